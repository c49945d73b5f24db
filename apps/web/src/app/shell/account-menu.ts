import {
  ChangeDetectionStrategy,
  Component,
  computed,
  type ElementRef,
  inject,
  viewChild,
} from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { toProblemSentence } from '../api/problem-text';
import { SessionStore } from '../session/session-store';
import { Notifier } from './notifier';
import { type Theme, THEMES, ThemeStore } from './theme-store';

const THEME_WORDS: Readonly<Record<Theme, string>> = {
  system: 'As the computer',
  light: 'Light',
  dark: 'Dark',
};

/** Behind the initials: own account, light or dark, sign out. */
@Component({
  selector: 'app-account-menu',
  imports: [RouterLink],
  templateUrl: './account-menu.html',
  styleUrl: './account-menu.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountMenu {
  private readonly session = inject(SessionStore);
  private readonly notifier = inject(Notifier);
  private readonly router = inject(Router);
  protected readonly themeStore = inject(ThemeStore);
  private readonly panel = viewChild.required<ElementRef<HTMLElement>>('panel');

  protected readonly user = this.session.user;
  protected readonly initials = computed(() => toInitials(this.user()?.name ?? ''));
  protected readonly themes = THEMES.map((theme) => ({ theme, word: THEME_WORDS[theme] }));

  protected close(): void {
    this.panel().nativeElement.hidePopover();
  }

  protected async signOut(): Promise<void> {
    try {
      await this.session.signOut();
      await this.router.navigateByUrl('/sign-in');
    } catch (error) {
      this.notifier.warn(toProblemSentence(error));
    }
  }
}

/** First letters of the first and the last word of a name. */
export function toInitials(name: string): string {
  const words = name.split(/\s+/).filter(Boolean);
  const letters = [words[0], words.length > 1 ? words.at(-1) : undefined];
  return letters
    .map((word) => (word ? [...word][0] : ''))
    .join('')
    .toUpperCase();
}
