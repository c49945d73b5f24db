import { type Branded, D, type Decimal, type DecimalInput, roundHalfUp } from './decimal';
import { findNumberInText, formatNumber } from './number-text';
import { accepted, type Parsed, quoted, refused } from './parsed';

/** Hours of work or of a machine, four decimals. */
export type Hours = Branded<'Hours'>;

const SECONDS_PER_DAY = 86_400;
const SECONDS_PER_HOUR = 3_600;
const HOURS_LIMIT = D(100_000);
const HOURS_EXAMPLE = 'Write hours such as 7.5 or 7:30.';
const CLOCK = /^(\d{1,5}):([0-5]\d)(?::([0-5]\d))?$/;

/** Rounds decimal hours to four decimals, ties away from zero. */
export function toHours(x: DecimalInput): Hours {
  return roundHalfUp(D(x), 4) as Hours;
}

/** Hours as they travel and are stored: '7.5000'. */
export function hoursText(hours: Hours): string {
  return hours.toFixed(4);
}

/**
 * A spreadsheet duration, a fraction of a day, as hours: rounded half-up to the whole second first (a file stores
 * 7:20 as 0.30555555555555558), then to four decimals.
 */
export function hoursFromDays(serialDays: DecimalInput): Hours {
  return hoursFromSeconds(roundHalfUp(D(serialDays).times(SECONDS_PER_DAY), 0));
}

/**
 * Reads decimal hours (`7.5`, rounded to four decimals) or hours and minutes (`7:30`, `36:15`, `7:30:00`).
 * A negative number is read as such, for the rules to refuse. Codes: `not_hours`, `too_large`.
 */
export function parseHoursText(text: string): Parsed<Hours> {
  const clock = CLOCK.exec(text.trim());
  const decimal = clock ? undefined : findNumberInText(text);
  if (!clock && !decimal)
    return refused('not_hours', `${quoted(text)} is not a number of hours. ${HOURS_EXAMPLE}`);
  const hours = decimal ? toHours(decimal) : hoursFromClock(clock?.slice(1) ?? []);
  if (hours.abs().gte(HOURS_LIMIT)) {
    return refused(
      'too_large',
      `${quoted(text)} is more hours than can be kept (below 100,000). ${HOURS_EXAMPLE}`,
    );
  }
  return accepted(hours);
}

/** Hours for people, at least two decimals and all that are kept: '7.50', '7.3333', '1,234.00'. */
export function formatHours(hours: Hours | string, locale = 'en-US'): string {
  return formatNumber(D(hours as Decimal | string), locale, {
    minimumFractionDigits: 2,
    maximumFractionDigits: 4,
  });
}

function hoursFromClock([hours = '0', minutes = '0', seconds = '0']: string[]): Hours {
  return hoursFromSeconds(D(Number(hours) * SECONDS_PER_HOUR + Number(minutes) * 60 + Number(seconds)));
}

function hoursFromSeconds(seconds: Decimal): Hours {
  return toHours(seconds.div(SECONDS_PER_HOUR));
}
