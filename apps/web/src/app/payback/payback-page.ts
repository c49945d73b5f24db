import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Router, RouterLink } from '@angular/router';
import {
  Chart,
  type ChartPalette,
  EmptyState,
  ErrorState,
  Figure,
  ForcePipe,
  LengthPipe,
  LoadingSkeleton,
  LocalDatePipe,
  PageHeader,
  SHOP_FORMAT,
  StatusTag,
} from '@brakeven/ui';
import { formatMoney, todayIn } from '@brakeven/values';
import { map } from 'rxjs';
import { MachinesApi } from '../api/machines-api';
import { PaybackApi } from '../api/payback-api';
import { toShownProblem } from '../api/problem-text';
import { RollupStore } from '../shell/rollup-store';
import { chooseMachine, listPaybackMachines } from './choose-machine';
import { CostCard } from './cost-card';
import { toGapAdvice } from './gap-text';
import { toPaybackRef } from './payback-refs';
import { MonthCard } from './month-card';
import { toPaybackChartOption, toPaybackTable } from './payback-chart-option';
import { TopJobsCard } from './top-jobs-card';
import { findEarlyCaution, findVerdictState, toChartSummary, toPaceWindow } from './verdict';

/** Has the machine paid for itself, and when will it: the verdict first, then what it rests on. */
@Component({
  selector: 'app-payback-page',
  imports: [
    Chart,
    CostCard,
    EmptyState,
    ErrorState,
    Figure,
    ForcePipe,
    LengthPipe,
    LoadingSkeleton,
    LocalDatePipe,
    MonthCard,
    PageHeader,
    RouterLink,
    StatusTag,
    TopJobsCard,
  ],
  templateUrl: './payback-page.html',
  styleUrl: './payback-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PaybackPage {
  private readonly paybackApi = inject(PaybackApi);
  private readonly machinesApi = inject(MachinesApi);
  private readonly router = inject(Router);
  private readonly format = inject(SHOP_FORMAT);

  /** Code of the machine, from the address. */
  readonly machine = input<string>();

  private readonly machineList = rxResource({
    stream: () => this.machinesApi.list().pipe(map(listPaybackMachines)),
  });
  protected readonly machines = computed(() =>
    this.machineList.hasValue() ? this.machineList.value() : null,
  );
  protected readonly chosen = computed(() => chooseMachine(this.machines() ?? [], this.machine()));

  private readonly answer = rxResource({
    params: () => this.chosen()?.machineId,
    stream: ({ params: machineId }) => this.paybackApi.getPayback(machineId),
  });
  protected readonly payback = computed(() => (this.answer.hasValue() ? this.answer.value() : null));
  protected readonly problem = computed(() => {
    const error = this.machineList.error() ?? this.answer.error();
    return error ? toShownProblem(error) : null;
  });

  protected readonly state = computed(() => {
    const payback = this.payback();
    return payback && findVerdictState(payback);
  });
  protected readonly paceWindow = computed(() => toPaceWindow(this.payback()?.paceDays ?? 0));
  protected readonly caution = computed(() => {
    const payback = this.payback();
    return payback && findEarlyCaution(payback);
  });
  protected readonly refs = computed(() => {
    const machineId = this.payback()?.machine.machineId ?? '';
    return {
      outlay: toPaybackRef('payback.outlay', machineId),
      earnedBack: toPaybackRef('payback.earnedBack', machineId),
      remaining: toPaybackRef('payback.remaining', machineId),
      pace: toPaybackRef('payback.pacePerWeek', machineId),
    };
  });
  protected readonly gaps = computed(() => this.payback()?.gaps.map(toGapAdvice) ?? []);

  protected readonly buildChart = computed(() => {
    const payback = this.payback();
    const { currency, timeZone } = this.format();
    return (palette: ChartPalette) =>
      payback ? toPaybackChartOption({ payback, currency, today: todayIn(timeZone) }, palette) : {};
  });
  protected readonly chartTable = computed(() => {
    const payback = this.payback();
    return payback ? toPaybackTable(payback) : { headers: [], rows: [] };
  });
  protected readonly chartSummary = computed(() => {
    const payback = this.payback();
    return payback ? toChartSummary(payback, this.formatAmount) : '';
  });

  constructor() {
    inject(RollupStore)
      .rolledUp.pipe(takeUntilDestroyed())
      .subscribe(() => this.answer.reload());
  }

  protected chooseMachine(code: string): void {
    void this.router.navigate([], { queryParams: { machine: code } });
  }

  protected retry(): void {
    if (this.machineList.error()) this.machineList.reload();
    else this.answer.reload();
  }

  private readonly formatAmount = (amount: string): string => formatMoney(amount, this.format().currency);
}
