import { type Branded, D, type DecimalInput, type Decimal } from './decimal';
import { formatNumber } from './number-text';
import { type Parsed } from './parsed';
import { findUnit, fromBaseUnit, parseQuantity, toBaseUnit, type UnitTable } from './quantity';
import { type UnitSystem } from './unit-system';

/** A mass; kilograms inside. */
export type Mass = Branded<'Mass'>;

/** Units in which a mass is written. */
export type MassUnit = 'kg' | 'lb';

// Source: international yard and pound agreement of 1959 (NIST SP 811, appendix B): 1 lb = 0.45359237 kg exactly.
const MASSES: UnitTable<MassUnit> = {
  kg: { factor: '1', words: ['kg', 'kilogram', 'kilograms'] },
  lb: { factor: '0.45359237', words: ['lb', 'lbs', 'pound', 'pounds'] },
};

/** A mass of so many units, exactly. */
export function toMass(value: DecimalInput, unit: MassUnit): Mass {
  return toBaseUnit(MASSES, D(value), unit) as Mass;
}

/** How many of `unit` a mass is. */
export function massIn(mass: Mass, unit: MassUnit): Decimal {
  return fromBaseUnit(MASSES, mass, unit);
}

/** Reads '12', '12 lb' or '5.4 kg'; a bare number is in `unitIfNone`. Codes as in `parseQuantity`. */
export function parseMass(text: string, unitIfNone: MassUnit): Parsed<Mass> {
  const example = 'Write a weight such as 12 lb or 5.4 kg.';
  return parseQuantity(MASSES, text, unitIfNone, example) as Parsed<Mass>;
}

/** Finds the unit of mass that a word names: 'lb', 'pounds', 'kg'. */
export function findMassUnit(word: string): MassUnit | undefined {
  return findUnit(MASSES, word);
}

/** A mass for people: '12.35 lb' or '5.6 kg', up to two decimals. */
export function formatMass(mass: Mass, system: UnitSystem, locale = 'en-US'): string {
  const unit = system === 'us' ? 'lb' : 'kg';
  return `${formatNumber(massIn(mass, unit), locale, { maximumFractionDigits: 2 })}\u00a0${unit}`;
}
