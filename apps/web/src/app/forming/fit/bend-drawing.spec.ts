import { drawBend, type DrawnBend } from './bend-drawing';

const drawn = (change: Partial<DrawnBend> = {}): DrawnBend => ({
  bend: { openingMm: 24, shoulderRadiusMm: 2, insideRadiusMm: 4, thicknessMm: 3 },
  insideAngle: 90,
  punchRadiusMm: 1,
  punchAngle: 85,
  dieAngle: 85,
  flangeMm: null,
  ...change,
});

/** The points that a path goes through, arcs by their ends. */
const pointsOf = (path: string) =>
  [...path.matchAll(/(-?[\d.]+) (-?[\d.]+)(?= [LAZM]|$| Z)/g)].map(([, x, y]) => ({
    x: Number(x),
    y: Number(y),
  }));

describe.each([60, 90, 120, 150])('A bend to %i° inside', (insideAngle) => {
  const change = insideAngle < 90 ? { punchAngle: 30, dieAngle: 30 } : {};
  const drawing = drawBend(drawn({ insideAngle, ...change }));

  it('touches the shoulder: the contact lies a shoulder radius from the arc’s centre', () => {
    const { x, y } = drawing.contact;
    expect(Math.hypot(x - 12, y + 2)).toBeCloseTo(2, 6);
  });

  it('has the sheet everywhere as thick as it is', () => {
    const [, outerLeft, outerRight, , , innerRight, innerLeft] = pointsOf(drawing.sheet);
    for (const [outer, inner] of [
      [outerLeft, innerLeft],
      [outerRight, innerRight],
    ]) {
      expect(Math.hypot((outer?.x ?? 0) - (inner?.x ?? 0), (outer?.y ?? 0) - (inner?.y ?? 0))).toBeCloseTo(
        3,
        2,
      );
    }
  });

  it('opens upwards by its inside angle', () => {
    const [, , outerRight, endRight] = pointsOf(drawing.sheet);
    const rise = (endRight?.y ?? 0) - (outerRight?.y ?? 0);
    const run = (endRight?.x ?? 0) - (outerRight?.x ?? 0);
    expect(180 - 2 * ((Math.atan2(rise, run) * 180) / Math.PI)).toBeCloseTo(insideAngle, 1);
  });

  it('has the punch’s nose on the inside of the bend, above the sheet and below the die’s top', () => {
    const innerBottom = drawing.centre.y - 4;
    const nose = pointsOf(drawing.punch).map(({ y }) => y);
    expect(Math.min(...nose)).toBeGreaterThan(innerBottom - 1e-6);
    expect(drawing.box.top).toBeGreaterThan(0);
    expect(drawing.box.bottom).toBeLessThan(0);
  });
});

describe('drawBend', () => {
  it('says when the short flange has slipped off its shoulder', () => {
    expect(drawBend(drawn({ flangeMm: 10 })).isFlangeOff).toBe(true);
    expect(drawBend(drawn({ flangeMm: 40 })).isFlangeOff).toBe(false);
  });

  it('draws tools of unknown angle sharper than the bend', () => {
    const known = drawBend(drawn({ punchAngle: 85, dieAngle: 85 }));
    expect(drawBend(drawn({ punchAngle: null, dieAngle: null })).die).toBe(known.die);
  });
});
