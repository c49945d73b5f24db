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
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatDialog } from '@angular/material/dialog';
import { Router } from '@angular/router';
import { type Job } from '@brakeven/contract';
import {
  EmptyState,
  Grid,
  type GridTotals,
  type PageRequest,
  type PageSource,
  PageHeader,
} from '@brakeven/ui';
import { debounceTime, tap } from 'rxjs';
import { JobsApi } from '../api/jobs-api';
import { SessionStore } from '../session/session-store';
import { RollupStore } from '../shell/rollup-store';
import { type JobFilter, toJobColumns, toJobTotals } from './job-columns';
import { isJobStatus, JOB_STATUS_ORDER, toStatusWord } from './job-status';

const TYPING_PAUSE_MS = 300;

/** All jobs: hours and cost, each figure with its workings. */
@Component({
  selector: 'app-jobs-page',
  imports: [EmptyState, Grid, PageHeader, ReactiveFormsModule],
  templateUrl: './jobs-page.html',
  styleUrl: './jobs-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class JobsPage implements OnInit {
  private readonly api = inject(JobsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);
  private readonly grid = viewChild.required<Grid<Job>>(Grid);

  /** From the address, so that a filtered list can be sent to somebody. */
  readonly search = input<string>();
  readonly status = input<string>();

  protected readonly statuses = JOB_STATUS_ORDER;
  protected readonly toStatusWord = toStatusWord;
  protected readonly order = { sort: 'number', direction: 'desc' } as const;
  protected readonly rowId = (job: Job): string => job.jobId;
  protected readonly columns = computed(() => toJobColumns(this.session.can('jobs.money')));
  protected readonly canEdit = computed(() => this.session.can('jobs.edit'));
  protected readonly totals = signal<GridTotals | null>(null);
  protected readonly searchBox = new FormControl('', { nonNullable: true });

  protected readonly filter = computed<JobFilter>(() => {
    const [search, status] = [this.search(), this.status()];
    return { ...(search && { search }), ...(isJobStatus(status) && { status }) };
  });
  protected readonly isFiltered = computed(() => Object.keys(this.filter()).length > 0);
  protected readonly source = computed<PageSource<Job>>(() => {
    const filter = this.filter();
    return { load: (request) => this.load(filter, request) };
  });

  constructor() {
    this.searchBox.valueChanges
      .pipe(debounceTime(TYPING_PAUSE_MS), takeUntilDestroyed())
      .subscribe((search) => this.setFilter({ search: search.trim() || null }));
    inject(RollupStore)
      .rolledUp.pipe(takeUntilDestroyed())
      .subscribe(() => this.grid().refresh());
  }

  ngOnInit(): void {
    this.searchBox.setValue(this.search() ?? '', { emitEvent: false });
  }

  protected setFilter(queryParams: { search?: string | null; status?: string | null }): void {
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }

  protected clearFilter(): void {
    this.searchBox.setValue('', { emitEvent: false });
    this.setFilter({ search: null, status: null });
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

  private load(filter: JobFilter, { cursor, sort, direction, limit }: PageRequest) {
    const query = { ...filter, cursor, direction, limit, sort: sort as 'number' | undefined };
    return this.api
      .listJobs(query as Parameters<JobsApi['listJobs']>[0])
      .pipe(tap(({ totals }) => this.totals.set(toJobTotals(totals, filter))));
  }
}
