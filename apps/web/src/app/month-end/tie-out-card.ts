import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { type FigureRef, type MonthTieOut } from '@brakeven/contract';
import { EmptyState, Figure } from '@brakeven/ui';
import { D, hoursText, parseHoursText, sum, toHours } from '@brakeven/values';

/** Hours of payroll as typed for an employee. */
export interface PayrollEntry {
  employeeId: string;
  hours: string | null;
}

/** Problems of the fields, by employee. */
export type PayrollProblems = Readonly<Record<string, string>>;

/** Hours of the month by employee: timesheets, cost lines, and payroll's, which are typed in here and kept at once. */
@Component({
  selector: 'app-tie-out-card',
  imports: [EmptyState, Figure],
  templateUrl: './tie-out-card.html',
  styleUrl: './tie-out-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TieOutCard {
  readonly rows = input.required<readonly MonthTieOut[]>();
  /** The month's first and last day. */
  readonly from = input.required<string>();
  readonly to = input.required<string>();
  readonly problems = input<PayrollProblems>({});
  readonly canEdit = input(false);
  readonly saved = output<PayrollEntry>();
  readonly refused = output<{ employeeId: string; message: string }>();

  protected readonly totals = computed(() => ({
    hours: total(this.rows(), ({ hours }) => hours),
    overtimeHours: total(this.rows(), ({ overtimeHours }) => overtimeHours),
    costedHours: total(this.rows(), ({ costedHours }) => costedHours),
    payrollHours: total(this.rows(), ({ payrollHours }) => payrollHours),
    difference: total(this.rows(), ({ difference }) => difference),
  }));
  protected readonly hasPayroll = computed(() =>
    this.rows().some(({ payrollHours }) => payrollHours !== null),
  );
  /** A sum of differences says nothing while somebody's hours are missing. */
  protected readonly isWhole = computed(() =>
    this.rows().every(({ payrollHours, hours }) => payrollHours !== null || D(hours).isZero()),
  );

  protected save({ employeeId, payrollHours }: MonthTieOut, text: string): void {
    const typed = text.trim();
    if (typed === '') {
      if (payrollHours !== null) this.saved.emit({ employeeId, hours: null });
      return;
    }
    const parsed = parseHoursText(typed);
    if (!parsed.ok) return this.refused.emit({ employeeId, message: parsed.message });
    if (parsed.value.lt(0) || parsed.value.gt(744))
      return this.refused.emit({ employeeId, message: 'A month has from 0 to 744 hours.' });
    const hours = hoursText(parsed.value);
    if (hours !== payrollHours || this.problems()[employeeId]) this.saved.emit({ employeeId, hours });
  }

  /** Of one employee, or of all. */
  protected ref(figure: FigureRef['figure'], row?: MonthTieOut): FigureRef {
    return { figure, from: this.from(), to: this.to(), ...(row && { employeeId: row.employeeId }) };
  }

  protected isOff(difference: string | null): boolean {
    return difference !== null && !D(difference).isZero();
  }

  /** Hours worked that are neither in the costs nor missing a wage: the rollup is behind. */
  protected isUncosted({ hours, costedHours }: MonthTieOut): boolean {
    return !D(hours).eq(D(costedHours));
  }

  /** As it is typed: '168.5', not '168.5000'. */
  protected toFieldText(hours: string | null): string {
    return hours === null ? '' : D(hours).toFixed();
  }
}

function total(rows: readonly MonthTieOut[], of: (row: MonthTieOut) => string | null): string {
  return hoursText(sum(rows.flatMap((row) => toHours(of(row) ?? '0'))));
}
