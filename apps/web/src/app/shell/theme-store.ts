import { DOCUMENT, inject, Injectable, signal } from '@angular/core';

export const THEMES = ['system', 'light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];

const KEY = 'brakeven.theme';

/** Light, dark, or as the computer says; remembered in this browser. */
@Injectable({ providedIn: 'root' })
export class ThemeStore {
  private readonly document = inject(DOCUMENT);
  private readonly storage = this.document.defaultView?.localStorage;
  private readonly chosen = signal<Theme>(this.readChosen());
  readonly theme = this.chosen.asReadonly();

  /** Puts the theme on the page. */
  apply(): void {
    const theme = this.chosen();
    if (theme === 'system') delete this.document.documentElement.dataset['theme'];
    else this.document.documentElement.dataset['theme'] = theme;
  }

  choose(theme: Theme): void {
    this.chosen.set(theme);
    this.storage?.setItem(KEY, theme);
    this.apply();
  }

  private readChosen(): Theme {
    const kept = this.storage?.getItem(KEY);
    return THEMES.find((theme) => theme === kept) ?? 'system';
  }
}
