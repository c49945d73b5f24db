import { D, sum, toMoney } from '@brakeven/values';
import {
  computeDecliningBalance,
  computeDoubleDecliningBalance,
  computeStraightLine,
  computeSumOfYearsDigits,
  computeUnitsOfProduction,
  type DepreciableAsset,
} from './depreciation';

const press: DepreciableAsset = { cost: toMoney('86000'), salvage: toMoney('8000'), life: 12 };
const periods = Array.from({ length: press.life }, (_, index) => index + 1);

describe('depreciation', () => {
  it('by straight line and by years’ digits writes cost down to salvage', () => {
    expect(computeStraightLine(press).toFixed()).toBe('6500');
    const digits = sum(periods.map((period) => computeSumOfYearsDigits(press, period)));
    expect(digits.toDecimalPlaces(20).toFixed()).toBe('78000');
  });

  it('by double declining balance stops at the salvage', () => {
    const asset: DepreciableAsset = { cost: toMoney('1000'), salvage: toMoney('200'), life: 4 };
    // 500, 250, then 50 down to 200, then nothing
    const written = [1, 2, 3, 4].map((period) => computeDoubleDecliningBalance(asset, period).toFixed());
    expect(written).toEqual(['500', '250', '50', '0']);
    expect(computeDoubleDecliningBalance({ ...asset, life: 1 }, 1).toFixed()).toBe('800');
    expect(computeDoubleDecliningBalance(asset, 1, D(1)).toFixed()).toBe('250');
  });

  it('by declining balance gives a year that is not whole its months, and the rest to one more', () => {
    const asset: DepreciableAsset = { cost: toMoney('1000'), salvage: toMoney('125'), life: 3 };
    // 1 − (1/8)^(1/3) = 0.5
    expect([1, 2, 3].map((period) => computeDecliningBalance(asset, period).toFixed())).toEqual([
      '500',
      '250',
      '125',
    ]);
    // Half a first year: 250; then 375, 187.50, and half of 93.75
    expect([1, 2, 3, 4].map((period) => computeDecliningBalance(asset, period, 6).toFixed())).toEqual([
      '250',
      '375',
      '187.5',
      '46.875',
    ]);
  });

  it('by units of production follows what is made', () => {
    const written = computeUnitsOfProduction(press, D(1_200_000), D(130_000));
    expect(written.toFixed()).toBe('8450');
  });

  it.each<[string, () => unknown]>([
    ['a life of 0', () => computeStraightLine({ ...press, life: 0 })],
    ['a life that is not whole', () => computeStraightLine({ ...press, life: 2.5 })],
    ['a salvage above the cost', () => computeStraightLine({ ...press, salvage: toMoney('86000.01') })],
    ['a salvage below 0', () => computeStraightLine({ ...press, salvage: toMoney('-1') })],
    ['a period of 0', () => computeSumOfYearsDigits(press, 0)],
    ['a period after the life', () => computeSumOfYearsDigits(press, 13)],
    ['a period that is not whole', () => computeDoubleDecliningBalance(press, 1.5)],
    ['a factor of 0', () => computeDoubleDecliningBalance(press, 1, D(0))],
    ['thirteen months', () => computeDecliningBalance(press, 1, 13)],
    ['no months', () => computeDecliningBalance(press, 1, 0)],
    ['one more period after a whole first year', () => computeDecliningBalance(press, 13)],
    ['a cost of 0', () => computeDecliningBalance({ cost: toMoney(0), salvage: toMoney(0), life: 3 }, 1)],
    ['no units in all', () => computeUnitsOfProduction(press, D(0), D(0))],
    ['more units than in all', () => computeUnitsOfProduction(press, D(10), D(11))],
  ])('refuses %s', (_, compute) => {
    expect(compute).toThrow(RangeError);
  });
});
