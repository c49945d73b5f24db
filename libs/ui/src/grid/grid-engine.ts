import {
  ChangeDetectionStrategy,
  Component,
  computed,
  CSP_NONCE,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { AgGridAngular } from 'ag-grid-angular';
import {
  type CellKeyDownEvent,
  type FullWidthCellKeyDownEvent,
  type GetRowIdParams,
  type GridApi,
  type GridReadyEvent,
  type IDatasource,
  type IGetRowsParams,
  type RowClassParams,
} from 'ag-grid-community';
import { SHOP_FORMAT } from '../shop-format';
import { WORKINGS_OPENER } from '../workings-opener';
import { type CellContext, toColumnDefs } from './column-defs';
import { ColumnMemory } from './column-memory';
import { CursorPages } from './cursor-pages';
import { type GridColumn, type GridOrder, type GridTotals } from './grid-column';
import { GRID_MODULES } from './grid-modules';
import { gridTheme } from './grid-theme';
import { type PageSource } from './page-source';

const BLOCK_SIZE = 100;
const PINNING_WIDTH_MIN = 720;

/** ag-grid behind our own columns and pages; `Grid` loads it when it is needed. */
@Component({
  selector: 'app-grid-engine',
  imports: [AgGridAngular],
  template: `
    <ag-grid-angular
      class="engine"
      [theme]="theme"
      [styleNonce]="styleNonce"
      [modules]="modules"
      [columnDefs]="columnDefs()"
      [rowModelType]="source() ? 'infinite' : 'clientSide'"
      [datasource]="datasource()"
      [rowData]="rows()"
      [getRowId]="getRowId"
      [rowClassRules]="rowClassRules"
      [pinnedBottomRowData]="pinnedRows()"
      [cacheBlockSize]="blockSize"
      [maxConcurrentDatasourceRequests]="1"
      [infiniteInitialRowCount]="12"
      [sortingOrder]="['asc', 'desc']"
      [domLayout]="isAutoHeight() ? 'autoHeight' : 'normal'"
      [ensureDomOrder]="true"
      [suppressCellFocus]="false"
      [suppressDragLeaveHidesColumns]="true"
      [suppressNoRowsOverlay]="true"
      [suppressLoadingOverlay]="true"
      [animateRows]="false"
      [enableCellTextSelection]="true"
      (gridReady)="start($event)"
      (cellKeyDown)="pressCell($event)"
      (columnResized)="$event.finished && keepColumns()"
      (columnMoved)="$event.finished && keepMoved($event.source)"
      (sortChanged)="changeOrder()"
    />
  `,
  styles: `
    :host,
    .engine {
      display: block;
      height: 100%;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class GridEngine<T> {
  private readonly format = inject(SHOP_FORMAT);
  private readonly opener = inject(WORKINGS_OPENER);
  private readonly memory = inject(ColumnMemory);
  private readonly canPin = globalThis.innerWidth >= PINNING_WIDTH_MIN;

  readonly columns = input.required<readonly GridColumn<T>[]>();
  readonly source = input<PageSource<T>>();
  readonly rows = input<T[]>();
  readonly rowId = input.required<(row: T) => string>();
  readonly rowTone = input<(row: T) => 'problem' | 'muted' | null>();
  readonly totals = input<GridTotals | null>(null);
  readonly order = input<GridOrder>();
  readonly stateKey = input<string>();
  /** False where the page itself keeps the order of columns. */
  readonly keepsOrder = input(true);
  readonly isAutoHeight = input(false);

  readonly linkFollowed = output<string>();
  readonly orderChanged = output<GridOrder>();
  /** Ids of the columns in their new order, after somebody has moved one. */
  readonly columnsMoved = output<string[]>();
  /** How many rows there are, once the end has been seen; undefined when loading starts again. */
  readonly rowCountChanged = output<number | undefined>();
  readonly failed = output<unknown>();

  protected readonly theme = gridTheme;
  /** The server's policy lets in only style elements that carry the page's nonce. */
  protected readonly styleNonce = inject(CSP_NONCE, { optional: true }) ?? undefined;
  protected readonly modules = GRID_MODULES;
  protected readonly blockSize = BLOCK_SIZE;
  private readonly api = signal<GridApi<T> | null>(null);

  private readonly context: CellContext = {
    format: this.format,
    totals: () => this.totals(),
    openWorkings: (ref) => this.opener.open(ref),
    followLink: (href) => this.linkFollowed.emit(href),
  };

  protected readonly columnDefs = computed(() =>
    toColumnDefs(this.columns(), this.context, this.order(), this.canPin),
  );
  protected readonly datasource = computed(() => {
    const source = this.source();
    return source && this.toDatasource(source);
  });
  /** A new object for each change of totals, so that the row is drawn again. */
  protected readonly pinnedRows = computed(() => (this.totals() ? [{ ...this.totals() } as T] : []));

  protected readonly getRowId = ({ data, rowPinned }: GetRowIdParams<T>): string =>
    rowPinned ? 'totals' : this.rowId()(data);
  protected readonly rowClassRules = {
    'row-problem': (params: RowClassParams<T>) => this.hasTone(params, 'problem'),
    'row-muted': (params: RowClassParams<T>) => this.hasTone(params, 'muted'),
  };

  /** Loads all rows again and keeps the place. */
  refresh(): void {
    if (this.source()) this.api()?.refreshInfiniteCache();
  }

  /** Brings a row into view and puts the focus on one of its cells. */
  showRow(rowId: string, columnId?: string): void {
    const api = this.api();
    const index = api?.getRowNode(rowId)?.rowIndex;
    if (!api || index === null || index === undefined) return;
    api.ensureIndexVisible(index, 'middle');
    const column = columnId ?? this.columns()[0]?.id;
    if (!column) return;
    api.ensureColumnVisible(column);
    api.setFocusedCell(index, column);
  }

  protected start({ api }: GridReadyEvent<T>): void {
    this.api.set(api);
    const key = this.stateKey();
    const kept = key && this.memory.find(key);
    if (!kept) return;
    const state = kept.map(({ colId, width }) => ({ colId, width }));
    api.applyColumnState({ state, applyOrder: this.keepsOrder() });
  }

  protected keepColumns(): void {
    const key = this.stateKey();
    const columns = this.api()?.getColumnState();
    if (key && columns)
      this.memory.keep(
        key,
        columns.map(({ colId, width }) => ({ colId, width })),
      );
  }

  protected keepMoved(source: string): void {
    this.keepColumns();
    const columns = this.api()?.getColumnState();
    if (columns && source === 'uiColumnMoved') this.columnsMoved.emit(columns.map(({ colId }) => colId));
  }

  /** Sorts by one of the columns shown; without one, as the source likes it. */
  sortBy(order: GridOrder | null): void {
    const state = order ? [{ colId: order.sort, sort: order.direction }] : [];
    this.api()?.applyColumnState({ state, defaultState: { sort: null } });
  }

  protected changeOrder(): void {
    const sorted = this.api()
      ?.getColumnState()
      .find((column) => column.sort);
    if (sorted?.sort) this.orderChanged.emit({ sort: sorted.colId, direction: sorted.sort });
  }

  /** Enter or space on a cell presses what is in it. */
  protected pressCell({ event }: CellKeyDownEvent<T> | FullWidthCellKeyDownEvent<T>): void {
    if (!(event instanceof KeyboardEvent) || !['Enter', ' '].includes(event.key)) return;
    const target = event.target as HTMLElement;
    const pressable = target.matches('[data-press]')
      ? null
      : target.querySelector<HTMLElement>('[data-press]');
    if (!pressable) return;
    event.preventDefault();
    pressable.click();
  }

  private toDatasource(source: PageSource<T>): IDatasource {
    let pages: CursorPages<T> | undefined;
    let sortedBy: string | undefined;
    return {
      getRows: (params: IGetRowsParams) => {
        const order = toOrder(params);
        const sorting = JSON.stringify(order);
        if (!pages || params.startRow === 0 || sorting !== sortedBy) {
          pages = new CursorPages(source, order, BLOCK_SIZE);
        }
        sortedBy = sorting;
        void this.serve(pages, params);
      },
    };
  }

  private async serve(pages: CursorPages<T>, params: IGetRowsParams): Promise<void> {
    try {
      const { rows, rowCount } = await pages.load(params.startRow / BLOCK_SIZE);
      params.successCallback([...rows], rowCount);
      this.rowCountChanged.emit(rowCount);
    } catch (error) {
      params.failCallback();
      this.failed.emit(error);
    }
  }

  private hasTone({ data, node }: RowClassParams<T>, tone: 'problem' | 'muted'): boolean {
    return data !== undefined && !node.rowPinned && this.rowTone()?.(data) === tone;
  }
}

function toOrder({ sortModel }: IGetRowsParams): GridOrder | undefined {
  const [first] = sortModel;
  return first && { sort: first.colId, direction: first.sort === 'desc' ? 'desc' : 'asc' };
}
