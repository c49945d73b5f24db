import { AppError, type MonthClosing, type Months, type MonthSummary } from '@brakeven/contract';
import { findFirstDay, getClosedThrough, listMonthCloseRows, type ShopTransaction } from '@brakeven/database';
import { addDays, endOfMonth, isLocalDate, type LocalDate, monthOf, toLocalDate } from '@brakeven/values';
import { inShopOf, type ShopContext, todayOf } from '../context';

/** A month by its first and last day. */
export interface MonthDays {
  month: string;
  from: LocalDate;
  to: LocalDate;
}

/** How a shop's months stand. */
export interface MonthStates {
  closedThrough: LocalDate | null;
  closings: MonthClosing[];
  /** From the first with anything in it (or this one) to this one, oldest first. */
  months: MonthSummary[];
}

/** Months with their state, latest first, and every closing there was. */
export async function listMonths(context: ShopContext): Promise<Months> {
  const { closedThrough, closings, months } = await inShopOf(context, (trx) => readMonthStates(context, trx));
  return {
    closedThrough,
    latePostedOn: closedThrough && addDays(closedThrough, 1),
    months: [...months].reverse(),
    closings,
  };
}

/**
 * The days of a month written as YYYY-MM.
 * @throws AppError `invalid_input`
 */
export function toMonthDays(month: string): MonthDays {
  const first = `${month}-01`;
  if (!isLocalDate(first)) {
    const message = `'${month}' is not a month. Write year and month, such as 2026-03.`;
    throw new AppError('invalid_input', message, {
      issues: [{ field: 'month', code: 'not_a_month', message }],
    });
  }
  return { month, from: first, to: endOfMonth(first) };
}

/** Reads how the months of the shop stand today. */
export async function readMonthStates(context: ShopContext, trx: ShopTransaction): Promise<MonthStates> {
  const today = todayOf(context);
  const closedThroughText = await getClosedThrough(trx);
  const closedThrough = closedThroughText === null ? null : toLocalDate(closedThroughText);
  const firstDay = await findFirstDay(trx);
  const closings = (await listMonthCloseRows(trx)).map(toClosing);
  const first = firstDay !== null && firstDay < today ? toLocalDate(firstDay) : today;
  const start = closings.reduce(
    (month, closing) => (closing.month < month ? closing.month : month),
    monthOf(first),
  );
  const months = listMonthsBetween(start, monthOf(today));
  const next = months.find(({ to }) => closedThrough === null || to > closedThrough)?.month;
  return {
    closedThrough,
    closings,
    months: months.map(({ month, to }) => {
      const isClosed = closedThrough !== null && to <= closedThrough;
      const closing = closings.find((one) => one.month === month && one.reopenedAt === null);
      return {
        month,
        state: toState(isClosed, to < today),
        closedAt: closing?.closedAt ?? null,
        closedBy: closing?.closedBy ?? null,
        isNext: month === next,
        isLatestClosed: closedThrough !== null && month === monthOf(closedThrough),
      };
    }),
  };
}

function toState(isClosed: boolean, isOver: boolean): MonthSummary['state'] {
  if (isClosed) return 'closed';
  return isOver ? 'open' : 'running';
}

function toClosing(row: Awaited<ReturnType<typeof listMonthCloseRows>>[number]): MonthClosing {
  return {
    month: monthOf(toLocalDate(row.month)),
    closedAt: row.closedAt.toISOString(),
    closedBy: row.closedBy,
    reopenedAt: row.reopenedAt?.toISOString() ?? null,
    reopenedBy: row.reopenedBy,
    reopenReason: row.reopenReason,
  };
}

function listMonthsBetween(first: string, last: string): MonthDays[] {
  const months: MonthDays[] = [];
  for (let days = toMonthDays(first); days.month <= last; days = toMonthDays(monthOf(addDays(days.to, 1))))
    months.push(days);
  return months;
}
