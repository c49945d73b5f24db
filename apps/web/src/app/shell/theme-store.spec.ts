import { TestBed } from '@angular/core/testing';
import { ThemeStore } from './theme-store';

describe('ThemeStore', () => {
  beforeEach(() => {
    localStorage.clear();
    delete document.documentElement.dataset['theme'];
  });

  it('follows the computer until something is chosen', () => {
    const store = TestBed.inject(ThemeStore);
    store.apply();
    expect(store.theme()).toBe('system');
    expect(document.documentElement.dataset['theme']).toBeUndefined();
  });

  it('remembers the choice, and lets it go again', () => {
    TestBed.inject(ThemeStore).choose('dark');
    expect(document.documentElement.dataset['theme']).toBe('dark');

    TestBed.resetTestingModule();
    const later = TestBed.inject(ThemeStore);
    expect(later.theme()).toBe('dark');
    later.choose('system');
    expect(document.documentElement.dataset['theme']).toBeUndefined();
  });

  it('takes a word it does not know as no choice', () => {
    localStorage.setItem('brakeven.theme', 'sepia');
    expect(TestBed.inject(ThemeStore).theme()).toBe('system');
  });
});
