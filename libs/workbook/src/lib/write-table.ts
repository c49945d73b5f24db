import { type Writable } from 'node:stream';
import { D, type Decimal, isLocalDate, toLocalDate, ZERO } from '@brakeven/values';
import { type Cell, type Worksheet } from 'exceljs';
import { columnLetters } from './cell-address';
import { encodeEscapedText } from './escaped-text';
import { type CsvCell, toCsvRecord } from './guarded-text';
import { loadExceljs } from './load-exceljs';
import {
  DATE_FORMAT,
  HEADER_FILL,
  HEADER_FONT,
  HOURS_FORMAT,
  MONEY_FORMAT,
  QUIET_FONT,
  TITLE_FONT,
  TOTAL_BORDER,
  TOTAL_FONT,
  WHOLE_FORMAT,
} from './sheet-style';
import { toWorkbookDate } from './workbook-date';

export type TableKind = 'text' | 'money' | 'hours' | 'date' | 'count';

export interface TableColumn {
  header: string;
  kind: TableKind;
  /** Gets a live sum at the foot of a workbook. */
  isSummed: boolean;
}

/** Cells in the order of the columns: text, dates as `YYYY-MM-DD`, numbers as decimal text; null for an empty one. */
export type TableRow = readonly (string | null)[];

/** A table with as many rows as it has. */
export interface Table {
  title: string;
  /** Lines below the title. */
  subtitles: readonly string[];
  sheetName: string;
  columns: readonly TableColumn[];
  rows: AsyncIterable<TableRow>;
}

const WIDTHS: Readonly<Record<TableKind, number>> = { text: 22, money: 13, hours: 11, date: 12, count: 9 };
const FORMATS: Partial<Record<TableKind, string>> = {
  money: MONEY_FORMAT,
  hours: HOURS_FORMAT,
  date: DATE_FORMAT,
  count: WHOLE_FORMAT,
};

/** Streams a table as CSV: UTF-8 with its mark, so that spreadsheets know it; text that looks like a formula guarded. */
export async function writeTableCsv({ columns, rows }: Table, target: Writable): Promise<void> {
  const send = async (text: string) => {
    if (!target.write(text)) await drained(target);
  };
  await send(`\uFEFF${toCsvRecord(columns.map(({ header }) => ({ text: header })))}`);
  for await (const row of rows) await send(toCsvRecord(columns.map(({ kind }, at) => toCell(row[at], kind))));
  target.end();
}

/** Streams a table as a workbook: header frozen and filtered, numbers as numbers, totals as live sums. */
export async function writeTableWorkbook(table: Table, target: Writable): Promise<void> {
  const exceljs = await loadExceljs();
  const workbook = new exceljs.stream.xlsx.WorkbookWriter({ stream: target, useStyles: true });
  const headerRow = table.subtitles.length + 3;
  const sheet = workbook.addWorksheet(table.sheetName, {
    views: [{ state: 'frozen', xSplit: 1, ySplit: headerRow }],
  });
  table.columns.forEach(({ kind, header }, at) => {
    sheet.getColumn(at + 1).width = Math.max(WIDTHS[kind], header.length + 2);
  });
  writeHead(sheet, table, headerRow);
  const sums = table.columns.map(() => ZERO);
  let count = 0;
  for await (const row of table.rows) {
    count += 1;
    writeRow(sheet, headerRow + count, table.columns, row, sums);
    if (target.writableNeedDrain) await drained(target);
  }
  writeTotals(sheet, table.columns, { headerRow, count, sums });
  sheet.commit();
  await workbook.commit();
}

function toCell(text: string | null | undefined, kind: TableKind): CsvCell | null {
  return text === null || text === undefined ? null : { text, isNumber: isNumeric(kind) };
}

function writeHead(sheet: Worksheet, { title, subtitles, columns }: Table, headerRow: number): void {
  [title, ...subtitles].forEach((text, at) => {
    const cell = sheet.getCell(at + 1, 1);
    cell.value = encodeEscapedText(text);
    cell.font = at === 0 ? TITLE_FONT : QUIET_FONT;
  });
  columns.forEach(({ header, kind }, at) => {
    const cell = sheet.getCell(headerRow, at + 1);
    cell.value = header;
    cell.font = HEADER_FONT;
    cell.fill = HEADER_FILL;
    if (isNumeric(kind)) cell.alignment = { horizontal: 'right' };
  });
  sheet.getRow(headerRow).commit();
}

function writeRow(
  sheet: Worksheet,
  number: number,
  columns: readonly TableColumn[],
  row: TableRow,
  sums: Decimal[],
): void {
  const written = sheet.getRow(number);
  columns.forEach(({ kind }, at) => {
    const text = row[at] ?? null;
    if (text === null) return;
    writeCell(written.getCell(at + 1), kind, text);
    if (isNumeric(kind)) sums[at] = (sums[at] ?? ZERO).plus(D(text));
  });
  written.commit();
}

function writeCell(cell: Cell, kind: TableKind, text: string): void {
  if (isNumeric(kind)) cell.value = D(text).toNumber();
  else if (kind === 'date' && isLocalDate(text)) cell.value = toWorkbookDate(toLocalDate(text));
  else cell.value = encodeEscapedText(text);
  const format = FORMATS[kind];
  if (format) cell.numFmt = format;
}

function writeTotals(
  sheet: Worksheet,
  columns: readonly TableColumn[],
  { headerRow, count, sums }: { headerRow: number; count: number; sums: readonly Decimal[] },
): void {
  const row = sheet.getRow(headerRow + count + 1);
  const wordAt = columns.findIndex((column) => !column.isSummed);
  columns.forEach(({ kind, isSummed }, at) => {
    const cell = row.getCell(at + 1);
    cell.font = TOTAL_FONT;
    cell.border = TOTAL_BORDER;
    if (at === wordAt) cell.value = 'Total';
    else if (isSummed) {
      const column = columnLetters(at + 1);
      const formula = `SUM(${column}${headerRow + 1}:${column}${headerRow + count})`;
      cell.value = count > 0 ? { formula, result: (sums[at] ?? ZERO).toNumber() } : 0;
      cell.numFmt = FORMATS[kind] ?? MONEY_FORMAT;
    }
  });
  row.commit();
}

function isNumeric(kind: TableKind): boolean {
  return kind === 'money' || kind === 'hours' || kind === 'count';
}

/** Waits until a target takes more; a target that fails or goes away ends the wait with an error. */
function drained(target: Writable): Promise<void> {
  return new Promise((resolve, reject) => {
    const settle = (end: () => void) => () => {
      target.off('drain', onDrain).off('close', onClose).off('error', reject);
      end();
    };
    const onDrain = settle(resolve);
    const onClose = settle(() => reject(new Error('Whoever asked for the table has gone.')));
    target.once('drain', onDrain).once('close', onClose).once('error', reject);
  });
}
