import { fitCurve, fitLinear } from './least-squares';

const numbers = (text: string) => text.trim().split(/\s+/).map(Number);

// Source: NIST Statistical Reference Datasets, linear regression, data set Norris, with its certified values.
const NORRIS_X =
  numbers(`0.2 337.4 118.2 884.6 10.1 226.5 666.3 996.3 448.6 777.0 558.2 0.4 0.6 775.5 666.9 338.0
  447.5 11.6 556.0 228.1 995.8 887.6 120.2 0.3 0.3 556.8 339.1 887.2 999.0 779.0 11.1 118.3 229.2 669.1 448.9 0.5`);
const NORRIS_Y =
  numbers(`0.1 338.8 118.1 888.0 9.2 228.1 668.5 998.5 449.1 778.9 559.2 0.3 0.1 778.1 668.8 339.3
  448.9 10.8 557.7 228.3 998.0 888.8 119.6 0.3 0.6 557.6 339.3 888.0 998.5 778.9 10.2 117.6 228.9 668.4 449.2 0.2`);

describe('the straight line of Norris', () => {
  const fit = fitLinear(
    NORRIS_X.map((x) => [1, x]),
    NORRIS_Y,
  );

  it('has the certified coefficients and standard deviations', () => {
    expect(fit?.coefficients[0]).toBeCloseTo(-0.262323073774029, 11);
    expect(fit?.coefficients[1]).toBeCloseTo(1.00211681802045, 13);
    expect(fit?.standardErrors?.[0]).toBeCloseTo(0.23281823430153, 11);
    expect(fit?.standardErrors?.[1]).toBeCloseTo(0.0004297968482, 13);
    expect(fit?.residualSd).toBeCloseTo(0.884796396144373, 11);
  });

  it('has the certified coefficient of determination', () => {
    const mean = NORRIS_Y.reduce((total, y) => total + y, 0) / NORRIS_Y.length;
    const total = NORRIS_Y.reduce((sum, y) => sum + (y - mean) ** 2, 0);
    expect(1 - ((fit?.residualSd ?? 0) ** 2 * 34) / total).toBeCloseTo(0.999993745883712, 12);
  });
});

// Source: NIST Statistical Reference Datasets, linear regression, NoInt1 and NoInt2 (through the origin).
it.each([
  [
    'NoInt1',
    60,
    numbers('130 131 132 133 134 135 136 137 138 139 140'),
    2.07438016528926,
    0.0165289256198347,
    3.56753034006338,
  ],
  ['NoInt2', 4, numbers('3 4 4'), 0.727272727272727, 0.042082731807843, 0.369274472937998],
])(
  '%s has the certified slope, its deviation and the residual deviation',
  (_, start, y, slope, slopeSd, sd) => {
    const fit = fitLinear(
      y.map((__, index) => [start + index]),
      y,
    );
    expect(fit?.coefficients[0]).toBeCloseTo(slope, 13);
    expect(fit?.standardErrors?.[0]).toBeCloseTo(slopeSd, 13);
    expect(fit?.residualSd).toBeCloseTo(sd, 12);
  },
);

it('has no answer for columns that depend on each other, or for too few rows', () => {
  expect(
    fitLinear(
      [
        [1, 2],
        [2, 4],
        [3, 6],
      ],
      [1, 2, 3],
    ),
  ).toBeUndefined();
  expect(fitLinear([[1, 2]], [1])).toBeUndefined();
  expect(fitLinear([], [])).toBeUndefined();
});

it('leaves no deviation where there are as many rows as coefficients', () => {
  const rows = [
    [1, 0],
    [1, 1],
  ];
  const fit = fitLinear(rows, [3, 5]);
  expect(fit).toMatchObject({ residualSd: null, standardErrors: null });
  expect(fit?.coefficients[0]).toBeCloseTo(3, 12);
  expect(fit?.coefficients[1]).toBeCloseTo(2, 12);
});

describe('a curve', () => {
  // Source: NIST Statistical Reference Datasets, nonlinear regression, data set Misra1a, y = b1·(1 − exp(−b2·x)),
  // start 1 of NIST, with its certified values.
  const x = numbers('77.6 114.9 141.1 190.8 239.9 289.0 332.8 378.4 434.8 477.3 536.8 593.1 689.1 760.0');
  const y = numbers('10.07 14.73 17.94 23.93 29.61 35.18 40.02 44.82 50.76 55.05 61.01 66.40 75.47 81.78');

  it('of Misra1a is fitted to the certified parameters from a start far away', () => {
    const fit = fitCurve(
      {
        residuals: ([b1 = 0, b2 = 0]) =>
          x.map((at, index) => b1 * (1 - Math.exp(-b2 * at)) - (y[index] ?? 0)),
        slopes: ([b1 = 0, b2 = 0]) => x.map((at) => [1 - Math.exp(-b2 * at), b1 * at * Math.exp(-b2 * at)]),
      },
      [500, 0.0001],
    );
    expect(fit?.parameters[0]).toBeCloseTo(238.94212918, 4);
    expect(fit?.parameters[1]).toBeCloseTo(5.5015643181e-4, 10);
    const squares = fit?.residuals.reduce((total, value) => total + value ** 2, 0);
    expect(squares).toBeCloseTo(0.12455138894, 9);
  });

  it('whose parameters cannot be told apart has no fit', () => {
    const fit = fitCurve(
      {
        residuals: ([a = 0, b = 0]) => x.map((at) => a + b - at),
        slopes: () => x.map(() => [1, 1]),
      },
      [0, 0],
    );
    expect(fit).toBeUndefined();
  });
});
