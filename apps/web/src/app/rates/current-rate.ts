import { findValidOn } from '@brakeven/costing';
import { toLocalDate } from '@brakeven/values';

export type RateState = 'current' | 'to come' | 'earlier';

/** A dated rate with where it stands today. */
export type StatedRate<T> = T & { state: RateState };

/** Says of each dated rate whether it holds today, begins later, or has been followed by another; latest first. */
export function stateRates<T extends { validFrom: string }>(
  rates: readonly T[],
  today: string,
): StatedRate<T>[] {
  const current = findCurrentRate(rates, today);
  return [...rates]
    .sort((a, b) => b.validFrom.localeCompare(a.validFrom))
    .map((rate) => ({ ...rate, state: toState(rate, current, today) }));
}

/** The rate that holds today, by the same rule that costs the entries; undefined if all begin later. */
export function findCurrentRate<T extends { validFrom: string }>(
  rates: readonly T[],
  today: string,
): T | undefined {
  const dated = rates.map((rate) => ({ rate, validFrom: toLocalDate(rate.validFrom) }));
  return findValidOn(dated, toLocalDate(today))?.rate;
}

function toState<T extends { validFrom: string }>(rate: T, current: T | undefined, today: string): RateState {
  if (rate === current) return 'current';
  return rate.validFrom > today ? 'to come' : 'earlier';
}
