import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  type OnInit,
  signal,
  viewChild,
} from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatDialog } from '@angular/material/dialog';
import { Router } from '@angular/router';
import { type Job, type ViewState } from '@brakeven/contract';
import {
  ColumnChooser,
  EmptyState,
  Grid,
  type GridOrder,
  type GridTotals,
  LoadingSkeleton,
  type PageRequest,
  type PageSource,
  PageHeader,
} from '@brakeven/ui';
import { catchError, debounceTime, of, tap } from 'rxjs';
import { JobsApi } from '../api/jobs-api';
import { toQueryParams } from '../api/query-params';
import { SessionStore } from '../session/session-store';
import { RollupStore } from '../shell/rollup-store';
import { chooseColumns, type JobFilter, toJobColumns, toJobTotals } from './job-columns';
import { isJobStatus, JOB_STATUS_ORDER, toStatusWord } from './job-status';
import { type JobView } from './job-views';
import { JobViewsStore } from './job-views-store';
import { ViewPicker } from './view-picker';

const TYPING_PAUSE_MS = 300;
type FilterParams = Record<'search' | 'status' | 'customerId', string | null>;

/** All jobs: cost against estimate, income and margin, each figure with its workings. */
@Component({
  selector: 'app-jobs-page',
  imports: [ColumnChooser, EmptyState, Grid, LoadingSkeleton, PageHeader, ReactiveFormsModule, ViewPicker],
  providers: [JobViewsStore],
  templateUrl: './jobs-page.html',
  styleUrl: './jobs-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class JobsPage implements OnInit {
  private readonly api = inject(JobsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);
  protected readonly views = inject(JobViewsStore);
  private readonly grid = viewChild<Grid<Job>>(Grid);

  /** From the address, so that a filtered list can be sent to somebody. */
  readonly search = input<string>();
  readonly status = input<string>();
  readonly customerId = input<string>();

  protected readonly statuses = JOB_STATUS_ORDER;
  protected readonly toStatusWord = toStatusWord;
  protected readonly rowId = (job: Job): string => job.jobId;
  protected readonly hasMoney = computed(() => this.session.can('jobs.money'));
  protected readonly choices = computed(() =>
    toJobColumns(this.hasMoney()).map((column) => ({
      ...column,
      isFixed: column.id === 'number',
    })),
  );
  protected readonly columns = computed(() => chooseColumns(this.choices(), this.views.columns()));
  protected readonly canEdit = computed(() => this.session.can('jobs.edit'));
  protected readonly totals = signal<GridTotals | null>(null);
  protected readonly searchBox = new FormControl('', { nonNullable: true });
  // Without the list the other filters still work.
  protected readonly customers = toSignal(this.api.listCustomers().pipe(catchError(() => of([]))), {
    initialValue: [],
  });

  protected readonly filter = computed<JobFilter>(() => {
    const [search, status, customerId] = [this.search(), this.status(), this.customerId()];
    return {
      ...(search && { search }),
      ...(isJobStatus(status) && { status }),
      ...(customerId && { customerId }),
    };
  });
  protected readonly isFiltered = computed(() => Object.keys(this.filter()).length > 0);
  protected readonly source = computed<PageSource<Job>>(() => {
    const filter = this.filter();
    return { load: (request) => this.load(filter, request) };
  });
  /** The rows, columns and order that are shown, as the export takes them. */
  private readonly exportQuery = computed(() =>
    toQueryParams({
      ...this.filter(),
      ...this.views.order(),
      columns: this.columns()
        .map(({ id }) => id)
        .join(','),
    }).toString(),
  );
  protected readonly csvUrl = computed(() => `/api/exports/jobs.csv?${this.exportQuery()}`);
  protected readonly workbookUrl = computed(() => `/api/exports/jobs.xlsx?${this.exportQuery()}`);

  constructor() {
    this.searchBox.valueChanges
      .pipe(debounceTime(TYPING_PAUSE_MS), takeUntilDestroyed())
      .subscribe((search) => this.setFilter({ search: search.trim() || null }));
    inject(RollupStore)
      .rolledUp.pipe(takeUntilDestroyed())
      .subscribe(() => this.grid()?.refresh());
  }

  ngOnInit(): void {
    this.searchBox.setValue(this.search() ?? '', { emitEvent: false });
    this.views.load((view) => {
      if (!this.isFiltered()) this.applyFilter(view.state);
    });
  }

  protected setFilter(queryParams: Partial<FilterParams>): void {
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }

  protected filterCustomer({ target }: Event): void {
    this.setFilter({ customerId: (target as HTMLSelectElement).value || null });
  }

  protected clearFilter(): void {
    this.searchBox.setValue('', { emitEvent: false });
    this.setFilter({ search: null, status: null, customerId: null });
  }

  protected chooseView(view: JobView): void {
    this.views.choose(view);
    this.applyFilter(view.state);
    this.grid()?.sortBy(this.views.shownOrder());
  }

  protected changeOrder(order: GridOrder): void {
    this.views.setOrder(order);
  }

  protected openJob(url: string): void {
    void this.router.navigateByUrl(url);
  }

  protected async addJob(): Promise<void> {
    const { JobDialog } = await import('./job-dialog');
    const dialog = this.dialog.open<unknown, null, Job>(JobDialog, { data: null, width: '560px' });
    dialog.afterClosed().subscribe((job) => {
      if (job) void this.router.navigate(['/jobs', job.jobId]);
    });
  }

  private applyFilter({ filter }: ViewState): void {
    const { search = null, status = null, customerId = null } = filter;
    this.searchBox.setValue(search ?? '', { emitEvent: false });
    this.setFilter({ search, status, customerId });
  }

  private load(filter: JobFilter, { cursor, sort, direction, limit }: PageRequest) {
    const order = sort ? { sort, direction } : this.views.order();
    const query = { ...filter, cursor, limit, ...order };
    return this.api
      .listJobs(query as Parameters<JobsApi['listJobs']>[0])
      .pipe(tap(({ totals }) => this.totals.set(toJobTotals(totals, filter))));
  }
}
