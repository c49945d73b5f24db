import { type SetupSheet } from '@brakeven/contract';
import { D, roundHalfUp } from '@brakeven/values';
import { type SetupRowSource } from '@brakeven/workbook';
import { type SetupDraft } from './setup-draft';

/** Decimals and digits before the point, as the columns keep them. */
const FORMS = {
  money: { decimals: 2, digits: 12 },
  rate: { decimals: 6, digits: 8 },
  percent: { decimals: 4, digits: 5 },
  quantity: { decimals: 5, digits: 7 },
  weight: { decimals: 10, digits: 10 },
  /** Density and strength. */
  property: { decimals: 3, digits: 7 },
  angle: { decimals: 4, digits: 3 },
  hours: { decimals: 4, digits: 5 },
  minutes: { decimals: 4, digits: 8 },
} as const;

/** A column that holds a decimal. */
export interface DecimalColumn {
  list: SetupSheet;
  column: string;
  form: keyof typeof FORMS;
}

/**
 * A decimal as its column keeps it, rounded half-up, so that equal numbers are equal texts; null for a blank cell
 * and for a number too large or too small to keep, which is refused in words.
 */
export function toStoredNumber(
  draft: SetupDraft,
  row: SetupRowSource,
  { list, column, form }: DecimalColumn,
  text: string | null,
): string | null {
  if (text === null) return null;
  const { decimals, digits } = FORMS[form];
  const number = roundHalfUp(D(text), decimals);
  if (number.isZero() && !D(text).isZero()) {
    const message = `${text} is too small to be kept here. Correct the number.`;
    draft.refuse(list, row, column, { code: 'number_too_small', message });
    return null;
  }
  if (number.lt(D(10).pow(digits))) return number.toFixed(decimals);
  const message = `${text} is more than can be kept here (below 1 followed by ${digits} noughts). Correct the number.`;
  draft.refuse(list, row, column, { code: 'number_too_large', message });
  return null;
}
