import { D } from '@brakeven/values';
import fc from 'fast-check';
import { ceilFraction, roundFraction } from './round-fraction';

describe('a fraction', () => {
  it.each([
    ['1', '3', 2, '0.33'],
    ['2', '3', 2, '0.67'],
    ['1', '8', 2, '0.13'],
    ['-1', '8', 2, '-0.13'],
    ['1', '-8', 2, '-0.13'],
    ['5', '2', 0, '3'],
    ['0', '7', 2, '0'],
    ['-1', '1000', 2, '0'],
  ])('%s ÷ %s to %d places is %s', (numerator, denominator, places, rounded) => {
    expect(roundFraction(D(numerator), D(denominator), places).toFixed()).toBe(rounded);
  });

  it('just below a tie stays below it, however close', () => {
    const numerator = D('12499999999999999999999999999999999999');
    expect(roundFraction(numerator, D('1e38'), 2).toFixed()).toBe('0.12');
  });

  it.each([
    ['1', '3', '0.34'],
    ['2', '3', '0.67'],
    ['1', '4', '0.25'],
    ['-1', '3', '-0.33'],
    ['1', '-3', '-0.33'],
    ['1', '1000', '0.01'],
  ])('%s ÷ %s rounds up to %s', (numerator, denominator, rounded) => {
    expect(ceilFraction(D(numerator), D(denominator), 2).toFixed()).toBe(rounded);
  });

  it('of nothing is refused', () => {
    expect(() => roundFraction(D(1), D(0), 2)).toThrow(RangeError);
    expect(() => ceilFraction(D(1), D(0), 2)).toThrow(RangeError);
  });
});

/** Half away from zero on whole numbers. */
function roundIntegers(numerator: bigint, denominator: bigint): bigint {
  const [n, d] = [numerator < 0n ? -numerator : numerator, denominator < 0n ? -denominator : denominator];
  const rounded = (2n * n + d) / (2n * d);
  return numerator < 0n === denominator < 0n ? rounded : -rounded;
}

it('rounds as whole numbers of any size do', () => {
  const digits = fc.bigInt({ min: -(10n ** 30n), max: 10n ** 30n });
  const divisors = fc.bigInt({ min: -(10n ** 12n), max: 10n ** 12n }).filter((n) => n !== 0n);
  fc.assert(
    fc.property(digits, divisors, (numerator, denominator) => {
      const [n, d] = [D(String(numerator)), D(String(denominator))];
      expect(roundFraction(n, d, 2).times(100).toFixed()).toBe(
        String(roundIntegers(numerator * 100n, denominator)),
      );
      const ceiling = ceilFraction(n, d, 0).minus(n.div(d));
      expect(ceiling.gte('-1e-20') && ceiling.lt(1)).toBe(true);
    }),
  );
});
