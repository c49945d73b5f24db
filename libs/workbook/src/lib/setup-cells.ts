import {
  D,
  dateFromSerial,
  hoursFromDays,
  hoursText,
  type LengthUnit,
  massIn,
  moneyText,
  parseDateText,
  parseHoursText,
  parseLength,
  percentText,
  quoted,
  rateText,
  roundHalfUp,
  toHours,
  toMass,
  toMoney,
  toPercent,
  toRate,
} from '@brakeven/values';
import { isGaugeText, parseAngle } from '@brakeven/forming';
import { findSetupChoices } from './setup-choices';
import { type SetupCellKind, type SetupColumn } from './setup-plan';
import { findSetupQuantity } from './setup-quantities';
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
  pricePerWeight: readPricePerWeight,
  percent: readPercent,
  count: readCount,
  hours: readHours,
  minutes: (cell, context) => readAmount(cell, context, (amount) => roundHalfUp(D(amount), 4).toFixed()),
  yesNo: readYesNo,
  force: readQuantity,
  forcePerLength: readQuantity,
  length: readQuantity,
  radius: (cell, context) => readQuantity(cell, context, { mayBeZero: true }),
  angle: readAngle,
  mass: readQuantity,
  density: readQuantity,
  strength: readQuantity,
  thickness: readThickness,
  costKind: readChoice,
  jobStatus: readChoice,
  materialForm: readChoice,
  issueKind: readChoice,
  invoiceKind: readChoice,
  estimateKind: readChoice,
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
      `holds '${cell.text}'. ${column.header} must be a number, such as ${column.example}.`,
    );
  }
  if (D(amount).lt(0)) {
    const instead = column.insteadOfMinus ? ` ${column.insteadOfMinus}` : '';
    return refuse(
      'amount_negative',
      cell,
      `holds ${cell.text}, but ${column.header} cannot be below 0.${instead}`,
    );
  }
  const text = toText(amount);
  if (column.isAboveZero && D(text).isZero()) {
    return refuse('amount_zero', cell, `holds ${cell.text}, but ${column.header} must be above 0.`);
  }
  return accept(text);
}

/** A price per pound or kilogram, as price per kilogram. */
function readPricePerWeight(cell: RawCell, context: SetupColumnContext): SetupReading {
  const kilograms = massIn(toMass(1, context.unit as 'lb' | 'kg'), 'kg');
  return readAmount(cell, context, (amount) => rateText(toRate(D(amount).div(kilograms))));
}

/** Hours as a number, or as a duration such as 1:30. */
function readHours(cell: RawCell, context: SetupColumnContext): SetupReading {
  if (cell.kind === 'duration' && cell.value >= 0) return accept(hoursText(hoursFromDays(cell.value)));
  const duration = cell.kind === 'text' && cell.text.includes(':') ? parseHoursText(cell.text) : null;
  if (duration?.ok) return accept(hoursText(duration.value));
  return readAmount(cell, context, (amount) => hoursText(toHours(amount)));
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
  const least = column.isAboveZero ? 1 : 0;
  if (number !== null && D(number).isInteger() && D(number).gte(least)) return accept(Number(number));
  const range = column.isAboveZero ? 'above 0' : 'not below 0';
  return refuse(
    'count_unreadable',
    cell,
    `holds '${cell.text}'. ${column.header} must be a whole number ${range}, such as ${column.example}.`,
  );
}

function readYesNo(cell: RawCell, { column }: SetupColumnContext): SetupReading {
  const value = YES_NO[cell.text.trim().toLowerCase()];
  return value === undefined
    ? refuse('yes_no_unreadable', cell, `holds '${cell.text}'. ${column.header} must be yes or no.`)
    : accept(value);
}

/** A number in the column's unit, or a text with a unit of its own; above 0, unless nothing makes sense too. */
function readQuantity(
  cell: RawCell,
  { column, unit }: SetupColumnContext,
  { mayBeZero = false }: { mayBeZero?: boolean } = {},
): SetupReading {
  const form = findSetupQuantity(column.kind);
  if (!form) throw new Error(`${column.kind} is no quantity.`);
  if (cell.kind === 'number' && !cell.isPercent && (cell.value > 0 || (mayBeZero && cell.value === 0))) {
    return accept(form.toBase(cell.value, unit).toFixed());
  }
  const parsed = form.parse(cell.text, unit);
  const isEnough = parsed.ok && (parsed.value.gt(0) || (mayBeZero && parsed.value.isZero()));
  if (cell.kind === 'text' && isEnough) return accept(parsed.value.toFixed());
  const why = parsed.ok ? `The ${form.noun} must be above 0.` : parsed.message;
  return refuse(`${form.noun.replaceAll(' ', '_')}_unreadable`, cell, `holds '${cell.text}'. ${why}`);
}

/** The angle of a tool, in degrees. */
function readAngle(cell: RawCell, { column }: SetupColumnContext): SetupReading {
  const parsed = parseAngle(cell.text);
  const isAngle = cell.kind === 'text' || (cell.kind === 'number' && !cell.isPercent);
  if (isAngle && parsed.ok && parsed.value >= 1 && parsed.value <= 179) {
    return accept(roundHalfUp(D(parsed.value), 4).toFixed());
  }
  const wanted = `${column.header} must be 1 to 179 degrees, such as ${column.example}.`;
  return refuse('angle_unreadable', cell, `holds '${cell.text}'. ${wanted}`);
}

/** Whole numbers from here on are gauges as likely as inches. */
const GAUGE_LEAST = D(3);
const BARE_NUMBER = /^\d+(\.\d+)?$/;

/** A thickness in the words of the workbook, with its unit; which gauge table applies depends on the material. */
function readThickness(cell: RawCell, { column, unit }: SetupColumnContext): SetupReading {
  if (cell.kind === 'date') {
    const words = `holds a date. Spreadsheets turn 3/16 into one: format the cell as text and type it again.`;
    return refuse('thickness_unreadable', cell, words);
  }
  const text = cell.text.trim();
  if (cell.kind === 'text' && isGaugeText(text)) return accept(toLabel(text));
  const isBare = BARE_NUMBER.test(text);
  const parsed = parseLength(text, unit as LengthUnit);
  const isRead = (cell.kind === 'text' || (cell.kind === 'number' && !cell.isPercent)) && parsed.ok;
  if (!isRead || parsed.value.lte(0)) {
    const words = `holds ${quoted(cell.text)}. ${column.header} must be such as 11 ga, 3/16, 0.12 in or 3 mm.`;
    return refuse('thickness_unreadable', cell, words);
  }
  if (isBare && unit === 'in' && D(text).gte(GAUGE_LEAST)) {
    const words = `holds ${text}, which would be ${text} inches. Write ${text} ga if it is a gauge, or ${text} in.`;
    return refuse('thickness_unclear', cell, words);
  }
  return accept(isBare ? `${text} ${unit}` : toLabel(text));
}

function readChoice(cell: RawCell, { column }: SetupColumnContext): SetupReading {
  const choices = findSetupChoices(column.kind);
  if (!choices) throw new Error(`${column.kind} has no list of words.`);
  const word = toLabel(cell.text).toLowerCase();
  const choice = choices.words[word] ?? choices.alsoKnown[word];
  const known = Object.keys(choices.words).join(', ');
  return choice !== undefined
    ? accept(choice)
    : refuse('choice_unknown', cell, `holds '${cell.text}'. ${column.header} must be one of: ${known}.`);
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
