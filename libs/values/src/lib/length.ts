import { type Branded, D, type DecimalInput, type Decimal, roundHalfUp } from './decimal';
import { findFractionInches } from './fraction-length';
import { formatNumber } from './number-text';
import { accepted, type Parsed } from './parsed';
import { findUnit, fromBaseUnit, parseQuantity, toBaseUnit, type UnitTable } from './quantity';
import { type UnitSystem } from './unit-system';

/** A length; millimetres inside. */
export type Length = Branded<'Length'>;

/** Units in which a length is written. */
export type LengthUnit = 'mm' | 'cm' | 'm' | 'in' | 'ft';

// Source: international yard and pound agreement of 1959 (NIST SP 811, appendix B): 1 in = 25.4 mm exactly.
const LENGTHS: UnitTable<LengthUnit> = {
  mm: { factor: '1', words: ['mm', 'millimeter', 'millimeters', 'millimetre', 'millimetres'] },
  cm: { factor: '10', words: ['cm', 'centimeter', 'centimeters', 'centimetre', 'centimetres'] },
  m: { factor: '1000', words: ['m', 'meter', 'meters', 'metre', 'metres'] },
  in: { factor: '25.4', words: ['in', 'inch', 'inches', '"', '″', '”'] },
  ft: { factor: '304.8', words: ['ft', 'foot', 'feet', "'", '′', '’'] },
};

/** A length of so many units, exactly. */
export function toLength(value: DecimalInput, unit: LengthUnit): Length {
  return toBaseUnit(LENGTHS, D(value), unit) as Length;
}

/** How many of `unit` a length is. */
export function lengthIn(length: Length, unit: LengthUnit): Decimal {
  return fromBaseUnit(LENGTHS, length, unit);
}

/** A length as it is stored: millimetres, five decimals, half-up: '1828.80000'. */
export function lengthText(length: Length): string {
  return roundHalfUp(length, 5).toFixed(5);
}

/**
 * Reads '72', '72 in', '6 ft', '1828.8 mm', and inches with a fraction or behind feet: '3/16', '1 1/2 in', `5' 6 1/2"`.
 * A bare number is in `unitIfNone`, a bare fraction in inches. Codes as in `parseQuantity`.
 */
export function parseLength(text: string, unitIfNone: LengthUnit): Parsed<Length> {
  const inches = findFractionInches(text);
  if (inches) return accepted(toLength(inches, 'in'));
  const example = 'Write a length such as 72 in, 6 ft or 1828.8 mm.';
  return parseQuantity(LENGTHS, text, unitIfNone, example) as Parsed<Length>;
}

/** The unit that a length is written in, feet with inches behind them counting as inches; undefined for a bare number. */
export function findWrittenLengthUnit(text: string): LengthUnit | undefined {
  if (findFractionInches(text)) return 'in';
  const [, unit = ''] = /^[+−-]?[\d.,]+\s*(.*)$/.exec(text.trim()) ?? [];
  return findUnit(LENGTHS, unit);
}

/** Finds the unit of length that a word names: 'in', 'inches', 'mm', 'ft'. */
export function findLengthUnit(word: string): LengthUnit | undefined {
  return findUnit(LENGTHS, word);
}

/** A length for people: '72 in' (up to four decimals) or '1,828.8 mm' (up to two). */
export function formatLength(length: Length, system: UnitSystem, locale = 'en-US'): string {
  const unit = system === 'us' ? 'in' : 'mm';
  const number = lengthIn(length, unit);
  return `${formatNumber(number, locale, { maximumFractionDigits: system === 'us' ? 4 : 2 })}\u00a0${unit}`;
}
