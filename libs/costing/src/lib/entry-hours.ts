import { type Decimal, type Hours, sum, toHours } from '@brakeven/values';
import { type CostCategory } from './cost-categories';

/** What a line has to say of its hours. */
export interface LineHours {
  category: CostCategory;
  quantity: Decimal;
}

/** What a gap has to say of its hours. */
export interface GapHours {
  category: CostCategory;
  hours: Hours;
}

/**
 * The hours of the entries that owe a category, whether or not a rate was found. Every entry owes labour, one on a
 * machine owes machine: so these count an entry's hours once. A line that takes back another counts against it.
 */
export function sumHoursOf(
  category: CostCategory,
  lines: readonly LineHours[],
  gaps: readonly GapHours[],
): Hours {
  const priced = lines.filter((line) => line.category === category).map((line) => line.quantity);
  const unpriced = gaps.filter((gap) => gap.category === category).map((gap) => gap.hours);
  return toHours(sum([...priced, ...unpriced]));
}
