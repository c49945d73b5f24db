/** Inside radius of an air bend in mm: the material's share of the opening, at least the punch's nose radius. */
export function insideRadiusMm(radiusPerOpening: number, openingMm: number, punchRadiusMm = 0): number {
  return Math.max(radiusPerOpening * openingMm, punchRadiusMm);
}

/** Shortest outside flange in mm that still lies on the shoulder at the end of the bend; `FORMING_RULES.shortestFlange`. */
export function shortestFlangeMm(openingMm: number, insideAngle = 90): number {
  return openingMm / 2 / Math.cos(toRadians(180 - insideAngle) / 2);
}

/** From which to which opening ÷ thickness is usual for a thickness; `FORMING_RULES.preferredOpening`. */
export function preferredOpeningRatios(thicknessMm: number): { from: number; to: number } {
  return thicknessMm < 13 ? { from: 8, to: 10 } : { from: 10, to: 12 };
}

/** Degrees to radians. */
export function toRadians(degrees: number): number {
  return (degrees * Math.PI) / 180;
}

/** Radians to degrees. */
export function toDegrees(radians: number): number {
  return (radians * 180) / Math.PI;
}
