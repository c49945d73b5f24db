import fc from 'fast-check';
import { D, roundHalfUp, sum } from './decimal';

/** Whole numbers with up to 30 digits, and how many of them stand behind the point. */
const scaled = fc.record({
  digits: fc.bigInt({ min: -(10n ** 30n), max: 10n ** 30n }),
  scale: fc.integer({ min: 0, max: 12 }),
});

function toText(digits: bigint, scale: number): string {
  const sign = digits < 0n ? '-' : '';
  const padded = (digits < 0n ? -digits : digits).toString().padStart(scale + 1, '0');
  return scale === 0 ? sign + padded : `${sign}${padded.slice(0, -scale)}.${padded.slice(-scale)}`;
}

/** Rounds half away from zero in whole numbers alone: the reference, in units of the last place kept. */
function roundByBigInt(digits: bigint, scale: number, places: number): bigint {
  if (places >= scale) return digits * 10n ** BigInt(places - scale);
  const unit = 10n ** BigInt(scale - places);
  const size = digits < 0n ? -digits : digits;
  const rounded = size / unit + (2n * (size % unit) >= unit ? 1n : 0n);
  return digits < 0n ? -rounded : rounded;
}

describe('roundHalfUp', () => {
  it('agrees with whole-number arithmetic for any number and any places', () => {
    fc.assert(
      fc.property(scaled, fc.integer({ min: 0, max: 8 }), ({ digits, scale }, places) => {
        const expected = toText(roundByBigInt(digits, scale, places), places);
        expect(roundHalfUp(D(toText(digits, scale)), places).toFixed(places)).toBe(expected);
      }),
    );
  });

  it('agrees with whole-number arithmetic on exact ties', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: -(10n ** 12n), max: 10n ** 12n }), (cents) => {
        const tie = cents * 10n + (cents < 0n ? -5n : 5n);
        expect(roundHalfUp(D(toText(tie, 3)), 2).toFixed(2)).toBe(toText(roundByBigInt(tie, 3, 2), 2));
      }),
    );
  });

  it('is symmetric about nought, and rounding twice is rounding once', () => {
    fc.assert(
      fc.property(scaled, ({ digits, scale }) => {
        const x = D(toText(digits, scale));
        const rounded = roundHalfUp(x, 2);
        expect(roundHalfUp(x.neg(), 2).plus(rounded).isZero()).toBe(true);
        expect(roundHalfUp(rounded, 2).eq(rounded)).toBe(true);
        expect(rounded.minus(x).abs().lte('0.005')).toBe(true);
      }),
    );
  });
});

describe('sum', () => {
  it('is the same in any order, and of any parts', () => {
    const cents = fc.array(fc.bigInt({ min: -(10n ** 14n), max: 10n ** 14n }), { maxLength: 40 });
    fc.assert(
      fc.property(cents, fc.nat(), (list, cut) => {
        const terms = list.map((cent) => D(toText(cent, 2)));
        const at = cut % (terms.length + 1);
        const expected = toText(
          list.reduce((total, cent) => total + cent, 0n),
          2,
        );
        expect(sum(terms).toFixed(2)).toBe(expected);
        expect(sum([...terms].reverse()).toFixed(2)).toBe(expected);
        expect(sum([sum(terms.slice(0, at)), sum(terms.slice(at))]).toFixed(2)).toBe(expected);
      }),
    );
  });
});
