import { sql } from 'kysely';
import { deleteDays, insertJobDays, insertMachineDays } from './rollup-days';
import { insertEntryLines, insertRateGaps } from './rollup-entry-lines';
import { insertMoneyLines, insertReversals } from './rollup-money-lines';
import { insertOvertimeLines, markRestOfWeek } from './rollup-overtime';
import {
  isDayIn,
  isInWeeks,
  isPostedIn,
  type ResolvedScope,
  resolveScope,
  type RollupScope,
} from './rollup-scope';
import { type ShopTransaction } from './tenancy';

/** What a rollup wrote. */
export interface WrittenCosts {
  days: number;
  lines: number;
}

/**
 * Keeps other rollups of the shop waiting, and shows to `getRollupState` that one is running. A whole shop's
 * entries are sorted in memory.
 */
export async function beginRollup(trx: ShopTransaction, shopId: string): Promise<void> {
  await sql`select pg_advisory_xact_lock(hashtextextended('rollup:' || ${shopId}, 0)),
    set_config('work_mem', '64MB', true)`.execute(trx);
}

/**
 * Takes the days up to `through` off the list of those that wait. Whoever marks one of them meanwhile waits for
 * this transaction and then marks it again, and a day that is marked first meanwhile stays on the list, so that no
 * change falls between two rollups.
 */
export async function takeDirtyDays(trx: ShopTransaction, through: string): Promise<string[]> {
  const rows = await trx
    .selectFrom('dirtyDay')
    .select('workedOn')
    .where('workedOn', '<=', through)
    .orderBy('workedOn')
    .forUpdate()
    .execute();
  const days = rows.map((row) => row.workedOn);
  await sql`delete from dirty_day where worked_on = any (${days}::date[])`.execute(trx);
  return days;
}

/**
 * Deletes all that was written for the days of the scope and writes it again from the rows, rates and settings of
 * now: cost lines, gaps, job days, machine days. What is posted in a closed month stays; what comes late for it is
 * posted on the first open day (`computePostings` is the reference).
 */
export async function rewriteCosts(
  trx: ShopTransaction,
  runId: string,
  wanted: RollupScope,
): Promise<WrittenCosts> {
  const scope = await resolveScope(trx, wanted);
  await deleteLines(trx, scope);
  await deleteDays(trx, scope);
  let lines = 0;
  for (const insert of [insertEntryLines, insertOvertimeLines, insertMoneyLines, insertReversals])
    lines += await insert(trx, runId, scope);
  await insertRateGaps(trx, scope);
  await insertJobDays(trx, scope);
  await insertMachineDays(trx, scope);
  await markRestOfWeek(trx, scope);
  return { lines, days: scope.days === 'all' ? await countDays(trx, scope) : scope.days.length };
}

/** The latest day in the costs, not after `limit` if one is given; null if there is none. */
export async function findThrough(trx: ShopTransaction, limit?: string): Promise<string | null> {
  let query = trx.selectFrom('jobDay').select((eb) => eb.fn.max('postedOn').as('through'));
  if (limit !== undefined) query = query.where('postedOn', '<=', limit);
  return (await query.executeTakeFirstOrThrow()).through;
}

async function deleteLines(trx: ShopTransaction, scope: ResolvedScope): Promise<void> {
  for (const table of ['cost_line', 'rate_gap']) {
    await sql`delete from ${sql.table(table)}
      where category <> 'overtime' and ${isPostedIn(scope)} and ${isDayIn(scope, 'worked_on')}`.execute(trx);
    await sql`delete from ${sql.table(table)}
      where category = 'overtime' and ${isPostedIn(scope, scope.weekDays)}
        and ${isInWeeks(scope, 'worked_on')}`.execute(trx);
  }
}

async function countDays(trx: ShopTransaction, scope: ResolvedScope): Promise<number> {
  const { rows } = await sql<{ days: number }>`
    select count(distinct posted_on) as days from job_day where ${isPostedIn(scope)}`.execute(trx);
  return rows[0]?.days ?? 0;
}
