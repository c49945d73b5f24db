import { buffer } from 'node:stream/consumers';
import { PassThrough } from 'node:stream';
import { setImmediate as nextTurn } from 'node:timers/promises';
import { D, type LocalDate, sum } from '@brakeven/values';
import { type Cell, type CellValue, type Worksheet } from 'exceljs';
import { encodeEscapedText } from './escaped-text';
import { loadExceljs } from './load-exceljs';
import {
  DATE_FORMAT,
  DURATION_FORMAT,
  HEADER_FILL,
  HEADER_FONT,
  HOURS_FORMAT,
  QUIET_FONT,
  TITLE_FONT,
  TOTAL_BORDER,
  TOTAL_FONT,
} from './sheet-style';
import { toWorkbookDate } from './workbook-date';

/** One entry of a timesheet to be written; numbers of employees and jobs may be numbers or text. */
export interface TimesheetLine {
  readonly workedOn: LocalDate;
  readonly employee: string | number;
  readonly job: string | number;
  readonly operation: string;
  readonly machine: string | null;
  /** Decimal text, such as `7.5000`. */
  readonly hours: string;
  readonly good: number | null;
  readonly scrap: number | null;
  readonly note: string | null;
}

export interface TimesheetWorkbook {
  readonly title: string;
  /** Lines below the title, such as who filled it in. */
  readonly subtitles?: readonly string[];
  readonly sheetName?: string;
  readonly rows: readonly TimesheetLine[];
  /**
   * Hours as plain numbers, or as `[h]:mm:ss` durations rounded to the second, so that hours which are no whole
   * seconds (7.3334) may come back changed in the fourth decimal.
   */
  readonly hoursAs?: 'number' | 'duration';
  /** A totals row with a live sum at the foot, unless false. */
  readonly hasTotal?: boolean;
}

const HEADERS = [
  'Date',
  'Employee',
  'Job',
  'Operation',
  'Machine',
  'Hours',
  'Good',
  'Scrap',
  'Note',
] as const;
const WIDTHS = [12, 22, 12, 14, 10, 10, 8, 8, 36] as const;
const HOURS_COLUMN = 6;
const ROWS_PER_TURN = 250;
const SECONDS_PER_HOUR = 3_600;
const SECONDS_PER_DAY = 86_400;

/**
 * Writes a week's timesheet as people keep them: a title above the header, real dates, a totals row with its stored
 * result. Streams row by row and lets other work through every few hundred rows.
 */
export async function writeTimesheetWorkbook(timesheet: TimesheetWorkbook): Promise<Buffer> {
  const stream = new PassThrough();
  const written = buffer(stream);
  const exceljs = await loadExceljs();
  const workbook = new exceljs.stream.xlsx.WorkbookWriter({
    stream,
    useStyles: true,
    useSharedStrings: true,
  });
  const titles = [timesheet.title, ...(timesheet.subtitles ?? [])];
  const headerRow = titles.length + 2;
  const sheet = workbook.addWorksheet(timesheet.sheetName ?? 'Timesheet', {
    views: [{ state: 'frozen', ySplit: headerRow }],
  });
  WIDTHS.forEach((width, index) => (sheet.getColumn(index + 1).width = width));
  writeHeader(sheet, titles, headerRow);
  await writeLines(sheet, timesheet, headerRow + 1);
  if (timesheet.hasTotal ?? true) writeTotal(sheet, timesheet, headerRow);
  sheet.commit();
  await workbook.commit();
  return written;
}

function writeHeader(sheet: Worksheet, titles: readonly string[], headerRow: number): void {
  titles.forEach((title, index) => {
    const cell = sheet.getCell(index + 1, 1);
    cell.value = encodeEscapedText(title);
    cell.font = index === 0 ? TITLE_FONT : QUIET_FONT;
  });
  HEADERS.forEach((header, index) => {
    const cell = sheet.getCell(headerRow, index + 1);
    cell.value = header;
    cell.font = HEADER_FONT;
    cell.fill = HEADER_FILL;
  });
  sheet.getRow(headerRow).commit();
}

async function writeLines(sheet: Worksheet, timesheet: TimesheetWorkbook, firstRow: number): Promise<void> {
  for (const [index, line] of timesheet.rows.entries()) {
    const row = sheet.getRow(firstRow + index);
    toCellValues(line).forEach((value, column) => {
      if (value !== null)
        row.getCell(column + 1).value = typeof value === 'string' ? encodeEscapedText(value) : value;
    });
    row.getCell(1).numFmt = DATE_FORMAT;
    writeHours(row.getCell(HOURS_COLUMN), toStoredHours(line, timesheet), timesheet);
    row.commit();
    if (index % ROWS_PER_TURN === ROWS_PER_TURN - 1) await nextTurn();
  }
}

function toCellValues(line: TimesheetLine): CellValue[] {
  const { workedOn, employee, job, operation, machine, good, scrap, note } = line;
  return [toWorkbookDate(workedOn), employee, job, operation, machine, null, good, scrap, note];
}

function writeTotal(sheet: Worksheet, timesheet: TimesheetWorkbook, headerRow: number): void {
  const lastRow = headerRow + timesheet.rows.length;
  const total = sheet.getRow(lastRow + 1);
  const stored = timesheet.rows.map((line) => D(toStoredHours(line, timesheet)));
  total.getCell(1).value = 'Total';
  const formula = timesheet.rows.length > 0 ? `SUM(F${headerRow + 1}:F${lastRow})` : '0';
  writeHours(total.getCell(HOURS_COLUMN), { formula, result: sum(stored).toNumber() }, timesheet);
  for (let column = 1; column <= HEADERS.length; column += 1) {
    total.getCell(column).font = TOTAL_FONT;
    total.getCell(column).border = TOTAL_BORDER;
  }
  total.commit();
}

function writeHours(cell: Cell, value: CellValue, { hoursAs }: TimesheetWorkbook): void {
  cell.value = value;
  cell.numFmt = hoursAs === 'duration' ? DURATION_FORMAT : HOURS_FORMAT;
}

function toStoredHours({ hours }: TimesheetLine, { hoursAs }: TimesheetWorkbook): number {
  if (hoursAs !== 'duration') return D(hours).toNumber();
  return D(hours).times(SECONDS_PER_HOUR).round().div(SECONDS_PER_DAY).toNumber();
}
