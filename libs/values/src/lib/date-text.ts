import { parseDate } from '@internationalized/date';
import { findLocalDate, type LocalDate, toLocalDate } from './local-date';
import { accepted, type Parsed, quoted, refused } from './parsed';

/** Orders in which a column of text dates may be declared to be written. */
export const DATE_FORMATS = [
  'YYYY-MM-DD',
  'YYYY/MM/DD',
  'MM/DD/YYYY',
  'DD/MM/YYYY',
  'DD.MM.YYYY',
  'MM-DD-YYYY',
  'DD-MM-YYYY',
  'DD MMM YYYY',
  'MMM DD YYYY',
] as const;

/** One of the declared orders. */
export type DateFormat = (typeof DATE_FORMATS)[number];

const EXAMPLES: Readonly<Record<DateFormat, string>> = {
  'YYYY-MM-DD': '2026-03-22',
  'YYYY/MM/DD': '2026/03/22',
  'MM/DD/YYYY': '03/22/2026',
  'DD/MM/YYYY': '22/03/2026',
  'DD.MM.YYYY': '22.03.2026',
  'MM-DD-YYYY': '03-22-2026',
  'DD-MM-YYYY': '22-03-2026',
  'DD MMM YYYY': '22 Mar 2026',
  'MMM DD YYYY': 'Mar 22 2026',
};

const MONTHS = [
  'january',
  'february',
  'march',
  'april',
  'may',
  'june',
  'july',
  'august',
  'september',
  'october',
  'november',
  'december',
];

const PIECES: Readonly<Record<string, string>> = {
  YYYY: '(?<year>\\d{4}|\\d{2})',
  MMM: '(?<name>[a-z]{3,9})\\.?',
  MM: '(?<month>\\d{1,2})',
  DD: '(?<day>\\d{1,2})',
  '.': '\\.',
  ' ': ',?\\s+',
};

const PATTERNS = new Map(DATE_FORMATS.map((format) => [format, toPattern(format)]));

/**
 * Reads a text date strictly in the declared order; day and month may have one or two digits, months English names
 * or their first three letters. Nothing is guessed: another order is refused.
 * Codes: `not_a_date`, `two_digit_year`, `no_such_day`.
 */
export function parseDateText(text: string, format: DateFormat): Parsed<LocalDate> {
  const found = PATTERNS.get(format)?.exec(text.trim())?.groups;
  const wanted = `Dates here are declared as ${format}, such as ${EXAMPLES[format]}.`;
  if (!found) return refused('not_a_date', `${quoted(text)} is not a date in that order. ${wanted}`);
  if (found['year']?.length !== 4) {
    return refused(
      'two_digit_year',
      `${quoted(text)} does not say which century: write four digits. ${wanted}`,
    );
  }
  const date = findLocalDate(Number(found['year']), monthNumber(found), Number(found['day']));
  return date ? accepted(date) : refused('no_such_day', `There is no day ${quoted(text)}. ${wanted}`);
}

/** Ways of showing a date. */
export type DateStyle = 'numeric' | 'medium' | 'long' | 'weekday' | 'dayMonth' | 'monthYear';

const STYLES: Readonly<Record<DateStyle, Intl.DateTimeFormatOptions>> = {
  numeric: { year: 'numeric', month: '2-digit', day: '2-digit' },
  medium: { year: 'numeric', month: 'short', day: 'numeric' },
  long: { year: 'numeric', month: 'long', day: 'numeric' },
  weekday: { weekday: 'short', year: 'numeric', month: 'short', day: 'numeric' },
  dayMonth: { month: 'short', day: 'numeric' },
  monthYear: { year: 'numeric', month: 'long' },
};

const formats = new Map<string, Intl.DateTimeFormat>();

/** A date for people; 'medium' in en-US is 'Mar 2, 2026'. The same day in every time zone. */
export function formatLocalDate(date: LocalDate, style: DateStyle = 'medium', locale = 'en-US'): string {
  const key = `${locale} ${style}`;
  const format = formats.get(key) ?? new Intl.DateTimeFormat(locale, { ...STYLES[style], timeZone: 'UTC' });
  formats.set(key, format);
  return format.format(parseDate(date).toDate('UTC'));
}

/** A month 'YYYY-MM' for people: 'March 2026'. */
export function formatMonth(month: string, locale = 'en-US'): string {
  return formatLocalDate(toLocalDate(`${month}-01`), 'monthYear', locale);
}

function toPattern(format: DateFormat): RegExp {
  const source = format.replace(/YYYY|MMM|MM|DD|[. ]/g, (piece) => PIECES[piece] ?? piece);
  return new RegExp(`^${source}$`, 'i');
}

function monthNumber(found: Record<string, string | undefined>): number {
  if (found['month'] !== undefined) return Number(found['month']);
  const name = found['name']?.toLowerCase() ?? '';
  return MONTHS.findIndex((month) => month === name || month.slice(0, 3) === name) + 1;
}
