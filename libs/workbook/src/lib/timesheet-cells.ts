import { type TimesheetField } from '@brakeven/contract';
import {
  dateFromSerial,
  type DateFormat,
  hoursFromDays,
  hoursText,
  type LocalDate,
  parseDateText,
  parseHoursText,
  type Parsed,
  toHours,
  toLocalDate,
} from '@brakeven/values';
import { type RawCell } from './sheet-file';
import { type RowProblemCode } from './timesheet-row';

/** What a cell says for its field, or why it cannot be read. Blank cells are `value: null`. */
export type CellReading<T> =
  | { readonly ok: true; readonly value: T | null }
  | { readonly ok: false; readonly code: RowProblemCode; readonly message: string };

/** How dates and hours that are text are to be read. */
export interface TextForms {
  readonly date1904: boolean;
  readonly dateFormat: DateFormat | undefined;
  readonly decimalMark: '.' | ',';
  /** Serial days read before; the same few stand in most rows of a sheet. */
  readonly knownDays: Map<number, Parsed<LocalDate>>;
}

type Labelled = 'employee' | 'job' | 'operation' | 'machine';

const FIRST_DAY = toLocalDate('1990-01-01');
const LAST_DAY = toLocalDate('2199-12-31');
const REAL_DATE = 'Write it as a real date.';
const DECLARE_ORDER =
  'Declare it under Change columns, or under To settle where it is offered (at the command line: --date-format), ' +
  'or write real dates.';
const OTHER_ORDER =
  'If this sheet writes its dates in another order, declare that one under Change columns (at the command line: ' +
  '--date-format).';
const NO_DATE_FORMAT = 'Format the cell as a number or a duration, not as a date.';
const HOURS_WANTED = 'Write hours as a number such as 7.5 or as a duration such as 7:30.';

/**
 * A work date: a real date, or text in the declared order.
 * Codes: `date_unreadable`, `date_out_of_range`, `cell_error`, `formula_without_result`.
 */
export function readDateCell(cell: RawCell | undefined, forms: TextForms): CellReading<LocalDate> {
  if (!cell) return blank;
  const stored = findStoredProblem(cell);
  if (stored) return stored;
  if (cell.kind === 'date') return readSerialDate(cell.value, cell.address, forms);
  if (cell.kind !== 'text') {
    return refuse(
      'date_unreadable',
      `Cell ${cell.address} holds ${describe(cell)}, not a date. ${REAL_DATE}`,
    );
  }
  if (!forms.dateFormat) {
    return refuse(
      'date_unreadable',
      `Cell ${cell.address} holds the text '${cell.text}', and no order of day and month is declared for text ` +
        `dates in this sheet. ${DECLARE_ORDER}`,
    );
  }
  const parsed = parseDateText(cell.text, forms.dateFormat);
  return parsed.ok
    ? assertRange(parsed.value, cell.address)
    : refuse('date_unreadable', `Cell ${cell.address}: ${parsed.message} ${OTHER_ORDER}`);
}

/**
 * Hours with 4 decimals: a number is decimal hours, a cell with a time or duration format a duration, text `7:30`
 * or a decimal with the declared mark. A duration is rounded to the second first.
 * Codes: `hours_unreadable`, `cell_error`, `formula_without_result`.
 */
export function readHoursCell(cell: RawCell | undefined, { decimalMark }: TextForms): CellReading<string> {
  if (!cell) return blank;
  const stored = findStoredProblem(cell);
  if (stored) return stored;
  if (cell.kind === 'number' && !cell.isPercent) return accept(hoursText(toHours(cell.value)));
  if (cell.kind === 'duration') return accept(hoursText(hoursFromDays(cell.value)));
  if (cell.kind !== 'text') {
    return refuse(
      'hours_unreadable',
      `Cell ${cell.address} holds ${describe(cell)}, not hours. ${HOURS_WANTED}${cell.kind === 'date' ? ` ${NO_DATE_FORMAT}` : ''}`,
    );
  }
  return readHoursText(cell.text, cell.address, decimalMark);
}

/**
 * An employee, job, operation or machine: text, or a number as text (`1001`, never `1001.0`).
 * Codes: `employee_unreadable` and its like, `cell_error`, `formula_without_result`.
 */
export function readLabelCell(cell: RawCell | undefined, field: Labelled): CellReading<string> {
  if (!cell) return blank;
  const stored = findStoredProblem(cell);
  if (stored) return stored;
  if (cell.kind === 'text' || (cell.kind === 'number' && !cell.isPercent)) return accept(toLabel(cell.text));
  return refuse(
    `${field}_unreadable`,
    `Cell ${cell.address} holds ${describe(cell)}, where the ${field} should stand. Spreadsheets turn entries such ` +
      'as 3-12 into dates: format the cell as text and type it again.',
  );
}

/**
 * A count of pieces. Fractions and numbers below 0 are handed on for the rules to refuse.
 * Codes: `pieces_unreadable`, `cell_error`, `formula_without_result`.
 */
export function readPiecesCell(cell: RawCell | undefined, field: TimesheetField): CellReading<number> {
  if (!cell) return blank;
  const stored = findStoredProblem(cell);
  if (stored) return stored;
  if (cell.kind === 'number' && !cell.isPercent) return accept(cell.value);
  if (cell.kind === 'text' && /^[+-]?\d{1,9}$/.test(cell.text)) return accept(Number(cell.text));
  return refuse(
    'pieces_unreadable',
    `Cell ${cell.address} holds ${describe(cell)}, where the ${field} pieces should stand. Write a whole number.`,
  );
}

/** A note: whatever the cell shows. Code: `cell_error`, `formula_without_result`. */
export function readNoteCell(cell: RawCell | undefined): CellReading<string> {
  if (!cell) return blank;
  return findStoredProblem(cell) ?? accept(toLabel(cell.text));
}

/** Without spaces around, with single spaces inside. */
export function toLabel(text: string): string {
  return text.replace(/\s+/gu, ' ').trim();
}

const blank = { ok: true, value: null } as const;

function accept<T>(value: T): CellReading<T> {
  return { ok: true, value };
}

function refuse(code: RowProblemCode, message: string): CellReading<never> & { ok: false } {
  return { ok: false, code, message };
}

/** A cell that no field can be read from: an error value, or a formula never calculated. */
function findStoredProblem(cell: RawCell): (CellReading<never> & { ok: false }) | null {
  if (cell.kind === 'error') {
    return refuse(
      'cell_error',
      `Cell ${cell.address} shows the error ${cell.value}. Put it right in the workbook.`,
    );
  }
  if (cell.kind !== 'formula-without-result') return null;
  return refuse(
    'formula_without_result',
    `Cell ${cell.address} holds a formula whose result is not stored in the file. Open the workbook in your ` +
      'spreadsheet program, save it and send it again.',
  );
}

function readSerialDate(serial: number, address: string, forms: TextForms): CellReading<LocalDate> {
  const known = forms.knownDays.get(serial);
  const date = known ?? dateFromSerial(serial, forms.date1904 ? '1904' : '1900');
  if (!known) forms.knownDays.set(serial, date);
  if (!date.ok) return refuse('date_out_of_range', `Cell ${address}: ${date.message}`);
  return assertRange(date.value, address);
}

function assertRange(date: LocalDate, address: string): CellReading<LocalDate> {
  if (date >= FIRST_DAY && date <= LAST_DAY) return accept(date);
  return refuse(
    'date_out_of_range',
    `Cell ${address} says ${date}, which cannot be a day of work. Dates from ${FIRST_DAY} to ${LAST_DAY} are read.`,
  );
}

function readHoursText(text: string, address: string, decimalMark: '.' | ','): CellReading<string> {
  const isClock = text.includes(':');
  const wrongMark = decimalMark === ',' ? '.' : ',';
  if (!isClock && text.includes(wrongMark)) {
    return refuse(
      'hours_unreadable',
      `Cell ${address} holds the text '${text}', but the decimal mark of this sheet is '${decimalMark}'. ` +
        'Change the cell, or choose the other decimal mark for the sheet.',
    );
  }
  const parsed = parseHoursText(isClock ? text : text.replace(',', '.'));
  return parsed.ok
    ? accept(hoursText(parsed.value))
    : refuse('hours_unreadable', `Cell ${address}: ${parsed.message}`);
}

/** The cell in words. A date that no work can be from is most likely a number in a cell formatted for dates. */
function describe(cell: RawCell): string {
  if (cell.kind === 'date' && !isLikelyDate(cell.text)) {
    const shown = cell.text === String(cell.value) ? '' : ` (${cell.text})`;
    return `the number ${cell.value} formatted as a date${shown}`;
  }
  const kinds: Readonly<Partial<Record<RawCell['kind'], string>>> = {
    number: 'the number',
    date: 'the date',
    duration: 'the time',
    boolean: 'the value',
    text: 'the text',
  };
  return `${kinds[cell.kind] ?? 'the value'} '${cell.text}'`;
}

function isLikelyDate(text: string): boolean {
  const day = text.slice(0, FIRST_DAY.length);
  return /^\d{4}-\d\d-\d\d$/.test(day) && day >= FIRST_DAY && day <= LAST_DAY;
}
