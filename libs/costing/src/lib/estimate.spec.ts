import { D, hoursText, moneyText, toHours, toMass, toMoney, toPercent, toRate } from '@brakeven/values';
import fc from 'fast-check';
import { type CategoryFigures, computeEstimate, computePriceForMargin, type EstimateLine } from './estimate';

const forming: EstimateLine = {
  kind: 'operation',
  setupHours: toHours('0.5'),
  minutesPerPiece: D('1.75'),
  pieces: D(120),
  labourRate: toRate('31.20'),
  machineHourRate: toRate('18.40'),
  overheadRate: toRate('12.80'),
};
const grinding: EstimateLine = {
  ...forming,
  setupHours: toHours(0),
  minutesPerPiece: D(1),
  machineHourRate: null,
};
const sheet: EstimateLine = { kind: 'material', weight: toMass('86.5', 'kg'), pricePerKg: toRate('1.62') };
const galvanizing: EstimateLine = { kind: 'outside', amount: toMoney('140') };

function textsOf(figures: Partial<CategoryFigures>) {
  return Object.fromEntries(
    Object.entries(figures).map(([category, { amount, quantity }]) => [
      category,
      [moneyText(amount), quantity?.toFixed() ?? null],
    ]),
  );
}

describe('an estimate', () => {
  it('of an operation is hours at its rates: set-up once, the run with the scrap allowance', () => {
    // 0.5 + 120 × 1.75 ÷ 60 × 1.04 = 4.14 h
    expect(textsOf(computeEstimate([forming], toPercent(4)).lines[0] ?? {})).toEqual({
      labour: ['129.17', '4.14'],
      overtime: ['0.00', '4.14'],
      machine: ['76.18', '4.14'],
      overhead: ['52.99', '4.14'],
    });
  });

  it('rounds hours to four decimals', () => {
    // 7 × 1.75 ÷ 60 × 1.03 = 0.210291666… + 0.5
    const { hours } = computeEstimate([{ ...forming, pieces: D(7) }], toPercent(3));
    expect(hoursText(hours)).toBe('0.7103');
  });

  it('of material buys the scrap allowance as well; outside work has none', () => {
    // 86.5 × 1.04 = 89.96 kg × 1.62 = 145.7352
    const { lines } = computeEstimate([sheet, galvanizing], toPercent(4));
    expect(lines.map(textsOf)).toEqual([{ material: ['145.74', '89.96'] }, { outside: ['140.00', null] }]);
  });

  it('adds its lines up by category, without a machine where an operation has none', () => {
    // Grinding: 120 ÷ 60 × 1.04 = 2.08 h: 64.90 and 26.62
    const estimate = computeEstimate([forming, grinding, sheet, galvanizing], toPercent(4));
    expect(textsOf(estimate.figures)).toEqual({
      labour: ['194.07', '6.22'],
      overtime: ['0.00', '6.22'],
      machine: ['76.18', '4.14'],
      overhead: ['79.61', '6.22'],
      material: ['145.74', '89.96'],
      outside: ['140.00', null],
    });
    expect([hoursText(estimate.hours), moneyText(estimate.total)]).toEqual(['6.2200', '635.60']);
  });

  it('of nothing is nothing', () => {
    const estimate = computeEstimate([], toPercent(10));
    expect([hoursText(estimate.hours), moneyText(estimate.total)]).toEqual(['0.0000', '0.00']);
    expect(textsOf(estimate.figures)).toMatchObject({ labour: ['0.00', null], material: ['0.00', null] });
  });
});

describe('a price for a wanted margin', () => {
  it.each([
    ['635.60', '30', '908.00'],
    ['635.60', '0', '635.60'],
    // 100 ÷ 0.7 = 142.857142… goes up, so that the margin is reached
    ['100.00', '30', '142.86'],
    ['100.00', '66.6667', '300.01'],
    ['0.00', '50', '0.00'],
  ])('of %s at %s %% is %s', (cost, margin, price) => {
    expect(moneyText(computePriceForMargin(toMoney(cost), toPercent(margin)))).toBe(price);
  });

  it.each([
    ['100', '100'],
    ['100', '-1'],
    ['-0.01', '10'],
  ])('of %s at %s %% is refused', (cost, margin) => {
    expect(() => computePriceForMargin(toMoney(cost), toPercent(margin))).toThrow(RangeError);
  });

  it('leaves at least that margin, and a cent less would not', () => {
    const costs = fc.integer({ min: 0, max: 90_000_000 }).map((cents) => toMoney(D(cents).div(100)));
    const margins = fc.integer({ min: 0, max: 999_999 }).map((parts) => toPercent(D(parts).div(10_000)));
    fc.assert(
      fc.property(costs, margins, (cost, margin) => {
        const price = computePriceForMargin(cost, margin);
        const isReached = (of: typeof cost) => of.minus(cost).times(100).gte(of.times(margin));
        expect(isReached(price)).toBe(true);
        expect(price.isZero() || !isReached(toMoney(price.minus('0.01')))).toBe(true);
      }),
    );
  });
});
