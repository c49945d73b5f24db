import { type Material } from '@brakeven/contract';
import { computeFlatWeight } from '@brakeven/costing';
import { D, toLength } from '@brakeven/values';

/** Sheets or blanks as they stand in a form: how many, and their size in mm; null for what cannot be read. */
export interface FlatSize {
  count: number | null;
  lengthMm: string | null;
  widthMm: string | null;
}

/** Kilograms by the same rule as the server's; null as long as something is missing. */
export function findFlatWeight(
  material: Pick<Material, 'thicknessMm' | 'densityKgM3'> | undefined,
  { count, lengthMm, widthMm }: FlatSize,
): string | null {
  const { thicknessMm = null, densityKgM3 = null } = material ?? {};
  if (thicknessMm === null || densityKgM3 === null) return null;
  if (count === null || lengthMm === null || widthMm === null) return null;
  return computeFlatWeight({
    pieces: count,
    length: toLength(lengthMm, 'mm'),
    width: toLength(widthMm, 'mm'),
    thickness: toLength(thicknessMm, 'mm'),
    densityKgPerM3: D(densityKgM3),
  }).toFixed();
}
