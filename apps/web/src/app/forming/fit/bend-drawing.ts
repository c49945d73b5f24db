import { type AirBend, legContactMm, outsideSetback, toRadians } from '@brakeven/forming';

/** What is drawn. Lengths in mm, angles in degrees. */
export interface DrawnBend {
  bend: AirBend;
  insideAngle: number;
  punchRadiusMm: number;
  /** Null where it is not known: then one is drawn that clears the sheet. */
  punchAngle: number | null;
  dieAngle: number | null;
  /** Outside flange at the left; null where it is not known. */
  flangeMm: number | null;
}

/** A point in mm; x to the right from the middle of the V, y up from the die's top plane. */
export interface Point {
  x: number;
  y: number;
}

/** A bend to scale: SVG paths with y up, so that they are shown under `scale(1 -1)`, and the box round them. */
export interface BendDrawing {
  sheet: string;
  punch: string;
  die: string;
  /** Where the leg at the right touches its shoulder. */
  contact: Point;
  /** Middle of the bend. */
  centre: Point;
  box: { left: number; right: number; top: number; bottom: number };
  /** Whether the flange at the left has slipped off its shoulder. */
  isFlangeOff: boolean;
}

const DRAWN_ANGLE = 85;
/** Degrees that a tool drawn by guess is sharper than the bend. */
const CLEARANCE = 5;
const SHARPEST = 26;

/**
 * Lays out punch, sheet and die at the end of an air bend. The leg's lower face touches the shoulder arc, whose centre
 * lies a shoulder radius below the edge of the opening; the punch's nose touches the inside of the bend.
 */
export function drawBend(drawn: DrawnBend): BendDrawing {
  const { bend, insideAngle } = drawn;
  const alpha = toRadians(180 - insideAngle) / 2;
  const radii = bend.insideRadiusMm + bend.thicknessMm + bend.shoulderRadiusMm;
  const half = bend.openingMm / 2;
  const centre = { x: 0, y: radii / Math.cos(alpha) - half * Math.tan(alpha) - bend.shoulderRadiusMm };
  const contactLeg = legContactMm(bend, 180 - insideAngle);
  const rightLeg = contactLeg + 0.55 * bend.openingMm;
  const leftLeg = drawn.flangeMm === null ? rightLeg : Math.min(flatOf(drawn), 2 * rightLeg);
  const legs = { left: Math.max(leftLeg, bend.thicknessMm / 4), right: rightLeg };
  const die = drawDie(drawn);
  const punch = drawPunch(drawn, centre.y - bend.insideRadiusMm, legs.right);
  const outer = bend.insideRadiusMm + bend.thicknessMm;
  const ends = [legs.left, legs.right].map((leg) => toLegPoint(centre, alpha, outer, leg));
  const reach = Math.max(die.halfWidthMm, ...ends.map(({ x }) => Math.abs(x) + bend.thicknessMm));
  const inner = toLegPoint(centre, alpha, bend.insideRadiusMm, Math.max(legs.left, legs.right));
  return {
    sheet: drawSheet(bend, centre, alpha, legs),
    punch: punch.path,
    die: die.path,
    contact: toLegPoint(centre, alpha, outer, contactLeg),
    centre,
    box: { left: -reach, right: reach, top: Math.max(punch.topMm, inner.y), bottom: die.bottomMm },
    isFlangeOff: leftLeg < contactLeg,
  };
}

/** Flat part of the flange beside its bend. */
function flatOf({ bend, insideAngle, flangeMm }: DrawnBend): number {
  const shape = { insideAngle, radius: bend.insideRadiusMm, thickness: bend.thicknessMm };
  return (flangeMm ?? 0) - outsideSetback(shape);
}

/** A point of the right leg: so far out from the bend's centre, so far along from the end of the bend. */
function toLegPoint({ y }: Point, alpha: number, radius: number, along: number): Point {
  return {
    x: radius * Math.sin(alpha) + along * Math.cos(alpha),
    y: y - radius * Math.cos(alpha) + along * Math.sin(alpha),
  };
}

function drawSheet(
  bend: AirBend,
  centre: Point,
  alpha: number,
  legs: { left: number; right: number },
): string {
  const { insideRadiusMm: inner } = bend;
  const outer = inner + bend.thicknessMm;
  const at = (radius: number, along: number, side: 1 | -1) =>
    mirror(toLegPoint(centre, alpha, radius, along), side);
  return [
    `M ${at(outer, legs.left, -1)}`,
    `L ${at(outer, 0, -1)}`,
    `A ${outer} ${outer} 0 0 1 ${at(outer, 0, 1)}`,
    `L ${at(outer, legs.right, 1)}`,
    `L ${at(inner, legs.right, 1)}`,
    `L ${at(inner, 0, 1)}`,
    `A ${inner} ${inner} 0 0 0 ${at(inner, 0, -1)}`,
    `L ${at(inner, legs.left, -1)} Z`,
  ].join(' ');
}

function drawPunch(
  { bend, insideAngle, punchRadiusMm, punchAngle }: DrawnBend,
  tipMm: number,
  legMm: number,
) {
  const half = toRadians(punchAngle ?? toDrawnAngle(insideAngle)) / 2;
  const nose = { x: 0, y: tipMm + punchRadiusMm };
  const start = { x: punchRadiusMm * Math.cos(half), y: nose.y - punchRadiusMm * Math.sin(half) };
  const bodyMm = Math.max(0.24 * bend.openingMm, punchRadiusMm * 1.15);
  const flankMm = Math.max(0, bodyMm - start.x) / Math.tan(half);
  const topMm = Math.max(start.y + flankMm + 0.35 * bend.openingMm, tipMm + legMm * 0.8);
  const at = (x: number, y: number, side: 1 | -1) => mirror({ x, y }, side);
  const path = [
    `M ${at(bodyMm, topMm, -1)}`,
    `L ${at(bodyMm, start.y + flankMm, -1)}`,
    `L ${at(start.x, start.y, -1)}`,
    `A ${punchRadiusMm} ${punchRadiusMm} 0 0 1 ${at(start.x, start.y, 1)}`,
    `L ${at(bodyMm, start.y + flankMm, 1)}`,
    `L ${at(bodyMm, topMm, 1)} Z`,
  ].join(' ');
  return { path, topMm };
}

function drawDie({ bend, insideAngle, dieAngle }: DrawnBend) {
  const { shoulderRadiusMm: shoulder, openingMm } = bend;
  const half = toRadians(dieAngle ?? toDrawnAngle(insideAngle)) / 2;
  const edge = openingMm / 2;
  const flank = { x: edge - shoulder * Math.cos(half), y: shoulder * (Math.sin(half) - 1) };
  const depthMm = flank.x / Math.tan(half) - flank.y;
  const halfWidthMm = edge + 0.45 * openingMm;
  const bottomMm = -depthMm - 0.25 * openingMm;
  const at = (x: number, y: number, side: 1 | -1) => mirror({ x, y }, side);
  const path = [
    `M ${at(halfWidthMm, 0, -1)}`,
    `L ${at(edge, 0, -1)}`,
    `A ${shoulder} ${shoulder} 0 0 0 ${at(flank.x, flank.y, -1)}`,
    `L 0 ${-depthMm}`,
    `L ${at(flank.x, flank.y, 1)}`,
    `A ${shoulder} ${shoulder} 0 0 0 ${at(edge, 0, 1)}`,
    `L ${at(halfWidthMm, 0, 1)}`,
    `L ${at(halfWidthMm, bottomMm, 1)}`,
    `L ${at(halfWidthMm, bottomMm, -1)} Z`,
  ].join(' ');
  return { path, halfWidthMm, bottomMm };
}

/** Angle of a tool that nobody has entered: the usual one, or sharper where the bend asks for it. */
function toDrawnAngle(insideAngle: number): number {
  return Math.max(Math.min(DRAWN_ANGLE, insideAngle - CLEARANCE), Math.min(SHARPEST, insideAngle - 1));
}

function mirror({ x, y }: Point, side: 1 | -1): string {
  return `${round(side * x)} ${round(y)}`;
}

function round(value: number): number {
  return Math.round(value * 1000) / 1000;
}
