import { ChangeDetectionStrategy, Component, input, output, signal } from '@angular/core';
import { type Employee, type PayRate } from '@brakeven/contract';
import { LocalDatePipe, RatePipe, StatusTag } from '@brakeven/ui';
import { formatPercent } from '@brakeven/values';
import { type EmployeeView } from './pay-rate-view';

export interface RateOf {
  view: EmployeeView;
  /** Null for a new rate. */
  rate: PayRate | null;
}

export interface AliasOf {
  employee: Employee;
  alias: Employee['aliases'][number];
}

/** Everybody with what an hour costs today; a row opens into the rates of all days and the spellings. */
@Component({
  selector: 'app-people-table',
  imports: [LocalDatePipe, RatePipe, StatusTag],
  templateUrl: './people-table.html',
  styleUrl: './people-table.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PeopleTable {
  readonly people = input.required<readonly EmployeeView[]>();
  readonly canEdit = input(false);
  readonly edited = output<Employee>();
  readonly rateEdited = output<RateOf>();
  readonly rateDeleted = output<{ employee: Employee; rate: PayRate }>();
  readonly aliasForgotten = output<AliasOf>();

  private readonly opened = signal<ReadonlySet<string>>(new Set());
  protected readonly formatPercent = (percent: string) => formatPercent(percent);

  protected isOpen(employeeId: string): boolean {
    return this.opened().has(employeeId);
  }

  protected toggle(employeeId: string): void {
    this.opened.update((opened) => {
      const next = new Set(opened);
      if (!next.delete(employeeId)) next.add(employeeId);
      return next;
    });
  }
}
