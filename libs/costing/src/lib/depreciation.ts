import { D, type Decimal, type Money, roundHalfUp } from '@brakeven/values';

/** A thing that is written down: what it cost, what it fetches at the end, and how many periods it lasts. */
export interface DepreciableAsset {
  cost: Money;
  salvage: Money;
  /** Periods, years as a rule. */
  life: number;
}

/**
 * Straight line, each period: (cost − salvage) ÷ life. Not rounded.
 * Source: OASIS OpenFormula, SLN.
 * @throws RangeError if the asset makes no sense.
 */
export function computeStraightLine(asset: DepreciableAsset): Decimal {
  assertAsset(asset);
  return asset.cost.minus(asset.salvage).div(asset.life);
}

/**
 * Sum of the years' digits, in one period: (cost − salvage) × (life + 1 − period) ÷ (1 + 2 + … + life). Not rounded.
 * Source: OASIS OpenFormula, SYD.
 * @throws RangeError if the asset makes no sense or the period is not within its life.
 */
export function computeSumOfYearsDigits(asset: DepreciableAsset, period: number): Decimal {
  assertAsset(asset);
  assertPeriod(period, asset.life);
  const digits = (asset.life * (asset.life + 1)) / 2;
  return asset.cost
    .minus(asset.salvage)
    .times(asset.life + 1 - period)
    .div(digits);
}

/**
 * Declining balance at `factor` ÷ life (2: double declining), in one period, never below the salvage. Not rounded.
 * Source: OASIS OpenFormula, DDB.
 * @throws RangeError if the asset makes no sense, the period is not within its life, or the factor is not above 0.
 */
export function computeDoubleDecliningBalance(
  asset: DepreciableAsset,
  period: number,
  factor: Decimal = D(2),
): Decimal {
  assertAsset(asset);
  assertPeriod(period, asset.life);
  if (factor.lte(0)) throw new RangeError('Give a factor above 0, such as 2.');
  const left = D(1).minus(factor.div(asset.life));
  const keeps = left.gt(0) ? left : D(0);
  const before = asset.cost.times(keeps.pow(period - 1));
  const after = asset.cost.times(keeps.pow(period));
  const written = before.minus(after.gt(asset.salvage) ? after : asset.salvage);
  return written.gt(0) ? written : D(0);
}

/**
 * Declining balance at a fixed rate, 1 − (salvage ÷ cost)^(1 ÷ life) rounded to three decimals, in one period; the
 * first year has `monthsOfFirstYear`, and a year after the last has the rest. Not rounded.
 * Source: OASIS OpenFormula, DB.
 * @throws RangeError if the asset makes no sense, its cost is 0, or the period is not within its life (one more
 * where the first year is not whole).
 */
export function computeDecliningBalance(
  asset: DepreciableAsset,
  period: number,
  monthsOfFirstYear = 12,
): Decimal {
  assertAsset(asset);
  if (asset.cost.isZero()) throw new RangeError('Give a cost above 0.');
  if (!Number.isInteger(monthsOfFirstYear) || monthsOfFirstYear < 1 || monthsOfFirstYear > 12) {
    throw new RangeError('Give 1 to 12 months for the first year.');
  }
  assertPeriod(period, monthsOfFirstYear < 12 ? asset.life + 1 : asset.life);
  const rate = fixedRate(asset);
  const first = asset.cost.times(rate).times(monthsOfFirstYear).div(12);
  if (period === 1) return first;
  const whole = asset.cost
    .minus(first)
    .times(
      D(1)
        .minus(rate)
        .pow(period - 2),
    )
    .times(rate);
  return period > asset.life ? whole.times(12 - monthsOfFirstYear).div(12) : whole;
}

/**
 * Units of production: (cost − salvage) × units of the period ÷ units in all. Not rounded. Common practice, no
 * published source.
 * @throws RangeError if salvage or units make no sense.
 */
export function computeUnitsOfProduction(
  { cost, salvage }: Omit<DepreciableAsset, 'life'>,
  unitsInAll: Decimal,
  units: Decimal,
): Decimal {
  assertAsset({ cost, salvage, life: 1 });
  if (unitsInAll.lte(0)) throw new RangeError('Give units above 0 for the whole life.');
  if (units.lt(0) || units.gt(unitsInAll))
    throw new RangeError('Give units from 0 to those of the whole life.');
  return cost.minus(salvage).times(units).div(unitsInAll);
}

function fixedRate({ cost, salvage, life }: DepreciableAsset): Decimal {
  return roundHalfUp(D(1).minus(salvage.div(cost).pow(D(1).div(life))), 3);
}

function assertAsset({ cost, salvage, life }: DepreciableAsset): void {
  if (!Number.isInteger(life) || life < 1) throw new RangeError('Give a life of 1 or more whole periods.');
  if (salvage.lt(0) || salvage.gt(cost)) throw new RangeError('Give a salvage value from 0 to the cost.');
}

function assertPeriod(period: number, last: number): void {
  if (Number.isInteger(period) && period >= 1 && period <= last) return;
  throw new RangeError(`Give a whole period from 1 to ${last}.`);
}
