import { computeMachineHourRate, computeRecovery, type MachineHourRateBasis } from '@brakeven/costing';
import { D, moneyText, rateText, sum, toHours, toMoney, toPercent, toRate } from '@brakeven/values';

const nothing = {
  interestPercent: toPercent(0),
  floorAreaM2: D(1),
  spaceCostPerM2Year: toRate(0),
  insurancePerYear: toMoney(0),
  upkeepPerYear: toMoney(0),
  loadPercent: toPercent(100),
  consumablesPerHour: toRate(0),
};

// Source: cost-accounting problem page on the machine-hour rate. 16,000 less 1000 over 10,000 hours; 120 and 40 per
// 160 hours; four units of power an hour at 0.05: 1.50 + 0.75 + 0.25 + 0.20 = 2.70 (2.60 with two units).
it.each([
  [4, '2.70'],
  [2, '2.60'],
])('comes to the published rate with %d units of power an hour', (power, printed) => {
  const basis: MachineHourRateBasis = {
    ...nothing,
    price: toMoney(16_000),
    salvage: toMoney(1000),
    lifeYears: D(5),
    productiveHoursPerYear: D(2000),
    upkeepPerYear: toMoney(1500),
    insurancePerYear: toMoney(500),
    powerKw: D(power),
    tariffPerKwh: toRate('0.05'),
  };
  const { parts, ratePerHour } = computeMachineHourRate(basis);
  expect([parts.depreciation, parts.upkeep, parts.insurance].map(rateText)).toEqual(['1.50', '0.75', '0.25']);
  expect(rateText(ratePerHour)).toBe(printed);
});

// Source: accounting-education page on the machine-hour rate. Cost 10,000, scrap 900, ten years of 4380 hours; repairs
// of 18,000 in all; 15 units an hour at 0.05. Standing charges of a month: a quarter of the rent of 300, two tenths of
// the light of 80, a sixth of the foreman's 960, insurance of 1 % a year, oil of 9: 268.33 ÷ 365 h = 0.735160. With
// depreciation 0.207763, repairs 0.410959 and power 0.75 the total is 2.103881, computed apart from this product.
it('comes to the published parts, standing charges as the cost of space', () => {
  const standingPerYear = D(300).div(4).plus(16).plus(160).plus(9).times(12);
  const { parts, fixedPerHour, runningPerHour } = computeMachineHourRate({
    ...nothing,
    price: toMoney(10_000),
    salvage: toMoney(900),
    lifeYears: D(10),
    productiveHoursPerYear: D(4380),
    spaceCostPerM2Year: toRate(standingPerYear),
    insurancePerYear: toMoney(100),
    upkeepPerYear: toMoney(1800),
    powerKw: D(15),
    tariffPerKwh: toRate('0.05'),
  });
  expect(sum([parts.space, parts.insurance]).toFixed(6)).toBe('0.735160');
  expect([parts.depreciation, parts.upkeep, parts.power].map(rateText)).toEqual([
    '0.207763',
    '0.410959',
    '0.75',
  ]);
  // Five parts rounded to the millionth may part from the exact total by as many halves of it.
  expect(fixedPerHour.plus(runningPerHour).minus('2.103881').abs().lte('0.000003')).toBe(true);
});

// Source: managerial-accounting course notes on overhead absorption: 1,000,000 ÷ 500,000 h, spent 980,000 in
// 495,000 h: 10,000 over; 465,500 ÷ 49,000 h, spent 412,000 in 43,500 h: 1250 over.
it.each([
  [1_000_000, 500_000, 980_000, 495_000, '990000.00', '10000.00'],
  [465_500, 49_000, 412_000, 43_500, '413250.00', '1250.00'],
])('absorbs a budget of %d over %d h as published', (budget, planned, spent, run, absorbed, over) => {
  const recovery = computeRecovery(toMoney(spent), toRate(D(budget).div(planned)), toHours(run));
  expect([moneyText(recovery.absorbed), moneyText(recovery.difference), recovery.outcome]).toEqual([
    absorbed,
    over,
    'over',
  ]);
});
