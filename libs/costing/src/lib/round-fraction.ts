import { D, type Decimal, ZERO } from '@brakeven/values';

/**
 * Rounds numerator ÷ denominator to `places` decimals, ties away from zero, in one step: the quotient itself is never
 * rounded before, so that a fraction just below a tie cannot become one.
 * @throws RangeError if the denominator is 0.
 */
export function roundFraction(numerator: Decimal, denominator: Decimal, places: number): Decimal {
  if (denominator.isZero()) throw new RangeError('A fraction needs a denominator other than 0.');
  const unitsPerOne = D(`1e${places}`);
  const scaled = numerator.abs().times(unitsPerOne);
  const divisor = denominator.abs();
  const whole = scaled.divToInt(divisor);
  const rest = scaled.minus(whole.times(divisor));
  const units = rest.times(2).gte(divisor) ? whole.plus(1) : whole;
  if (units.isZero()) return ZERO;
  const isNegative = numerator.isNegative() !== denominator.isNegative();
  return (isNegative ? units.negated() : units).div(unitsPerOne);
}

/**
 * Rounds numerator ÷ denominator up to `places` decimals, towards the larger number, in one step.
 * @throws RangeError if the denominator is 0.
 */
export function ceilFraction(numerator: Decimal, denominator: Decimal, places: number): Decimal {
  const nearest = roundFraction(numerator, denominator, places);
  const short = numerator.minus(nearest.times(denominator));
  const isBelow = short.times(denominator).gt(0);
  return isBelow ? nearest.plus(D(`1e-${places}`)) : nearest;
}
