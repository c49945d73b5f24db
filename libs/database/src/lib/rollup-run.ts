import { type Insertable, sql } from 'kysely';
import { type PaybackSnapshotTable, type RollupRunTable } from './tables';
import { type ShopTransaction } from './tenancy';

/** Notes that a rollup has begun; visible to others with all that it wrote, or not at all. */
export async function insertRollupRun(trx: ShopTransaction, row: Insertable<RollupRunTable>): Promise<void> {
  await trx.insertInto('rollupRun').values(row).execute();
}

/** Notes what a rollup did. */
export async function finishRollupRun(
  trx: ShopTransaction,
  runId: string,
  done: Pick<Insertable<RollupRunTable>, 'days' | 'lines' | 'through'>,
): Promise<void> {
  await trx
    .updateTable('rollupRun')
    .set({ ...done, finishedAt: sql`clock_timestamp()` })
    .where('runId', '=', runId)
    .execute();
}

/** A machine's day, or several days in one. */
export interface MachineDayRow {
  machineId: string;
  postedOn: string;
  earned: string;
  operatorLabour: string;
  running: string;
}

/**
 * Days of all machines up to `through`; those before `from` are summed into one, dated the day before it, so that
 * the answer does not grow with the years.
 */
export async function listRecentMachineDays(
  trx: ShopTransaction,
  from: string,
  through: string,
): Promise<MachineDayRow[]> {
  const { rows } = await sql<MachineDayRow>`
    select machine_id, greatest(posted_on, ${from}::date - 1) as posted_on,
      sum(earned) as earned, sum(operator_labour) as operator_labour, sum(running) as running
    from machine_day
    where posted_on <= ${through}::date
    group by 1, 2`.execute(trx);
  return rows;
}

/** The first day on which a machine's net benefit, added up from its first day, reaches `outlay`. */
export async function findReachedOn(
  trx: ShopTransaction,
  machineId: string,
  outlay: string,
): Promise<string | null> {
  const { rows } = await sql<{ reachedOn: string | null }>`
    select min(posted_on) as reached_on
    from (
      select posted_on, sum(earned - operator_labour - running) over (order by posted_on) as net
      from machine_day where machine_id = ${machineId}
    ) cumulative
    where net >= ${outlay}::numeric`.execute(trx);
  return rows[0]?.reachedOn ?? null;
}

/** Replaces the snapshots from the day `from` on; what was known then is no longer so. */
export async function replacePaybackSnapshots(
  trx: ShopTransaction,
  from: string,
  rows: readonly Insertable<PaybackSnapshotTable>[],
): Promise<void> {
  await trx.deleteFrom('paybackSnapshot').where('asOf', '>=', from).execute();
  if (rows.length > 0) await trx.insertInto('paybackSnapshot').values(rows).execute();
}
