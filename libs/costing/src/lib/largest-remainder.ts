import { D, type Decimal, type Money, sum, toMoney } from '@brakeven/values';

/**
 * Shares `amount` out by weights, in whole cents that add up to it exactly: each share is first cut down to the cent,
 * then the cents left over go one each to the largest remainders, the earlier weight first where they are equal. An
 * amount below 0 is shared out as if it were above, and negated.
 * @throws RangeError if a weight is below 0, or all are 0 while there is an amount to share out.
 */
export function allocateLargestRemainder(amount: Money, weights: readonly Decimal[]): Money[] {
  if (amount.isZero()) return weights.map(() => toMoney(0));
  const whole = sum(weights);
  if (weights.some((weight) => weight.lt(0)) || whole.lte(0)) {
    throw new RangeError('An amount is shared out by weights of which none is below 0 and one is above.');
  }
  const cents = amount.abs().times(100);
  const cuts = weights.map((weight) => cut(cents, weight, whole));
  const left = cents.minus(sum(cuts.map((share) => share.units))).toNumber();
  const raised = new Set(byRemainder(cuts).slice(0, left));
  const sign = amount.isNegative() ? -1 : 1;
  return cuts.map(({ units }, index) =>
    toMoney(
      units
        .plus(raised.has(index) ? 1 : 0)
        .times(sign)
        .div(100),
    ),
  );
}

/** A share cut down to the cent, and what was cut off × the sum of the weights, which keeps it exact. */
interface Cut {
  units: Decimal;
  remainder: Decimal;
}

function cut(cents: Decimal, weight: Decimal, whole: Decimal): Cut {
  const product = cents.times(weight);
  const units = product.divToInt(whole);
  return { units: D(units), remainder: product.minus(units.times(whole)) };
}

function byRemainder(cuts: readonly Cut[]): number[] {
  const remainderAt = (index: number): Decimal => cuts[index]?.remainder ?? D(0);
  return [...cuts.keys()].sort((a, b) => remainderAt(b).cmp(remainderAt(a)) || a - b);
}
