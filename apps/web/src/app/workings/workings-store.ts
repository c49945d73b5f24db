import { computed, inject, Injectable, signal } from '@angular/core';
import { type FigureRef, type Workings } from '@brakeven/contract';
import { type WorkingsOpener } from '@brakeven/ui';
import { type Subscription } from 'rxjs';
import { type ShownProblem, toShownProblem } from '../api/problem-text';
import { WorkingsApi } from '../api/workings-api';

/** The figures opened one out of the other, and the workings of the topmost. */
@Injectable({ providedIn: 'root' })
export class WorkingsStore implements WorkingsOpener {
  private readonly api = inject(WorkingsApi);
  private readonly stack = signal<readonly FigureRef[]>([]);
  private readonly loaded = signal<Workings | null>(null);
  private readonly failed = signal<ShownProblem | null>(null);
  private readonly busy = signal(false);
  private request: Subscription | undefined;

  readonly isOpen = computed(() => this.stack().length > 0);
  readonly canGoBack = computed(() => this.stack().length > 1);
  readonly workings = this.loaded.asReadonly();
  readonly problem = this.failed.asReadonly();
  readonly isLoading = this.busy.asReadonly();

  open(ref: FigureRef): void {
    this.stack.update((refs) => [...refs, ref]);
    this.reload();
  }

  back(): void {
    this.stack.update((refs) => refs.slice(0, -1));
    if (this.isOpen()) this.reload();
    else this.close();
  }

  close(): void {
    this.request?.unsubscribe();
    this.stack.set([]);
    this.loaded.set(null);
    this.failed.set(null);
    this.busy.set(false);
  }

  reload(): void {
    this.loaded.set(null);
    this.fetch((workings) => workings);
  }

  /** Adds the next page of lines to those shown. */
  loadMore(): void {
    const shown = this.loaded();
    if (!shown?.nextCursor || this.busy()) return;
    this.fetch((next) => ({ ...next, lines: [...shown.lines, ...next.lines] }), shown.nextCursor);
  }

  private fetch(merge: (workings: Workings) => Workings, cursor?: string): void {
    const ref = this.stack().at(-1);
    if (!ref) return;
    this.request?.unsubscribe();
    this.failed.set(null);
    this.busy.set(true);
    this.request = this.api.getWorkings(ref, cursor).subscribe({
      next: (workings) => this.loaded.set(merge(workings)),
      error: (error: unknown) => {
        this.failed.set(toShownProblem(error));
        this.busy.set(false);
      },
      complete: () => this.busy.set(false),
    });
  }
}
