import { JOB_STATUSES, type JobStatus, MACHINE_COST_KINDS } from '@brakeven/contract';
import {
  D,
  dateFromSerial,
  findForceUnit,
  findLengthUnit,
  type ForceUnit,
  type LengthUnit,
  moneyText,
  parseDateText,
  parseForce,
  parseLength,
  percentText,
  rateText,
  toForce,
  toLength,
  toMoney,
  toPercent,
  toRate,
  type UnitSystem,
} from '@brakeven/values';
import { type SetupCellKind, type SetupColumn } from './setup-columns';
import { type RawCell } from './sheet-file';
import { toLabel } from './timesheet-cells';

export type SetupValue = string | number | boolean;

/** What a cell of the set-up workbook says, or why it cannot be read. */
export type SetupReading =
  | { readonly ok: true; readonly value: SetupValue; readonly warning?: SetupTrouble }
  | ({ readonly ok: false } & SetupTrouble);

export interface SetupTrouble {
  readonly code: string;
  readonly message: string;
}

/** What a column's cells need to be read beside themselves. */
export interface SetupColumnContext {
  readonly column: SetupColumn;
  readonly date1904: boolean;
  /** Unit of numbers without one, from the header or the shop's own units. */
  readonly unit: string;
}

type ReadCell = (cell: RawCell, context: SetupColumnContext) => SetupReading;

const STATUS_WORDS: Readonly<Record<string, JobStatus>> = {
  active: 'open',
  'in progress': 'open',
  closed: 'finished',
  complete: 'finished',
  completed: 'finished',
  done: 'finished',
  canceled: 'cancelled',
};
const YES_NO: Readonly<Record<string, boolean>> = {
  yes: true,
  y: true,
  true: true,
  '1': true,
  no: false,
  n: false,
  false: false,
  '0': false,
};

const READERS: Readonly<Record<SetupCellKind, ReadCell>> = {
  label: readLabel,
  date: readDate,
  money: (cell, context) => readAmount(cell, context, (amount) => moneyText(toMoney(amount))),
  rate: (cell, context) => readAmount(cell, context, (amount) => rateText(toRate(amount))),
  percent: readPercent,
  count: readCount,
  yesNo: readYesNo,
  force: readForce,
  length: readLength,
  costKind: (cell, context) => readChoice(cell, context, MACHINE_COST_KINDS, {}),
  jobStatus: (cell, context) => readChoice(cell, context, JOB_STATUSES, STATUS_WORDS),
};

/** Reads a cell as its column asks. Errors and formulas without a stored result are refused for every kind. */
export function readSetupCell(cell: RawCell, context: SetupColumnContext): SetupReading {
  if (cell.kind === 'error') return refuse('cell_error', cell, `shows the error ${cell.value}.`);
  if (cell.kind === 'formula-without-result') {
    return refuse(
      'formula_without_result',
      cell,
      'holds a formula whose result is not stored. Open and save the workbook in your spreadsheet program.',
    );
  }
  return READERS[context.column.kind](cell, context);
}

/** The unit that a header's brackets or the shop's units give a column; undefined when the brackets name none known. */
export function findColumnUnit(
  kind: SetupCellKind,
  headerUnit: string | null,
  units: UnitSystem,
): string | undefined {
  if (kind === 'force') return headerUnit ? findForceUnit(headerUnit) : { us: 'US ton', metric: 'kN' }[units];
  if (kind === 'length') return headerUnit ? findLengthUnit(headerUnit) : { us: 'in', metric: 'mm' }[units];
  return '';
}

function readLabel(cell: RawCell, { column }: SetupColumnContext): SetupReading {
  if (cell.kind === 'text' || (cell.kind === 'number' && !cell.isPercent)) return accept(toLabel(cell.text));
  return refuse(
    'text_unreadable',
    cell,
    `holds '${cell.text}' as a date, time or other special value, where ${column.header} should stand. ` +
      'Format the cell as text and type it again.',
  );
}

function readDate(cell: RawCell, { column, date1904 }: SetupColumnContext): SetupReading {
  const wanted = `${column.header} must be a real date or a text such as 2026-03-02.`;
  if (cell.kind !== 'date' && cell.kind !== 'text') {
    return refuse('date_unreadable', cell, `holds '${cell.text}', which is no date. ${wanted}`);
  }
  const parsed =
    cell.kind === 'date'
      ? dateFromSerial(cell.value, date1904 ? '1904' : '1900')
      : parseDateText(cell.text, 'YYYY-MM-DD');
  return parsed.ok
    ? accept(parsed.value)
    : refuse('date_unreadable', cell, `cannot be read: ${parsed.message} ${wanted}`);
}

function readAmount(
  cell: RawCell,
  { column }: SetupColumnContext,
  toText: (amount: number | string) => string,
): SetupReading {
  const amount = findNumber(cell);
  if (amount === null || (cell.kind === 'number' && cell.isPercent)) {
    return refuse(
      'amount_unreadable',
      cell,
      `holds '${cell.text}'. ${column.header} must be a number, such as 28.50.`,
    );
  }
  if (D(amount).lt(0)) {
    return refuse('amount_negative', cell, `holds ${cell.text}, but ${column.header} cannot be below 0.`);
  }
  return accept(toText(amount));
}

function readPercent(cell: RawCell, { column }: SetupColumnContext): SetupReading {
  const number = findNumber(cell);
  if (number === null) {
    return refuse(
      'percent_unreadable',
      cell,
      `holds '${cell.text}'. ${column.header} must be a number, such as 28.`,
    );
  }
  const isFraction = cell.kind === 'number' && cell.isPercent;
  const percent = toPercent(isFraction ? D(number).times(100) : number);
  if (percent.lt(0)) return refuse('percent_negative', cell, `holds ${cell.text}; it cannot be below 0.`);
  const text = percentText(percent);
  if (isFraction || percent.eq(0) || percent.gte(1)) return accept(text);
  const message = `Cell ${cell.address} is read as ${text} %, less than one percent. Write 28 for 28 %.`;
  return { ok: true, value: text, warning: { code: 'percent_small', message } };
}

function readCount(cell: RawCell, { column }: SetupColumnContext): SetupReading {
  const number = findNumber(cell);
  if (number !== null && D(number).isInteger() && D(number).gte(0)) return accept(Number(number));
  return refuse(
    'count_unreadable',
    cell,
    `holds '${cell.text}'. ${column.header} must be a whole number, such as 24.`,
  );
}

function readYesNo(cell: RawCell, { column }: SetupColumnContext): SetupReading {
  const value = YES_NO[cell.text.trim().toLowerCase()];
  return value === undefined
    ? refuse('yes_no_unreadable', cell, `holds '${cell.text}'. ${column.header} must be yes or no.`)
    : accept(value);
}

function readForce(cell: RawCell, { unit }: SetupColumnContext): SetupReading {
  if (cell.kind === 'number' && cell.value > 0)
    return accept(toForce(cell.value, unit as ForceUnit).toFixed());
  const parsed = parseForce(cell.text, unit as ForceUnit);
  if (cell.kind === 'text' && parsed.ok && parsed.value.gt(0)) return accept(parsed.value.toFixed());
  const why = parsed.ok ? 'The force must be above 0.' : parsed.message;
  return refuse('force_unreadable', cell, `holds '${cell.text}'. ${why}`);
}

function readLength(cell: RawCell, { unit }: SetupColumnContext): SetupReading {
  if (cell.kind === 'number' && cell.value > 0)
    return accept(toLength(cell.value, unit as LengthUnit).toFixed());
  const parsed = parseLength(cell.text, unit as LengthUnit);
  if (cell.kind === 'text' && parsed.ok && parsed.value.gt(0)) return accept(parsed.value.toFixed());
  const why = parsed.ok ? 'The length must be above 0.' : parsed.message;
  return refuse('length_unreadable', cell, `holds '${cell.text}'. ${why}`);
}

function readChoice<T extends string>(
  cell: RawCell,
  { column }: SetupColumnContext,
  choices: readonly T[],
  alsoKnown: Readonly<Record<string, T>>,
): SetupReading {
  const word = toLabel(cell.text).toLowerCase();
  const choice = choices.find((one) => one === word) ?? alsoKnown[word];
  return choice
    ? accept(choice)
    : refuse(
        'choice_unknown',
        cell,
        `holds '${cell.text}'. ${column.header} must be one of: ${choices.join(', ')}.`,
      );
}

/** A number, or a text that is one without doubt: digits with at most a point. */
function findNumber(cell: RawCell): number | string | null {
  if (cell.kind === 'number') return cell.value;
  return cell.kind === 'text' && /^-?\d{1,12}(\.\d{1,12})?$/.test(cell.text) ? cell.text : null;
}

function accept(value: SetupValue): SetupReading {
  return { ok: true, value };
}

function refuse(code: string, cell: RawCell, words: string): SetupReading {
  return { ok: false, code, message: `Cell ${cell.address} ${words}` };
}
