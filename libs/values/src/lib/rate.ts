import { type Branded, D, type Decimal, type DecimalInput, roundHalfUp } from './decimal';
import { findNumberInText, formatNumber } from './number-text';
import { accepted, type Parsed, quoted, refused } from './parsed';

/** Money per hour, up to six decimals. */
export type Rate = Branded<'Rate'>;

const RATE_LIMIT = D('1e8');
const RATE_EXAMPLE = 'Write a rate per hour such as 28.50.';

/** Rounds to six decimals, ties away from zero. */
export function toRate(x: DecimalInput): Rate {
  return roundHalfUp(D(x), 6) as Rate;
}

/** A rate as it travels: at least two decimals, at most six, without trailing noughts: '85.00', '0.125'. */
export function rateText(rate: Rate): string {
  const rounded = toRate(rate);
  return rounded.toFixed(Math.max(2, rounded.decimalPlaces()));
}

/**
 * Reads a rate of nought or more with at most six decimals, with or without a leading currency sign.
 * Codes: `not_a_rate`, `negative`, `too_many_decimals`, `too_large`.
 */
export function parseRate(text: string): Parsed<Rate> {
  const rate = findNumberInText(text.trim().replace(/^([+−-]?)\p{Sc}\s?/u, '$1'));
  if (!rate) return refused('not_a_rate', `${quoted(text)} is not a rate. ${RATE_EXAMPLE}`);
  if (rate.lt(0))
    return refused('negative', `A rate cannot be below 0, but this one is ${quoted(text)}. ${RATE_EXAMPLE}`);
  if (rate.decimalPlaces() > 6) {
    return refused('too_many_decimals', `${quoted(text)} has more than six decimals. ${RATE_EXAMPLE}`);
  }
  if (rate.gte(RATE_LIMIT))
    return refused('too_large', `${quoted(text)} is 100,000,000 or more. ${RATE_EXAMPLE}`);
  return accepted(toRate(rate));
}

/** A rate for people, as money: '$28.50', '$0.125'. Say 'per hour' beside it. */
export function formatRate(rate: Rate | string, currency: string, locale = 'en-US'): string {
  return formatNumber(D(rate as Decimal | string), locale, {
    style: 'currency',
    currency,
    minimumFractionDigits: 2,
    maximumFractionDigits: 6,
  });
}
