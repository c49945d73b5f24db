import {
  addDays,
  type DayOfWeek,
  endOfMonth,
  isLocalDate,
  type LocalDate,
  startOfMonth,
  startOfWeek,
} from '@brakeven/values';

/** The stretches of days that the hours page offers, in the order of its buttons. */
export const PERIODS = {
  'this-week': 'This week',
  'last-week': 'Last week',
  'this-month': 'This month',
  '13-weeks': 'Last 13 weeks',
  all: 'All',
  custom: 'From … to …',
} as const;
export type Period = keyof typeof PERIODS;

/** First and last day, both counted; an end that is absent is open. */
export interface DayRange {
  from?: LocalDate;
  to?: LocalDate;
}

/** The period that an address names; one that is not known is the last 13 weeks, which shows a shop's quarter. */
export function toPeriod(text: string | undefined): Period {
  return text !== undefined && text in PERIODS ? (text as Period) : '13-weeks';
}

/** The days of a period, as of today, for weeks that begin on `weekStart`; `custom` takes the days as given. */
export function toDayRange(
  period: Period,
  today: LocalDate,
  weekStart: DayOfWeek,
  custom: { from?: string; to?: string } = {},
): DayRange {
  const first = startOfWeek(today, weekStart);
  switch (period) {
    case 'this-week':
      return { from: first, to: addDays(first, 6) };
    case 'last-week':
      return { from: addDays(first, -7), to: addDays(first, -1) };
    case 'this-month':
      return { from: startOfMonth(today), to: endOfMonth(today) };
    case '13-weeks':
      return { from: addDays(first, -12 * 7), to: addDays(first, 6) };
    case 'all':
      return {};
    case 'custom':
      return { ...toDay('from', custom.from), ...toDay('to', custom.to) };
  }
}

function toDay(name: 'from' | 'to', text: string | undefined): DayRange {
  return text !== undefined && isLocalDate(text) ? { [name]: text } : {};
}
