import fc from 'fast-check';
import {
  type AirBend,
  legContactMm,
  punchTravelMm,
  travelPerDegreeMm,
  turnedAtTravel,
  turnedMax,
} from './air-bend';

function bendOf(
  insideRadiusMm: number,
  thicknessMm: number,
  half: number,
  shoulderRadiusMm: number,
): AirBend {
  return { insideRadiusMm, thicknessMm, openingMm: 2 * half, shoulderRadiusMm };
}

// Check values of the derivation, each found three ways apart from this code: closed form, bisection on the distance
// between shoulder and outline, and a sampled outline.
const TABLE: [
  turned: number,
  ri: number,
  t: number,
  a: number,
  rd: number,
  p: number,
  leg: number,
  slope: number,
][] = [
  [30, 2.56, 2, 8, 2, 1.912182, 6.5245, 0.05895],
  [60, 2.56, 2, 8, 2, 3.603967, 5.4502, 0.05492],
  [90, 2.56, 2, 8, 2, 5.282759, 4.7537, 0.05867],
  [120, 2.56, 2, 8, 2, 7.296406, 4.6377, 0.08094],
  [90, 4, 3, 12, 3, 7.857864, 6.9706, 0.08603],
  [135, 1.28, 1, 4, 0.8, 4.688426, 3.0167, 0.06879],
  [90, 2, 2, 8, 2, 5.514719, 5.3137, 0.06558],
];

it.each(TABLE)('turned %d°, Ri %d, t %d, a %d, rd %d: travel %d', (turned, ri, t, a, rd, p, leg, slope) => {
  const bend = bendOf(ri, t, a, rd);
  expect(punchTravelMm(bend, turned)).toBeCloseTo(p, 6);
  expect(legContactMm(bend, turned)).toBeCloseTo(leg, 4);
  expect(travelPerDegreeMm(bend, turned)).toBeCloseTo(slope, 5);
});

// Check values: 90° wanted with +2° of springback, and with a springback factor of 0.98 and a tighter loaded radius.
it('gives the worked travels with springback', () => {
  expect(punchTravelMm(bendOf(2.56, 2, 8, 2), 92)).toBeCloseTo(5.400752, 6);
  expect(punchTravelMm(bendOf(0.98 * 3.56 - 1, 2, 8, 2), 90 / 0.98)).toBeCloseTo(5.422214, 6);
});

it('is the half opening at 90° without radii and thickness', () => {
  expect(punchTravelMm(bendOf(0, 0, 8, 0), 90)).toBeCloseTo(8, 12);
});

/**
 * Solves the contact by bisection, without the formula: the punch goes down until the distance from the shoulder's
 * centre to the outside of the sheet, arc or straight leg, is the shoulder's radius.
 */
function solveTravel(
  { insideRadiusMm: ri, thicknessMm: t, openingMm, shoulderRadiusMm: rd }: AirBend,
  turned: number,
) {
  const alpha = (turned * Math.PI) / 360;
  const shoulder = { x: openingMm / 2, y: -rd };
  const outside = ri + t;
  const gapAt = (travel: number) => {
    const centreY = t - travel + ri;
    const tangent = { x: outside * Math.sin(alpha), y: centreY - outside * Math.cos(alpha) };
    const along = (shoulder.x - tangent.x) * Math.cos(alpha) + (shoulder.y - tangent.y) * Math.sin(alpha);
    if (along <= 0) return Math.abs(Math.hypot(shoulder.x, shoulder.y - centreY) - outside) - rd;
    const foot = { x: tangent.x + along * Math.cos(alpha), y: tangent.y + along * Math.sin(alpha) };
    return Math.hypot(shoulder.x - foot.x, shoulder.y - foot.y) - rd;
  };
  let [low, high] = [-5, 0];
  while (gapAt(high) > 0) {
    low = high;
    high += 0.01;
  }
  for (let step = 0; step < 60; step += 1) {
    const middle = (low + high) / 2;
    if (gapAt(middle) > 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

const bends = fc
  .record({
    openingMm: fc.double({ min: 6, max: 60, noNaN: true }),
    ratio: fc.double({ min: 6, max: 12, noNaN: true }),
    radius: fc.double({ min: 0.1, max: 0.2, noNaN: true }),
    shoulder: fc.double({ min: 0.02, max: 0.12, noNaN: true }),
  })
  .map(({ openingMm, ratio, radius, shoulder }) => ({
    openingMm,
    thicknessMm: openingMm / ratio,
    insideRadiusMm: openingMm * radius,
    shoulderRadiusMm: openingMm * shoulder,
  }));
const turns = fc.double({ min: 5, max: 110, noNaN: true });

it('agrees with the contact of sheet and shoulder solved by bisection', () => {
  fc.assert(
    fc.property(bends, turns, (bend, turned) => {
      expect(punchTravelMm(bend, turned)).toBeCloseTo(solveTravel(bend, turned), 8);
    }),
  );
});

it('goes there and back, and always deeper for more turn', () => {
  fc.assert(
    fc.property(bends, turns, (bend, turned) => {
      fc.pre(turned < turnedMax(bend));
      const travel = punchTravelMm(bend, turned);
      expect(turnedAtTravel(bend, travel)).toBeCloseTo(turned, 6);
      expect(travelPerDegreeMm(bend, turned)).toBeGreaterThan(0);
    }),
  );
});

it('has the slope of its own small differences', () => {
  fc.assert(
    fc.property(bends, turns, (bend, turned) => {
      const difference = punchTravelMm(bend, turned + 1e-4) - punchTravelMm(bend, turned - 1e-4);
      expect(travelPerDegreeMm(bend, turned)).toBeCloseTo(difference / 2e-4, 6);
    }),
  );
});

it('ends where the leg leaves the shoulder or lies on the flank of the die', () => {
  const wrapped = bendOf(5, 3, 8, 2);
  expect(turnedMax(wrapped)).toBeCloseTo((2 * Math.asin(0.8) * 180) / Math.PI, 10);
  expect(legContactMm(wrapped, turnedMax(wrapped))).toBeCloseTo(0, 10);
  expect(turnedMax(bendOf(2.56, 2, 8, 2), 85)).toBe(95);
});
