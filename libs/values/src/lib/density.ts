import { type Branded, D, type DecimalInput, type Decimal, roundHalfUp } from './decimal';
import { type Parsed } from './parsed';
import { findUnit, fromBaseUnit, parseQuantity, toBaseUnit, type UnitTable } from './quantity';

/** A density; kilograms per cubic metre inside. */
export type Density = Branded<'Density'>;

/** Units in which a density is written. */
export type DensityUnit = 'kg/m³' | 'g/cm³' | 'lb/in³';

// Source: 1 lb = 0.45359237 kg and 1 in = 25.4 mm, both exact (NIST SP 811, appendix B), so that 1 lb/in³ is
// 0.45359237 ÷ 0.0254³ kg/m³; the quotient does not end and is held to 26 decimals.
const DENSITIES: UnitTable<DensityUnit> = {
  'kg/m³': { factor: '1', words: ['kg/m³', 'kg/m3'] },
  'g/cm³': { factor: '1000', words: ['g/cm³', 'g/cm3', 'g/cc'] },
  'lb/in³': {
    factor: '27679.90471020312119364396209107',
    words: ['lb/in³', 'lb/in3', 'lbs/in³', 'lbs/in3', 'lb/cu in', 'lb per cubic inch'],
  },
};

/** A density of so many units; pounds per cubic inch to 30 digits, the others exactly. */
export function toDensity(value: DecimalInput, unit: DensityUnit): Density {
  return toBaseUnit(DENSITIES, D(value), unit) as Density;
}

/** How many of `unit` a density is. */
export function densityIn(density: Density, unit: DensityUnit): Decimal {
  return fromBaseUnit(DENSITIES, density, unit);
}

/** A density as it is stored: kilograms per cubic metre, three decimals, half-up: '7850.000'. */
export function densityText(density: Density): string {
  return roundHalfUp(density, 3).toFixed(3);
}

/** Reads '7850 kg/m³', '7.85 g/cm³' or '0.2836 lb/in³'; a bare number is in `unitIfNone`. Codes as in `parseQuantity`. */
export function parseDensity(text: string, unitIfNone: DensityUnit): Parsed<Density> {
  const example = 'Write a density such as 0.2836 lb/in³ or 7850 kg/m³.';
  return parseQuantity(DENSITIES, text, unitIfNone, example) as Parsed<Density>;
}

/** Finds the unit of density that a word names: 'lb/in3', 'kg/m³', 'g/cm3'. */
export function findDensityUnit(word: string): DensityUnit | undefined {
  return findUnit(DENSITIES, word);
}
