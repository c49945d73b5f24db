import { FormArray, FormGroup, type ValidatorFn, Validators } from '@angular/forms';
import { type EstimateInput, type EstimateLineInput } from '@brakeven/contract';
import {
  accepted,
  D,
  type Decimal,
  findNumberInText,
  type Hours,
  hoursText,
  massIn,
  type Money,
  moneyText,
  type Parsed,
  parseHoursText,
  parseMass,
  parseMoney,
  parsePercent,
  parseRate,
  percentText,
  rateText,
  refused,
  toMass,
  toRate,
  type UnitSystem,
} from '@brakeven/values';
import { parsedBy } from '../../forms/parsed-by';
import { textControl } from '../../forms/text-control';
import { parsePieces } from '../job-form';

export type LineKind = EstimateLineInput['kind'];

/** Every field that a line may have, as it is typed; those of other kinds stay empty and are not asked for. */
export interface LineTexts {
  operationId: string;
  machineId: string;
  setupHours: string;
  minutesPerPiece: string;
  pieces: string;
  labourRate: string;
  machineHourRate: string;
  overheadRate: string;
  materialId: string;
  weight: string;
  price: string;
  amount: string;
  description: string;
}

/** What each field is called where something is wrong with it. */
export const FIELD_WORDS: Readonly<Record<keyof LineTexts, string>> = {
  operationId: 'Operation',
  machineId: 'Machine',
  setupHours: 'Set-up hours',
  minutesPerPiece: 'Minutes per piece',
  pieces: 'Pieces',
  labourRate: 'Labour rate',
  machineHourRate: 'Machine-hour rate',
  overheadRate: 'Overhead rate',
  materialId: 'Material',
  weight: 'Weight',
  price: 'Price',
  amount: 'Amount',
  description: 'Description',
};

const EMPTY: LineTexts = {
  operationId: '',
  machineId: '',
  setupHours: '',
  minutesPerPiece: '',
  pieces: '',
  labourRate: '',
  machineHourRate: '',
  overheadRate: '',
  materialId: '',
  weight: '',
  price: '',
  amount: '',
  description: '',
};

/** A line of the form; fields are checked as its kind needs them. */
export function toLineForm(kind: LineKind, texts: Partial<LineTexts>, units: UnitSystem) {
  const value = { ...EMPTY, ...texts };
  const is = (wanted: LineKind, ...validators: ValidatorFn[]) => (kind === wanted ? validators : []);
  const required = Validators.required;
  return new FormGroup(
    {
      kind: textControl(kind),
      operationId: textControl(value.operationId, ...is('operation', required)),
      machineId: textControl(value.machineId),
      setupHours: textControl(value.setupHours, ...is('operation', parsedBy(parseHours))),
      minutesPerPiece: textControl(value.minutesPerPiece, ...is('operation', parsedBy(parseMinutes))),
      pieces: textControl(value.pieces, ...is('operation', required, parsedBy(parsePieces))),
      labourRate: textControl(value.labourRate, ...is('operation', required, parsedBy(parseRate))),
      machineHourRate: textControl(value.machineHourRate, ...is('operation', parsedBy(parseRate))),
      overheadRate: textControl(value.overheadRate, ...is('operation', required, parsedBy(parseRate))),
      materialId: textControl(value.materialId, ...is('material', required)),
      weight: textControl(value.weight, ...is('material', required, parsedBy(weightReader(units)))),
      price: textControl(value.price, ...is('material', required, parsedBy(parseRate))),
      amount: textControl(value.amount, ...is('outside', required, parsedBy(parseAmount))),
      description: textControl(value.description, Validators.maxLength(200)),
    },
    { validators: kind === 'operation' ? [needsTime, needsMachineRate] : [] },
  );
}
export type LineForm = ReturnType<typeof toLineForm>;

/** The form of an estimate; without one, empty from `today` on. */
export function toEstimateForm(estimate: EstimateInput | null, today: string, units: UnitSystem) {
  return new FormGroup({
    estimatedOn: textControl(estimate?.estimatedOn ?? today, Validators.required),
    scrapAllowancePercent: textControl(
      trim(estimate?.scrapAllowancePercent ?? '0'),
      Validators.required,
      parsedBy(percentReader('0 to 100 percent', (percent) => percent.lte(100))),
    ),
    marginPercent: textControl(
      trim(estimate?.marginPercent ?? '20'),
      Validators.required,
      parsedBy(percentReader('0 to below 100 percent of the price', (percent) => percent.lt(100))),
    ),
    lines: new FormArray<LineForm>((estimate?.lines ?? []).map((line) => fromLine(line, units))),
  });
}
export type EstimateForm = ReturnType<typeof toEstimateForm>;

/** A saved line as it is typed. */
export function fromLine(line: EstimateLineInput, units: UnitSystem): LineForm {
  switch (line.kind) {
    case 'operation':
      return toLineForm(
        'operation',
        {
          ...line,
          machineId: line.machineId ?? '',
          machineHourRate: line.machineHourRate ?? '',
          pieces: String(line.pieces),
        },
        units,
      );
    case 'material': {
      const weight = massIn(toMass(line.weightKg, 'kg'), massUnit(units));
      const texts = {
        ...line,
        weight: weight.toDecimalPlaces(6).toFixed(),
        price: toPriceText(line.pricePerKg, units),
      };
      return toLineForm('material', texts, units);
    }
    case 'outside':
      return toLineForm('outside', line, units);
  }
}

/** What a line says, as it is saved; null while something in it cannot be read. */
export function readLine(form: LineForm, units: UnitSystem): EstimateLineInput | null {
  if (form.invalid) return null;
  const value = form.getRawValue();
  const description = value.description.trim();
  switch (value.kind as LineKind) {
    case 'operation':
      return {
        kind: 'operation',
        operationId: value.operationId,
        machineId: value.machineId || null,
        setupHours: hoursText(read(parseHours, value.setupHours || '0')),
        minutesPerPiece: read(parseMinutes, value.minutesPerPiece || '0').toFixed(),
        pieces: read(parsePieces, value.pieces),
        labourRate: rateText(read(parseRate, value.labourRate)),
        machineHourRate: value.machineId ? rateText(read(parseRate, value.machineHourRate)) : null,
        overheadRate: rateText(read(parseRate, value.overheadRate)),
        description,
      };
    case 'material':
      return {
        kind: 'material',
        materialId: value.materialId,
        weightKg: read(weightReader(units), value.weight).toDecimalPlaces(10).toFixed(),
        pricePerKg: rateText(toRate(read(parseRate, value.price).div(toMass(1, massUnit(units))))),
        description,
      };
    case 'outside':
      return { kind: 'outside', amount: moneyText(read(parseAmount, value.amount)), description };
  }
}

/** What the whole form says, as it is saved; null while something in it cannot be read. */
export function readEstimate(form: EstimateForm, units: UnitSystem): EstimateInput | null {
  const lines = form.controls.lines.controls.flatMap((line) => readLine(line, units) ?? []);
  if (form.invalid || lines.length < form.controls.lines.length) return null;
  const { estimatedOn, scrapAllowancePercent, marginPercent } = form.getRawValue();
  return {
    estimatedOn,
    scrapAllowancePercent: percentText(read(parsePercent, scrapAllowancePercent)),
    marginPercent: percentText(read(parsePercent, marginPercent)),
    lines,
  };
}

/** The shop's price of a kilogram as a price in its own unit, at most six decimals. */
export function toPriceText(pricePerKg: string, units: UnitSystem): string {
  return rateText(toRate(D(pricePerKg).times(toMass(1, massUnit(units)))));
}

/** The unit in which the shop weighs. */
export function massUnit(units: UnitSystem): 'lb' | 'kg' {
  return units === 'us' ? 'lb' : 'kg';
}

function weightReader(units: UnitSystem) {
  return (text: string): Parsed<Decimal> => {
    const weight = parseMass(text, massUnit(units));
    if (!weight.ok || weight.value.gt(0)) return weight;
    return refused('not_positive', 'A weight must be above 0.');
  };
}

function parseAmount(text: string): Parsed<Money> {
  const amount = parseMoney(text);
  if (!amount.ok || amount.value.gt(0)) return amount;
  return refused('not_positive', 'An amount must be above 0.');
}

function parseHours(text: string): Parsed<Hours> {
  const hours = parseHoursText(text);
  return hours.ok && hours.value.lt(0) ? refused('negative', 'Hours cannot be below 0.') : hours;
}

function parseMinutes(text: string): Parsed<Decimal> {
  const minutes = findNumberInText(text);
  const isFit = minutes && minutes.gte(0) && minutes.lt(1_000_000) && minutes.decimalPlaces() <= 4;
  if (isFit) return accepted(minutes);
  return refused('not_minutes', 'Write minutes of 0 or more such as 3.5, with at most four decimals.');
}

function percentReader(range: string, isWithin: (percent: Decimal) => boolean) {
  return (text: string): Parsed<Decimal> => {
    const percent = parsePercent(text);
    if (!percent.ok || isWithin(percent.value)) return percent;
    return refused('out_of_range', `Give a percentage from ${range}.`);
  };
}

const needsTime: ValidatorFn = ({ value }) => {
  const { setupHours, minutesPerPiece } = value as LineTexts;
  const isAbove = (text: string) => Number(findNumberInText(text) ?? Number(text.includes(':'))) > 0;
  if (isAbove(setupHours) || isAbove(minutesPerPiece)) return null;
  return { words: 'Give set-up hours or minutes per piece; one of them must be above 0.' };
};

const needsMachineRate: ValidatorFn = ({ value }) => {
  const { machineId, machineHourRate } = value as LineTexts;
  if (!machineId || machineHourRate.trim() !== '') return null;
  return { words: 'Give the machine-hour rate of the machine, or take the machine out.' };
};

/** Reads what its validator has let through. */
function read<T>(parse: (text: string) => Parsed<T>, text: string): T {
  const parsed = parse(text);
  if (!parsed.ok) throw new Error(parsed.message);
  return parsed.value;
}

/** Without noughts that nobody typed. */
function trim(percent: string): string {
  return D(percent).toFixed();
}
