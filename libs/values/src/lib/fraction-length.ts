import { D, type Decimal } from './decimal';
import { findNumberInText } from './number-text';

// One or more feet, then perhaps inches: 5' · 5' 6" · 5'-6 1/2" · 5 ft 6 in · 5' 3/8
const FEET_AND_INCHES = /^(\d+)\s*(?:['′’]|ft\.?|foot|feet)\s*-?\s*(\S.*)$/i;
const FRACTION_OF_INCH = /^(?:(\d+)(?:\s+|-))?(\d+)\s*\/\s*(\d+)$/;
const INCH_WORD = /\s*(?:["″”]|in\.?|inch|inches)$/i;
const INCHES_PER_FOOT = 12;

/**
 * Reads inches written with a fraction, with feet before them or not: `3/16`, `1 1/2 in`, `1-1/2"`, `5' 6 1/2"`,
 * `5 ft 6`. A fraction without a unit is in inches, as nobody writes fractions of a millimetre. Gives undefined for
 * anything else, for a mixed fraction that is not proper (`1 3/2`), and for feet with 12 or more inches behind them.
 */
export function findFractionInches(text: string): Decimal | undefined {
  const tidy = text.trim();
  const [, feet, rest] = FEET_AND_INCHES.exec(tidy) ?? [];
  if (feet === undefined || rest === undefined) return findFraction(tidy.replace(INCH_WORD, ''));
  const bare = rest.replace(INCH_WORD, '');
  const inches = findFraction(bare) ?? findPlain(bare);
  if (!inches || inches.gte(INCHES_PER_FOOT)) return undefined;
  return D(feet).times(INCHES_PER_FOOT).plus(inches);
}

function findFraction(text: string): Decimal | undefined {
  const [, whole, over, under] = FRACTION_OF_INCH.exec(text) ?? [];
  if (over === undefined || under === undefined || D(under).isZero()) return undefined;
  const fraction = D(over).div(D(under));
  if (whole === undefined) return fraction;
  return fraction.lt(1) ? D(whole).plus(fraction) : undefined;
}

function findPlain(text: string): Decimal | undefined {
  const number = findNumberInText(text);
  return number?.gte(0) ? number : undefined;
}
