import {
  addDays,
  D,
  moneyText,
  rateText,
  sum,
  toHours,
  toLocalDate,
  toMoney,
  toPercent,
  toRate,
} from '@brakeven/values';
import fc from 'fast-check';
import {
  computeMachineHourRate,
  computeRecovery,
  FIXED_RATE_PARTS,
  type MachineHourRateBasis,
  prorateFixedCost,
  RUNNING_RATE_PARTS,
} from './machine-hour-rate';
import { RULES } from './rules';

const basis: MachineHourRateBasis = {
  price: toMoney('86000'),
  salvage: toMoney('8000'),
  lifeYears: D(12),
  interestPercent: toPercent('6.5'),
  floorAreaM2: D(18),
  spaceCostPerM2Year: toRate('72'),
  insurancePerYear: toMoney('940'),
  upkeepPerYear: toMoney('2150'),
  productiveHoursPerYear: D(1400),
  powerKw: D('11'),
  loadPercent: toPercent(40),
  tariffPerKwh: toRate('0.1725'),
  consumablesPerHour: toRate('0.8'),
};

const texts = (parts: Record<string, Parameters<typeof rateText>[0]>) =>
  Object.fromEntries(Object.entries(parts).map(([part, rate]) => [part, rateText(rate)]));

describe('a machine-hour rate', () => {
  const rate = computeMachineHourRate(basis);

  it('has a part for each cost of a year over its hours, and for each hour of running', () => {
    // 78,000 ÷ 12 ÷ 1400; 47,000 × 6.5 % ÷ 1400; 1296 ÷ 1400; 940 ÷ 1400; 2150 ÷ 1400; 11 × 0.4 × 0.1725; 0.80
    expect(texts(rate.parts)).toEqual({
      depreciation: '4.642857',
      interest: '2.182143',
      space: '0.925714',
      insurance: '0.671429',
      upkeep: '1.535714',
      power: '0.759',
      consumables: '0.80',
    });
  });

  it('is the sum of its parts to the cent, and says what stands still', () => {
    expect(rateText(rate.fixedPerHour)).toBe('9.957857');
    expect(rateText(rate.runningPerHour)).toBe('1.559');
    expect(rateText(rate.ratePerHour)).toBe('11.52');
    // 6500 + 3055 + 1296 + 940 + 2150
    expect(moneyText(rate.fixedPerYear)).toBe('13941.00');
  });

  it('has a rule in words for each part', () => {
    const rules = [...FIXED_RATE_PARTS, ...RUNNING_RATE_PARTS].map(
      (part) => RULES[`rate${part.charAt(0).toUpperCase()}${part.slice(1)}` as keyof typeof RULES],
    );
    expect(rules.filter((rule) => typeof rule === 'string')).toHaveLength(7);
  });

  it.each([
    [{ lifeYears: D(0) }, /life above 0/],
    [{ productiveHoursPerYear: D(0) }, /productive hours above 0/],
    [{ salvage: toMoney('86000.01') }, /salvage value that is not above the price/],
  ])('is refused with %j', (changes, message) => {
    expect(() => computeMachineHourRate({ ...basis, ...changes })).toThrow(message);
  });

  it('is the sum of its parts whatever they are, each within half a millionth of its fraction', () => {
    const amounts = fc.integer({ min: 0, max: 50_000_000 }).map((cents) => toMoney(D(cents).div(100)));
    const random = fc.record({
      salvage: amounts,
      more: amounts,
      lifeYears: fc.integer({ min: 1, max: 60_000 }).map((parts) => D(parts).div(1000)),
      upkeepPerYear: amounts,
      productiveHoursPerYear: fc.integer({ min: 1, max: 878_400 }).map((parts) => D(parts).div(100)),
    });
    fc.assert(
      fc.property(random, ({ more, ...changes }) => {
        const changed = { ...basis, ...changes, price: sum([changes.salvage, more]) };
        const { parts, fixedPerHour, runningPerHour, ratePerHour } = computeMachineHourRate(changed);
        const whole = sum(Object.values(parts));
        expect(whole.eq(fixedPerHour.plus(runningPerHour))).toBe(true);
        expect(whole.minus(ratePerHour).abs().lte('0.005')).toBe(true);
        const exact = more.div(changed.lifeYears).div(changed.productiveHoursPerYear);
        expect(exact.minus(parts.depreciation).abs().lte('0.0000005')).toBe(true);
      }),
    );
  });
});

describe('the fixed cost of a period', () => {
  const costOf = (from: string, to: string) =>
    moneyText(prorateFixedCost(toMoney('13941'), toLocalDate(from), toLocalDate(to)));

  it.each([
    // A whole year bears the whole, with 365 days or with 366.
    ['2026-01-01', '2026-12-31', '13941.00'],
    ['2028-01-01', '2028-12-31', '13941.00'],
    ['2026-01-01', '2028-12-31', '41823.00'],
    // 31 ÷ 365; one day; 31 ÷ 365 + 31 ÷ 366 over the turn of a year
    ['2026-03-01', '2026-03-31', '1184.03'],
    ['2026-03-01', '2026-03-01', '38.19'],
    ['2027-12-01', '2028-01-31', '2364.83'],
  ])('from %s to %s is %s', (from, to, amount) => {
    expect(costOf(from, to)).toBe(amount);
  });

  it('of two periods side by side is that of both, to a cent', () => {
    const day = toLocalDate('2026-01-01');
    const spans = fc.tuple(
      fc.integer({ min: 0, max: 900 }),
      fc.integer({ min: 1, max: 900 }),
      fc.integer({ min: 0, max: 900 }),
    );
    fc.assert(
      fc.property(spans, ([start, first, second]) => {
        const cost = (from: number, to: number) =>
          prorateFixedCost(toMoney('13941'), addDays(day, from), addDays(day, to));
        const parts = sum([cost(start, start + first - 1), cost(start + first, start + first + second)]);
        expect(
          parts
            .minus(cost(start, start + first + second))
            .abs()
            .lte('0.01'),
        ).toBe(true);
      }),
    );
  });

  it('is refused if it ends before it begins', () => {
    expect(() => costOf('2026-03-02', '2026-03-01')).toThrow(/cannot end on 2026-03-01/);
  });
});

it.each([
  ['1100.00', '100', '995.79', '-104.21', 'under'],
  ['1000.00', '120', '1194.94', '194.94', 'over'],
  ['995.79', '100', '995.79', '0.00', 'even'],
  ['1000.00', '0', '0.00', '-1000.00', 'under'],
])(
  'of a fixed cost of %s, %s hours really run carry %s',
  (fixedCost, hours, absorbed, difference, outcome) => {
    const recovery = computeRecovery(toMoney(fixedCost), toRate('9.957857'), toHours(hours));
    expect([moneyText(recovery.absorbed), moneyText(recovery.difference), recovery.outcome]).toEqual([
      absorbed,
      difference,
      outcome,
    ]);
  },
);
