import { AppError, type Issue, type MonthEnd } from '@brakeven/contract';
import {
  insertMonthClose,
  lockBooks,
  markMonthReopened,
  markReopenedDays,
  type ShopTransaction,
} from '@brakeven/database';
import { formatMonth } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';
import { runRollup } from '../roll-up-costs/run-rollup';
import { getMonth, readMonthEnd } from './month-end';
import { readMonthStates, toMonthDays } from './month-states';

/**
 * Closes a month: rolls up first if the costs are behind, then fixes all that is posted through its last day. What
 * comes late for it afterwards is posted on the first open day.
 * @throws AppError `month_refused` with an issue for everything that stands in the way (not over, not the next one,
 *   costs behind, entries without a rate), `invalid_input`, `not_found`; the month is open then as before
 */
export async function closeMonth(context: ShopContext, { month }: { month: string }): Promise<MonthEnd> {
  const before = await getMonth(context, { month });
  if (isBehindOnly(before)) await runRollup(context, {});
  const days = toMonthDays(month);
  return inShopOf(context, async (trx) => {
    const { shopId } = context.shop;
    await lockBooks(trx, shopId);
    refuseBlocked(await readMonthEnd(context, trx, days));
    const closing = { shopId, monthCloseId: newId(), month: days.from, closedBy: context.actor.name };
    await insertMonthClose(trx, closing);
    return readMonthEnd(context, trx, days);
  });
}

/**
 * Reopens the latest closed month: what stood late for it goes back to its own days, and costs are rolled up anew.
 * @throws AppError `month_refused` (not closed, or not the latest), `invalid_input`, `not_found`
 */
export async function reopenMonth(
  context: ShopContext,
  { month }: { month: string },
  { reason }: { reason: string },
): Promise<MonthEnd> {
  const days = toMonthDays(month);
  await inShopOf(context, async (trx) => {
    await lockBooks(trx, context.shop.shopId);
    await refuseOtherThanLatest(context, trx, month);
    const reopened = { reopenedBy: context.actor.name, reopenReason: reason };
    await markMonthReopened(trx, days.from, reopened);
    await markReopenedDays(trx);
  });
  await runRollup(context, {});
  return getMonth(context, { month });
}

/** Whether a rollup may be all that it takes: rates may have been entered since the last one. */
function isBehindOnly({ blockers }: MonthEnd): boolean {
  const codes = blockers.map(({ code }) => code);
  return (
    codes.includes('rollup_behind') &&
    codes.every((code) => code === 'rollup_behind' || code === 'rates_missing')
  );
}

function refuseBlocked({ month, blockers }: MonthEnd): void {
  if (blockers.length === 0) return;
  const message = `${formatMonth(month)} cannot be closed. ${blockers.map((blocker) => blocker.message).join(' ')}`;
  throw new AppError('month_refused', message, {
    issues: blockers.map((blocker) => toIssue(blocker.code, blocker.message)),
  });
}

async function refuseOtherThanLatest(
  context: ShopContext,
  trx: ShopTransaction,
  month: string,
): Promise<void> {
  const { months } = await readMonthStates(context, trx);
  const latest = months.find(({ isLatestClosed }) => isLatestClosed);
  if (latest?.month === month) return;
  const message = latest
    ? `Only the latest closed month can be reopened, which is ${formatMonth(latest.month)}.`
    : 'No month is closed, so there is none to reopen.';
  throw new AppError('month_refused', message, { issues: [toIssue('not_latest', message)] });
}

function toIssue(code: string, message: string): Issue {
  return { field: 'month', code, message };
}
