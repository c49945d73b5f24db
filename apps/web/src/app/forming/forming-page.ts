import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { type Permission } from '@brakeven/contract';
import { LoadingSkeleton, PageHeader } from '@brakeven/ui';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { FormingCaution } from './forming-caution';
import { FormingStore } from './forming-store';

interface FormingPart {
  path: string;
  label: string;
  permission: Permission;
}

const PARTS: readonly FormingPart[] = [
  { path: 'fit', label: 'Will it fit', permission: 'forming.use' },
  { path: 'depth', label: 'Ram depth', permission: 'forming.use' },
  { path: 'card', label: 'Card for the press', permission: 'forming.use' },
  { path: 'blank', label: 'Blank', permission: 'forming.use' },
  { path: 'runs', label: 'Press runs', permission: 'press-runs.log' },
  { path: 'setup-card', label: 'Set-up card', permission: 'press-runs.log' },
  { path: 'tooling', label: 'Dies and punches', permission: 'forming.use' },
];

/** The frame of Forming: its parts as links, the part chosen, and what must be said of all of them. */
@Component({
  selector: 'app-forming-page',
  imports: [
    FormingCaution,
    LoadError,
    LoadingSkeleton,
    PageHeader,
    RouterLink,
    RouterLinkActive,
    RouterOutlet,
  ],
  template: `
    <app-page-header title="Forming">
      Settle the bend before metal is cut. Angles are inside angles: 180° is flat, ‘turned’ is 180° minus it.
    </app-page-header>
    <nav aria-label="Parts of Forming">
      @for (part of parts(); track part.path) {
        <a
          #link
          [routerLink]="part.path"
          routerLinkActive="here"
          ariaCurrentWhenActive="page"
          (isActiveChange)="$event && show(link)"
          >{{ part.label }}</a
        >
      }
    </nav>
    <app-forming-caution />
    <div class="part">
      @if (store.reference.error(); as error) {
        <app-load-error [error]="error" (retried)="store.reload()" />
      } @else if (store.reference.hasValue()) {
        <router-outlet />
      } @else {
        <app-loading-skeleton [lines]="10" />
      }
    </div>
  `,
  styleUrl: './forming-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FormingPage {
  private readonly session = inject(SessionStore);
  protected readonly store = inject(FormingStore);
  protected readonly parts = computed(() => PARTS.filter(({ permission }) => this.session.can(permission)));

  /** On a telephone not all parts fit: the chosen one is scrolled to. */
  protected show(link: HTMLElement): void {
    const row = link.parentElement;
    if (row) row.scrollLeft = link.offsetLeft - row.offsetLeft - (row.clientWidth - link.offsetWidth) / 2;
  }
}
