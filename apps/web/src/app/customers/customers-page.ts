import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { type Customer, type FigureRef } from '@brakeven/contract';
import { EmptyState, Figure, LoadingSkeleton, LocalDatePipe, PageHeader } from '@brakeven/ui';
import { CustomersApi } from '../api/customers-api';
import { LoadError } from '../shell/load-error';
import { RollupStore } from '../shell/rollup-store';

/** Whom the shop works for: what their jobs cost, what was invoiced, and what stands between. */
@Component({
  selector: 'app-customers-page',
  imports: [EmptyState, Figure, LoadError, LoadingSkeleton, LocalDatePipe, PageHeader, RouterLink],
  templateUrl: './customers-page.html',
  styleUrl: './customers-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CustomersPage {
  private readonly api = inject(CustomersApi);

  protected readonly customers = rxResource({ stream: () => this.api.list() });
  protected readonly rows = computed(() => (this.customers.hasValue() ? this.customers.value().items : []));

  constructor() {
    inject(RollupStore)
      .rolledUp.pipe(takeUntilDestroyed())
      .subscribe(() => this.customers.reload());
  }

  protected nameOf({ name }: Customer): string {
    return name ?? 'Jobs without a customer';
  }

  /** Of one row, or of all jobs. */
  protected ref(figure: FigureRef['figure'], row?: Customer): FigureRef {
    if (!row) return { figure };
    return row.customerId ? { figure, customerId: row.customerId } : { figure, without: 'customer' };
  }
}
