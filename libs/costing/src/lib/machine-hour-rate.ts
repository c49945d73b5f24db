import {
  addDays,
  D,
  daysBetween,
  type Decimal,
  findLocalDate,
  type Hours,
  type LocalDate,
  type Money,
  type Percent,
  type Rate,
  roundHalfUp,
  sum,
  toMoney,
  toRate,
} from '@brakeven/values';
import { roundFraction } from './round-fraction';

/** What a machine-hour rate is built from; a year is a year of planned work. */
export interface MachineHourRateBasis {
  price: Money;
  /** What the machine fetches at the end of its life. */
  salvage: Money;
  lifeYears: Decimal;
  interestPercent: Percent;
  floorAreaM2: Decimal;
  spaceCostPerM2Year: Rate;
  insurancePerYear: Money;
  /** Planned upkeep. */
  upkeepPerYear: Money;
  /** Planned productive hours: those scheduled, less upkeep and normal idle time. */
  productiveHoursPerYear: Decimal;
  powerKw: Decimal;
  /** The share of its power that the machine draws on average. */
  loadPercent: Percent;
  tariffPerKwh: Rate;
  consumablesPerHour: Rate;
}

/** Parts of the rate that stand still or run, for the year shared out over its planned hours. */
export const FIXED_RATE_PARTS = ['depreciation', 'interest', 'space', 'insurance', 'upkeep'] as const;

/** Parts of the rate that each hour of running adds. */
export const RUNNING_RATE_PARTS = ['power', 'consumables'] as const;

/** One part of a machine-hour rate. */
export type RatePart = (typeof FIXED_RATE_PARTS)[number] | (typeof RUNNING_RATE_PARTS)[number];

/** A machine-hour rate with its parts. */
export interface MachineHourRate {
  /** Money per hour, six decimals each. */
  parts: Record<RatePart, Rate>;
  /** The sum of `FIXED_RATE_PARTS`. */
  fixedPerHour: Rate;
  /** The sum of `RUNNING_RATE_PARTS`. */
  runningPerHour: Rate;
  /** The sum of all parts, half-up to the cent. */
  ratePerHour: Rate;
  /** What the fixed parts come to in a year, to the cent; not the rounded parts × hours. */
  fixedPerYear: Money;
}

/** What the hours that a machine really ran have carried of its fixed cost. */
export interface Recovery {
  fixedCost: Money;
  /** Hours really run × fixed share of the rate. */
  absorbed: Money;
  /** absorbed − fixedCost: above 0 over-recovered, below 0 under-recovered. */
  difference: Money;
  outcome: 'over' | 'under' | 'even';
}

/**
 * Builds a machine-hour rate: straight-line depreciation (price − salvage) ÷ life, interest on the average capital
 * (price + salvage) ÷ 2, space, insurance and upkeep of a year, each ÷ planned productive hours; power kW × load ×
 * tariff and consumables an hour. Each part is an exact fraction rounded half-up to six decimals; their sum to the
 * cent. Rules in words: `RULES.machineHourRate` and those of `rateDepreciation` … `rateConsumables`.
 * @throws RangeError if life or hours are not above 0, or salvage is above the price.
 */
export function computeMachineHourRate(basis: MachineHourRateBasis): MachineHourRate {
  assertBasis(basis);
  const yearly = fixedFractions(basis);
  const hours = basis.productiveHoursPerYear;
  const perHour = ({ numerator, denominator }: Fraction): Rate =>
    toRate(roundFraction(numerator, denominator.times(hours), 6));
  const parts: Record<RatePart, Rate> = {
    depreciation: perHour(yearly.depreciation),
    interest: perHour(yearly.interest),
    space: perHour(yearly.space),
    insurance: perHour(yearly.insurance),
    upkeep: perHour(yearly.upkeep),
    power: toRate(basis.powerKw.times(basis.loadPercent).div(100).times(basis.tariffPerKwh)),
    consumables: toRate(basis.consumablesPerHour),
  };
  const fixedPerHour = sum(FIXED_RATE_PARTS.map((part) => parts[part]));
  const runningPerHour = sum(RUNNING_RATE_PARTS.map((part) => parts[part]));
  return {
    parts,
    fixedPerHour,
    runningPerHour,
    ratePerHour: roundHalfUp(fixedPerHour.plus(runningPerHour), 2) as Rate,
    fixedPerYear: sumYearly(Object.values(yearly)),
  };
}

/**
 * The fixed cost of a period, both ends included: each day bears its share of its calendar year, so that a whole
 * year bears the whole. Half-up to the cent. Rule in words: `RULES.fixedCostOfPeriod`.
 * @throws RangeError if the period ends before it begins.
 */
export function prorateFixedCost(fixedPerYear: Money, from: LocalDate, to: LocalDate): Money {
  if (to < from) throw new RangeError(`A period from ${from} cannot end on ${to}.`);
  let [commonDays, leapDays] = [0, 0];
  for (let start = from; start <= to; start = addDays(endOfYear(start), 1)) {
    const end = endOfYear(start) < to ? endOfYear(start) : to;
    const days = daysBetween(start, end) + 1;
    if (isLeapYear(start)) leapDays += days;
    else commonDays += days;
  }
  // Days ÷ 365 + leap days ÷ 366, as one fraction.
  const share = D(commonDays * 366 + leapDays * 365);
  return toMoney(roundFraction(fixedPerYear.times(share), D(365 * 366), 2));
}

/**
 * Compares the fixed cost of a period with what the hours really run have carried of it. Amounts to the cent,
 * half-up. Rule in words: `RULES.recovery`.
 */
export function computeRecovery(fixedCost: Money, fixedPerHour: Rate, hoursRun: Hours): Recovery {
  const absorbed = toMoney(hoursRun.times(fixedPerHour));
  const difference = toMoney(absorbed.minus(fixedCost));
  return { fixedCost, absorbed, difference, outcome: outcomeOf(difference) };
}

/** A yearly amount that may have no end as a decimal. */
interface Fraction {
  numerator: Decimal;
  denominator: Decimal;
}

const ONE = D(1);

function assertBasis({ price, salvage, lifeYears, productiveHoursPerYear }: MachineHourRateBasis): void {
  if (lifeYears.lte(0)) throw new RangeError('Give a life above 0 years.');
  if (productiveHoursPerYear.lte(0)) throw new RangeError('Give productive hours above 0 a year.');
  if (salvage.gt(price)) throw new RangeError('Give a salvage value that is not above the price.');
}

function fixedFractions(basis: MachineHourRateBasis): Record<(typeof FIXED_RATE_PARTS)[number], Fraction> {
  const { price, salvage, lifeYears, interestPercent, floorAreaM2, spaceCostPerM2Year } = basis;
  return {
    depreciation: { numerator: price.minus(salvage), denominator: lifeYears },
    interest: { numerator: price.plus(salvage).times(interestPercent), denominator: D(200) },
    space: { numerator: floorAreaM2.times(spaceCostPerM2Year), denominator: ONE },
    insurance: { numerator: basis.insurancePerYear, denominator: ONE },
    upkeep: { numerator: basis.upkeepPerYear, denominator: ONE },
  };
}

function sumYearly(fractions: readonly Fraction[]): Money {
  const whole = fractions.reduce((a, b) => ({
    numerator: a.numerator.times(b.denominator).plus(b.numerator.times(a.denominator)),
    denominator: a.denominator.times(b.denominator),
  }));
  return toMoney(roundFraction(whole.numerator, whole.denominator, 2));
}

function endOfYear(date: LocalDate): LocalDate {
  return `${date.slice(0, 4)}-12-31` as LocalDate;
}

function isLeapYear(date: LocalDate): boolean {
  return findLocalDate(Number(date.slice(0, 4)), 2, 29) !== undefined;
}

function outcomeOf(difference: Money): Recovery['outcome'] {
  if (difference.isZero()) return 'even';
  return difference.gt(0) ? 'over' : 'under';
}
