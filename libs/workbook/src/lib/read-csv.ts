import { CsvError, parse } from 'csv-parse/sync';
import { columnLetters } from './cell-address';
import { READ_LIMITS } from './read-limits';
import { type RawCell, type Sheet, type SheetRow } from './sheet-file';
import { toNotWorkbookError, WorkbookError } from './workbook-error';

/** Name of the one sheet of a CSV file. */
export const CSV_SHEET = 'CSV';

/** A separator used in a file of comma- or semicolon-separated values. */
export type CsvSeparator = ',' | ';';

const LINES_LOOKED_AT = 50;

/**
 * Reads a CSV file as one sheet of text cells (RFC 4180; comma or semicolon, told from the file).
 * @throws WorkbookError `csv_not_utf8`, `csv_separator_unknown`, `csv_quotes_broken`, `too_many_rows`
 */
export function readCsv(bytes: Uint8Array): { sheet: Sheet; separator: CsvSeparator } {
  const text = decodeUtf8(bytes);
  const separator = findSeparator(text);
  const rows = parseRecords(text, separator).flatMap((record, index) => toSheetRow(record, index + 1));
  if (rows.length > READ_LIMITS.rowsMax) {
    throw new WorkbookError(
      'too_many_rows',
      `This file has ${rows.length.toLocaleString('en-US')} rows; at most ` +
        `${READ_LIMITS.rowsMax.toLocaleString('en-US')} can be read at once. Split it, for example by year.`,
    );
  }
  return { sheet: { name: CSV_SHEET, isHidden: false, date1904: false, rows }, separator };
}

function decodeUtf8(bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    throw new WorkbookError(
      'csv_not_utf8',
      "This CSV file is not in UTF-8, so letters such as é would be lost. Save it as 'CSV UTF-8' " +
        'or as an .xlsx workbook.',
    );
  }
}

/** The separator that stands outside quotes more often in the typical line; a comma if there is none at all. */
function findSeparator(text: string): CsvSeparator {
  const lines = listUnquotedLines(text);
  const [commas, semicolons, tabs] = [',', ';', '\t'].map((mark) =>
    typicalCount(lines.map((line) => line.split(mark).length - 1)),
  ) as [number, number, number];
  if (commas === 0 && semicolons === 0 && tabs > 0) {
    throw new WorkbookError(
      'csv_separator_unknown',
      'The columns of this file are separated by tabs. Save it with commas or semicolons, or as .xlsx.',
    );
  }
  return semicolons > commas ? ';' : ',';
}

/** The first lines with all quoted text taken out, blank ones left away. */
function listUnquotedLines(text: string): string[] {
  const bare = text.slice(0, 200_000).replace(/"(?:[^"]|"")*"/g, '');
  const lines = bare.split(/\r\n|\n|\r/).filter((line) => line.trim() !== '');
  return lines.slice(0, LINES_LOOKED_AT);
}

function typicalCount(counts: readonly number[]): number {
  return [...counts].sort((a, b) => a - b)[Math.floor(counts.length / 2)] ?? 0;
}

function parseRecords(text: string, separator: CsvSeparator): string[][] {
  try {
    return parse(text, { delimiter: separator, relax_column_count: true, relax_quotes: true });
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    throw new WorkbookError(
      'csv_quotes_broken',
      `Near line ${String(error['lines'] ?? '?')} of this file a quotation mark is opened and not closed. ` +
        'Close it, or save the file as .xlsx.',
    );
  }
}

function toSheetRow(record: readonly string[], row: number): SheetRow[] {
  const cells = record.flatMap((value, index): RawCell[] => {
    const text = value.trim();
    if (text === '') return [];
    return [{ address: `${columnLetters(index + 1)}${row}`, kind: 'text', value, text, hasFormula: false }];
  });
  return cells.length > 0 ? [{ row, cells }] : [];
}

/** Refuses text that is markup or has control characters in it. @throws WorkbookError `file_not_workbook` */
export function assertPlainText(text: string): void {
  if (/^\s*<(!doctype|html|\?xml)/i.test(text)) throw toNotWorkbookError('a web page');
}
