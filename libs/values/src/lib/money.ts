import { type Branded, D, type Decimal, type DecimalInput, roundHalfUp } from './decimal';
import { findNumberInText, formatNumber } from './number-text';
import { accepted, type Parsed, quoted, refused } from './parsed';

/** An amount in the shop's currency, whole cents. */
export type Money = Branded<'Money'>;

const MONEY_LIMIT = D('1e12');
const MONEY_EXAMPLE = 'Write an amount such as 1234.50 or $1,234.50.';

/** Rounds to the cent, ties away from zero. Call it once, where a line is made; sums of money stay exact. */
export function toMoney(x: DecimalInput): Money {
  return roundHalfUp(D(x), 2) as Money;
}

/** Money as it travels and is stored: '123.40', '-0.05'. */
export function moneyText(money: Money): string {
  return money.toFixed(2);
}

/**
 * Reads an amount with at most two decimals, with or without a leading currency sign and thousands commas.
 * Codes: `not_money`, `too_many_decimals`, `too_large` (12 digits before the point and more).
 */
export function parseMoney(text: string): Parsed<Money> {
  const amount = findNumberInText(text.trim().replace(/^([+−-]?)\p{Sc}\s?/u, '$1'));
  if (!amount) return refused('not_money', `${quoted(text)} is not an amount. ${MONEY_EXAMPLE}`);
  if (amount.decimalPlaces() > 2) {
    return refused('too_many_decimals', `${quoted(text)} goes below the cent. ${MONEY_EXAMPLE}`);
  }
  if (amount.abs().gte(MONEY_LIMIT)) {
    return refused('too_large', `${quoted(text)} is more than 999,999,999,999.99. ${MONEY_EXAMPLE}`);
  }
  return accepted(toMoney(amount));
}

/** Money for people: '$1,234.50', '−$12.00'. Takes the value or its text; always two decimals. */
export function formatMoney(money: Money | string, currency: string, locale = 'en-US'): string {
  return formatNumber(D(money as Decimal | string), locale, {
    style: 'currency',
    currency,
    minimumFractionDigits: 2,
    maximumFractionDigits: 2,
  });
}
