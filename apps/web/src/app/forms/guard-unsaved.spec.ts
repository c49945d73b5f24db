import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MatDialog } from '@angular/material/dialog';
import { firstValueFrom, type Observable, of } from 'rxjs';
import { guardUnsaved } from './guard-unsaved';

@Component({ template: '', changeDetection: ChangeDetectionStrategy.OnPush })
class Page {
  isDirty = false;
  readonly canLeave = guardUnsaved(() => this.isDirty, 'The sketch is not saved.');
}

describe('guardUnsaved', () => {
  const open = jest.fn();
  let isConfirmed = false;

  beforeEach(() => {
    open.mockReset().mockImplementation(() => ({ afterClosed: () => of(isConfirmed) }));
    TestBed.configureTestingModule({ providers: [{ provide: MatDialog, useValue: { open } }] });
  });

  const closeTab = () => {
    const event = new Event('beforeunload', { cancelable: true });
    window.dispatchEvent(event);
    return event.defaultPrevented ? 'asked' : 'closed';
  };

  it('lets a page go that has nothing unsaved', () => {
    const page = TestBed.createComponent(Page).componentInstance;
    expect(page.canLeave()).toBe(true);
    expect(closeTab()).toBe('closed');
    expect(open).not.toHaveBeenCalled();
  });

  it.each([true, false])('asks before unsaved work is left, and does as it is told: %s', async (answer) => {
    isConfirmed = answer;
    const page = TestBed.createComponent(Page).componentInstance;
    page.isDirty = true;
    expect(await firstValueFrom(page.canLeave() as Observable<boolean>)).toBe(answer);
    expect(open.mock.calls[0]?.[1]).toMatchObject({ data: { text: ['The sketch is not saved.'] } });
    expect(closeTab()).toBe('asked');
  });

  it('stops asking once the page is gone', () => {
    const fixture = TestBed.createComponent(Page);
    fixture.componentInstance.isDirty = true;
    fixture.destroy();
    expect(closeTab()).toBe('closed');
  });
});
