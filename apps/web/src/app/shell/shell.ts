import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  type ElementRef,
  inject,
  viewChild,
} from '@angular/core';
import { NgTemplateOutlet } from '@angular/common';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { SHOP_FORMAT } from '@brakeven/ui';
import { filter, map, type Observable, pairwise, startWith } from 'rxjs';
import { SessionStore } from '../session/session-store';
import { WorkingsPanel } from '../workings/workings-panel';
import { WorkingsStore } from '../workings/workings-store';
import { AccountMenu } from './account-menu';
import { Mark } from './mark';
import { listNavigation } from './navigation';
import { RollupChip } from './rollup-chip';

/** The frame of every page: bar above, rail at the left (a drawer where it is narrow), the page, the workings. */
@Component({
  selector: 'app-shell',
  imports: [
    AccountMenu,
    Mark,
    NgTemplateOutlet,
    RollupChip,
    RouterLink,
    RouterLinkActive,
    RouterOutlet,
    WorkingsPanel,
  ],
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Shell {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);
  protected readonly workings = inject(WorkingsStore);
  private readonly drawer = viewChild.required<ElementRef<HTMLDialogElement>>('drawer');
  private readonly main = viewChild.required<ElementRef<HTMLElement>>('main');

  protected readonly shop = this.session.shop;
  protected readonly groups = computed(() => {
    const user = this.session.user();
    return user && !user.mustChangePassword ? listNavigation(user.role) : [];
  });
  /** Until a temporary password is changed the server answers nothing else. */
  protected readonly canSeeRollup = computed(
    () => this.session.can('rollup.view') && !this.session.user()?.mustChangePassword,
  );

  constructor() {
    const format = inject(SHOP_FORMAT);
    format.set(this.session.shopFormat());
    effect(() => format.set(this.session.shopFormat()));
    const destroyed = takeUntilDestroyed();
    afterNextRender(() =>
      this.pageChanges()
        .pipe(destroyed)
        .subscribe(() => this.leaveForPage()),
    );
  }

  protected openDrawer(): void {
    this.drawer().nativeElement.showModal();
  }

  protected closeDrawer(): void {
    this.drawer().nativeElement.close();
  }

  protected skipToPage(event: Event): void {
    event.preventDefault();
    this.main().nativeElement.focus();
  }

  /** Emits when another page opens; the same page with another question in its address is no other page. */
  private pageChanges(): Observable<unknown> {
    return this.router.events.pipe(
      filter((event) => event instanceof NavigationEnd),
      map((event) => event.urlAfterRedirects),
      startWith(this.router.url),
      map((url) => url.split(/[?#]/)[0]),
      pairwise(),
      filter(([before, after]) => before !== after),
    );
  }

  /** Keyboard and screen reader go on at the new page, not in the rail. */
  private leaveForPage(): void {
    this.workings.close();
    this.closeDrawer();
    this.main().nativeElement.focus({ preventScroll: true });
  }
}
