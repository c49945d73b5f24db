import { FormGroup, type ValidatorFn, Validators } from '@angular/forms';
import { type MachineRateBasis } from '@brakeven/contract';
import { computeMachineHourRate, type MachineHourRate } from '@brakeven/costing';
import {
  accepted,
  type AreaUnit,
  areaIn,
  D,
  type Decimal,
  findNumberInText,
  moneyText,
  type Parsed,
  parseArea,
  parseMoney,
  parsePercent,
  parseRate,
  quoted,
  rateText,
  refused,
  roundHalfUp,
  toArea,
  toMoney,
  toPercent,
  toRate,
  type UnitSystem,
} from '@brakeven/values';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';

export const AREA_UNITS: Record<UnitSystem, AreaUnit> = { us: 'sq ft', metric: 'm²' };

/** Decimals that an area in square metres is kept with; three of square feet are what that can tell apart. */
const AREA_DECIMALS = 5;
const AREA_DECIMALS_SHOWN = 3;
const COST_DECIMALS_SHOWN = 4;
const HOURS_PER_YEAR_MAX = 8784;

/** Fields of the form in which a machine-hour rate is built; areas in the unit of the shop. */
export type BasisForm = ReturnType<typeof createBasisForm>;
export type BasisTexts = ReturnType<BasisForm['getRawValue']>;

/** Makes the form of a basis; without one it begins with what few will want to change. */
export function createBasisForm(basis: MachineRateBasis | null, units: UnitSystem, price?: string) {
  const texts = basis ? toBasisTexts(basis, units) : { ...BLANK, price: price ?? '' };
  const field = (name: keyof typeof BLANK, ...validators: ValidatorFn[]) =>
    textControl(texts[name], Validators.required, ...validators);
  return new FormGroup(
    {
      price: field('price', parsedBy(parseAbove0(parseAmount))),
      salvage: field('salvage', parsedBy(parseAmount)),
      lifeYears: field('lifeYears', parsedBy(parseAbove0(parseNumber(3, 'years')))),
      interestPercent: field('interestPercent', parsedBy(parsePercent)),
      floorArea: field(
        'floorArea',
        parsedBy((text) => parseArea(text, AREA_UNITS[units])),
      ),
      spaceCost: field('spaceCost', parsedBy(parseRate)),
      insurancePerYear: field('insurancePerYear', parsedBy(parseAmount)),
      upkeepPerYear: field('upkeepPerYear', parsedBy(parseAmount)),
      productiveHoursPerYear: field('productiveHoursPerYear', parsedBy(parseHoursOfYear)),
      powerKw: field('powerKw', parsedBy(parseNumber(3, 'kilowatts'))),
      loadPercent: field('loadPercent', parsedBy(parseLoad)),
      tariffPerKwh: field('tariffPerKwh', parsedBy(parseRate)),
      consumablesPerHour: field('consumablesPerHour', parsedBy(parseRate)),
    },
    { validators: salvageBelowPrice },
  );
}

/** What the form says as it travels, or null while a field cannot be read. */
export function readBasis(texts: BasisTexts, units: UnitSystem): MachineRateBasis | null {
  const price = valueOf(parseAbove0(parseAmount)(texts.price));
  const salvage = valueOf(parseAmount(texts.salvage));
  const lifeYears = valueOf(parseAbove0(parseNumber(3, 'years'))(texts.lifeYears));
  const interestPercent = valueOf(parsePercent(texts.interestPercent));
  const area = valueOf(parseArea(texts.floorArea, AREA_UNITS[units]));
  const spaceCost = valueOf(parseRate(texts.spaceCost));
  const insurance = valueOf(parseAmount(texts.insurancePerYear));
  const upkeep = valueOf(parseAmount(texts.upkeepPerYear));
  const hours = valueOf(parseHoursOfYear(texts.productiveHoursPerYear));
  const powerKw = valueOf(parseNumber(3, 'kilowatts')(texts.powerKw));
  const load = valueOf(parseLoad(texts.loadPercent));
  const tariff = valueOf(parseRate(texts.tariffPerKwh));
  const consumables = valueOf(parseRate(texts.consumablesPerHour));
  if (!price || !salvage || !lifeYears || !interestPercent || !area || !spaceCost || !insurance) return null;
  if (!upkeep || !hours || !powerKw || !load || !tariff || !consumables || salvage.gt(price)) return null;
  return {
    price: moneyText(toMoney(price)),
    salvage: moneyText(toMoney(salvage)),
    lifeYears: lifeYears.toFixed(),
    interestPercent: interestPercent.toFixed(),
    ...toSpace(area, spaceCost, units),
    insurancePerYear: moneyText(toMoney(insurance)),
    upkeepPerYear: moneyText(toMoney(upkeep)),
    productiveHoursPerYear: hours.toFixed(),
    powerKw: powerKw.toFixed(),
    loadPercent: load.toFixed(),
    tariffPerKwh: rateText(toRate(tariff)),
    consumablesPerHour: rateText(toRate(consumables)),
  };
}

/** The rate that a basis gives, with its parts. */
export function computeRate(basis: MachineRateBasis): MachineHourRate {
  return computeMachineHourRate({
    price: toMoney(basis.price),
    salvage: toMoney(basis.salvage),
    lifeYears: D(basis.lifeYears),
    interestPercent: toPercent(basis.interestPercent),
    floorAreaM2: D(basis.floorAreaM2),
    spaceCostPerM2Year: toRate(basis.spaceCostPerM2Year),
    insurancePerYear: toMoney(basis.insurancePerYear),
    upkeepPerYear: toMoney(basis.upkeepPerYear),
    productiveHoursPerYear: D(basis.productiveHoursPerYear),
    powerKw: D(basis.powerKw),
    loadPercent: toPercent(basis.loadPercent),
    tariffPerKwh: toRate(basis.tariffPerKwh),
    consumablesPerHour: toRate(basis.consumablesPerHour),
  });
}

const BLANK = {
  price: '',
  salvage: '0',
  lifeYears: '10',
  interestPercent: '',
  floorArea: '',
  spaceCost: '',
  insurancePerYear: '0',
  upkeepPerYear: '',
  productiveHoursPerYear: '',
  powerKw: '',
  loadPercent: '50',
  tariffPerKwh: '',
  consumablesPerHour: '0',
};

function toBasisTexts(basis: MachineRateBasis, units: UnitSystem): typeof BLANK {
  const unit = AREA_UNITS[units];
  const plain = (value: Decimal, decimals: number) => roundHalfUp(value, decimals).toFixed();
  const { floorAreaM2, spaceCostPerM2Year, ...texts } = basis;
  return {
    ...texts,
    floorArea: plain(areaIn(toArea(floorAreaM2, 'm²'), unit), AREA_DECIMALS_SHOWN),
    spaceCost: plain(D(spaceCostPerM2Year).times(toArea(1, unit)), COST_DECIMALS_SHOWN),
  };
}

/**
 * Area and cost of space in square metres. The area is rounded to what is kept and the cost follows it, so that
 * 120 sq ft at $12 come to $1,440 a year and not to a fraction of a cent less.
 */
function toSpace(area: Decimal, cost: Decimal, units: UnitSystem) {
  const perUnit = toArea(1, AREA_UNITS[units]);
  const kept = roundHalfUp(area, AREA_DECIMALS);
  const costPerM2 = kept.isZero() ? cost.div(perUnit) : cost.times(area).div(perUnit).div(kept);
  return { floorAreaM2: kept.toFixed(), spaceCostPerM2Year: rateText(toRate(costPerM2)) };
}

const salvageBelowPrice: ValidatorFn = (form) => {
  const { price, salvage } = form.getRawValue() as { price: string; salvage: string };
  const [from, to] = [valueOf(parseMoney(price)), valueOf(parseMoney(salvage))];
  return from && to && to.gt(from) ? { salvage: true } : null;
};

function valueOf<T>(parsed: Parsed<T>): T | null {
  return parsed.ok ? parsed.value : null;
}

function parseAmount(text: string): Parsed<Decimal> {
  const money = parseMoney(text);
  if (money.ok && money.value.lt(0))
    return refused('negative', `${quoted(text)} is below 0. Write an amount of 0 or more.`);
  return money;
}

function parseAbove0(parse: (text: string) => Parsed<Decimal>): (text: string) => Parsed<Decimal> {
  return (text) => {
    const parsed = parse(text);
    return parsed.ok && parsed.value.isZero() ? refused('zero', 'Must be above 0.') : parsed;
  };
}

function parseNumber(places: number, unit: string): (text: string) => Parsed<Decimal> {
  return (text) => {
    const number = findNumberInText(text);
    if (!number || number.lt(0))
      return refused('not_a_number', `${quoted(text)} is not a number of ${unit}, such as 7.5.`);
    if (number.decimalPlaces() > places)
      return refused('too_many_decimals', `At most ${places} decimals, please.`);
    return accepted(number);
  };
}

function parseHoursOfYear(text: string): Parsed<Decimal> {
  const hours = parseAbove0(parseNumber(2, 'hours'))(text);
  if (hours.ok && hours.value.gt(HOURS_PER_YEAR_MAX))
    return refused('too_many', 'A year has at most 8,784 hours.');
  return hours;
}

function parseLoad(text: string): Parsed<Decimal> {
  const percent = parsePercent(text);
  if (percent.ok && percent.value.gt(100)) return refused('out_of_range', 'The load is at most 100 %.');
  if (percent.ok && percent.value.decimalPlaces() > 3)
    return refused('too_many_decimals', 'At most 3 decimals, please.');
  return percent;
}
