import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  linkedSignal,
  signal,
} from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import { type MonthEnd } from '@brakeven/contract';
import { EmptyState, InstantPipe, LoadingSkeleton, LocalDatePipe, PageHeader, StatusTag } from '@brakeven/ui';
import { formatMonth } from '@brakeven/values';
import { filter, type Observable, switchMap } from 'rxjs';
import { MonthsApi } from '../api/months-api';
import { toProblemSentence, toShownProblem } from '../api/problem-text';
import { confirm } from '../forms/confirm-dialog';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { ChecklistCard } from './checklist-card';
import { LateLinesCard } from './late-lines-card';
import { canClose, chooseMonth, STATE_WORDS, toChecks, toVerdict } from './month-words';
import { MonthTotalsCard } from './month-totals-card';
import { ReopenDialog } from './reopen-dialog';
import { type PayrollEntry, type PayrollProblems, TieOutCard } from './tie-out-card';

/** Month end: what is missing, hours against payroll, what the books come to, and the close. */
@Component({
  selector: 'app-month-end-page',
  imports: [
    ChecklistCard,
    EmptyState,
    InstantPipe,
    LateLinesCard,
    LoadError,
    LoadingSkeleton,
    LocalDatePipe,
    MonthTotalsCard,
    PageHeader,
    RouterLink,
    StatusTag,
    TieOutCard,
  ],
  templateUrl: './month-end-page.html',
  styleUrl: './month-end-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MonthEndPage {
  /** YYYY-MM in the address; absent for the one to look at first. */
  readonly month = input<string>();

  private readonly api = inject(MonthsApi);
  private readonly session = inject(SessionStore);
  private readonly rollup = inject(RollupStore);
  private readonly notifier = inject(Notifier);
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);

  protected readonly months = rxResource({ stream: () => this.api.list() });
  protected readonly chosen = computed(
    () => this.month() ?? (this.months.hasValue() ? chooseMonth(this.months.value()) : null) ?? undefined,
  );
  protected readonly end = rxResource({
    params: () => this.chosen(),
    stream: ({ params }) => this.api.get(params),
  });
  /** What was shown last, while it is fetched again: the page keeps its place. */
  protected readonly shown = linkedSignal<MonthEnd | undefined, MonthEnd | undefined>({
    source: () => (this.end.hasValue() ? this.end.value() : undefined),
    computation: (now, before) => now ?? (before?.value?.month === this.chosen() ? before?.value : undefined),
  });
  protected readonly problems = signal<PayrollProblems>({});
  protected readonly isWorking = signal(false);
  protected readonly isRollingUp = this.rollup.isRunning;

  protected readonly verdict = computed(() => whole(this.shown(), toVerdict) ?? 'Month end');
  protected readonly canCloseNow = computed(() => whole(this.shown(), canClose) ?? false);
  protected readonly mayClose = computed(() => this.session.can('months.close'));
  protected readonly mayReopen = computed(() => this.session.can('months.reopen'));
  protected readonly words = STATE_WORDS;
  protected readonly nameOf = formatMonth;

  constructor() {
    this.rollup.rolledUp.pipe(takeUntilDestroyed()).subscribe(() => this.end.reload());
    effect(() => {
      this.chosen();
      this.problems.set({});
    });
  }

  protected close(month: MonthEnd): void {
    const name = formatMonth(month.month);
    const left = toChecks(month).filter(({ state, check }) => state === 'look' && check !== 'rollup');
    confirm(this.dialog, {
      title: `Close ${name}?`,
      text: [
        `What is posted through ${name} stays as it is from then on. What comes late for it is posted in the next month and marked late.`,
        ...(left.length > 0
          ? [`Left to look at: ${left.map(({ title }) => title.toLowerCase()).join(', ')}.`]
          : []),
      ],
      action: `Close ${name}`,
      tone: 'primary',
    })
      .pipe(
        filter(Boolean),
        switchMap(() => {
          this.isWorking.set(true);
          return this.api.close(month.month);
        }),
      )
      .subscribe(this.takeIn(`${name} is closed.`));
  }

  protected reopen(month: MonthEnd): void {
    this.dialog
      .open<ReopenDialog, string, MonthEnd>(ReopenDialog, { data: month.month, width: '480px' })
      .afterClosed()
      .pipe(filter((reopened) => reopened !== undefined))
      .subscribe(this.takeIn(`${formatMonth(month.month)} is open again.`));
  }

  protected review({ importId, isReviewed }: { importId: string; isReviewed: boolean }): void {
    this.api.reviewRefusals(importId, isReviewed).subscribe({
      next: () => {
        this.end.reload();
        const undo = () => this.review({ importId, isReviewed: !isReviewed });
        this.notifier.say(isReviewed ? 'Marked as reviewed.' : 'Not reviewed after all.', undo);
      },
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  protected rollUp(): void {
    void this.rollup.run();
  }

  protected savePayroll(month: string, { employeeId, hours }: PayrollEntry): void {
    this.api.savePayrollHours(month, employeeId, hours).subscribe({
      next: (row) => {
        this.noteProblem(employeeId, null);
        this.shown.update(
          (end) =>
            end && { ...end, tieOut: end.tieOut.map((one) => (one.employeeId === employeeId ? row : one)) },
        );
      },
      error: (error: unknown) => {
        const { issues, text } = toShownProblem(error);
        this.noteProblem(employeeId, issues[0]?.message ?? text);
      },
    });
  }

  protected noteProblem(employeeId: string, message: string | null): void {
    this.problems.update(({ [employeeId]: _, ...others }) =>
      message === null ? others : { ...others, [employeeId]: message },
    );
  }

  protected show(month: string): void {
    void this.router.navigate(['/month-end', month]);
  }

  private takeIn(done: string): Partial<Parameters<Observable<MonthEnd>['subscribe']>[0]> & object {
    return {
      next: (end: MonthEnd) => {
        this.isWorking.set(false);
        this.shown.set(end);
        // By its own address: without one, the page would go on to the next month to be closed.
        this.show(end.month);
        this.months.reload();
        void this.rollup.refresh();
        this.notifier.say(done);
      },
      error: (error: unknown) => {
        this.isWorking.set(false);
        this.end.reload();
        this.notifier.warn(toProblemSentence(error));
      },
    };
  }
}

function whole<T>(month: MonthEnd | undefined, of: (month: MonthEnd) => T): T | undefined {
  return month && of(month);
}
