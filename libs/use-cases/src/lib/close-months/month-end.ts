import {
  AppError,
  COST_CATEGORIES,
  hasPermission,
  type MonthEnd,
  type MonthLateLine,
  type MonthSummary,
  type MonthTieOut,
  type MonthTotal,
} from '@brakeven/contract';
import {
  type LateLineRow,
  listLateLineRows,
  listMonthTotalRows,
  listTieOutRows,
  type MonthTotalRow,
  type ShopTransaction,
  type TieOutRow,
  type WeekRule,
} from '@brakeven/database';
import { addDays, D, hoursText, moneyText, toHours, toMoney } from '@brakeven/values';
import { inShopOf, type ShopContext, todayOf } from '../context';
import { toLineFacts, toLineId } from '../show-workings/line-facts';
import { listBlockers, readChecklist } from './month-checklist';
import { type MonthDays, type MonthStates, readMonthStates, toMonthDays } from './month-states';

/** Late lines listed one by one; with more, the count says so. */
const LATE_LINES_MAX = 200;

/** Of a machine's payback, not of a job's cost. */
const PAYBACK_CATEGORIES: readonly string[] = ['earned', 'running'];

/**
 * A month before and after it is closed: what is missing, hours against payroll, totals of the books, late lines.
 * @throws AppError `invalid_input` (no such month), `not_found` (a month to come, or before the shop had anything)
 */
export async function getMonth(context: ShopContext, { month }: { month: string }): Promise<MonthEnd> {
  const days = toMonthDays(month);
  return inShopOf(context, (trx) => readMonthEnd(context, trx, days));
}

/** Reads all of a month; `not_found` as `getMonth`. */
export async function readMonthEnd(
  context: ShopContext,
  trx: ShopTransaction,
  days: MonthDays,
): Promise<MonthEnd> {
  const states = await readMonthStates(context, trx);
  const summary = findMonth(states, days.month);
  const checklist = await readChecklist(trx, days, todayOf(context));
  const { from, to } = days;
  const lateIn = await listLateLineRows(trx, { by: 'posted', from, to, limit: LATE_LINES_MAX });
  const lateOut = await listLateLineRows(trx, { by: 'worked', from, to, limit: LATE_LINES_MAX });
  return {
    ...summary,
    from,
    to,
    latePostedOn: states.closedThrough && addDays(states.closedThrough, 1),
    blockers: listBlockers(summary, states, checklist),
    checklist,
    tieOut: await readTieOut(trx, context, days),
    totals: toTotals(await listMonthTotalRows(trx, from, to), context),
    lateIn: lateIn.rows.filter((row) => isShown(row, context)).map(toLateLine),
    lateInCount: lateIn.count,
    lateOut: lateOut.rows.filter((row) => isShown(row, context)).map(toLateLine),
    lateOutCount: lateOut.count,
  };
}

/** Hours of the month by employee, or of the one asked for. */
export async function readTieOut(
  trx: ShopTransaction,
  context: ShopContext,
  days: MonthDays,
  employeeId?: string,
): Promise<MonthTieOut[]> {
  return (await listTieOutRows(trx, days, weekRuleOf(context), employeeId)).map(toTieOut);
}

/** Week and threshold that the shop's overtime goes by. */
export function weekRuleOf({ shop }: ShopContext): WeekRule {
  return { weekStart: shop.weekStart, thresholdHours: shop.overtimeThresholdHours };
}

function findMonth({ months }: MonthStates, month: string): MonthSummary {
  const found = months.find((one) => one.month === month);
  if (found) return found;
  const [first, last] = [months[0]?.month ?? '', months.at(-1)?.month ?? ''];
  const message = month > last ? `${month} is still to come.` : `The shop has nothing before ${first}.`;
  throw new AppError('not_found', message, { issues: [{ field: 'month', code: 'no_such_month', message }] });
}

function toTieOut(row: TieOutRow): MonthTieOut {
  const { employeeId, employee, hours, payrollHours } = row;
  const text = (value: string) => hoursText(toHours(value));
  return {
    employeeId,
    employee,
    hours: text(hours),
    overtimeHours: text(row.overtimeHours),
    costedHours: text(row.costedHours),
    payrollHours: payrollHours === null ? null : text(payrollHours),
    difference: payrollHours === null ? null : hoursText(toHours(D(payrollHours).minus(D(hours)))),
  };
}

/** In the order of the categories, those without a line left out; a machine's payback only for who may see it. */
function toTotals(rows: readonly MonthTotalRow[], { actor }: ShopContext): MonthTotal[] {
  const byCategory = new Map(rows.map((row) => [row.category, row]));
  return COST_CATEGORIES.flatMap((category) => {
    const row = byCategory.get(category);
    if (!row || (PAYBACK_CATEGORIES.includes(category) && !hasPermission(actor.role, 'payback.view')))
      return [];
    return [
      {
        category,
        amount: moneyText(toMoney(row.amount)),
        toOverhead: moneyText(toMoney(row.toOverhead)),
        late: moneyText(toMoney(row.late)),
        lines: row.lines,
      },
    ];
  });
}

function isShown({ category }: LateLineRow, { actor }: ShopContext): boolean {
  return !PAYBACK_CATEGORIES.includes(category) || hasPermission(actor.role, 'payback.view');
}

function toLateLine(row: LateLineRow): MonthLateLine {
  const { postedOn, takesBackOn, label, detail } = toLineFacts(row);
  return {
    lineId: toLineId(row),
    postedOn: postedOn ?? row.postedOn,
    workedOn: row.workedOn,
    category: row.category,
    label: detail === null ? label : `${label}, ${detail}`,
    isReversal: takesBackOn !== null,
    job: row.job,
    jobId: row.jobId,
    amount: moneyText(toMoney(row.amount)),
  };
}
