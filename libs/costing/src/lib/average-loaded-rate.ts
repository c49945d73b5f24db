import { D, factorOf, type Percent, type Rate, sum, toRate, ZERO } from '@brakeven/values';
import { roundFraction } from './round-fraction';

/** A wage with the burden on it. */
export interface WageWithBurden {
  wagePerHour: Rate;
  burdenPercent: Percent;
}

/**
 * What an hour of labour costs on average: the mean of wage × (1 + burden), each person once, half-up to six
 * decimals in one step; null of nobody. Common practice, no published source.
 */
export function computeAverageLoadedRate(wages: readonly WageWithBurden[]): Rate | null {
  if (wages.length === 0) return null;
  const total = sum([ZERO, ...wages.map((wage) => wage.wagePerHour.times(factorOf(wage.burdenPercent)))]);
  return toRate(roundFraction(total, D(wages.length), 6));
}
