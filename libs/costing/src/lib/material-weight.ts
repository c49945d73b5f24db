import { D, type Decimal, type DecimalInput, type Length, type Mass, roundHalfUp } from '@brakeven/values';

/** Flat metal of one thickness: sheets, or blanks cut from them. */
export interface FlatPieces {
  pieces: DecimalInput;
  length: Length;
  width: Length;
  thickness: Length;
  densityKgPerM3: Decimal;
}

const CUBIC_MM_PER_M3 = D('1e9');

/** A weight as stock keeps it: kilograms, ten decimals, half-up; hundredths of a pound are exact. */
export function toStockWeight(weight: Decimal): Mass {
  return roundHalfUp(weight, 10) as Mass;
}

/**
 * The weight of sheets or blanks: pieces × length × width × thickness × density, kilograms, ten decimals, half-up.
 * Rule in words: `RULES.materialWeight`.
 */
export function computeFlatWeight(flat: FlatPieces): Mass {
  const volumeMm3 = D(flat.pieces).times(flat.length).times(flat.width).times(flat.thickness);
  return toStockWeight(volumeMm3.times(flat.densityKgPerM3).div(CUBIC_MM_PER_M3));
}
