import { type LocalDate } from '@brakeven/values';

/** A row that holds from its date until a later row takes over. */
export interface EffectiveDated {
  validFrom: LocalDate;
}

/**
 * The row valid on `date`: the one with the latest `validFrom` that is not after it. Undefined if all begin later.
 * The order of rows does not matter.
 * @throws Error if two rows begin on the same day, since neither may win by chance.
 */
export function findValidOn<T extends EffectiveDated>(rows: readonly T[], date: LocalDate): T | undefined {
  let valid: T | undefined;
  for (const row of rows) {
    if (row.validFrom > date || (valid && row.validFrom < valid.validFrom)) continue;
    if (row.validFrom === valid?.validFrom) throw new Error(`Two rates are valid from ${row.validFrom}.`);
    valid = row;
  }
  return valid;
}
