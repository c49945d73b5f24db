import { computed, DOCUMENT, inject, Injectable, signal } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { type SavedView, type ViewState } from '@brakeven/contract';
import { type GridOrder } from '@brakeven/ui';
import { catchError, of } from 'rxjs';
import { toShownProblem } from '../api/problem-text';
import { SavedViewsApi } from '../api/saved-views-api';
import { SessionStore } from '../session/session-store';
import { injectIsNarrow } from '../shell/is-narrow';
import { Notifier } from '../shell/notifier';
import { type JobView, toBuiltInViews, toOwnView } from './job-views';

const COLUMNS_KEY = 'brakeven.jobs.shown';

/** Which columns and order the jobs are shown in, and the views that can be chosen. */
@Injectable()
export class JobViewsStore {
  private readonly api = inject(SavedViewsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly notifier = inject(Notifier);
  private readonly storage = inject(DOCUMENT).defaultView?.localStorage;

  private readonly withMoney = this.session.can('jobs.money');
  private readonly saved = signal<readonly SavedView[]>([]);
  private readonly builtIn = toBuiltInViews(this.withMoney, injectIsNarrow());
  private readonly standard = this.builtIn[0]?.state.columns ?? [];

  readonly isReady = signal(false);
  readonly columns = signal<readonly string[]>(this.readColumns());
  readonly order = signal<GridOrder>({ sort: 'lastWorkedOn', direction: 'desc' });
  /** The order that the grid begins with. */
  readonly openingOrder = signal<GridOrder>(this.order());
  /** Id of the view that was chosen last; what is changed after that is not saved by itself. */
  readonly chosenId = signal('standard');
  readonly views = computed<readonly JobView[]>(() => [
    ...this.builtIn,
    ...this.saved().map((view) => toOwnView(view, this.withMoney)),
  ]);
  readonly chosen = computed(() => this.views().find(({ id }) => id === this.chosenId()) ?? null);
  /** The order, if its column is shown. */
  readonly shownOrder = computed(() => (this.columns().includes(this.order().sort) ? this.order() : null));

  /** Loads the own views; `open` is given the one that the page opens with, if there is one. */
  load(open: (view: JobView) => void): void {
    // Without them the views that come with the product can still be chosen.
    this.api
      .listSavedViews('jobs')
      .pipe(catchError(() => of([])))
      .subscribe((saved) => {
        this.saved.set(saved);
        const first = saved.find(({ isDefault }) => isDefault);
        if (first) {
          const view = toOwnView(first, this.withMoney);
          this.choose(view);
          open(view);
        }
        this.openingOrder.set(this.order());
        this.isReady.set(true);
      });
  }

  choose({ id, state }: JobView): void {
    this.chosenId.set(id);
    this.setColumns(state.columns);
    if (state.sort) this.order.set({ sort: state.sort, direction: state.direction });
  }

  setColumns(columns: readonly string[]): void {
    if (columns.join() === this.columns().join()) return;
    this.columns.set(columns);
    this.storage?.setItem(COLUMNS_KEY, JSON.stringify(columns));
  }

  setOrder(order: GridOrder): void {
    this.order.set(order);
  }

  async save(filter: Record<string, string>): Promise<void> {
    const { SaveViewDialog } = await import('./save-view-dialog');
    const own = this.saved().find(({ savedViewId }) => savedViewId === this.chosenId());
    const state: ViewState = { columns: [...this.columns()], ...this.order(), filter };
    this.dialog
      .open<unknown, unknown, SavedView>(SaveViewDialog, {
        data: { name: own?.name ?? '', isDefault: own?.isDefault ?? false, state },
        width: '460px',
      })
      .afterClosed()
      .subscribe((view) => {
        if (!view) return;
        this.notifier.say(`View ‘${view.name}’ saved.`);
        this.chosenId.set(view.savedViewId);
        this.reload();
      });
  }

  /** Removes the own view that is chosen; what is shown stays, and the view can be brought back. */
  remove(): void {
    const own = this.saved().find(({ savedViewId }) => savedViewId === this.chosenId());
    if (!own) return;
    const { savedViewId, name, isDefault, state } = own;
    this.api.deleteSavedView(savedViewId).subscribe({
      next: () => {
        this.chosenId.set('');
        this.reload();
        this.notifier.say(`View ‘${name}’ removed.`, () =>
          this.api.saveView({ page: 'jobs', name, isDefault, state }).subscribe({
            next: () => this.reload(),
            error: (error: unknown) => this.notifier.warn(toShownProblem(error).text),
          }),
        );
      },
      error: (error: unknown) => this.notifier.warn(toShownProblem(error).text),
    });
  }

  private reload(): void {
    this.api
      .listSavedViews('jobs')
      .pipe(catchError(() => of(this.saved())))
      .subscribe((saved) => this.saved.set(saved));
  }

  /** Columns as they were left in this browser; what cannot be read is as if nothing had been kept. */
  private readColumns(): readonly string[] {
    try {
      const kept: unknown = JSON.parse(this.storage?.getItem(COLUMNS_KEY) ?? 'null');
      const isList = Array.isArray(kept) && kept.length > 0 && kept.every((id) => typeof id === 'string');
      return isList ? (kept as string[]) : this.standard;
    } catch {
      return this.standard;
    }
  }
}
