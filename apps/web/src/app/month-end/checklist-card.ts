import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type MonthEnd } from '@brakeven/contract';
import { InstantPipe, MoneyPipe } from '@brakeven/ui';
import { toGapAdvice } from '../payback/gap-text';
import { SessionStore } from '../session/session-store';
import { type CheckState, toChecks, toDayRanges } from './month-words';

const MARKS: Record<CheckState, { sign: string; word: string }> = {
  done: { sign: '✓', word: 'In order' },
  look: { sign: '!', word: 'To look at' },
  stops: { sign: '✕', word: 'Stops the close' },
};

/** What is missing in a month, each item with what it is about and the way to where it is mended. */
@Component({
  selector: 'app-checklist-card',
  imports: [InstantPipe, MoneyPipe, RouterLink],
  templateUrl: './checklist-card.html',
  styleUrl: './checklist-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ChecklistCard {
  private readonly session = inject(SessionStore);

  readonly month = input.required<MonthEnd>();
  readonly isRollingUp = input(false);
  readonly reviewed = output<{ importId: string; isReviewed: boolean }>();
  readonly rolledUp = output();

  protected readonly marks = MARKS;
  protected readonly toDayRanges = toDayRanges;
  protected readonly checks = computed(() => toChecks(this.month()));
  protected readonly list = computed(() => this.month().checklist);
  /** Somebody who may not see machines is told who may. */
  protected readonly gaps = computed(() =>
    this.list().gaps.map((gap) => {
      const advice = toGapAdvice(gap);
      const isAllowed = advice.path !== '/machines' || this.session.can('machines.view');
      return { ...advice, isAllowed };
    }),
  );
  protected readonly canRollUp = computed(() => this.session.can('rollup.run'));
}
