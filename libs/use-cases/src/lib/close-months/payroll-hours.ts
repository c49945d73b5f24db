import { AppError, type MonthTieOut, type PayrollHoursInput } from '@brakeven/contract';
import { getClosedThrough, markRefusalsReviewed, savePayrollHoursRow } from '@brakeven/database';
import { formatMonth } from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { toImportNotFound } from '../timesheet-history/list-imports';
import { readTieOut } from './month-end';
import { toMonthDays } from './month-states';

/**
 * Keeps the hours of an employee's month as payroll has them, to be held against the timesheets; null forgets them.
 * @throws AppError `not_found` (employee), `month_refused` (the month is closed), `invalid_input`
 */
export async function savePayrollHours(
  context: ShopContext,
  { month, employeeId }: { month: string; employeeId: string },
  { hours }: PayrollHoursInput,
): Promise<MonthTieOut> {
  const days = toMonthDays(month);
  const { shopId } = context.shop;
  return inShopOf(context, async (trx) => {
    const closedThrough = await getClosedThrough(trx);
    if (closedThrough !== null && days.to <= closedThrough) throw toMonthClosed(month);
    const [known] = await readTieOut(trx, context, days, employeeId);
    if (!known) throw new AppError('not_found', 'There is no such employee.');
    await savePayrollHoursRow(trx, { shopId, employeeId, month: days.from, hours });
    const [saved = known] = await readTieOut(trx, context, days, employeeId);
    return saved;
  });
}

/**
 * Notes that somebody has looked at the refused rows of an import, or takes that back.
 * @throws AppError `import_not_found`
 */
export async function reviewRefusals(
  context: ShopContext,
  { importId }: { importId: string },
  { isReviewed }: { isReviewed: boolean },
): Promise<void> {
  const reviewedBy = isReviewed ? context.actor.name : null;
  const isThere = await inShopOf(context, (trx) => markRefusalsReviewed(trx, importId, reviewedBy));
  if (!isThere) throw toImportNotFound();
}

function toMonthClosed(month: string): AppError {
  const message = `${formatMonth(month)} is closed, and its payroll hours with it. An owner can reopen it.`;
  return new AppError('month_refused', message, { issues: [{ field: 'month', code: 'closed', message }] });
}
