import { computeWeekPremium, type PaidHours } from '@brakeven/costing';
import { moneyText, type Rate, sum, toHours, toMoney, toRate } from '@brakeven/values';

function payOf(week: [hours: number, wage: string][], threshold: number) {
  const entries = week.map(([hours, wage]): PaidHours & { wagePerHour: Rate } => ({
    hours: toHours(hours),
    wagePerHour: toRate(wage),
  }));
  const { premium, regularRate } = computeWeekPremium(entries, toHours(threshold));
  if (premium === null) throw new Error('Every entry has a wage.');
  const straight = toMoney(sum(entries.map(({ hours, wagePerHour }) => hours.times(wagePerHour))));
  return { straight, premium, regularRate, total: toMoney(straight.plus(premium)) };
}

// Source: 29 CFR 778.110 (hourly rate employee). (a): 12 an hour, 46 hours: 588. (b): with a bonus of 46 the regular
// rate is 13 and the pay 637; our entries carry wages alone, so the 13 stand as the wage. The print of 1981 has
// 6 an hour: 294, and with a bonus 6.20: 303.80.
it.each([
  ['12', '588.00'],
  ['13', '637.00'],
  ['6', '294.00'],
  ['6.20', '303.80'],
])('pays 46 hours at %s as %s', (wage, printed) => {
  expect(moneyText(payOf([[46, wage]], 40).total)).toBe(printed);
});

// Source: 29 CFR 778.115 (two or more rates): the regular rate is the weighted average, all earnings ÷ all hours. The
// inputs are our own; 892 ÷ 46 = 19.391304, a premium of 58.173913 and 950.17 were computed apart from this product.
it('pays 30 h at 18 and 16 h at 22 by their weighted average', () => {
  const week = payOf(
    [
      [30, '18'],
      [16, '22'],
    ],
    40,
  );
  expect(week.regularRate?.toFixed(6)).toBe('19.391304');
  expect([moneyText(week.straight), moneyText(week.premium)]).toEqual(['892.00', '58.17']);
  expect(moneyText(week.total)).toBe('950.17');
});

// Source: cost-accounting course texts on the overtime premium: straight time is direct, the premium apart from it
// (44 h at 20; 44 h at 16; 40 h at 10.40 with 35 normal). Last: a professional body's exam answer, 42 h at 3.60 with
// 36 normal, whose premium of 6 × 1.80 it splits over a customer's request and overhead.
it.each([
  [44, '20', 40, '880.00', '40.00'],
  [44, '16', 40, '704.00', '32.00'],
  [40, '10.40', 35, '416.00', '26.00'],
  [42, '3.60', 36, '151.20', '10.80'],
])(
  'parts %d h at %s over %d h into %s straight and %s premium',
  (hours, wage, threshold, straight, premium) => {
    const week = payOf([[hours, wage]], threshold);
    expect([moneyText(week.straight), moneyText(week.premium)]).toEqual([straight, premium]);
  },
);
