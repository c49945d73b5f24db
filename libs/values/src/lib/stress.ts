import { type Branded, D, type DecimalInput, type Decimal } from './decimal';
import { type Parsed } from './parsed';
import { findUnit, fromBaseUnit, parseQuantity, toBaseUnit, type UnitTable } from './quantity';

/** A stress or a strength; megapascals (N/mm²) inside. */
export type Stress = Branded<'Stress'>;

/** Units in which a strength is written. */
export type StressUnit = 'MPa' | 'ksi' | 'psi';

// Source: 1 lbf = 4.4482216152605 N and 1 in = 25.4 mm, both exact (NIST SP 811, appendix B), so that 1 ksi is
// 1000 × 4.4482216152605 ÷ 645.16 MPa; the quotient does not end and is held to 30 decimals.
const STRESSES: UnitTable<StressUnit> = {
  MPa: { factor: '1', words: ['mpa', 'n/mm2', 'n/mm²', 'megapascal', 'megapascals'] },
  ksi: { factor: '6.894757293168361336722673445346', words: ['ksi'] },
  psi: { factor: '0.006894757293168361336722673445', words: ['psi'] },
};

/** A strength of so many units, to 30 digits. */
export function toStress(value: DecimalInput, unit: StressUnit): Stress {
  return toBaseUnit(STRESSES, D(value), unit) as Stress;
}

/** How many of `unit` a strength is. */
export function stressIn(stress: Stress, unit: StressUnit): Decimal {
  return fromBaseUnit(STRESSES, stress, unit);
}

/** Reads '60 ksi', '60,000 psi' or '414 MPa'; a bare number is in `unitIfNone`. Codes as in `parseQuantity`. */
export function parseStress(text: string, unitIfNone: StressUnit): Parsed<Stress> {
  const example = 'Write a tensile strength such as 60 ksi or 414 MPa.';
  return parseQuantity(STRESSES, text, unitIfNone, example) as Parsed<Stress>;
}

/** Finds the unit of strength that a word names: 'ksi', 'psi', 'MPa'. */
export function findStressUnit(word: string): StressUnit | undefined {
  return findUnit(STRESSES, word);
}
