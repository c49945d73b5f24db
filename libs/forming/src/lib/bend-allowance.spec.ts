import {
  bendAllowance,
  bendDeduction,
  findKByRadius,
  handbookBendLength,
  type HandbookGroup,
  handbookK,
  outsideSetback,
} from './bend-allowance';

const shape = (insideAngle: number, radius: number, thickness: number) => ({
  insideAngle,
  radius,
  thickness,
});

// Worked values of the standard formulas, made with 30 digits apart from this code.
it.each([
  [90, 0.125, 0.33, 0.125, 0.26114489, 0.25, 0.23885511],
  [90, 0.0625, 0.44, 0.0598, 0.13950556, 0.1223, 0.10509444],
  [135, 0.1, 0.4, 0.1046, 0.11140088, 0.084748095, 0.058095314],
  [90, 2, 0.446, 2, 4.542743, 4, 3.457257],
  [90, 3, 0.38, 3, 6.5030968, 6, 5.4969032],
])('inside angle %d, R %d, K %d, t %d: BA %d, OSSB %d, BD %d', (angle, r, k, t, ba, ossb, bd) => {
  expect(bendAllowance(shape(angle, r, t), k)).toBeCloseTo(ba, 7);
  expect(outsideSetback(shape(angle, r, t))).toBeCloseTo(ossb, 8);
  expect(bendDeduction(shape(angle, r, t), k)).toBeCloseTo(bd, 7);
});

// Source: Machinery's Handbook, lengths of straight metal before bending: coefficient · T + 1.57 · R.
it.each([
  [0.125, 0.125, 0.265, 0.27625, 0.285],
  [0.0625, 0.09375, 0.1815625, 0.1871875, 0.1915625],
  [2, 3, 5.81, 5.99, 6.13],
])('T %d, R %d: %d soft, %d half-hard, %d hard', (t, r, soft, halfHard, hard) => {
  const lengthOf = (group: HandbookGroup) => handbookBendLength(shape(90, r, t), group);
  expect(lengthOf('soft')).toBeCloseTo(soft, 10);
  expect(lengthOf('half-hard')).toBeCloseTo(halfHard, 10);
  expect(lengthOf('hard')).toBeCloseTo(hard, 10);
});

it('has the K that stands behind each group', () => {
  expect(handbookK('soft')).toBeCloseTo(0.3501, 4);
  expect(handbookK('half-hard')).toBeCloseTo(0.4074, 4);
  expect(handbookK('hard')).toBeCloseTo(0.452, 4);
});

// Source: DIN 6935, correction factor k and amount v to subtract; recomputed apart from this code. The row of 45° goes
// by the convention for sharp angles.
it.each([
  [90, 1, 1, 0.65, 1.918695],
  [90, 2, 2, 0.65, 3.83739],
  [90, 3, 2, 0.738046, 4.128292],
  [90, 2, 1, 0.800515, 2.229684],
  [90, 4, 3, 0.712469, 6.038098],
  [90, 1, 2, 0.499485, 3.644614],
  [120, 2, 2, 0.65, 1.843729],
  [135, 3, 2, 0.738046, 1.206281],
  [45, 4, 2, 0.800515, 0.689053],
])('DIN 6935: opening angle %d, r %d, s %d: k %d, v %d', (angle, r, s, k, v) => {
  const found = findKByRadius(r, s) ?? NaN;
  expect(2 * found).toBeCloseTo(k, 6);
  expect(bendDeduction(shape(angle, r, s), found)).toBeCloseTo(v, 6);
});

// Source: worked example of a Tabellenbuch Metall: 60°, a 16, b 21, r 6, s 5 with k = 0.7 from the chart: v = 5.77.
it('gives the published 5.77 mm for a 60° angle', () => {
  expect(bendDeduction(shape(60, 6, 5), 0.35)).toBeCloseTo(5.76844, 5);
});

// Source: DIN 6935, k by radius ÷ thickness.
it.each([
  [0.2, 0.3005],
  [0.5, 0.4995],
  [1, 0.65],
  [1.5, 0.738],
  [2, 0.8005],
  [3, 0.8886],
  [4, 0.951],
  [5, 0.9995],
  [6, 1],
])('k at r/s = %d is %d', (ratio, k) => {
  expect(2 * (findKByRadius(ratio, 1) ?? NaN)).toBeCloseTo(k, 4);
});

it('has no K for a radius far below the thickness', () => {
  expect(findKByRadius(0, 1)).toBeUndefined();
  expect(findKByRadius(0.19, 1)).toBeUndefined();
});

it('is the same by both conventions at 90°', () => {
  expect(bendDeduction(shape(90, 2, 2), 0.4)).toBeCloseTo(bendDeduction(shape(90 - 1e-9, 2, 2), 0.4), 8);
});
