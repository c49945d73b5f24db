import { type Payback } from '@brakeven/contract';
import { D, endOfMonth, formatLocalDate, toLocalDate } from '@brakeven/values';

export type VerdictState = 'reached' | 'straight-line' | 'not-at-this-pace' | 'no-outlay' | 'not-rolled-up';

/** Fewer days than eight weeks say little about a pace. */
const EARLY_DAYS = 56;
const PACE_WINDOW_DAYS = 182;

/** Which of the answers a payback gives. */
export function findVerdictState({ breakEven, outlay, asOf }: Payback): VerdictState {
  if (breakEven.method !== 'no-data') return breakEven.method;
  return asOf !== null && D(outlay).isZero() ? 'no-outlay' : 'not-rolled-up';
}

/** Over which days the pace was taken, in words. */
export function toPaceWindow(paceDays: number): string {
  if (paceDays >= PACE_WINDOW_DAYS) return 'the last 26 weeks';
  return paceDays === 1 ? 'its first day' : `its first ${paceDays} days`;
}

/** A caution if the pace rests on less than eight weeks, otherwise null. */
export function findEarlyCaution({ breakEven, paceDays }: Payback): string | null {
  const isFromPace = breakEven.method === 'straight-line' || breakEven.method === 'not-at-this-pace';
  if (!isFromPace || paceDays >= EARLY_DAYS) return null;
  return `It is early to tell: the pace rests on ${paceDays} ${paceDays === 1 ? 'day' : 'days'} only.`;
}

/** What the chart shows, in a sentence. */
export function toChartSummary(payback: Payback, formatAmount: (amount: string) => string): string {
  const last = payback.curve.at(-1);
  if (!last) return 'There is nothing to draw yet.';
  const day = (date: string) => formatLocalDate(toLocalDate(date), 'long');
  const stand = `Net cash stands at ${formatAmount(last.netCash)} on ${day(last.on)}`;
  const { date, method } = payback.breakEven;
  if (date && method === 'reached') return `${stand}; even was reached on ${day(date)}.`;
  if (date && method === 'straight-line')
    return `${stand}; a straight line from there reaches even on ${day(date)}.`;
  return `${stand}; even is not in sight.`;
}

/** 'November 2026', with 'so far' while the month is not over. */
export function toMonthHeading(month: string, asOf: string): string {
  const first = toLocalDate(`${month}-01`);
  const isOver = asOf === endOfMonth(first);
  return `${formatLocalDate(first, 'monthYear')}${isOver ? '' : ' so far'}`;
}
