import { type Branded, D, type DecimalInput, type Decimal, roundHalfUp } from './decimal';
import { type Parsed } from './parsed';
import { findUnit, fromBaseUnit, parseQuantity, toBaseUnit, type UnitTable } from './quantity';

/** A force for each length, as tools are limited by; kilonewtons per metre inside. */
export type ForcePerLength = Branded<'ForcePerLength'>;

/** Units in which a force per length is written. */
export type ForcePerLengthUnit = 'kN/m' | 'US ton/ft' | 'tonne/m';

// Source: 1 US ton-force = 8.896443230521 kN, 1 ft = 0.3048 m and 1 tonne-force = 9.80665 kN, all exact (NIST SP 811,
// appendix B); the quotient of US tons and feet does not end and is held to 30 decimals.
const FORCES_PER_LENGTH: UnitTable<ForcePerLengthUnit> = {
  'kN/m': { factor: '1', words: ['kn/m', 'n/mm'] },
  'US ton/ft': {
    factor: '29.187805874412729658792650918635',
    words: ['us ton/ft', 'us tons/ft', 'ton/ft', 'tons/ft', 'us tons per foot', 'tons per foot'],
  },
  'tonne/m': { factor: '9.80665', words: ['tonne/m', 'tonnes/m', 'tf/m'] },
};

/** A force of so many units for each length; US tons per foot to 30 decimals, the others exactly. */
export function toForcePerLength(value: DecimalInput, unit: ForcePerLengthUnit): ForcePerLength {
  return toBaseUnit(FORCES_PER_LENGTH, D(value), unit) as ForcePerLength;
}

/** How many of `unit` a force per length is. */
export function forcePerLengthIn(force: ForcePerLength, unit: ForcePerLengthUnit): Decimal {
  return fromBaseUnit(FORCES_PER_LENGTH, force, unit);
}

/** A force per length as it is stored: kilonewtons per metre, five decimals, half-up: '583.75612'. */
export function forcePerLengthText(force: ForcePerLength): string {
  return roundHalfUp(force, 5).toFixed(5);
}

/** Reads '20 tons/ft' or '600 kN/m'; a bare number is in `unitIfNone`. Codes as in `parseQuantity`. */
export function parseForcePerLength(text: string, unitIfNone: ForcePerLengthUnit): Parsed<ForcePerLength> {
  const example = 'Write a force per length such as 20 tons/ft or 600 kN/m.';
  return parseQuantity(FORCES_PER_LENGTH, text, unitIfNone, example) as Parsed<ForcePerLength>;
}

/** Finds the unit of force per length that a word names: 'tons/ft', 'kN/m'. */
export function findForcePerLengthUnit(word: string): ForcePerLengthUnit | undefined {
  return findUnit(FORCES_PER_LENGTH, word);
}
