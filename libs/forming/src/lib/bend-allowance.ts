import { toRadians } from './die-choice';

/** One bend of a sheet. Lengths in mm (or all in another unit alike). */
export interface BendShape {
  /** Inside angle of the finished part in degrees. */
  insideAngle: number;
  /** Inside radius. */
  radius: number;
  thickness: number;
}

/** How the outside flanges beside a bend are measured. */
export type FlangeConvention = 'virtual-sharp' | 'outside-tangent';

/** The convention for an inside angle: to the virtual sharp corner from 90° up, to the tangent of the bend below. */
export function flangeConvention(insideAngle: number): FlangeConvention {
  return insideAngle >= 90 ? 'virtual-sharp' : 'outside-tangent';
}

/** Length of the neutral line in the bend; `FORMING_RULES.bendAllowance`. */
export function bendAllowance({ insideAngle, radius, thickness }: BendShape, k: number): number {
  return toRadians(180 - insideAngle) * (radius + k * thickness);
}

/** Distance from the tangent of the bend to the point that its flange is measured to. */
export function outsideSetback({ insideAngle, radius, thickness }: BendShape): number {
  const isSharp = flangeConvention(insideAngle) === 'outside-tangent';
  return (radius + thickness) * (isSharp ? 1 : Math.tan(toRadians(180 - insideAngle) / 2));
}

/** What one bend takes off the sum of its outside flanges; `FORMING_RULES.bendDeduction`, `.acuteDeduction`. */
export function bendDeduction(shape: BendShape, k: number): number {
  return 2 * outsideSetback(shape) - bendAllowance(shape, k);
}

/** Below this radius ÷ thickness the published formula for K is not used. */
export const RADIUS_RATIO_MIN = 0.2;

/**
 * K of a radius and a thickness by DIN 6935, whose k is referred to half the thickness; `FORMING_RULES.kByRadius`.
 * Undefined below a radius of 0.2 thicknesses.
 */
export function findKByRadius(radius: number, thickness: number): number | undefined {
  const ratio = radius / thickness;
  if (!(ratio >= RADIUS_RATIO_MIN)) return undefined;
  return ratio > 5 ? 0.5 : (0.65 + 0.5 * Math.log10(ratio)) / 2;
}

/** Material groups of the handbook's lengths of metal in a bend. */
export const HANDBOOK_GROUPS = {
  soft: { coefficient: 0.55, words: 'soft brass, soft copper' },
  'half-hard': { coefficient: 0.64, words: 'half-hard copper and brass, soft steel, aluminium' },
  hard: { coefficient: 0.71, words: 'bronze, hard copper, cold-rolled and spring steel' },
} as const;

/** One of the handbook's material groups. */
export type HandbookGroup = keyof typeof HANDBOOK_GROUPS;

/**
 * Length of metal in a bend by the handbook's formula for 90°, coefficient · T + 1.57 · R, other angles in proportion.
 * Source: Machinery's Handbook, lengths of straight metal before bending.
 */
export function handbookBendLength(
  { insideAngle, radius, thickness }: BendShape,
  group: HandbookGroup,
): number {
  return ((HANDBOOK_GROUPS[group].coefficient * thickness + 1.57 * radius) * (180 - insideAngle)) / 90;
}

/** K that stands behind a handbook group: its coefficient ÷ (π/2). */
export function handbookK(group: HandbookGroup): number {
  return HANDBOOK_GROUPS[group].coefficient / (Math.PI / 2);
}

/** A piece that was bent to find K: its blank, and its outside flanges measured to the same points as a drawing's. */
export interface TrialPiece {
  blank: number;
  flanges: readonly number[];
}

/** K from one piece; every bend has the same shape. `FORMING_RULES.kFromTrials`. */
export function kOfTrialPiece(piece: TrialPiece, shape: BendShape): number {
  const outside = piece.flanges.reduce((total, flange) => total + flange, 0);
  const deduction = (outside - piece.blank) / (piece.flanges.length - 1);
  const allowance = 2 * outsideSetback(shape) - deduction;
  return (allowance / toRadians(180 - shape.insideAngle) - shape.radius) / shape.thickness;
}
