import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { type TimesheetCheck, type TimesheetField, type TimesheetProblem } from '@brakeven/contract';
import { StatusTag } from '@brakeven/ui';
import { type ChosenName } from './group-unknown-names';
import { NameChoice } from './name-choice';
import { filterRows, type RowFilter, stepThrough, type TableRow, toTableRows } from './row-problems';
import { count, FIELD_WORDS_SHORT, STATE_WORDS } from './timesheet-words';

const ROWS_AT_ONCE = 100;
const STATE_TONES = { ready: 'good', 'already-there': 'plain', refused: 'loss' } as const;

/** The rows of the sheet as they were read, with every problem in its place and a way from one to the next. */
@Component({
  selector: 'app-check-table',
  imports: [NameChoice, StatusTag],
  templateUrl: './check-table.html',
  styleUrl: './check-table.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { '(keydown)': 'stepByKey($event)' },
})
export class CheckTable {
  readonly check = input.required<TimesheetCheck>();
  readonly isBusy = input(false);
  readonly nameChosen = output<ChosenName>();

  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly chosenFilter = signal<RowFilter | null>(null);
  private readonly rowsShown = signal(ROWS_AT_ONCE);
  protected readonly words = FIELD_WORDS_SHORT;
  protected readonly stateWords = STATE_WORDS;
  protected readonly stateTones = STATE_TONES;

  protected readonly fields = computed(() => {
    const columns = this.check().mapping?.columns ?? {};
    return (Object.keys(FIELD_WORDS_SHORT) as TimesheetField[]).filter(
      (field) => columns[field] !== undefined,
    );
  });
  private readonly rows = computed(() => toTableRows(this.check()));
  protected readonly filters = computed(() => this.listFilters());
  protected readonly filter = computed<RowFilter>(() => {
    const chosen = this.chosenFilter();
    const isThere = this.filters().some(({ filter }) => filter === chosen);
    if (chosen && isThere) return chosen;
    return this.filters().some(({ filter }) => filter === 'problems') ? 'problems' : 'all';
  });
  private readonly filtered = computed(() => filterRows(this.rows(), this.filter()));
  protected readonly shown = computed(() => this.filtered().slice(0, this.rowsShown()));
  protected readonly hidden = computed(() => this.filtered().length - this.shown().length);
  protected readonly problems = computed(() => this.rows().flatMap((row) => row.problems));
  protected readonly notShownWords = computed(() => {
    const { rowsNotShown } = this.check();
    const [rows, are] = rowsNotShown === 1 ? ['row', 'is'] : ['rows', 'are'];
    return `${rowsNotShown.toLocaleString('en-US')} more ${rows} without problems ${are} counted above but not listed.`;
  });
  private readonly currentKey = signal<string | null>(null);
  protected readonly current = computed(
    () => this.problems().find((one) => toKey(one) === this.currentKey()) ?? null,
  );
  protected readonly position = computed(() => {
    const current = this.current();
    const total = count(this.problems().length, 'problem');
    return current ? `Problem ${this.problems().indexOf(current) + 1} of ${total}` : total;
  });

  /** Shows the row of a problem and puts the focus on its words. */
  show(problem: TimesheetProblem): void {
    this.currentKey.set(toKey(problem));
    let index = this.filtered().findIndex((row) => row.row === problem.row);
    if (index === -1) {
      this.chosenFilter.set('all');
      index = this.filtered().findIndex((row) => row.row === problem.row);
    }
    this.rowsShown.update((shown) => Math.max(shown, index + 1));
    setTimeout(() => {
      const words = this.host.nativeElement.querySelector<HTMLElement>(`#${toElementId(problem)}`);
      words?.scrollIntoView({ block: 'center' });
      words?.focus({ preventScroll: true });
    });
  }

  protected step(direction: 1 | -1): void {
    const problem = stepThrough(this.problems(), this.current(), direction);
    if (problem) this.show(problem);
  }

  protected stepByKey(event: KeyboardEvent): void {
    if (!event.altKey || (event.key !== 'ArrowDown' && event.key !== 'ArrowUp')) return;
    event.preventDefault();
    this.step(event.key === 'ArrowDown' ? 1 : -1);
  }

  protected setFilter(filter: RowFilter): void {
    this.chosenFilter.set(filter);
    this.rowsShown.set(ROWS_AT_ONCE);
  }

  protected showMore(): void {
    this.rowsShown.update((shown) => shown + ROWS_AT_ONCE);
  }

  protected choose(problem: TimesheetProblem, known: { targetId: string; label: string }): void {
    const alias = problem.alias;
    if (!alias) return;
    this.nameChosen.emit({ kind: alias.kind, spelling: alias.spelling, ...known });
    // The button goes away with the next check; the keyboard goes on from the table.
    this.host.nativeElement.querySelector<HTMLElement>('.frame')?.focus({ preventScroll: true });
  }

  protected idsOf(row: TableRow, field: TimesheetField): string | null {
    const problem = row.byField[field];
    return problem ? toElementId(problem) : null;
  }

  protected readonly toElementId = toElementId;

  private listFilters(): { filter: RowFilter; label: string }[] {
    const { refused, alreadyThere, entriesReady, rowsRead } = this.check();
    const withProblems = filterRows(this.rows(), 'problems').length;
    const all: { filter: RowFilter; label: string; size: number }[] = [
      { filter: 'problems', label: 'Only problems', size: withProblems },
      { filter: 'refused', label: 'Refused', size: refused },
      { filter: 'ready', label: 'Ready', size: entriesReady },
      { filter: 'already-there', label: 'Already there', size: alreadyThere },
    ];
    const there = all.filter(({ size }) => size > 0);
    return [...there, { filter: 'all' as const, label: 'All rows', size: rowsRead }].map(
      ({ filter, label, size }) => ({ filter, label: `${label} · ${size.toLocaleString('en-US')}` }),
    );
  }
}

function toKey(problem: TimesheetProblem): string {
  return `${problem.cell} ${problem.code}`;
}

function toElementId(problem: TimesheetProblem): string {
  return `problem-${problem.cell}-${problem.code}`.replace(/[^\w-]/g, '-');
}
