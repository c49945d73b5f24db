import { type Hours, sum } from '@brakeven/values';
import { type CostCategory, type CostLine, type RateGap } from './entry-lines';

/** A line or a gap: both know their entry and its hours. */
type EntryTrace = CostLine | RateGap;

/**
 * The hours of the entries behind lines and gaps, each entry once however many categories it has.
 * `isCounted` chooses which traces count, for example those with a machine.
 */
export function sumEntryHours(
  lines: Iterable<CostLine>,
  gaps: Iterable<RateGap>,
  isCounted: (trace: EntryTrace) => boolean = () => true,
): Hours {
  const hoursByEntry = new Map<string, Hours>();
  for (const line of lines) if (isCounted(line)) hoursByEntry.set(line.entryId, line.quantity);
  for (const gap of gaps) if (isCounted(gap)) hoursByEntry.set(gap.entryId, gap.hours);
  return sum(hoursByEntry.values());
}

/** A choice of traces for `sumEntryHours`: those of one category. */
export function isOfCategory(category: CostCategory): (trace: EntryTrace) => boolean {
  return (trace) => trace.category === category;
}
