import fc from 'fast-check';
import { DATE_FORMATS, type DateFormat, parseDateText } from './date-text';
import {
  addDays,
  type DayOfWeek,
  dayOfWeek,
  daysBetween,
  endOfMonth,
  type LocalDate,
  startOfMonth,
  startOfWeek,
  toLocalDate,
} from './local-date';
import { dateFromSerial } from './serial-date';

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const dayNumbers = fc.integer({ min: -25_000, max: 100_000 });
const dates = dayNumbers.map(dateOf);
const weekStarts = fc.integer({ min: 0, max: 6 }) as fc.Arbitrary<DayOfWeek>;

/** The reference: ECMAScript's calendar in UTC, days from 1970-01-01. */
function dateOf(dayNumber: number): LocalDate {
  return toLocalDate(new Date(dayNumber * 86_400_000).toISOString().slice(0, 10));
}

function write(date: LocalDate, format: DateFormat, isShort: boolean): string {
  const [year = '', month = '', day = ''] = date.split('-');
  const cut = (part: string) => (isShort ? String(Number(part)) : part);
  return format
    .replace('YYYY', year)
    .replace('MMM', MONTHS[Number(month) - 1] ?? '')
    .replace('MM', cut(month))
    .replace('DD', cut(day));
}

it('adding days agrees with the calendar in UTC, and comes back', () => {
  fc.assert(
    fc.property(dayNumbers, fc.integer({ min: -20_000, max: 20_000 }), (dayNumber, days) => {
      const date = dateOf(dayNumber);
      const other = addDays(date, days);
      expect(other).toBe(dateOf(dayNumber + days));
      expect(addDays(other, -days)).toBe(date);
      expect(daysBetween(date, other)).toBe(days);
      expect(date < other).toBe(days > 0);
    }),
  );
});

it('the day of the week agrees with the calendar in UTC', () => {
  fc.assert(
    fc.property(dayNumbers, (dayNumber) => {
      expect(dayOfWeek(dateOf(dayNumber))).toBe(new Date(dayNumber * 86_400_000).getUTCDay());
    }),
  );
});

it('a week starts on its first day, at most six days before', () => {
  fc.assert(
    fc.property(dates, weekStarts, (date, firstDay) => {
      const start = startOfWeek(date, firstDay);
      expect(dayOfWeek(start)).toBe(firstDay);
      expect(daysBetween(start, date)).toBeGreaterThanOrEqual(0);
      expect(daysBetween(start, date)).toBeLessThanOrEqual(6);
    }),
  );
});

it('the day after the end of a month is the first of the next', () => {
  fc.assert(
    fc.property(dates, (date) => {
      const next = addDays(endOfMonth(date), 1);
      expect(next).toBe(startOfMonth(next));
      expect(startOfMonth(date) <= date && date <= endOfMonth(date)).toBe(true);
    }),
  );
});

it('a date written in any declared order is read back, with one digit or two', () => {
  fc.assert(
    fc.property(dates, fc.constantFrom(...DATE_FORMATS), fc.boolean(), (date, format, isShort) => {
      expect(parseDateText(write(date, format, isShort), format)).toEqual({ ok: true, value: date });
    }),
  );
});

it('a serial date is the same day in both systems, whatever the time of day', () => {
  const serials = fc.integer({ min: 1462 + 1, max: 120_000 });
  const times = fc.double({ min: 0, max: 0.999, noNaN: true });
  fc.assert(
    fc.property(serials, times, (serial, time) => {
      const expected = { ok: true, value: dateOf(serial - 25_569) };
      expect(dateFromSerial(serial + time, '1900')).toEqual(expected);
      expect(dateFromSerial(serial - 1462 + time, '1904')).toEqual(expected);
    }),
  );
});
