import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { type MachineRecovery } from '@brakeven/contract';
import { RULES } from '@brakeven/costing';
import { EmptyState, HoursPipe, LoadingSkeleton, LocalDatePipe, MoneyPipe } from '@brakeven/ui';
import { addDays, addYears, D, formatMoney, startOfMonth, toLocalDate } from '@brakeven/values';
import { MachinesApi } from '../api/machines-api';
import { LoadError } from '../shell/load-error';

const PERIODS = [
  { id: 'months', label: 'Three months' },
  { id: 'year', label: 'This year' },
  { id: 'twelve', label: 'Last 12 months' },
] as const;
type PeriodId = (typeof PERIODS)[number]['id'];

/** Whether the hours that a machine really ran have carried its fixed cost, planned hours beside actual ones. */
@Component({
  selector: 'app-recovery-card',
  imports: [EmptyState, HoursPipe, LoadError, LoadingSkeleton, LocalDatePipe, MoneyPipe],
  templateUrl: './recovery-card.html',
  styleUrl: './recovery-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RecoveryCard {
  readonly machineId = input.required<string>();
  readonly today = input.required<string>();
  readonly currency = input('USD');
  /** Another number after rates have changed: it is asked for anew. */
  readonly round = input(0);

  private readonly api = inject(MachinesApi);
  protected readonly periods = PERIODS;
  protected readonly rules = RULES;
  protected readonly period = signal<PeriodId>('year');
  protected readonly recovery = rxResource({
    params: () => ({
      machineId: this.machineId(),
      round: this.round(),
      ...toDays(this.period(), this.today()),
    }),
    stream: ({ params }) => this.api.getRecovery(params.machineId, params.from, params.to),
  });
  protected readonly verdict = computed(() =>
    this.recovery.hasValue() ? toRecoverySentence(this.recovery.value(), this.currency()) : '',
  );
  /** Actual hours as a share of the planned ones, for the picture: at most twice. */
  protected readonly shares = computed(() => {
    if (!this.recovery.hasValue()) return { planned: 0, actual: 0 };
    const { plannedHours, actualHours } = this.recovery.value();
    const most = Math.max(Number(plannedHours), Number(actualHours), 1e-9);
    return { planned: (Number(plannedHours) / most) * 100, actual: (Number(actualHours) / most) * 100 };
  });
}

/** What the recovery comes to, in a sentence. */
export function toRecoverySentence({ outcome, difference }: MachineRecovery, currency: string): string {
  const amount = formatMoney(D(difference).abs().toFixed(2), currency);
  if (outcome === 'even') return 'The hours run have carried the fixed cost exactly.';
  return outcome === 'over'
    ? `Over-recovered: the hours run have carried ${amount} more than the machine’s fixed cost.`
    : `Under-recovered: ${amount} of the machine’s fixed cost has not been carried by hours run.`;
}

function toDays(period: PeriodId, day: string): { from: string; to: string } {
  const today = toLocalDate(day);
  if (period === 'year') return { from: `${day.slice(0, 4)}-01-01`, to: day };
  if (period === 'twelve') return { from: addDays(addYears(today, -1), 1), to: day };
  const before = startOfMonth(addDays(startOfMonth(addDays(startOfMonth(today), -1)), -1));
  return { from: before, to: day };
}
