import { TestBed } from '@angular/core/testing';
import { Notices } from './notices';
import { Notifier } from './notifier';

describe('notices', () => {
  let notifier: Notifier;

  beforeEach(() => {
    jest.useFakeTimers();
    notifier = TestBed.inject(Notifier);
  });

  afterEach(() => jest.useRealTimers());

  it('go by themselves, but not while somebody is at them', () => {
    notifier.say('Entry voided.', () => undefined);
    notifier.pause();
    jest.advanceTimersByTime(60_000);
    expect(notifier.notice()?.text).toBe('Entry voided.');
    notifier.resume();
    jest.advanceTimersByTime(60_000);
    expect(notifier.notice()).toBeNull();
  });

  it('about problems stay until they are closed', () => {
    notifier.warn('The server cannot be reached.');
    notifier.resume();
    jest.advanceTimersByTime(600_000);
    expect(notifier.notice()?.tone).toBe('problem');
    notifier.close();
    expect(notifier.notice()).toBeNull();
  });

  it('offer to undo, once', () => {
    let undone = 0;
    notifier.say('Entry voided.', () => undone++);
    const fixture = TestBed.createComponent(Notices);
    fixture.detectChanges();
    const element = fixture.nativeElement as HTMLElement;
    expect(element.querySelector('[aria-live=polite]')?.textContent).toContain('Entry voided.');
    element.querySelector<HTMLElement>('.action')?.click();
    fixture.detectChanges();
    expect(undone).toBe(1);
    expect(element.querySelector('.notice')).toBeNull();
  });
});
