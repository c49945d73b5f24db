import { columnLetters, columnNumber } from './cell-address';
import { READ_LIMITS } from './read-limits';
import { WorkbookError } from './workbook-error';
import { decodeXmlText, parseXmlAttributes } from './xml-tags';

/** What a cell stores, for cells whose stored value the workbook library does not hand over whole. */
export interface StoredValue {
  readonly type: string;
  /** Text of the value; null when the file holds none. */
  readonly value: string | null;
  readonly isFormula: boolean;
}

/** What was found in the XML of a sheet. */
export interface SheetScan {
  /** Formula cells and ISO date cells by address. */
  readonly stored: ReadonlyMap<string, StoredValue>;
  /** Ranges of merged cells, such as `A1:D1`. */
  readonly merges: readonly string[];
  readonly rowsFilled: number;
  readonly cells: number;
}

const MISSING_REFERENCE = /<(?:c|row)(?:\s(?![^>]*?\sr\s*=)(?!r\s*=)[^>]*)?>/;

/**
 * Looks through the XML of a sheet (without prefixes, every cell with its address) for what decides about reading
 * it: sizes, merges, and the stored results of formulas with their type.
 */
export function scanSheetXml(xml: string): SheetScan {
  const stored = new Map<string, StoredValue>();
  const counts = { cells: 0, rowsFilled: 0, lastRow: '' };
  for (let start = nextCell(xml, 0); start >= 0;) {
    const tagEnd = xml.indexOf('>', start);
    counts.cells += 1;
    if (tagEnd < 0) break;
    const isBlank = xml[tagEnd - 1] === '/';
    const end = isBlank ? tagEnd : xml.indexOf('</c>', tagEnd);
    if (end < 0) break;
    if (!isBlank) noteCell(xml, { start, tagEnd, end }, counts, stored);
    start = nextCell(xml, end);
  }
  const merges = [...xml.matchAll(/<mergeCell\s[^>]*?ref\s*=\s*["']([A-Z0-9:]+)["']/g)];
  return { stored, merges: merges.map(([, range = '']) => range), ...counts };
}

/** Refuses sheets that hold more than can be read. @throws WorkbookError `too_many_rows`, `too_many_cells` */
export function assertSheetSize(scan: Pick<SheetScan, 'rowsFilled' | 'cells'>, sheet: string): void {
  const { rowsMax, cellsMax } = READ_LIMITS;
  if (scan.rowsFilled > rowsMax) {
    throw new WorkbookError(
      'too_many_rows',
      `Sheet '${sheet}' has ${scan.rowsFilled.toLocaleString('en-US')} rows; at most ` +
        `${rowsMax.toLocaleString('en-US')} can be read at once. Split the file, for example by year.`,
    );
  }
  if (scan.cells > cellsMax) {
    throw new WorkbookError(
      'too_many_cells',
      `Sheet '${sheet}' has more than ${cellsMax.toLocaleString('en-US')} cells, most of them perhaps only ` +
        'formatted. Copy the filled columns into a new workbook.',
    );
  }
}

/** Gives rows and cells the address that follows from their place, when a program left it out. */
export function addressCells(xml: string): string {
  if (!MISSING_REFERENCE.test(xml)) return xml;
  let row = 0;
  let column = 0;
  return xml.replace(/<(row|c)(\s[^>]*?)?(\/?)>/g, (_, tag: string, attributes = '', close: string) => {
    const known = parseXmlAttributes(attributes)['r'];
    if (tag === 'row') {
      row = known ? Number(known) : row + 1;
      column = 0;
      return known ? `<row${attributes}${close}>` : `<row r="${row}"${attributes}${close}>`;
    }
    column = known ? columnNumber(known) : column + 1;
    return known ? `<c${attributes}${close}>` : `<c r="${columnLetters(column)}${row}"${attributes}${close}>`;
  });
}

interface CellSpan {
  readonly start: number;
  readonly tagEnd: number;
  readonly end: number;
}

function noteCell(
  xml: string,
  { start, tagEnd, end }: CellSpan,
  counts: { rowsFilled: number; lastRow: string },
  stored: Map<string, StoredValue>,
): void {
  const tag = xml.slice(start + 2, tagEnd);
  const row = /\sr\s*=\s*["'][A-Z]+(\d+)/.exec(tag)?.[1] ?? '';
  if (row !== counts.lastRow) {
    counts.lastRow = row;
    counts.rowsFilled += 1;
  }
  const isFormula = /^\s*<f[\s>/]/.test(xml.slice(tagEnd + 1, tagEnd + 20));
  if (!isFormula && !/\st\s*=\s*["']d["']/.test(tag)) return;
  const { r: address = '', t: type = 'n' } = parseXmlAttributes(tag);
  stored.set(address, { type, value: findValue(xml.slice(tagEnd + 1, end)), isFormula });
}

function findValue(inner: string): string | null {
  const [, value] = /<v(?:\s[^>]*?)?(?:\/>|>([^<]*)<\/v>)/.exec(inner) ?? [null, null];
  if (value === null) return null;
  return decodeXmlText(value ?? '');
}

/** Where the next `<c …>` starts; names that only begin with c, such as `<cols>`, are passed over. */
function nextCell(xml: string, from: number): number {
  for (let at = xml.indexOf('<c', from); at >= 0; at = xml.indexOf('<c', at + 2)) {
    const next = xml[at + 2] ?? '';
    if (next === '>' || next === '/' || next.trim() === '') return at;
  }
  return -1;
}
