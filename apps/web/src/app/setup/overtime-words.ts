import { type OvertimeTo, type Shop } from '@brakeven/contract';
import { accepted, D, formatHours, hoursText, type Parsed, parseHoursText, refused } from '@brakeven/values';

/** The hours of a week. */
const THRESHOLD_MAX = 168;

export const OVERTIME_CAUTION =
  'Overtime here is an estimate for costing: hours above the weekly threshold × ½ the week’s regular rate. Federal, state and local rules differ (daily overtime, double time, exemptions), and payroll decides what is paid.';

const TARGET_WORDS: Record<OvertimeTo, string> = {
  overhead: 'Overhead of the shop',
  jobs: 'The week’s jobs, by hours',
};
export const OVERTIME_OPTIONS = Object.entries(TARGET_WORDS).map(([value, label]) => ({ value, label }));

/** What the shop does about overtime, in words. */
export function toOvertimeSentence({
  overtimeThresholdHours,
  overtimeTo,
}: Pick<Shop, 'overtimeThresholdHours' | 'overtimeTo'>): string {
  if (overtimeThresholdHours === null) return 'Not computed';
  const target = overtimeTo === 'overhead' ? 'to overhead' : 'spread over the week’s jobs';
  return `Above ${toThresholdText(overtimeThresholdHours)} h a week, ${target}`;
}

/** The threshold as a field shows it: '40', '37.5', empty for none. */
export function toThresholdText(hours: string | null): string {
  return hours === null ? '' : D(hours).toFixed();
}

/**
 * Reads the threshold of a week; an empty text is none. Codes: those of hours, `too_many_decimals`, `out_of_range`.
 */
export function parseThreshold(text: string): Parsed<string | null> {
  if (text.trim() === '') return accepted(null);
  const hours = parseHoursText(text);
  if (!hours.ok) return hours;
  if (hours.value.lte(0) || hours.value.gt(THRESHOLD_MAX))
    return refused('out_of_range', `A week’s threshold is above 0 and at most ${THRESHOLD_MAX} hours.`);
  if (hours.value.decimalPlaces() > 2)
    return refused(
      'too_many_decimals',
      `Write hours with at most two decimals, such as 37.5, not ${formatHours(hours.value)}.`,
    );
  return accepted(D(hoursText(hours.value)).toFixed(2));
}
