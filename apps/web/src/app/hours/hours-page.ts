import { ChangeDetectionStrategy, Component, computed, inject, input, viewChild } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { Router, RouterLink } from '@angular/router';
import { type EntryFilter, type EntryListQuery, type TimeEntry } from '@brakeven/contract';
import {
  EmptyState,
  Grid,
  type GridOrder,
  HoursPipe,
  LocalDatePipe,
  PageHeader,
  type PageSource,
} from '@brakeven/ui';
import { type DayOfWeek, formatHours, formatLocalDate, toLocalDate, todayIn } from '@brakeven/values';
import { EntriesApi } from '../api/entries-api';
import { MonthsApi } from '../api/months-api';
import { toProblemSentence } from '../api/problem-text';
import { SessionStore } from '../session/session-store';
import { injectGridAddress, toGridOrder } from '../shell/grid-address';
import { LoadError } from '../shell/load-error';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { toEntryColumns, toEntryTotals } from './entry-columns';
import { type Period, PERIODS, toDayRange, toPeriod } from './period';

const DEFAULT_ORDER: GridOrder = { sort: 'workedOn', direction: 'desc' };

/** All time entries, page by page, with what is asked of them kept in the address. */
@Component({
  selector: 'app-hours-page',
  imports: [EmptyState, Grid, HoursPipe, LoadError, LocalDatePipe, PageHeader, RouterLink],
  templateUrl: './hours-page.html',
  styleUrl: './hours-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HoursPage {
  readonly period = input<string>();
  readonly from = input<string>();
  readonly to = input<string>();
  readonly employeeId = input<string>();
  readonly operationId = input<string>();
  readonly machineId = input<string>();
  readonly jobId = input<string>();
  readonly importId = input<string>();
  readonly search = input<string>();
  readonly sort = input<string>();
  readonly direction = input<string>();

  private readonly api = inject(EntriesApi);
  private readonly monthsApi = inject(MonthsApi);
  private readonly session = inject(SessionStore);
  private readonly notifier = inject(Notifier);
  private readonly rollup = inject(RollupStore);
  private readonly router = inject(Router);
  private readonly grid = viewChild<Grid<TimeEntry>>(Grid);
  protected readonly address = injectGridAddress();

  protected readonly periods = Object.entries(PERIODS).map(([id, label]) => ({ id: id as Period, label }));
  protected readonly chosenPeriod = computed(() => toPeriod(this.period()));
  protected readonly range = computed(() => {
    const shop = this.session.shop();
    const today = todayIn(shop?.timeZone ?? 'UTC');
    const weekStart = (shop?.weekStart ?? 1) as DayOfWeek;
    return toDayRange(this.chosenPeriod(), today, weekStart, { from: this.from(), to: this.to() });
  });
  protected readonly filter = computed<EntryFilter>(() => ({
    ...this.range(),
    employeeId: this.employeeId(),
    operationId: this.operationId(),
    machineId: this.machineId(),
    jobId: this.jobId(),
    importId: this.importId(),
    search: this.search(),
  }));
  protected readonly isFiltered = computed(() => {
    const { from: _from, to: _to, ...others } = this.filter();
    return Object.values(others).some(Boolean);
  });
  protected readonly source = computed<PageSource<TimeEntry>>(() => {
    const filter = this.filter();
    return {
      load: (request) => this.api.list({ ...filter, ...(request as Partial<EntryListQuery>) }),
    };
  });
  protected readonly order = computed(() => toGridOrder(this.sort(), this.direction(), DEFAULT_ORDER));
  protected readonly isOwnOnly = computed(() => !this.session.can('hours.all'));
  protected readonly columns = computed(() =>
    toEntryColumns({
      canSeeOthers: !this.isOwnOnly(),
      isNarrow: this.address.isNarrow,
      canOpenJobs: this.session.can('jobs.view'),
      canOpenSources: this.session.can('timesheets.use'),
      ...(this.session.can('hours.edit') && { voidEntry: (entry: TimeEntry) => this.void(entry) }),
    }),
  );
  protected readonly canImport = computed(() => this.session.can('timesheets.use'));
  protected readonly choices = rxResource({ stream: () => this.api.getChoices() });
  protected readonly totals = rxResource({
    params: () => this.filter(),
    stream: ({ params }) => this.api.getTotals(params),
  });
  private readonly months = rxResource({
    params: () => (this.session.can('months.view') ? true : undefined),
    stream: () => this.monthsApi.list(),
  });
  /** The closed books, if days of theirs are shown: what changes there is posted late. */
  protected readonly closed = computed(() => {
    const { closedThrough = null, latePostedOn = null } = this.months.hasValue() ? this.months.value() : {};
    const { from } = this.range();
    const isShown = closedThrough !== null && (from === undefined || from <= closedThrough);
    return isShown && latePostedOn !== null ? { closedThrough, latePostedOn } : null;
  });
  protected readonly totalsRow = computed(() =>
    this.totals.hasValue() ? toEntryTotals(this.totals.value()) : null,
  );
  protected readonly rowId = (entry: TimeEntry): string => entry.entryId;

  protected setPeriod(period: Period): void {
    if (period === 'custom')
      this.address.ask({ period, from: this.range().from ?? null, to: this.range().to ?? null });
    else this.address.ask({ period, from: null, to: null });
  }

  protected clear(): void {
    void this.router.navigate([], { queryParams: { period: 'all' } });
  }

  private void(entry: TimeEntry): void {
    const words = `${formatHours(entry.hours)} h of ${entry.employee}, ${formatLocalDate(toLocalDate(entry.workedOn))}`;
    this.api.void(entry.entryId).subscribe({
      next: () => {
        this.notifier.say(`Voided ${words}.${this.toLateWords(entry)}`, () => this.restore(entry));
        this.reload();
      },
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private toLateWords({ workedOn }: TimeEntry): string {
    const closed = this.closed();
    if (!closed || workedOn > closed.closedThrough) return '';
    return ` Its month is closed: it is taken back on ${formatLocalDate(toLocalDate(closed.latePostedOn))}, late.`;
  }

  private restore(entry: TimeEntry): void {
    this.api.restore(entry.entryId).subscribe({
      next: () => {
        this.notifier.say('The entry counts again.');
        this.reload();
      },
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private reload(): void {
    this.grid()?.refresh();
    this.totals.reload();
    void this.rollup.refresh();
  }
}
