import { D, moneyText, sum, toMoney } from '@brakeven/values';
import fc from 'fast-check';
import { allocateLargestRemainder } from './largest-remainder';

function sharesOf(amount: string, weights: string[]): string[] {
  return allocateLargestRemainder(
    toMoney(amount),
    weights.map((weight) => D(weight)),
  ).map(moneyText);
}

describe('shares by largest remainder', () => {
  it.each([
    // The cent left over goes to the largest remainder …
    ['10.00', ['1', '1', '1'], ['3.34', '3.33', '3.33']],
    // … 2.857…, 4.285…, 2.857…: the cents cut down are 285, 428, 285; the remainders .71, .57, .71; two cents left.
    ['10.00', ['2', '3', '2'], ['2.86', '4.28', '2.86']],
    ['0.01', ['1', '5'], ['0.00', '0.01']],
    ['-10.00', ['1', '1', '1'], ['-3.34', '-3.33', '-3.33']],
    ['5.00', ['0', '1'], ['0.00', '5.00']],
    ['0.00', ['0', '0'], ['0.00', '0.00']],
    ['0.00', [], []],
  ])('of %s by %j are %j', (amount, weights, shares) => {
    expect(sharesOf(amount, weights)).toEqual(shares);
  });

  it('are refused where there is nobody to bear them', () => {
    expect(() => sharesOf('1.00', [])).toThrow(RangeError);
    expect(() => sharesOf('1.00', ['0'])).toThrow(RangeError);
    expect(() => sharesOf('1.00', ['2', '-1'])).toThrow(RangeError);
  });

  it('add up to the amount, each within a cent of its part', () => {
    const amounts = fc
      .integer({ min: -10_000_000, max: 10_000_000 })
      .map((cents) => toMoney(D(cents).div(100)));
    const weights = fc.array(
      fc.integer({ min: 1, max: 240_000 }).map((parts) => D(parts).div(10_000)),
      { minLength: 1, maxLength: 40 },
    );
    fc.assert(
      fc.property(amounts, weights, (amount, list) => {
        const shares = allocateLargestRemainder(amount, list);
        expect(moneyText(sum(shares))).toBe(moneyText(amount));
        const whole = sum(list);
        shares.forEach((share, index) => {
          const exact = amount.times(list[index] ?? 0).div(whole);
          expect(share.minus(exact).abs().lt('0.01')).toBe(true);
        });
      }),
    );
  });
});
