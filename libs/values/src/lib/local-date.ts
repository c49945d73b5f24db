import {
  CalendarDate,
  endOfMonth as lastOfMonth,
  fromDate,
  GregorianCalendar,
  parseDate,
  toCalendarDate,
} from '@internationalized/date';
import { accepted, type Parsed, quoted, refused } from './parsed';

declare const brand: unique symbol;

/** A day on the wall calendar, 'YYYY-MM-DD'; no clock, no zone. Comparing as text compares as dates. */
export type LocalDate = string & { readonly [brand]: 'LocalDate' };

/** Day of the week, Sunday 0 to Saturday 6. */
export type DayOfWeek = 0 | 1 | 2 | 3 | 4 | 5 | 6;

const ISO_DATE = /^(?!0000)\d{4}-\d{2}-\d{2}$/;
const calendar = new GregorianCalendar();
const A_SUNDAY = new CalendarDate(2000, 1, 2);

/** Whether a text is a day that exists, written YYYY-MM-DD. */
export function isLocalDate(text: string): text is LocalDate {
  if (!ISO_DATE.test(text)) return false;
  try {
    parseDate(text);
    return true;
  } catch {
    return false;
  }
}

/** Reads YYYY-MM-DD, years 0001 to 9999. Code: `not_a_date`. */
export function parseLocalDate(text: string): Parsed<LocalDate> {
  if (isLocalDate(text)) return accepted(text);
  return refused(
    'not_a_date',
    `${quoted(text)} is not a date. Write year, month and day, such as 2026-03-02.`,
  );
}

/**
 * The text as a date, for texts that ought to be one.
 * @throws RangeError if it is not an existing day written YYYY-MM-DD.
 */
export function toLocalDate(text: string): LocalDate {
  const parsed = parseLocalDate(text);
  if (!parsed.ok) throw new RangeError(parsed.message);
  return parsed.value;
}

/** Makes a date of its parts, or undefined if there is no such day. */
export function findLocalDate(year: number, month: number, day: number): LocalDate | undefined {
  const pad = (part: number, width: number) => String(part).padStart(width, '0');
  const text = `${pad(year, 4)}-${pad(month, 2)}-${pad(day, 2)}`;
  return isLocalDate(text) ? text : undefined;
}

/**
 * The date `days` later (earlier if negative).
 * @throws RangeError if `days` is not whole or the result leaves the years 0001 to 9999.
 */
export function addDays(date: LocalDate, days: number): LocalDate {
  const from = parseDate(date);
  // By day numbers: adding to a calendar date goes month by month, too slow for a sheet of serial dates.
  const day = calendar.toJulianDay(from) + days;
  const to = Number.isSafeInteger(day) ? calendar.fromJulianDay(day) : from;
  const isReached = to.era === 'AD' && to.compare(from) === days;
  if (!isReached) throw new RangeError(`Cannot add ${days} days to ${date}.`);
  return to.toString() as LocalDate;
}

/**
 * The same day so many years later; 29 February becomes 28 February where it has to.
 * @throws RangeError if `years` is not whole or the result leaves the years 0001 to 9999.
 */
export function addYears(date: LocalDate, years: number): LocalDate {
  const from = parseDate(date);
  const to = from.add({ years });
  const isReached = Number.isSafeInteger(years) && to.era === 'AD' && to.year === from.year + years;
  if (!isReached) throw new RangeError(`Cannot add ${years} years to ${date}.`);
  return to.toString() as LocalDate;
}

/** Days from `from` to `to`; negative if `to` is earlier. */
export function daysBetween(from: LocalDate, to: LocalDate): number {
  return parseDate(to).compare(parseDate(from));
}

/** Day of the week, Sunday 0. */
export function dayOfWeek(date: LocalDate): DayOfWeek {
  return positiveRemainder(parseDate(date).compare(A_SUNDAY)) as DayOfWeek;
}

/** The first day of the week that holds `date`, for weeks that begin on `firstDay` (Sunday 0). */
export function startOfWeek(date: LocalDate, firstDay: DayOfWeek): LocalDate {
  return addDays(date, -positiveRemainder(dayOfWeek(date) - firstDay));
}

/** The month of a date, 'YYYY-MM'. */
export function monthOf(date: LocalDate): string {
  return date.slice(0, 7);
}

/** The first day of the month that holds `date`. */
export function startOfMonth(date: LocalDate): LocalDate {
  return `${monthOf(date)}-01` as LocalDate;
}

/** The last day of the month that holds `date`. */
export function endOfMonth(date: LocalDate): LocalDate {
  return lastOfMonth(parseDate(date)).toString() as LocalDate;
}

/** The later of two dates. */
export function laterOf(a: LocalDate, b: LocalDate): LocalDate {
  return a > b ? a : b;
}

/**
 * Today's date where the shop is, at the instant `now`.
 * @throws RangeError if the time zone is not an IANA name such as 'America/Chicago'.
 */
export function todayIn(timeZone: string, now: Date = new Date()): LocalDate {
  return toCalendarDate(fromDate(now, timeZone)).toString() as LocalDate;
}

/** Whether a text is an IANA time zone that this machine knows, such as 'America/Chicago'; offsets are not zones. */
export function isTimeZone(text: string): boolean {
  if (!/^[A-Za-z]/.test(text)) return false;
  try {
    return new Intl.DateTimeFormat('en-US', { timeZone: text }).resolvedOptions().timeZone !== '';
  } catch {
    return false;
  }
}

function positiveRemainder(days: number): number {
  return ((days % 7) + 7) % 7;
}
