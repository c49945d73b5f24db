import { type Writable } from 'node:stream';
import { AppError, type JobExportQuery, type JobSort } from '@brakeven/contract';
import { findThrough, type JobRow, type KeysetPosition, listJobRows } from '@brakeven/database';
import { formatLocalDate, toLocalDate } from '@brakeven/values';
import {
  type Table,
  type TableColumn,
  type TableRow,
  writeTableCsv,
  writeTableWorkbook,
} from '@brakeven/workbook';
import { inShopOf, type ShopContext, todayOf } from '../context';
import { isPlainSort, toJobSelection } from '../show-jobs/list-jobs';
import { seesMoney } from '../show-jobs/job-dto';

const PAGE_SIZE = 500;

/** A file that writes itself into whatever asks for it. */
export interface StreamedFile {
  name: string;
  write(target: Writable): Promise<void>;
}

/**
 * All jobs of a filter as CSV, in the columns and the order that are asked for; read page by page as it is written.
 * @throws AppError `forbidden` for columns of money to who may not see it
 */
export async function exportJobsCsv(context: ShopContext, query: JobExportQuery): Promise<StreamedFile> {
  const table = await toTable(context, query);
  return { name: `jobs-${todayOf(context)}.csv`, write: (target) => writeTableCsv(table, target) };
}

/**
 * The same as a workbook, with live sums at the foot.
 * @throws AppError `forbidden` for columns of money to who may not see it
 */
export async function exportJobsWorkbook(context: ShopContext, query: JobExportQuery): Promise<StreamedFile> {
  const table = await toTable(context, query);
  return { name: `jobs-${todayOf(context)}.xlsx`, write: (target) => writeTableWorkbook(table, target) };
}

async function toTable(context: ShopContext, query: JobExportQuery): Promise<Table> {
  const { columns, sort } = query;
  if (!seesMoney(context) && ![...columns, sort].every(isPlainSort)) {
    throw new AppError('forbidden', 'You may not see money on jobs. Leave those columns out.');
  }
  const through = await inShopOf(context, findThrough);
  return {
    title: `Jobs of ${context.shop.name}`,
    subtitles: [
      through === null
        ? 'Nothing is rolled up yet.'
        : `Costs through ${formatLocalDate(toLocalDate(through))}.`,
      ...(columns.includes('margin') ? ['Margins are provisional until a job is finished or invoiced.'] : []),
    ],
    sheetName: 'Jobs',
    columns: columns.map((column) => COLUMNS[column]),
    rows: readRows(context, query),
  };
}

/** Page by page, each in a transaction of its own, so that a slow reader holds none. */
async function* readRows(context: ShopContext, query: JobExportQuery): AsyncGenerator<TableRow> {
  const { columns, sort, direction } = query;
  const selection = toJobSelection(query);
  let after: KeysetPosition | null = null;
  do {
    const paging = { sort, direction, after, limit: PAGE_SIZE };
    const rows: JobRow[] = await inShopOf(context, (trx) => listJobRows(trx, selection, paging));
    for (const row of rows) yield columns.map((column) => row[column]?.toString() ?? null);
    const last: JobRow | undefined = rows.at(-1);
    after = last && rows.length === PAGE_SIZE ? { value: last.sortValue, id: last.jobId } : null;
  } while (after !== null);
}

const text = (header: string): TableColumn => ({ header, kind: 'text', isSummed: false });
const date = (header: string): TableColumn => ({ header, kind: 'date', isSummed: false });
const hours = (header: string): TableColumn => ({ header, kind: 'hours', isSummed: true });
const money = (header: string): TableColumn => ({ header, kind: 'money', isSummed: true });

const COLUMNS: Readonly<Record<JobSort, TableColumn>> = {
  number: text('Job'),
  customer: text('Customer'),
  title: text('Title'),
  status: text('Status'),
  quantity: { header: 'Pieces', kind: 'count', isSummed: false },
  openedOn: date('Opened'),
  dueOn: date('Due'),
  hours: hours('Hours'),
  machineHours: hours('Machine hours'),
  labour: money('Labour'),
  overtime: money('Overtime'),
  machine: money('Machine'),
  overhead: money('Overhead'),
  material: money('Material'),
  outside: money('Outside'),
  total: money('Cost'),
  quotedPrice: money('Quoted'),
  estimatedHours: hours('Estimated hours'),
  estimate: money('Estimate'),
  variance: money('Cost − estimate'),
  invoiced: money('Invoiced'),
  margin: money('Margin'),
  workInProgress: money('Work in progress'),
  lastWorkedOn: date('Last worked'),
};
