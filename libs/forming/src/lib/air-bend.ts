import { toDegrees, toRadians } from './die-choice';

/** The geometry of an air bend. Lengths in mm. */
export interface AirBend {
  /** V, between the points where the shoulder arcs meet the die's top plane. */
  openingMm: number;
  shoulderRadiusMm: number;
  /** Radius inside the bend. */
  insideRadiusMm: number;
  thicknessMm: number;
}

/**
 * Travel of the punch in mm from first contact until the sheet is turned by `turned` degrees (0 flat, 90 square):
 * P = a·tan α − (Ri + t + rd)·(1/cos α − 1) with a = V/2 and α half the angle turned.
 * Source: own derivation; the leg's lower face touches the shoulder arc.
 */
export function punchTravelMm(bend: AirBend, turned: number): number {
  const alpha = toRadians(turned) / 2;
  return (bend.openingMm / 2) * Math.tan(alpha) - radiiMm(bend) * (1 / Math.cos(alpha) - 1);
}

/** Slope of the travel in mm per degree turned. */
export function travelPerDegreeMm(bend: AirBend, turned: number): number {
  const alpha = toRadians(turned) / 2;
  const secant = 1 / Math.cos(alpha);
  const perRadian = (bend.openingMm / 2) * secant ** 2 - radiiMm(bend) * secant * Math.tan(alpha);
  return toRadians(perRadian / 2);
}

/**
 * Degrees turned at a travel, the inverse of `punchTravelMm`. With ρ = √(a² + (R−P)²), a·sin α + (R−P)·cos α = R gives
 * α = asin(R/ρ) − atan2(R−P, a). Beyond the deepest travel that the geometry knows it stays at the angle reached there.
 */
export function turnedAtTravel(bend: AirBend, travelMm: number): number {
  const half = bend.openingMm / 2;
  const radii = radiiMm(bend);
  const reach = Math.hypot(half, radii - travelMm);
  const alpha = Math.asin(Math.min(1, radii / reach)) - Math.atan2(radii - travelMm, half);
  return toDegrees(2 * alpha);
}

/**
 * The most a sheet can be turned in degrees: where the leg leaves the shoulder arc (sin α = a/R), and short of folding
 * flat; on a die with a known angle, where the leg comes to lie on its flank.
 */
export function turnedMax(bend: AirBend, dieAngle?: number): number {
  const sine = bend.openingMm / 2 / radiiMm(bend);
  const byContact = sine < 1 ? toDegrees(2 * Math.asin(sine)) : TURNED_LIMIT;
  return Math.min(TURNED_LIMIT, byContact, dieAngle === undefined ? TURNED_LIMIT : 180 - dieAngle);
}

/** Distance in mm along the leg from the end of the bend to where it touches the shoulder; below 0 there is no contact. */
export function legContactMm(bend: AirBend, turned: number): number {
  const alpha = toRadians(turned) / 2;
  return (bend.openingMm / 2 - radiiMm(bend) * Math.sin(alpha)) / Math.cos(alpha);
}

const TURNED_LIMIT = 170;

function radiiMm({ insideRadiusMm, thicknessMm, shoulderRadiusMm }: AirBend): number {
  return insideRadiusMm + thicknessMm + shoulderRadiusMm;
}
