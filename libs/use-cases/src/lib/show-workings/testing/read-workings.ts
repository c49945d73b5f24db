import { type FigureRef, type Workings, workingsSchema } from '@brakeven/contract';
import { D, sum } from '@brakeven/values';
import { type ShopContext } from '../../context';
import { getBooksWorkings } from '../get-books-workings';
import { getHoursWorkings } from '../get-hours-workings';
import { getJobWorkings } from '../get-job-workings';
import { getOvertimeWorkings } from '../get-overtime-workings';
import { getPaybackWorkings } from '../get-payback-workings';
import { getStockWorkings } from '../get-stock-workings';

const PAGE = 17;

const READERS: Readonly<Record<string, typeof getJobWorkings>> = {
  books: getBooksWorkings,
  hours: getHoursWorkings,
  job: getJobWorkings,
  overtime: getOvertimeWorkings,
  payback: getPaybackWorkings,
  stock: getStockWorkings,
};

/** All pages of a figure's workings in one. */
export async function readAll(context: ShopContext, ref: FigureRef, limit = PAGE): Promise<Workings> {
  const read = READERS[ref.figure.split('.')[0] ?? ''];
  if (!read) throw new Error(`Nobody reads ${ref.figure}.`);
  const pages: Workings[] = [await read(context, { ...ref, limit })];
  for (let cursor = pages[0]?.nextCursor; cursor; cursor = pages.at(-1)?.nextCursor) {
    pages.push(await read(context, { ...ref, limit, cursor }));
  }
  const [first] = pages;
  if (!first) throw new Error('No page.');
  return workingsSchema.parse({ ...first, lines: pages.flatMap((page) => page.lines), nextCursor: null });
}

/** Holds lines and parts against the figure. */
export function expectToAddUp(workings: Workings): void {
  const { amount, unit, parts, lines, lineCount } = workings;
  expect(lines).toHaveLength(lineCount);
  expect(new Set(lines.map((line) => line.lineId)).size).toBe(lineCount);
  if (parts.length > 0) expect(sumAmounts(parts, unit)).toBe(amount);
  if (parts.length === 0 || lineCount > 0) expect(sumAmounts(lines, unit)).toBe(amount);
}

function sumAmounts(items: readonly { amount: string }[], unit: Workings['unit']): string {
  return sum(items.map((item) => D(item.amount))).toFixed(unit === 'money' ? 2 : 4);
}
