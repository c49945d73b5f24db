import { type Branded, D, type Decimal, type DecimalInput, roundHalfUp } from './decimal';
import { findNumberInText, formatNumber } from './number-text';
import { accepted, type Parsed, quoted, refused } from './parsed';

/** A percentage as written: 28.5 means 28.5 %. Up to four decimals. */
export type Percent = Branded<'Percent'>;

const PERCENT_EXAMPLE = 'Write a percentage such as 28.5 or 28.5 %.';

/** Rounds to four decimals, ties away from zero. */
export function toPercent(x: DecimalInput): Percent {
  return roundHalfUp(D(x), 4) as Percent;
}

/** A percentage as it travels, at least two decimals, at most four: '28.50'. */
export function percentText(percent: Percent): string {
  const rounded = toPercent(percent);
  return rounded.toFixed(Math.max(2, rounded.decimalPlaces()));
}

/** The factor that adds the percentage: 28.5 gives 1.285, exactly. */
export function factorOf(percent: Percent): Decimal {
  return percent.div(100).plus(1);
}

/**
 * Reads a percentage from 0 to 1000 with or without its sign; `28.5` is 28.5 %, never 2850 %.
 * Codes: `not_a_percentage`, `too_many_decimals`, `out_of_range`.
 */
export function parsePercent(text: string): Parsed<Percent> {
  const percent = findNumberInText(text.trim().replace(/\s?%$/, ''));
  if (!percent) return refused('not_a_percentage', `${quoted(text)} is not a percentage. ${PERCENT_EXAMPLE}`);
  if (percent.decimalPlaces() > 4) {
    return refused('too_many_decimals', `${quoted(text)} has more than four decimals. ${PERCENT_EXAMPLE}`);
  }
  if (percent.lt(0) || percent.gt(1000)) {
    return refused('out_of_range', `${quoted(text)} is not from 0 to 1000 percent. ${PERCENT_EXAMPLE}`);
  }
  return accepted(toPercent(percent));
}

/** A percentage for people: '28.5 %'. */
export function formatPercent(percent: Percent | string, locale = 'en-US'): string {
  const number = formatNumber(D(percent as Decimal | string), locale, { maximumFractionDigits: 4 });
  return `${number}\u00a0%`;
}
