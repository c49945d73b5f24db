import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { type Employee, type PayRate } from '@brakeven/contract';
import { EmptyState, LoadingSkeleton, PageHeader } from '@brakeven/ui';
import { todayIn } from '@brakeven/values';
import { type Observable } from 'rxjs';
import { PeopleApi } from '../api/people-api';
import { toProblemSentence } from '../api/problem-text';
import { confirm } from '../forms/confirm-dialog';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { EmployeeDialog, type EmployeeDialogData } from './employee-dialog';
import { OverheadCard } from './overhead-card';
import { PayRateDialog, type PayRateDialogData } from './pay-rate-dialog';
import { toEmployeeView } from './pay-rate-view';
import { type AliasOf, PeopleTable, type RateOf } from './people-table';

/** Everybody with wage, burden and loaded rate from each day on, and the shop's overhead. */
@Component({
  selector: 'app-people-page',
  imports: [EmptyState, LoadError, LoadingSkeleton, OverheadCard, PageHeader, PeopleTable, RouterLink],
  templateUrl: './people-page.html',
  styles: `
    .stack {
      display: grid;
      grid-template-columns: minmax(0, 1fr);
      gap: 16px;
    }
    .caution {
      max-width: 100ch;
      color: var(--ink-muted);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PeoplePage {
  private readonly api = inject(PeopleApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly notifier = inject(Notifier);
  private readonly rollup = inject(RollupStore);

  protected readonly employees = rxResource({ stream: () => this.api.listEmployees() });
  protected readonly today = computed(() => todayIn(this.session.shopFormat().timeZone));
  protected readonly canEdit = computed(() => this.session.can('people.edit'));
  protected readonly canSetUp = computed(() => this.session.can('setup.import'));
  protected readonly people = computed(() => {
    const { currency } = this.session.shopFormat();
    const employees = this.employees.hasValue() ? this.employees.value() : [];
    return [...employees].sort(byActiveThenNumber).map((one) => toEmployeeView(one, this.today(), currency));
  });

  protected add(): void {
    this.openEmployee(null);
  }

  protected openEmployee(employee: Employee | null): void {
    const data: EmployeeDialogData = { employee, today: this.today() };
    this.take(
      this.dialog
        .open<EmployeeDialog, EmployeeDialogData, Employee>(EmployeeDialog, { data, width: '520px' })
        .afterClosed(),
    );
  }

  protected openRate({ view, rate }: RateOf): void {
    const current = view.current ?? view.rates[0];
    const data: PayRateDialogData = { employee: view.employee, rate, current, today: this.today() };
    this.take(
      this.dialog
        .open<PayRateDialog, PayRateDialogData, Employee>(PayRateDialog, { data, width: '480px' })
        .afterClosed(),
    );
  }

  protected deleteRate(employee: Employee, rate: PayRate): void {
    const { validFrom, wagePerHour, burdenPercent } = rate;
    this.change(this.api.deletePayRate(employee.employeeId, rate.payRateId), 'Rate deleted.', () =>
      this.change(
        this.api.addPayRate(employee.employeeId, { validFrom, wagePerHour, burdenPercent }),
        'Rate put back.',
      ),
    );
  }

  protected forget({ employee, alias }: AliasOf): void {
    confirm(this.dialog, {
      title: `Forget “${alias.spelling}”?`,
      text: [
        `The next timesheet that writes it is asked about again. Hours already booked stay with ${employee.name}.`,
      ],
      action: 'Forget',
    }).subscribe((isConfirmed) => {
      if (!isConfirmed) return;
      this.change(this.api.deleteAlias(alias.aliasId), `“${alias.spelling}” is forgotten.`);
    });
  }

  private take(closed: Observable<Employee | undefined>): void {
    closed.subscribe((employee) => {
      if (employee) this.reload();
    });
  }

  private change(answer: Observable<unknown>, done: string, undo?: () => void): void {
    answer.subscribe({
      next: () => {
        this.notifier.say(done, undo);
        this.reload();
      },
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private reload(): void {
    this.employees.reload();
    void this.rollup.refresh();
  }
}

function byActiveThenNumber(a: Employee, b: Employee): number {
  return Number(b.isActive) - Number(a.isActive) || a.number.localeCompare(b.number, 'en', { numeric: true });
}
