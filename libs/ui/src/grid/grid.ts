import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { PROBLEM_WORDS } from '../problem-words';
import { ErrorState } from '../states/error-state';
import { LoadingSkeleton } from '../states/loading-skeleton';
import { type GridColumn, type GridOrder, type GridTotals } from './grid-column';
import { GridEngine } from './grid-engine';
import { type PageSource } from './page-source';

const HEADER_PX = 40;
const ROW_PX = 38;
const SCROLLBAR_PX = 18;

/**
 * A grid of many rows: give it either `rows` (all here) or `source` (page by page from the server). Cells that are
 * figures open their workings, links go to their page; what is projected as `[empty]` shows when there is no row.
 */
@Component({
  selector: 'app-grid',
  imports: [ErrorState, GridEngine, LoadingSkeleton],
  templateUrl: './grid.html',
  styleUrl: './grid.scss',
  host: { '[style.height.px]': 'heightPx()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Grid<T> {
  private readonly toWords = inject(PROBLEM_WORDS);
  // By name: naming the class here would load ag-grid with every page.
  private readonly engine = viewChild<GridEngine<T>>('engine');

  /** Read out as the grid's name. */
  readonly label = input.required<string>();
  readonly columns = input.required<readonly GridColumn<T>[]>();
  readonly source = input<PageSource<T>>();
  readonly rows = input<T[]>();
  readonly rowId = input.required<(row: T) => string>();
  readonly rowTone = input<(row: T) => 'problem' | 'muted' | null>();
  readonly totals = input<GridTotals | null>(null);
  /** The order to start with. */
  readonly order = input<GridOrder>();
  /** Under which name widths and order of columns are kept in this browser. */
  readonly stateKey = input<string>();
  /** False where the page itself keeps the order of columns. */
  readonly keepsOrder = input(true);

  readonly linkFollowed = output<string>();
  readonly orderChanged = output<GridOrder>();
  /** Ids of the columns in their new order, after somebody has moved one. */
  readonly columnsMoved = output<string[]>();

  private readonly error = signal<unknown>(null);
  private readonly count = signal<number | undefined>(undefined);
  protected readonly problem = computed(() => {
    const error = this.error();
    return error === null ? null : this.toWords(error);
  });
  protected readonly rowCount = computed(() => (this.source() ? this.count() : this.rows()?.length));
  protected readonly isEmpty = computed(() => this.rowCount() === 0 && !this.problem());

  /** As high as its rows while they are few; the style sheet bounds it. */
  protected readonly heightPx = computed(() => {
    const rows = this.rowCount();
    if (rows === undefined) return undefined;
    const shown = Math.max(rows, this.isEmpty() ? 6 : 1) + (this.totals() ? 1 : 0);
    return HEADER_PX + shown * ROW_PX + SCROLLBAR_PX;
  });

  /** Loads all rows again and keeps the place. */
  refresh(): void {
    this.error.set(null);
    this.engine()?.refresh();
  }

  /** Sorts by one of the columns shown; without one, as the source likes it. */
  sortBy(order: GridOrder | null): void {
    this.engine()?.sortBy(order);
  }

  /** Brings a row into view and puts the focus on one of its cells. */
  showRow(rowId: string, columnId?: string): void {
    this.engine()?.showRow(rowId, columnId);
  }

  protected takeRowCount(count: number | undefined): void {
    this.count.set(count);
    this.error.set(null);
  }

  protected takeFailure(error: unknown): void {
    this.error.set(error);
  }
}
