import { computeFlatWeight } from '@brakeven/costing';
import { type RegisterValue, type RegisterValues } from '@brakeven/database';
import { D, toLength } from '@brakeven/values';

/** How many sheets or blanks of which size; what is not known is null or missing. */
export interface FlatSize {
  pieces: RegisterValue | undefined;
  lengthMm: RegisterValue | undefined;
  widthMm: RegisterValue | undefined;
}

/** The weight of sheets or blanks of a material in kilograms; null if something of it is not known. */
export function computeSheetWeight(material: RegisterValues | undefined, size: FlatSize): string | null {
  const { pieces, lengthMm, widthMm } = size;
  const thicknessMm = material?.['thicknessMm'];
  const density = material?.['densityKgM3'];
  if (!isKnown(pieces) || !isKnown(lengthMm) || !isKnown(widthMm)) return null;
  if (!isKnown(thicknessMm) || !isKnown(density)) return null;
  return computeFlatWeight({
    pieces,
    length: toLength(lengthMm, 'mm'),
    width: toLength(widthMm, 'mm'),
    thickness: toLength(thicknessMm, 'mm'),
    densityKgPerM3: D(density),
  }).toFixed();
}

/** What is missing for a weight, and what to do about it. */
export function whyNoWeight(
  material: RegisterValues | undefined,
  { pieces, lengthMm, widthMm }: FlatSize,
  measure: string,
): string {
  if (![pieces, lengthMm, widthMm].every(isKnown)) return `Write its Weight, or ${measure}.`;
  const missing = isKnown(material?.['thicknessMm']) ? 'density' : 'thickness';
  const name = String(material?.['name'] ?? 'The material');
  return `${name} has no ${missing}, so it cannot be worked out. Write its Weight, or the ${missing} on sheet Materials.`;
}

function isKnown(value: RegisterValue | undefined): value is string | number {
  return typeof value === 'string' || typeof value === 'number';
}
