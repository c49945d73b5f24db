import { JOB_COST_CATEGORIES, type MonthBlocker, type MonthEnd, type MonthSummary } from '@brakeven/contract';
import {
  countDaysWaiting,
  findThrough,
  listMissingTimesheetRows,
  listRateGapRows,
  listRefusalRows,
  listUninvoicedJobRows,
  type ShopTransaction,
} from '@brakeven/database';
import { addDays, formatMonth, moneyText, toMoney, type LocalDate } from '@brakeven/values';
import { type MonthDays, type MonthStates } from './month-states';

/** Reads what is still to be looked at in a month; days after today are not missing yet. */
export async function readChecklist(
  trx: ShopTransaction,
  { from, to }: MonthDays,
  today: LocalDate,
): Promise<MonthEnd['checklist']> {
  const lastDay = to < today ? to : addDays(today, -1);
  const missing = await listMissingTimesheetRows(trx, from, lastDay);
  const refusals = await listRefusalRows(trx, from, to);
  const jobs = await listUninvoicedJobRows(trx, to, JOB_COST_CATEGORIES);
  return {
    missingTimesheets: missing,
    refusals: refusals.map((refusal) => ({
      ...refusal,
      importedAt: refusal.importedAt.toISOString(),
      reviewedAt: refusal.reviewedAt?.toISOString() ?? null,
    })),
    uninvoicedJobs: jobs.map((job) => ({ ...job, cost: moneyText(toMoney(job.cost)) })),
    rollup: { daysWaiting: await countDaysWaiting(trx, to), through: await findThrough(trx) },
    gaps: await listRateGapRows(trx, { posted: { from, to } }),
  };
}

/** Why a month cannot be closed as things stand, in words; empty for one that can. */
export function listBlockers(
  month: MonthSummary,
  states: MonthStates,
  checklist: MonthEnd['checklist'],
): MonthEnd['blockers'] {
  if (month.state === 'closed')
    return [toBlocker('closed', `${formatMonth(month.month)} is closed already.`)];
  const blockers: MonthEnd['blockers'] = [];
  if (month.state === 'running') {
    blockers.push(
      toBlocker(
        'running',
        `${formatMonth(month.month)} is not over yet. A month is closed once it has ended.`,
      ),
    );
  }
  const next = states.months.find(({ isNext }) => isNext);
  if (!month.isNext && next) {
    blockers.push(toBlocker('not_next', `Months close in order: close ${formatMonth(next.month)} first.`));
  }
  return [...blockers, ...listCostBlockers(checklist)];
}

function listCostBlockers({ rollup, gaps }: MonthEnd['checklist']): MonthEnd['blockers'] {
  const blockers: MonthEnd['blockers'] = [];
  if (rollup.daysWaiting > 0) {
    const days = rollup.daysWaiting === 1 ? '1 day is' : `${rollup.daysWaiting} days are`;
    blockers.push(toBlocker('rollup_behind', `${days} not rolled up yet.`));
  }
  const [first] = gaps;
  if (first) {
    const subject = first.subject ?? 'the shop';
    const others = gaps.length > 1 ? ` and ${gaps.length - 1} more` : '';
    blockers.push(
      toBlocker(
        'rates_missing',
        `Entries have no ${first.category} rate on their day (${subject}${others}). Enter the missing rates; a rate of 0 is a rate.`,
      ),
    );
  }
  return blockers;
}

function toBlocker(code: MonthBlocker, message: string): MonthEnd['blockers'][number] {
  return { code, message };
}
