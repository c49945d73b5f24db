import {
  addDays,
  addYears,
  dayOfWeek,
  daysBetween,
  endOfMonth,
  findLocalDate,
  isLocalDate,
  isTimeZone,
  laterOf,
  monthOf,
  parseLocalDate,
  startOfMonth,
  startOfWeek,
  todayIn,
  toLocalDate,
} from './local-date';

const day = toLocalDate;

describe('reading a date', () => {
  it.each(['2026-03-02', '2024-02-29', '0001-01-01', '9999-12-31'])('takes %s', (text) => {
    expect(isLocalDate(text)).toBe(true);
    expect(parseLocalDate(text)).toEqual({ ok: true, value: text });
  });

  it.each([
    '',
    '2023-02-29',
    '2026-13-01',
    '2026-3-2',
    '0000-01-01',
    '2026-03-02T00:00',
    ' 2026-03-02',
    '03/02/2026',
  ])('refuses %p and shows how to write one', (text) => {
    expect(isLocalDate(text)).toBe(false);
    expect(parseLocalDate(text)).toEqual({
      ok: false,
      code: 'not_a_date',
      message: expect.stringContaining('such as 2026-03-02'),
    });
    expect(() => toLocalDate(text)).toThrow(RangeError);
  });

  it('makes a date of parts only if there is such a day', () => {
    expect(findLocalDate(2026, 3, 2)).toBe('2026-03-02');
    expect(findLocalDate(2026, 2, 29)).toBeUndefined();
    expect(findLocalDate(2026, 0, 1)).toBeUndefined();
    expect(findLocalDate(12026, 1, 1)).toBeUndefined();
  });
});

describe('counting days', () => {
  it('crosses months, leap days and years', () => {
    expect(addDays(day('2024-02-28'), 1)).toBe('2024-02-29');
    expect(addDays(day('2023-02-28'), 1)).toBe('2023-03-01');
    expect(addDays(day('2026-01-01'), -1)).toBe('2025-12-31');
    expect(daysBetween(day('2026-01-01'), day('2027-01-01'))).toBe(365);
    expect(daysBetween(day('2026-03-02'), day('2026-03-01'))).toBe(-1);
  });

  it('does not lose a day where clocks change', () => {
    expect(addDays(day('2026-03-08'), 1)).toBe('2026-03-09');
    expect(daysBetween(day('2026-10-31'), day('2026-11-02'))).toBe(2);
  });

  it('throws rather than stopping short of a day it cannot reach', () => {
    expect(() => addDays(day('9999-12-31'), 1)).toThrow(RangeError);
    expect(() => addDays(day('0001-01-01'), -1)).toThrow(RangeError);
    expect(() => addDays(day('2026-03-02'), 0.5)).toThrow(RangeError);
    expect(() => addYears(day('9990-01-01'), 20)).toThrow(RangeError);
    expect(() => addYears(day('2026-01-01'), 0.5)).toThrow(RangeError);
  });

  it('adds years, from a leap day to the 28th where it has to', () => {
    expect(addYears(day('2024-02-29'), 20)).toBe('2044-02-29');
    expect(addYears(day('2024-02-29'), 1)).toBe('2025-02-28');
  });

  it('tells the later of two', () => {
    expect(laterOf(day('2026-03-02'), day('2026-02-28'))).toBe('2026-03-02');
    expect(laterOf(day('2026-02-28'), day('2026-03-02'))).toBe('2026-03-02');
  });
});

describe('weeks and months', () => {
  it('knows the day of the week', () => {
    expect(dayOfWeek(day('2026-03-01'))).toBe(0);
    expect(dayOfWeek(day('2026-03-07'))).toBe(6);
    expect(dayOfWeek(day('1999-12-31'))).toBe(5);
  });

  it('finds the start of the week for any first day', () => {
    expect(startOfWeek(day('2026-03-04'), 0)).toBe('2026-03-01');
    expect(startOfWeek(day('2026-03-04'), 1)).toBe('2026-03-02');
    expect(startOfWeek(day('2026-03-04'), 3)).toBe('2026-03-04');
    expect(startOfWeek(day('2026-03-04'), 4)).toBe('2026-02-26');
  });

  it('finds both ends of the month', () => {
    expect(monthOf(day('2024-02-10'))).toBe('2024-02');
    expect(startOfMonth(day('2024-02-10'))).toBe('2024-02-01');
    expect(endOfMonth(day('2024-02-10'))).toBe('2024-02-29');
    expect(endOfMonth(day('2026-12-31'))).toBe('2026-12-31');
  });
});

describe('today', () => {
  it('is the date on the wall of the shop', () => {
    const instant = new Date('2026-03-02T03:30:00Z');
    expect(todayIn('America/Chicago', instant)).toBe('2026-03-01');
    expect(todayIn('UTC', instant)).toBe('2026-03-02');
    expect(todayIn('Pacific/Auckland', instant)).toBe('2026-03-02');
  });

  it('is now if no instant is given', () => {
    const before = new Date().toISOString().slice(0, 10);
    const today = todayIn('UTC');
    const after = new Date().toISOString().slice(0, 10);
    expect([before, after]).toContain(today);
  });

  it('needs a zone that exists', () => {
    expect(() => todayIn('Nowhere/Town', new Date())).toThrow(RangeError);
    expect(isTimeZone('America/Chicago')).toBe(true);
    expect(isTimeZone('UTC')).toBe(true);
    expect(isTimeZone('Nowhere/Town')).toBe(false);
    expect(isTimeZone('+05:00')).toBe(false);
    expect(isTimeZone('')).toBe(false);
  });
});
