import { type BlankInput, outsideSetback, toRadians } from '@brakeven/forming';

/** A part seen from its end: one line along the middle of the sheet, drawn as thick as the sheet. y is up. */
export interface ProfileDrawing {
  path: string;
  /** Where each flange's number stands. */
  labels: { x: number; y: number; flange: number }[];
  box: { left: number; right: number; top: number; bottom: number };
}

interface Cursor {
  x: number;
  y: number;
  /** Direction in radians. */
  heading: number;
}

/** Which way a bend goes as the part is walked along: up is to the left. */
export type BendWay = 'up' | 'down';

/** Walks along a part, flange by flange, true to scale. The bends are round arcs of the middle of the sheet. */
export function drawProfile(
  { flangesMm, insideAngles, radiusMm, thicknessMm }: BlankInput,
  ways: readonly BendWay[],
): ProfileDrawing {
  const middleMm = radiusMm + thicknessMm / 2;
  const setbacks = insideAngles.map((insideAngle) =>
    outsideSetback({ insideAngle, radius: radiusMm, thickness: thicknessMm }),
  );
  let at: Cursor = { x: 0, y: 0, heading: 0 };
  const points: Cursor[] = [at];
  const labels: ProfileDrawing['labels'] = [];
  const steps = [`M ${toText(at)}`];
  for (const [index, flangeMm] of flangesMm.entries()) {
    const flatMm = Math.max(0, flangeMm - (setbacks[index - 1] ?? 0) - (setbacks[index] ?? 0));
    const end = goOn(at, flatMm);
    labels.push({ x: (at.x + end.x) / 2, y: (at.y + end.y) / 2, flange: index + 1 });
    steps.push(`L ${toText(end)}`);
    points.push(end);
    const angle = insideAngles[index];
    const side = ways[index] === 'down' ? -1 : 1;
    at = angle === undefined ? end : turn(end, toRadians(180 - angle), middleMm, side);
    if (angle !== undefined) steps.push(`A ${middleMm} ${middleMm} 0 0 ${side === 1 ? 1 : 0} ${toText(at)}`);
    points.push(at);
  }
  const [xs, ys] = [points.map(({ x }) => x), points.map(({ y }) => y)];
  return {
    path: steps.join(' '),
    labels,
    box: { left: Math.min(...xs), right: Math.max(...xs), top: Math.max(...ys), bottom: Math.min(...ys) },
  };
}

function goOn({ x, y, heading }: Cursor, lengthMm: number): Cursor {
  return { x: x + lengthMm * Math.cos(heading), y: y + lengthMm * Math.sin(heading), heading };
}

/** Round an arc, to the left for side 1 and to the right for −1. */
function turn({ x, y, heading }: Cursor, turned: number, radiusMm: number, side: 1 | -1): Cursor {
  const after = heading + side * turned;
  return {
    x: x + side * radiusMm * (Math.sin(after) - Math.sin(heading)),
    y: y + side * radiusMm * (Math.cos(heading) - Math.cos(after)),
    heading: after,
  };
}

function toText({ x, y }: Cursor): string {
  return `${Math.round(x * 1000) / 1000} ${Math.round(y * 1000) / 1000}`;
}

/** The ways of a list in the address; up unless it says down. */
export function toWays(text: string): BendWay[] {
  return text.split(';').map((way) => (way === 'down' ? 'down' : 'up'));
}
