import { Decimal as BaseDecimal } from 'decimal.js';
import { quoted } from './parsed';

// A clone of our own, so that no other package can change our precision or rounding. Forty digits hold every
// product of stored values exactly (hours 9 digits × rate 14 × burden factor 9), so the only rounding is ours.
const Exact = BaseDecimal.clone({
  precision: 40,
  rounding: BaseDecimal.ROUND_HALF_UP,
  toExpNeg: -9e15,
  toExpPos: 9e15,
});

/** An exact decimal number; made by `D`, never by `new`. */
export type Decimal = BaseDecimal;

/** What `D` reads. */
export type DecimalInput = string | number | Decimal;

declare const brand: unique symbol;

/** A decimal that stands for one kind of quantity; brands keep hours out of money at compile time. */
export type Branded<Kind extends string> = Decimal & { readonly [brand]: Kind };

const NUMBER_TEXT = /^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d{1,3})?$/i;

/**
 * The one door to decimals. Reads a number, a decimal, or a text such as `-12.5` or `1e-3`
 * (exponents of up to three digits, so that no short text can become a number of a million digits).
 * @throws RangeError if the input is empty, not finite, or not a plain decimal number.
 */
export function D(x: DecimalInput): Decimal {
  if (!isReadable(x)) throw new RangeError(`${quoted(String(x))} is not a decimal number such as 12.5.`);
  return new Exact(x);
}

function isReadable(x: DecimalInput): boolean {
  if (typeof x === 'string') return NUMBER_TEXT.test(x);
  return typeof x === 'number' ? Number.isFinite(x) : x.isFinite();
}

/** Nought, for sums that start empty. */
export const ZERO: Decimal = D(0);

/** Rounds to `places` decimals, ties away from zero (2.5 → 3, −2.5 → −3); never gives minus nought. */
export function roundHalfUp(x: Decimal, places: number): Decimal {
  const rounded = x.toDecimalPlaces(places, BaseDecimal.ROUND_HALF_UP);
  return rounded.isZero() ? ZERO : rounded;
}

/** Adds up exactly, without rounding; an empty list gives 0. A sum of money is money, of hours hours. */
export function sum<T extends Decimal>(decimals: Iterable<T>): T {
  let total = ZERO;
  for (const decimal of decimals) total = total.plus(decimal);
  return total as T;
}
