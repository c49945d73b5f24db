import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import {
  type CostCategory,
  type Figure as FigureName,
  type FigureRef,
  type Job,
  type JobLine,
} from '@brakeven/contract';
import {
  EmptyState,
  ErrorState,
  Figure,
  Grid,
  LoadingSkeleton,
  LocalDatePipe,
  PageHeader,
  type PageSource,
  SHOP_FORMAT,
  StatusTag,
} from '@brakeven/ui';
import { JobsApi } from '../api/jobs-api';
import { toShownProblem } from '../api/problem-text';
import { SessionStore } from '../session/session-store';
import { InvoicesCard, MaterialIssuesCard, OutsideServicesCard } from '../job-money';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { ComparisonCard } from './comparison-card';
import { JobCharts } from './job-charts';
import { OperationTable } from './operation-table';
import { toStatusTone } from './job-status';
import { toCategoryWord, toLineColumns } from './line-columns';
import { StatusActions } from './status-actions';
import { VerdictCard } from './verdict-card';

const CATEGORIES = ['labour', 'overtime', 'machine', 'overhead', 'material', 'outside'] as const;

/** One job: what came of it against its estimate, by category and operation, down to the cells of the timesheets. */
@Component({
  selector: 'app-job-page',
  imports: [
    EmptyState,
    ErrorState,
    Figure,
    Grid,
    ComparisonCard,
    InvoicesCard,
    JobCharts,
    LoadingSkeleton,
    LocalDatePipe,
    MaterialIssuesCard,
    OperationTable,
    OutsideServicesCard,
    PageHeader,
    RouterLink,
    StatusActions,
    StatusTag,
    VerdictCard,
  ],
  templateUrl: './job-page.html',
  styleUrl: './job-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class JobPage {
  private readonly api = inject(JobsApi);
  private readonly session = inject(SessionStore);
  private readonly notifier = inject(Notifier);
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);
  private readonly format = inject(SHOP_FORMAT);

  /** From the address. */
  readonly jobId = input.required<string>();

  private readonly answer = rxResource({
    params: () => this.jobId(),
    stream: ({ params: jobId }) => this.api.getJob(jobId),
  });
  protected readonly job = computed(() => (this.answer.hasValue() ? this.answer.value() : null));
  protected readonly problem = computed(() => {
    const error = this.answer.error();
    return error ? toShownProblem(error) : null;
  });
  protected readonly canEdit = computed(() => this.session.can('jobs.edit'));
  protected readonly hasMoney = computed(() => this.job()?.total !== undefined);
  protected readonly seesMaterials = computed(() => this.session.can('materials.view'));
  protected readonly mayImport = computed(() => this.session.can('timesheets.use'));
  protected readonly seesRows = computed(() => this.session.can('jobs.money'));
  protected readonly toStatusTone = toStatusTone;

  protected readonly categories = CATEGORIES.map((category) => ({
    category,
    figure: `job.${category}` as const,
    word: toCategoryWord(category),
  }));
  protected readonly lineCategories: readonly { category: CostCategory; word: string }[] = [
    ...this.categories,
    { category: 'invoiced', word: toCategoryWord('invoiced') },
  ];
  /** Whether anything has been spent on the job or invoiced for it. */
  protected readonly hasCost = computed(() => {
    const job = this.job();
    if (!job) return false;
    return job.lastWorkedOn !== null || [job.total, job.invoiced].some((amount) => Number(amount ?? 0) !== 0);
  });
  protected readonly category = signal<CostCategory | undefined>(undefined);
  protected readonly columns = computed(() => toLineColumns(this.hasMoney(), this.format()));
  protected readonly rowId = (line: JobLine): string => line.lineId;
  /** Without money the three lines of an entry say the same three times: labour stands for all. */
  protected readonly source = computed<PageSource<JobLine>>(() => {
    const jobId = this.jobId();
    const category = this.hasMoney() ? this.category() : 'labour';
    return { load: ({ cursor, limit }) => this.api.listJobLines(jobId, { cursor, limit, category }) };
  });

  constructor() {
    inject(RollupStore)
      .rolledUp.pipe(takeUntilDestroyed())
      .subscribe(() => this.answer.reload());
  }

  protected ref(figure: FigureName): FigureRef {
    return { figure, jobId: this.jobId() };
  }

  protected reload(): void {
    this.answer.reload();
  }

  protected openSource(url: string): void {
    void this.router.navigateByUrl(url);
  }

  protected async editJob(job: Job): Promise<void> {
    const { JobDialog } = await import('./job-dialog');
    const dialog = this.dialog.open<unknown, Job, Job>(JobDialog, { data: job, width: '560px' });
    dialog.afterClosed().subscribe((saved) => {
      if (!saved) return;
      this.notifier.say(`Job ${saved.number} saved.`);
      this.answer.reload();
    });
  }
}
