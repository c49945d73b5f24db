import { type Decimal, factorOf, type Percent, type Rate, toRate } from '@brakeven/values';

/** What an hour of somebody costs, and the factor that makes it of the wage. */
export interface LoadedRate {
  /** 1 + burden, exact: 28 % gives 1.28. */
  factor: Decimal;
  /** Wage × factor, for showing: rounded half-up to six decimals. A labour line multiplies first and rounds once. */
  loaded: Rate;
}

/** The loaded rate of an hour: wage × (1 + burden). Common practice, no published source. */
export function computeLoadedRate(wagePerHour: Rate, burdenPercent: Percent): LoadedRate {
  const factor = factorOf(burdenPercent);
  return { factor, loaded: toRate(wagePerHour.times(factor)) };
}
