import { type CostCategory, type MonthEnd, type Months, type MonthState } from '@brakeven/contract';
import {
  addDays,
  dayOfWeek,
  formatLocalDate,
  formatMonth,
  type LocalDate,
  toLocalDate,
} from '@brakeven/values';

/** How an item of the checklist stands: nothing to do, to be looked at, or in the way of the close. */
export type CheckState = 'done' | 'look' | 'stops';

/** The items of the checklist, in the order in which a month is gone through. */
export const CHECKS = ['timesheets', 'refusals', 'rates', 'rollup', 'invoices'] as const;
export type Check = (typeof CHECKS)[number];

/** One item of the checklist in words. */
export interface CheckView {
  check: Check;
  state: CheckState;
  title: string;
  /** What was found, or that all is well. */
  text: string;
}

export const STATE_WORDS: Record<MonthState, string> = {
  closed: 'closed',
  open: 'open',
  running: 'still running',
};

export const CATEGORY_WORDS: Record<CostCategory, string> = {
  labour: 'Labour',
  overtime: 'Overtime premium',
  machine: 'Machine',
  overhead: 'Overhead',
  material: 'Material',
  outside: 'Outside services',
  invoiced: 'Invoiced',
  earned: 'Earned by machines',
  running: 'Running cost of machines',
};

/** The month to look at first: the next to be closed if it is over, else the latest. */
export function chooseMonth({ months }: Months): string | null {
  const next = months.find(({ isNext, state }) => isNext && state === 'open');
  return (next ?? months[0])?.month ?? null;
}

/** What stands in the way or is still to be looked at, item by item. */
export function toChecks({ checklist, tieOut }: MonthEnd): CheckView[] {
  return [
    toTimesheets(checklist, tieOut),
    toRefusals(checklist),
    toRates(checklist),
    toRollup(checklist),
    toInvoices(checklist),
  ];
}

/** The month's verdict in one sentence. */
export function toVerdict(month: MonthEnd): string {
  const name = formatMonth(month.month);
  if (month.state === 'closed') return `${name} is closed`;
  if (month.state === 'running') return `${name} is still running`;
  const stops = month.blockers.filter(({ code }) => code !== 'rollup_behind').length;
  if (stops > 0) return `${name} cannot be closed yet`;
  const looks = toChecks(month).filter(({ state, check }) => state !== 'done' && check !== 'rollup').length;
  if (looks === 0) return `${name} is ready to be closed`;
  return `${name} can be closed, with ${looks === 1 ? '1 thing' : `${looks} things`} left to look at`;
}

/** Whether nothing but the rollup, which the close does by itself, is in the way. */
export function canClose({ state, blockers }: MonthEnd): boolean {
  return state === 'open' && blockers.every(({ code }) => code === 'rollup_behind');
}

/** Weekdays as people say them, runs in one: 'Nov 2 – Nov 13, Nov 18'; a weekend does not end a run. */
export function toDayRanges(days: readonly string[]): string {
  const runs: { from: LocalDate; to: LocalDate }[] = [];
  for (const day of days.map(toLocalDate)) {
    const last = runs.at(-1);
    if (last && day === nextWeekday(last.to)) last.to = day;
    else runs.push({ from: day, to: day });
  }
  const name = (day: LocalDate) => formatLocalDate(day, 'dayMonth');
  return runs.map(({ from, to }) => (from === to ? name(from) : `${name(from)} – ${name(to)}`)).join(', ');
}

const FRIDAY = 5;

function nextWeekday(day: LocalDate): LocalDate {
  return addDays(day, dayOfWeek(day) === FRIDAY ? 3 : 1);
}

type Checklist = MonthEnd['checklist'];

function toTimesheets({ missingTimesheets }: Checklist, tieOut: MonthEnd['tieOut']): CheckView {
  const days = missingTimesheets.reduce((sum, { days: own }) => sum + own.length, 0);
  const title = 'Days without timesheets';
  if (days === 0) {
    const text =
      tieOut.length === 0 ? 'Nobody was to work in this month.' : 'Everybody has hours on every weekday.';
    return { check: 'timesheets', state: 'done', title, text };
  }
  const text = `${count(days, 'weekday')} of ${count(missingTimesheets.length, 'employee')} without any hours.`;
  return { check: 'timesheets', state: 'look', title, text };
}

function toRefusals({ refusals }: Checklist): CheckView {
  const open = refusals.filter(({ reviewedAt }) => reviewedAt === null);
  const title = 'Refused rows';
  if (open.length === 0) {
    const text =
      refusals.length === 0 ? 'No row of the month’s timesheets was refused.' : 'All have been reviewed.';
    return { check: 'refusals', state: 'done', title, text };
  }
  const rows = open.reduce((sum, { refused }) => sum + refused, 0);
  const text = `${count(rows, 'row')} of ${count(open.length, 'timesheet')} were left out and nobody has reviewed them.`;
  return { check: 'refusals', state: 'look', title, text };
}

function toRates({ gaps }: Checklist): CheckView {
  const title = 'Entries without a rate';
  if (gaps.length === 0) return { check: 'rates', state: 'done', title, text: 'Every entry has its rates.' };
  return {
    check: 'rates',
    state: 'stops',
    title,
    text: 'Their cost is missing, so the month cannot be closed. A rate of 0 is a rate.',
  };
}

function toRollup({ rollup }: Checklist): CheckView {
  const title = 'Rollup';
  const through = rollup.through && formatLocalDate(toLocalDate(rollup.through));
  if (rollup.daysWaiting > 0) {
    const text = `${count(rollup.daysWaiting, 'day')} not rolled up yet. The close does it first.`;
    return { check: 'rollup', state: 'look', title, text };
  }
  const text = through ? `Costs are rolled up through ${through}.` : 'There is nothing to roll up.';
  return { check: 'rollup', state: 'done', title, text };
}

function toInvoices({ uninvoicedJobs }: Checklist): CheckView {
  const title = 'Finished jobs without an invoice';
  if (uninvoicedJobs.length === 0)
    return { check: 'invoices', state: 'done', title, text: 'Every finished job with cost has an invoice.' };
  const text = `${count(uninvoicedJobs.length, 'job')} with cost and nothing invoiced.`;
  return { check: 'invoices', state: 'look', title, text };
}

function count(number: number, noun: string): string {
  return `${number.toLocaleString('en-US')} ${noun}${number === 1 ? '' : 's'}`;
}
