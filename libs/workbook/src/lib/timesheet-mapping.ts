import { createHash } from 'node:crypto';
import {
  LIMITS,
  REQUIRED_TIMESHEET_FIELDS,
  TIMESHEET_FIELDS,
  type TimesheetField,
  type TimesheetMapping,
} from '@brakeven/contract';
import { DATE_FORMATS, type DateFormat, parseDateText } from '@brakeven/values';
import { columnLetters, columnNumber, columnOf } from './cell-address';
import { toPlainHeader } from './header-text';
import { type RawCell, type Sheet, type SheetFile, type SheetRow } from './sheet-file';
import { findHeaderField, listHeaderExamples } from './timesheet-header-words';
import { WorkbookError } from './workbook-error';

export interface HeaderCell {
  readonly column: string;
  /** Blank for a column that holds values without a header. */
  readonly text: string;
  /** The first value below, as text. */
  readonly sample: string;
}

export interface TimesheetHeader {
  /** What was recognised; complete when `missing` is empty. */
  readonly mapping: TimesheetMapping;
  readonly headerCells: readonly HeaderCell[];
  /** The same for the same header, wherever it stands; see {@link headerSignature}. */
  readonly signature: string;
  /** Required fields that no header names. */
  readonly missing: readonly TimesheetField[];
  /** When dates are text: the orders in which most of them can be read, for the user to choose from. */
  readonly dateFormats: readonly DateFormat[];
  /** Other sheets whose header is recognised just as well; they are not read with this mapping. */
  readonly alsoOnSheets: readonly string[];
}

type Columns = Partial<Record<TimesheetField, string>>;

interface Candidate {
  readonly sheet: Sheet;
  readonly row: SheetRow;
  readonly columns: Columns;
  readonly score: number;
  /** Whether anything stands below the row. */
  readonly isFilled: boolean;
}

const REQUIRED_WEIGHT = 10;
const HEADER_CELLS_MIN = 3;
/** Rows below the header that tell how dates and hours are written. */
const ROWS_LOOKED_AT = 1_000;
/** Orders of day and month that cannot be taken for another one. */
const PLAIN_ORDERS: readonly DateFormat[] = ['YYYY-MM-DD', 'YYYY/MM/DD', 'DD MMM YYYY', 'MMM DD YYYY'];

/**
 * Finds the row that heads a timesheet's columns, on any sheet within its first 30 rows: the row with most known
 * wordings, or else the row with most texts, to be mapped by hand.
 *
 * An order of text dates is declared only when those below can mean nothing else (2026-03-02, 2 Mar 2026), and a
 * decimal comma only when a file of semicolon-separated values can mean nothing else; all other readings are the
 * user's to choose.
 * @throws WorkbookError `header_not_found`
 */
export function findTimesheetHeader(file: SheetFile): TimesheetHeader {
  const candidates = file.sheets.flatMap(listCandidates).sort(compareCandidates);
  const best = candidates[0] ?? findTextRow(file);
  if (!best) throw toHeaderError(file);
  const others = candidates.filter(
    ({ sheet, score, isFilled }) => sheet !== best.sheet && score === best.score && isFilled,
  );
  return {
    ...describeHeader(best.sheet, best.row, best.columns, file),
    alsoOnSheets: [...new Set(others.map(({ sheet }) => sheet.name))],
  };
}

/**
 * Describes the header row that a mapping names, for checking a mapping chosen by hand against its file.
 * @throws WorkbookError `sheet_not_found`, `header_not_found`
 */
export function describeTimesheetHeader(
  file: SheetFile,
  place: Pick<TimesheetMapping, 'sheet' | 'headerRow'>,
): TimesheetHeader {
  const sheet = getSheet(file, place.sheet);
  const row = sheet.rows.find(({ row }) => row === place.headerRow);
  if (!row)
    throw new WorkbookError('header_not_found', `Row ${place.headerRow} of sheet '${sheet.name}' is blank.`);
  return { ...describeHeader(sheet, row, recogniseColumns(row), file), alsoOnSheets: [] };
}

/** The sheet of that name. @throws WorkbookError `sheet_not_found` */
export function getSheet(file: SheetFile, name: string): Sheet {
  const sheet = file.sheets.find((one) => one.name === name);
  if (sheet) return sheet;
  const names = file.sheets.map((one) => `'${one.name}'`).join(', ');
  throw new WorkbookError('sheet_not_found', `There is no sheet '${name}' in this file; it has ${names}.`);
}

/**
 * A short text that is equal for equal headers: the same wordings in the same columns, whatever their case, spaces,
 * punctuation and units. For remembering a mapping.
 */
export function headerSignature(cells: readonly Pick<HeaderCell, 'column' | 'text'>[]): string {
  const named = cells.filter(({ text }) => toPlainHeader(text) !== '');
  const words = named.map(({ column, text }) => `${column}=${toPlainHeader(text)}`);
  return createHash('sha256').update(words.join('|')).digest('hex');
}

function listCandidates(sheet: Sheet): Candidate[] {
  return sheet.rows
    .filter(({ row }) => row <= LIMITS.headerRowsSearched)
    .map((row) => {
      const columns = recogniseColumns(row);
      return { sheet, row, columns, score: toScore(columns), isFilled: row !== sheet.rows.at(-1) };
    })
    .filter(({ score }) => score >= 2 * REQUIRED_WEIGHT);
}

/** Best score first; of equals a sheet with rows before an empty one, a visible before a hidden one. */
function compareCandidates(a: Candidate, b: Candidate): number {
  const byScore = b.score - a.score || Number(b.isFilled) - Number(a.isFilled);
  return byScore || Number(a.sheet.isHidden) - Number(b.sheet.isHidden);
}

function recogniseColumns({ cells }: SheetRow): Columns {
  const best = new Map<TimesheetField, { column: string; rank: number }>();
  for (const cell of cells) {
    const found = cell.kind === 'text' ? findHeaderField(cell.value) : null;
    if (!found || (best.get(found.field)?.rank ?? Infinity) <= found.rank) continue;
    best.set(found.field, { column: columnOf(cell.address), rank: found.rank });
  }
  return Object.fromEntries([...best].map(([field, { column }]) => [field, column]));
}

function toScore(columns: Columns): number {
  const required = REQUIRED_TIMESHEET_FIELDS.filter((field) => columns[field]).length;
  return required * REQUIRED_WEIGHT + Object.keys(columns).length - required;
}

/** For headers in unknown words: the first of the rows with most text cells. */
function findTextRow(file: SheetFile): Candidate | null {
  const countTexts = (row: SheetRow) => row.cells.filter(({ kind }) => kind === 'text').length;
  const rows = file.sheets
    .filter((sheet) => !sheet.isHidden)
    .flatMap((sheet) => sheet.rows.map((row) => ({ sheet, row, texts: countTexts(row) })))
    .filter(({ row, texts }) => row.row <= LIMITS.headerRowsSearched && texts >= HEADER_CELLS_MIN)
    .sort((a, b) => b.texts - a.texts);
  const [most] = rows;
  return most ? { sheet: most.sheet, row: most.row, columns: {}, score: 0, isFilled: true } : null;
}

function describeHeader(
  sheet: Sheet,
  row: SheetRow,
  columns: Columns,
  file: SheetFile,
): Omit<TimesheetHeader, 'alsoOnSheets'> {
  const below = sheet.rows.filter((one) => one.row > row.row).slice(0, ROWS_LOOKED_AT);
  const headerCells = listHeaderCells(row, below);
  const dateFormats = listFittingFormats(listTexts(below, columns.date));
  const decimalMark = hasDecimalCommas(file, listTexts(below, columns.hours)) ? ',' : undefined;
  const dateFormat = dateFormats.find((format) => PLAIN_ORDERS.includes(format));
  return {
    mapping: {
      sheet: sheet.name,
      headerRow: row.row,
      columns,
      ...(dateFormat && { dateFormat }),
      ...(decimalMark && { decimalMark }),
    },
    headerCells,
    signature: headerSignature(headerCells),
    missing: REQUIRED_TIMESHEET_FIELDS.filter((field) => !columns[field]),
    dateFormats,
  };
}

function listHeaderCells(header: SheetRow, below: readonly SheetRow[]): HeaderCell[] {
  const texts = new Map(header.cells.map((cell) => [columnOf(cell.address), cell.text]));
  const samples = new Map<string, string>();
  for (const { cells } of below) {
    for (const { address, text } of cells) {
      const column = columnOf(address);
      if (!samples.has(column)) samples.set(column, text);
    }
  }
  const numbers = [...new Set([...texts.keys(), ...samples.keys()])].map(columnNumber).sort((a, b) => a - b);
  return numbers.map(columnLetters).map((column) => ({
    column,
    text: texts.get(column) ?? '',
    sample: samples.get(column) ?? '',
  }));
}

function listTexts(rows: readonly SheetRow[], column: string | undefined): string[] {
  const isText = (cell: RawCell) => cell.kind === 'text' && columnOf(cell.address) === column;
  return column ? rows.flatMap(({ cells }) => cells.filter(isText).map(({ text }) => text)) : [];
}

/** The orders that read most of the texts; none when no text is a date in any order. */
function listFittingFormats(texts: readonly string[]): DateFormat[] {
  const counts = DATE_FORMATS.map((format) => texts.filter((text) => parseDateText(text, format).ok).length);
  const most = Math.max(...counts);
  return most === 0 ? [] : DATE_FORMATS.filter((_, index) => counts[index] === most);
}

/**
 * Whether hours can only be written with a decimal comma: the values are separated by semicolons, there are commas
 * and no points, and no comma stands where thousands would be grouped.
 */
function hasDecimalCommas(file: SheetFile, texts: readonly string[]): boolean {
  const commas = texts.filter((text) => text.includes(','));
  if (file.separator !== ';' || commas.length === 0 || texts.some((text) => text.includes('.'))) return false;
  return commas.every((text) => /^(0,\d+|\d+,(\d{1,2}|\d{4,}))$/.test(text));
}

function toHeaderError(file: SheetFile): WorkbookError {
  const names = file.sheets.map(({ name }) => `'${name}'`).join(', ') || 'none';
  const wanted = REQUIRED_TIMESHEET_FIELDS.map((field) => `${field} (${listHeaderExamples(field)} …)`).join(
    '; ',
  );
  const unused = TIMESHEET_FIELDS.length - REQUIRED_TIMESHEET_FIELDS.length;
  return new WorkbookError(
    'header_not_found',
    `No row with column headers was found in the first ${LIMITS.headerRowsSearched} rows. Sheets: ${names}. ` +
      `Looked for columns headed ${wanted}; ${unused} more are optional.`,
  );
}
