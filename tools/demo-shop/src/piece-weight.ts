import { computeFlatWeight } from '@brakeven/costing';
import { D, type Decimal, densityText, type Mass, toDensity, toLength, toMass } from '@brakeven/values';
import { type DemoMaterial, type KindCosts, MATERIALS } from './cost-story';

/** What so many pieces of a kind of work weigh in kilograms. */
export function weighPieces(kind: KindCosts, pieces: number): Mass {
  if (kind.blankIn === null) return toMass(pieces * (kind.poundsPerPiece ?? 0), 'lb');
  return weighFlat(MATERIALS[kind.material], pieces, kind.blankIn);
}

/** What so many sheets or blanks of a size in inches weigh, as the shop's stock keeps it. */
export function weighFlat(
  material: DemoMaterial,
  pieces: number,
  [length, width]: readonly [string, string],
): Mass {
  return computeFlatWeight({
    pieces,
    length: toLength(length, 'in'),
    width: toLength(width, 'in'),
    thickness: toLength(material.thicknessIn, 'in'),
    densityKgPerM3: densityOf(material),
  });
}

function densityOf({ name, density }: DemoMaterial): Decimal {
  if (density === null) throw new Error(`${name} is only weighed.`);
  return D(densityText(toDensity(density, 'g/cm³')));
}
