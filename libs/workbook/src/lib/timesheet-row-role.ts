import { type TimesheetField } from '@brakeven/contract';
import { type RawCell, type SheetRow } from './sheet-file';

export type FieldCells = Readonly<Partial<Record<TimesheetField, RawCell>>>;

/** What a row of a timesheet is, before its cells are read. */
export type RowRole = 'entry' | 'total' | 'text' | 'header' | 'blank';

export interface SortedRow {
  readonly row: SheetRow;
  readonly fields: FieldCells;
  readonly role: RowRole;
}

/** `bare` rows hold hours and nothing else: an unlabelled total or an entry with all else forgotten. */
type FirstGuess = Omit<SortedRow, 'role'> & { readonly guess: RowRole | 'bare' };

const TOTAL_LABEL = /\b(sub|grand)?[\s-]*totals?\b|^sum\W*$|^[Σ∑]/iu;
const COUNTED: readonly TimesheetField[] = ['hours', 'good', 'scrap'];
const NAMED: readonly TimesheetField[] = ['job', 'operation', 'machine'];
const FOOTER_FIELDS_MAX = 2;

/**
 * Tells entries from all else that stands below a header:
 * - `total`: a row labelled as a total that names no job, operation or machine ('Total', 'Ann, total'); at the very
 *   end also hours with nothing else;
 * - `header`: the header again;
 * - `text`: below the last entry, a row without hours, counts and date, such as a signature line;
 * - `blank`: nothing in the mapped columns.
 */
export function sortTimesheetRows(
  rows: readonly Omit<SortedRow, 'role'>[],
  headerFields: FieldCells,
): SortedRow[] {
  const guesses = rows.map((one): FirstGuess => ({ ...one, guess: guessRole(one, headerFields) }));
  const lastEntry = guesses.findLastIndex(({ guess }) => guess === 'entry');
  const lastHours = guesses.findLastIndex(({ guess }) => ['entry', 'total', 'bare'].includes(guess));
  return guesses.map(({ guess, ...one }, index) => {
    if (guess === 'bare') return { ...one, role: index === lastHours ? 'total' : 'entry' };
    if (guess === 'text' && index < lastEntry) return { ...one, role: isUnmapped(one) ? 'blank' : 'entry' };
    return { ...one, role: guess };
  });
}

function guessRole({ row, fields }: Omit<SortedRow, 'role'>, header: FieldCells): FirstGuess['guess'] {
  const labels = row.cells.filter(isTotalLabel);
  const isFree = (cell: RawCell | undefined) => !cell || labels.includes(cell);
  const isBare = Object.entries(fields).every(([field, cell]) => isCounted(field) || isFree(cell));
  const isNameless = NAMED.every((field) => isFree(fields[field]));
  const isCounting = COUNTED.some((field) => holdsValue(fields[field]));
  if (labels.length > 0 && isCounting && (isBare || isNameless)) return 'total';
  if (isBare && holdsValue(fields.hours)) return 'bare';
  if (isUnmapped({ fields })) return row.cells.length === 1 ? 'text' : 'blank';
  if (repeatsHeader(fields, header)) return 'header';
  return isFooter(fields) ? 'text' : 'entry';
}

function isUnmapped({ fields }: Pick<SortedRow, 'fields'>): boolean {
  return Object.keys(fields).length === 0;
}

function isTotalLabel({ kind, text }: RawCell): boolean {
  return kind === 'text' && TOTAL_LABEL.test(text);
}

function isCounted(field: string): boolean {
  return (COUNTED as readonly string[]).includes(field);
}

/** A number, or a text with digits in it, as all values of a CSV file are. */
function holdsValue(cell: RawCell | undefined): boolean {
  return cell !== undefined && (cell.kind !== 'text' || /\d/.test(cell.text));
}

function repeatsHeader(fields: FieldCells, header: FieldCells): boolean {
  const named = Object.entries(header) as [TimesheetField, RawCell][];
  return named.length > 0 && named.every(([field, { text }]) => fields[field]?.text === text);
}

function isFooter(fields: FieldCells): boolean {
  const hasCounts = COUNTED.some((field) => fields[field]);
  const isDated = fields.date?.kind === 'date' || /^\d/.test(fields.date?.text ?? '');
  return !hasCounts && !isDated && Object.keys(fields).length <= FOOTER_FIELDS_MAX;
}
