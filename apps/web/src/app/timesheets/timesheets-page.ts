import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  type ElementRef,
  inject,
  signal,
  viewChild,
} from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { MatProgressBarModule } from '@angular/material/progress-bar';
import { LIMITS, type TimesheetImported } from '@brakeven/contract';
import { ErrorState, HoursPipe, InstantPipe, LoadingSkeleton, PageHeader } from '@brakeven/ui';
import { type DateFormat } from '@brakeven/values';
import { RouterLink } from '@angular/router';
import { FileDrop } from '../files/file-drop';
import { type FileRule } from '../files/find-file-problem';
import { confirm } from '../forms/confirm-dialog';
import { RollupStore } from '../shell/rollup-store';
import { CheckSummary } from './check-summary';
import { CheckTable } from './check-table';
import { HoursBreakdown } from './hours-breakdown';
import { ImportHistory } from './import-history';
import { ImportHistoryStore } from './import-history-store';
import { KnownNames } from './known-names';
import { MappingPanel } from './mapping-panel';
import { ProblemPanel } from './problem-panel';
import { TimesheetCheckStore } from './timesheet-check-store';
import { splitProblems } from './row-problems';
import { commitWords, count, countEntries, leaveOutWords, percentDone, STAGE_WORDS } from './timesheet-words';
import { UnusedColumns } from './unused-columns';

/** From the week's workbook to entries in the books: drop, settle, add, and the history to undo from. */
@Component({
  selector: 'app-timesheets-page',
  imports: [
    CheckSummary,
    CheckTable,
    ErrorState,
    FileDrop,
    HoursBreakdown,
    HoursPipe,
    ImportHistory,
    InstantPipe,
    LoadingSkeleton,
    MappingPanel,
    MatProgressBarModule,
    PageHeader,
    ProblemPanel,
    RouterLink,
    UnusedColumns,
  ],
  providers: [TimesheetCheckStore, KnownNames, ImportHistoryStore],
  templateUrl: './timesheets-page.html',
  styleUrl: './timesheets-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TimesheetsPage {
  protected readonly store = inject(TimesheetCheckStore);
  protected readonly history = inject(ImportHistoryStore);
  private readonly rollup = inject(RollupStore);
  private readonly dialog = inject(MatDialog);
  private readonly table = viewChild(CheckTable);
  private readonly doneHeading = viewChild<ElementRef<HTMLElement>>('doneHeading');

  protected readonly rule: FileRule = { endings: ['.xlsx', '.csv'], bytesMax: LIMITS.uploadBytesMax };
  protected readonly rowsMax = LIMITS.timesheetRowsMax.toLocaleString('en-US');
  private readonly wantsMapping = signal(false);
  protected readonly columnAsked = signal<{ column: string } | null>(null);
  private readonly chosenDateFormat = signal<DateFormat | null>(null);
  /** The order of text dates that was settled beside the rows, unless the columns say otherwise by now. */
  protected readonly dateFormat = computed(() => {
    const chosen = this.chosenDateFormat();
    return chosen === this.store.mapping()?.dateFormat ? chosen : null;
  });
  protected readonly isMappingNeeded = computed(() => {
    const check = this.store.check();
    return check !== null && (check.mapping === null || check.missingFields.length > 0);
  });
  private readonly problems = computed(() => splitProblems(this.store.check()));
  /** What is to be said of the file as a whole rather than of one of its entries. */
  protected readonly fileProblems = computed(() => this.problems().ofFile);
  protected readonly rowProblems = computed(() => this.problems().ofRows);
  protected readonly hasToSettle = computed(
    () => this.rowProblems().length > 0 || this.store.chosenNames().length > 0 || this.dateFormat() !== null,
  );
  protected readonly isMappingOpen = computed(() => this.isMappingNeeded() || this.wantsMapping());
  protected readonly commitWords = computed(() => {
    const check = this.store.check();
    return check && !this.isMappingNeeded() ? commitWords(check) : null;
  });
  protected readonly stage = computed(() => {
    const activity = this.store.activity();
    if (!activity) return null;
    const first = activity.kind === 'checking' ? 'Sending and reading the workbook' : 'Sending the workbook';
    const progress = activity.progress;
    const percent = progress && percentDone(progress);
    return {
      words: progress ? STAGE_WORDS[progress.stage] : first,
      message: progress?.message ?? '',
      percent,
    };
  });

  /** Read out when a check has come back. */
  protected readonly announcement = computed(() => {
    const check = this.store.check();
    if (!check || this.store.isBusy() || this.store.imported()) return '';
    const found = [count(check.rowsRead, 'row') + ' read', `${check.entriesReady} ready`];
    return [...found, `${check.alreadyThere} already there`, `${check.refused} refused`].join(', ');
  });

  constructor() {
    effect(() => this.doneHeading()?.nativeElement.focus());
  }

  protected open(file: File): void {
    this.wantsMapping.set(false);
    this.columnAsked.set(null);
    this.chosenDateFormat.set(null);
    this.store.open(file);
  }

  protected askColumn(column: string): void {
    this.wantsMapping.set(true);
    this.columnAsked.set({ column });
  }

  protected chooseDateFormat(format: DateFormat | null): void {
    const mapping = this.store.mapping();
    if (!mapping) return;
    this.chosenDateFormat.set(format);
    this.store.setMapping({ ...mapping, dateFormat: format ?? undefined });
  }

  protected toggleMapping(): void {
    this.columnAsked.set(null);
    this.wantsMapping.update((wanted) => !wanted);
  }

  protected showProblem(problem: Parameters<CheckTable['show']>[0]): void {
    this.table()?.show(problem);
  }

  protected commit(): void {
    const check = this.store.check();
    if (!check) return;
    if (check.refused === 0) {
      this.store.commit(false, () => this.settle());
      return;
    }
    confirm(this.dialog, {
      title: `Leave ${count(check.refused, 'row')} out?`,
      text: [
        leaveOutWords(check),
        `Correct ${check.refused === 1 ? 'it' : 'them'} in your workbook later and drop the same file again: only what is new goes in.`,
      ],
      action: commitWords(check) ?? '',
      tone: 'primary',
    }).subscribe((isConfirmed) => {
      if (isConfirmed) this.store.commit(true, () => this.settle());
    });
  }

  protected undo(imported: TimesheetImported): void {
    const { importId, file, entriesAdded, hoursAdded } = imported;
    if (importId === null) return;
    this.history.undo({ importId, fileName: file.name, entriesAdded, hoursAdded }, () => this.store.close());
  }

  protected entriesAdded(imported: TimesheetImported): string {
    return countEntries(imported.entriesAdded);
  }

  private settle(): void {
    this.history.load();
    void this.rollup.refresh();
  }
}
