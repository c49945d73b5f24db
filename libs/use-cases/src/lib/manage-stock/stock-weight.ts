import { AppError } from '@brakeven/contract';
import { computeFlatWeight, toStockWeight } from '@brakeven/costing';
import { type MaterialRow } from '@brakeven/database';
import { D, toLength } from '@brakeven/values';

/** A weight as given, or how many sheets or blanks of which size. */
export interface Measure {
  weightKg: string | null;
  count: number | null;
  lengthMm: string | null;
  widthMm: string | null;
}

/**
 * The weight of a lot or an issue in kilograms: as given, else by the rule of flat pieces with the material's
 * thickness and density.
 * @throws AppError `invalid_input` if the weight is not given and cannot be computed
 */
export function computeStockWeight(
  material: Pick<MaterialRow, 'name' | 'thicknessMm' | 'densityKgM3'>,
  { weightKg, count, lengthMm, widthMm }: Measure,
): string {
  if (weightKg !== null) return toStockWeight(D(weightKg)).toFixed();
  const { thicknessMm, densityKgM3 } = material;
  if (thicknessMm === null || densityKgM3 === null) {
    const missing = thicknessMm === null ? 'thickness' : 'density';
    throw refusedWeight(
      `${material.name} has no ${missing}, so the weight cannot be worked out. Write the weight, or give the material its ${missing} first.`,
    );
  }
  if (count === null || lengthMm === null || widthMm === null) {
    throw refusedWeight('Say the weight, or how many with their length and width.');
  }
  return computeFlatWeight({
    pieces: count,
    length: toLength(lengthMm, 'mm'),
    width: toLength(widthMm, 'mm'),
    thickness: toLength(thicknessMm, 'mm'),
    densityKgPerM3: D(densityKgM3),
  }).toFixed();
}

function refusedWeight(message: string): AppError {
  return new AppError('invalid_input', message, {
    issues: [{ field: 'weightKg', code: 'no_weight', message }],
  });
}
