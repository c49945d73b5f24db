import { studentLimit, studentShareWithin } from './student-t';

// Source: published tables of Student's t, two-sided 90 %, 95 % and 99 %.
it.each([
  [0.9, 1, 6.314],
  [0.9, 2, 2.92],
  [0.9, 3, 2.353],
  [0.9, 10, 1.812],
  [0.9, 30, 1.697],
  [0.95, 1, 12.706],
  [0.95, 5, 2.571],
  [0.99, 4, 4.604],
  [0.99, 9, 3.25],
])('the limit of %d with %d degrees of freedom is %d', (share, freedom, limit) => {
  expect(Math.abs(studentLimit(share, freedom) - limit)).toBeLessThan(0.0006);
});

it.each([1, 2, 3, 4, 5, 8, 13])(
  'the share is the area under the density, %d degrees of freedom',
  (freedom) => {
    const step = 0.001;
    const density = (t: number) => (1 + t ** 2 / freedom) ** (-(freedom + 1) / 2);
    const area = (to: number) => {
      let total = 0;
      for (let t = step / 2; t < to; t += step) total += density(t) * step;
      return total;
    };
    // The normalizing constant is taken from the ratio of two areas, so that no gamma function is needed.
    expect(area(1) / area(2)).toBeCloseTo(studentShareWithin(1, freedom) / studentShareWithin(2, freedom), 6);
  },
);
