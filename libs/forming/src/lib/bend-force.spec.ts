import { toStress } from '@brakeven/values';
import { checkForceInput, computeBendForce, type ForceInput, toForceUnit } from './bend-force';
import { findMaterial } from './materials';

const KSI_60 = toStress(60, 'ksi').toNumber();

function inputOf(tensileMpa: number, thicknessMm: number, openingMm: number, lengthMm: number): ForceInput {
  return { tensileMpa, thicknessMm, openingMm, lengthMm };
}

function tonsOf(input: ForceInput) {
  const [shop, oehler] = computeBendForce(input).rules.map((rule) => toForceUnit(rule.forceKn, 'in'));
  return { shop, oehler };
}

// Worked values of F = 575·t²·L/V (common practice, no published standard) and of F = C·Rm·b·t²/V, C = 1 + 4t/V
// (Lange, Umformtechnik, vol. 3, after Oehler) at 60 ksi, made with decimal arithmetic apart from this code.
const US_TABLE: [t: number, v: number, feet: number, shop: number, oehler: number][] = [
  [0.0478, 0.375, 4, 14.01, 13.25],
  [0.0598, 0.5, 8, 32.9, 30.45],
  [0.1046, 0.875, 10, 71.9, 66.54],
  [0.1345, 1, 6, 62.41, 60.1],
  [0.25, 2, 10, 179.69, 168.75],
  [0.375, 3, 8, 215.62, 202.5],
  [0.5, 5, 10, 287.5, 252],
];

it.each(US_TABLE)('%d in on %d in, %d ft: %d tons by 575, %d by Oehler', (t, v, feet, shop, oehler) => {
  const tons = tonsOf(inputOf(KSI_60, t * 25.4, v * 25.4, feet * 304.8));
  expect(Math.abs((tons.shop ?? 0) - shop)).toBeLessThan(0.006);
  expect(Math.abs((tons.oehler ?? 0) - oehler)).toBeLessThan(0.006);
});

// Metric worked values of the Oehler formula, made with decimal arithmetic apart from this code.
const METRIC_TABLE: [t: number, v: number, metres: number, rm: number, oehler: number][] = [
  [1, 8, 1, 400, 75],
  [1.5, 12, 2, 400, 225],
  [2, 16, 3, 400, 450],
  [4, 32, 2.5, 450, 843.75],
  [6, 50, 3, 450, 1438.56],
  [10, 80, 3, 450, 2531.25],
  [2, 16, 2, 515, 386.25],
  [6, 60, 3, 290, 730.8],
];

it.each(METRIC_TABLE)('%d mm on %d mm, %d m at %d MPa: %d kN by Oehler', (t, v, metres, rm, oehler) => {
  const force = computeBendForce(inputOf(rm, t, v, metres * 1000));
  expect(force.rules[1]?.forceKn).toBeCloseTo(oehler, 8);
});

// Source: a forming handbook page that quotes Lange: Rm 310 MPa, t 1 mm, V 10 mm, b 100 mm give 4.34 kN.
it('gives the published 4.34 kN', () => {
  expect(computeBendForce(inputOf(310, 1, 10, 100)).rules[1]?.forceKn).toBeCloseTo(4.34, 10);
});

// Source: NIST SP 811 units, exact: the 575 rule of 1/4 in on 2 in, 10 ft is 1 598 580 N, and Oehler's 1 501 275 N.
it('agrees in pure SI', () => {
  const force = computeBendForce(inputOf(KSI_60, 6.35, 50.8, 3048));
  expect(force.highKn).toBeCloseTo(1598.58, 2);
  expect(force.lowKn).toBeCloseTo(1501.275, 2);
});

describe('common practice, no published source', () => {
  it('bends 7 gauge 4 ft long with about 28 tons on the wide opening of a press in the low thirties', () => {
    const { highKn } = computeBendForce(inputOf(KSI_60, 0.1793 * 25.4, 2.5 * 25.4, 4 * 304.8));
    expect(toForceUnit(highKn, 'in')).toBeGreaterThan(26.5);
    expect(toForceUnit(highKn, 'in')).toBeLessThan(30);
  });

  it('takes about half of mild steel for soft aluminium, and half more for stainless', () => {
    const strengthOf = (code: string) => findMaterial(code)?.tensileUsed.toNumber() ?? NaN;
    const mild = strengthOf('mild-steel');
    expect(strengthOf('5052') / mild).toBeCloseTo(0.55, 2);
    expect(strengthOf('304') / mild).toBeCloseTo(1.5, 10);
  });
});

describe('what cannot be', () => {
  it.each([
    [inputOf(400, 0, 16, 1000), 'thickness'],
    [inputOf(400, -2, 16, 1000), 'thickness'],
    [inputOf(400, Number.NaN, 16, 1000), 'thickness'],
    [inputOf(400, 2, Infinity, 1000), 'opening'],
    [inputOf(400, 2, 16, 0), 'length'],
    [inputOf(0, 2, 16, 1000), 'tensile'],
    [inputOf(400, 16, 16, 1000), 'opening'],
  ])('%j is refused at %s, with the range and an example', (input, field) => {
    const issues = checkForceInput(input);
    expect(issues.map((issue) => issue.field)).toContain(field);
    expect(issues[0]?.message).toMatch(/such as/);
    expect(() => computeBendForce(input)).toThrow(RangeError);
  });
});
