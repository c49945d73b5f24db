import { ChangeDetectionStrategy, Component, computed, inject, input, viewChild } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import { type CustomerDetail, type FigureRef, type Job, type JobListQuery } from '@brakeven/contract';
import {
  EmptyState,
  Figure,
  Grid,
  LoadingSkeleton,
  LocalDatePipe,
  MoneyPipe,
  PageHeader,
  type PageSource,
  StatusTag,
} from '@brakeven/ui';
import { CustomersApi } from '../api/customers-api';
import { JobsApi } from '../api/jobs-api';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { CUSTOMER_JOB_COLUMNS } from './customer-job-columns';

/** One customer: what its jobs cost and brought, then the jobs and what was invoiced for them. */
@Component({
  selector: 'app-customer-page',
  imports: [
    EmptyState,
    Figure,
    Grid,
    LoadError,
    LoadingSkeleton,
    LocalDatePipe,
    MoneyPipe,
    PageHeader,
    RouterLink,
    StatusTag,
  ],
  templateUrl: './customer-page.html',
  styleUrl: './customers-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CustomerPage {
  private readonly api = inject(CustomersApi);
  private readonly jobs = inject(JobsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly notifier = inject(Notifier);
  private readonly router = inject(Router);
  private readonly grid = viewChild<Grid<Job>>(Grid);

  /** From the address. */
  readonly customerId = input.required<string>();

  protected readonly customer = rxResource({
    params: () => this.customerId(),
    stream: ({ params }) => this.api.get(params),
  });
  protected readonly canEdit = computed(() => this.session.can('jobs.edit'));

  protected readonly columns = CUSTOMER_JOB_COLUMNS;
  protected readonly order = { sort: 'number', direction: 'desc' } as const;
  protected readonly rowId = (job: Job): string => job.jobId;
  protected readonly source = computed<PageSource<Job>>(() => {
    const customerId = this.customerId();
    return {
      load: ({ cursor, sort, direction, limit }) =>
        this.jobs.listJobs({ customerId, cursor, sort: sort as JobListQuery['sort'], direction, limit }),
    };
  });

  constructor() {
    inject(RollupStore)
      .rolledUp.pipe(takeUntilDestroyed())
      .subscribe(() => {
        this.customer.reload();
        this.grid()?.refresh();
      });
  }

  protected ref(figure: FigureRef['figure']): FigureRef {
    return { figure, customerId: this.customerId() };
  }

  protected async rename(customer: CustomerDetail): Promise<void> {
    const { CustomerDialog } = await import('./customer-dialog');
    this.dialog
      .open<unknown, CustomerDetail, CustomerDetail>(CustomerDialog, { data: customer, width: '460px' })
      .afterClosed()
      .subscribe((saved) => {
        if (!saved) return;
        this.notifier.say(`${customer.name} is now ${saved.name}.`);
        this.customer.set(saved);
      });
  }

  protected openJob(url: string): void {
    void this.router.navigateByUrl(url);
  }
}
