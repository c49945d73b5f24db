import { type Workings, type WorkingsLine } from '@brakeven/contract';
import { type ItemRow, type ItemSums, type KeysetPosition } from '@brakeven/database';
import { cutPage, positionSchema, readCursor, writeCursor } from '../page-cursor';
import { type LinePaging, type WorkingsHead } from './workings-request';

/** Where the items of a figure come from. */
export interface ItemSource {
  sum(): Promise<ItemSums>;
  list(after: KeysetPosition | null, limit: number): Promise<ItemRow[]>;
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
    lines: rows.map(toWorkingsLine),
    nextCursor,
  };
}

function toWorkingsLine({ id, on, category, label, job, amount }: ItemRow): WorkingsLine {
  return {
    lineId: id,
    on,
    category,
    label,
    job,
    operation: null,
    machine: null,
    hours: null,
    rate: null,
    rateFactor: null,
    rateValidFrom: null,
    amount,
    source: null,
  };
}
