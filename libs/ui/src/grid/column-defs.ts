import { type ColDef, type ICellRendererParams } from 'ag-grid-community';
import { type ShopFormat } from '../shop-format';
import { type CellContent, type CellHandlers, toCellElement } from './cell-element';
import { compareValues, isNumeric, toCellText } from './cell-text';
import { type GridColumn, type GridOrder, type GridTotals } from './grid-column';

/** What the drawing of cells depends on besides the row. */
export interface CellContext extends CellHandlers {
  format: () => ShopFormat;
  totals: () => GridTotals | null;
}

/** Our columns as ag-grid's. */
export function toColumnDefs<T>(
  columns: readonly GridColumn<T>[],
  context: CellContext,
  order: GridOrder | undefined,
  canPin: boolean,
): ColDef<T>[] {
  return columns.map((column) => ({
    colId: column.id,
    headerName: column.header,
    valueGetter: ({ data }) => (data ? column.value(data) : null),
    comparator: (a: string | number | null, b: string | number | null) => compareValues(a, b, column.kind),
    cellRenderer: (params: ICellRendererParams<T>) => toElement(column, params, context),
    cellClass: ({ data }) => toCellClasses(column, data),
    headerClass: isNumeric(column.kind) ? 'ag-right-aligned-header' : '',
    sortable: column.isSortable ?? false,
    initialSort: order?.sort === column.id ? order.direction : null,
    pinned: column.isPinned && canPin ? 'left' : null,
    initialWidth: column.width,
    minWidth: column.minWidth ?? 72,
    initialFlex: column.flex,
    lockPinned: true,
  }));
}

function toElement<T>(
  column: GridColumn<T>,
  { data, node }: ICellRendererParams<T>,
  context: CellContext,
): HTMLElement | null {
  if (node.rowPinned) return toCellElement(toTotalContent(column, context), context);
  if (!data) return toSkeleton();
  return toCellElement(toContent(column, data, context.format()), context);
}

function toContent<T>(column: GridColumn<T>, row: T, format: ShopFormat): CellContent {
  return {
    text: toCellText(column.value(row), column.kind, format),
    label: column.header,
    figure: column.figure?.(row),
    href: column.href?.(row),
    tone: column.tone?.(row),
    isLoss: column.isLoss?.(row),
    note: column.note?.(row),
    actions: column.actions?.(row),
  };
}

function toTotalContent<T>(column: GridColumn<T>, context: CellContext): CellContent {
  const total = context.totals()?.[column.id];
  const kind = total?.isText ? 'text' : column.kind;
  return {
    text: toCellText(total?.value, kind, context.format()),
    label: `${column.header}, all rows`,
    figure: total?.figure,
  };
}

function toCellClasses<T>(column: GridColumn<T>, row: T | undefined): string[] {
  const severity = row && column.note?.(row)?.severity;
  return [isNumeric(column.kind) ? 'ag-right-aligned-cell' : '', severity ? `has-${severity}` : ''].filter(
    Boolean,
  );
}

function toSkeleton(): HTMLElement {
  const bar = document.createElement('span');
  bar.className = 'skeleton';
  return bar;
}
