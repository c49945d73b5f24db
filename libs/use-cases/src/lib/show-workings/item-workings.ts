import { type FigureRef, type Workings, type WorkingsLine } from '@brakeven/contract';
import { type ItemRow, type ItemSums, type KeysetPosition } from '@brakeven/database';
import { cutPage, positionSchema, readCursor, writeCursor } from '../page-cursor';
import { type LinePaging, type WorkingsHead } from './workings-request';

/** Where the items of a figure come from. */
export interface ItemSource {
  sum(): Promise<ItemSums>;
  list(after: KeysetPosition | null, limit: number): Promise<ItemRow[]>;
  /** The figure that an item is, if it is one. */
  toFigure?(row: ItemRow): FigureRef | null;
}

/** The workings of a figure whose lines were written down with their amounts: cost items, quoted prices. */
export async function readItemWorkings(
  head: WorkingsHead & { rule: string },
  source: ItemSource,
  { list, cursor, limit }: LinePaging,
): Promise<Workings> {
  const after = readCursor(cursor, list, positionSchema('date'));
  const sums = await source.sum();
  const found = await source.list(after, limit + 1);
  const { rows, nextCursor } = cutPage(found, limit, (last) =>
    writeCursor(list, { value: last.on, id: last.id }),
  );
  return {
    ...head,
    unit: 'money',
    amount: sums.amount,
    inputs: [],
    parts: [],
    lineCount: sums.lines,
    lines: rows.map((row) => toWorkingsLine(row, source.toFigure)),
    nextCursor,
  };
}

/** What a row says that is no cost line and came from no file. */
export const PLAIN_LINE = {
  postedOn: null,
  isLate: false,
  takesBackOn: null,
  detail: null,
  job: null,
  operation: null,
  machine: null,
  quantity: null,
  unit: null,
  rate: null,
  rateFactor: null,
  rateValidFrom: null,
  figure: null,
  source: null,
} as const satisfies Partial<WorkingsLine>;

function toWorkingsLine(row: ItemRow, toFigure: ItemSource['toFigure']): WorkingsLine {
  const { id, on, category, label, detail, job, quantity, amount } = row;
  return {
    ...PLAIN_LINE,
    lineId: id,
    on,
    category,
    label,
    detail: detail ?? null,
    job,
    quantity: quantity ?? null,
    unit: quantity === undefined ? null : 'kg',
    amount,
    figure: toFigure?.(row) ?? null,
  };
}
