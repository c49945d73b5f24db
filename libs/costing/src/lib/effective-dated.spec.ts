import { toLocalDate } from '@brakeven/values';
import { findValidOn } from './effective-dated';

const row = (validFrom: string) => ({ validFrom: toLocalDate(validFrom) });
const rows = [row('2026-03-01'), row('2026-01-01'), row('2026-06-01')];

describe('findValidOn', () => {
  it.each([
    ['2026-01-01', '2026-01-01'],
    ['2026-02-28', '2026-01-01'],
    ['2026-03-01', '2026-03-01'],
    ['2026-05-31', '2026-03-01'],
    ['2030-01-01', '2026-06-01'],
  ])('finds on %s the row from %s, whatever the order of rows', (date, expected) => {
    expect(findValidOn(rows, toLocalDate(date))).toEqual(row(expected));
    expect(findValidOn([...rows].reverse(), toLocalDate(date))).toEqual(row(expected));
  });

  it('finds none before the first, and none among none', () => {
    expect(findValidOn(rows, toLocalDate('2025-12-31'))).toBeUndefined();
    expect(findValidOn([], toLocalDate('2026-03-01'))).toBeUndefined();
  });

  it('does not let chance decide between two of the same day', () => {
    const twice = [...rows, row('2026-03-01')];
    expect(() => findValidOn(twice, toLocalDate('2026-04-01'))).toThrow(
      'Two rates are valid from 2026-03-01.',
    );
    expect(findValidOn(twice, toLocalDate('2026-07-01'))).toEqual(row('2026-06-01'));
  });
});
