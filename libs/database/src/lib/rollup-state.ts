import { type RawBuilder, sql } from 'kysely';
import { type CostLineTable } from './tables';
import { type ShopTransaction } from './tenancy';

/** How far costs are rolled up, and what waits. */
export interface RollupState {
  through: string | null;
  entriesWaiting: number;
  daysWaiting: number;
  lastRunAt: Date | null;
  isRunning: boolean;
}

/** Reads the state of the shop's costs; a rollup that is running holds the lock of `beginRollup`. */
export async function getRollupState(trx: ShopTransaction, shopId: string): Promise<RollupState> {
  const { rows } = await sql<RollupState>`
    select
      (select max(posted_on) from job_day) as through,
      coalesce(waiting.entries, 0) as entries_waiting,
      waiting.days as days_waiting,
      (select max(finished_at) from rollup_run) as last_run_at,
      exists (
        select from pg_locks l, hashtextextended('rollup:' || ${shopId}, 0) as key
        where l.locktype = 'advisory' and l.granted and l.objsubid = 1
          and l.database = (select oid from pg_database where datname = current_database())
          and l.classid::bigint = ((key >> 32) & 4294967295) and l.objid::bigint = (key & 4294967295)
      ) as is_running
    from (select sum(entry_changes) as entries, count(*) as days from dirty_day) waiting`.execute(trx);
  const [state] = rows;
  if (!state) throw new Error('A statement without a table gave no row.');
  return state;
}

/** Entries without a rate of one category, by employee, machine or, for overhead, the shop. */
export interface RateGapRow {
  category: CostLineTable['category'];
  subject: string | null;
  entries: number;
  firstDay: string;
  lastDay: string;
}

/** Which gaps are meant: those posted in a period, or those that a machine's payback lacks. */
export type RateGapSelection = { posted: { from: string; to: string } } | { machineId: string };

/** Groups the gaps that the rollup found, all of them unless some are asked for; a premium lacks a wage. */
export async function listRateGapRows(
  trx: ShopTransaction,
  selection?: RateGapSelection,
): Promise<RateGapRow[]> {
  const { rows } = await sql<RateGapRow>`
    select g.category, subject.name as subject, count(*) as entries, min(g.worked_on) as first_day,
      max(g.worked_on) as last_day
    from rate_gap g
    left join employee e on e.shop_id = g.shop_id and e.employee_id = g.employee_id
    left join machine m on m.shop_id = g.shop_id and m.machine_id = g.machine_id
    cross join lateral (
      select
        case when g.category in ('labour', 'overtime') then e.employee_id
          when g.category <> 'overhead' then m.machine_id end as id,
        case when g.category in ('labour', 'overtime') then e.name when g.category <> 'overhead' then m.name end as name
    ) subject
    where ${isMeant(selection)}
    group by g.category, subject.id, subject.name
    order by g.category, subject.name, subject.id`.execute(trx);
  return rows;
}

function isMeant(selection: RateGapSelection | undefined): RawBuilder<boolean> {
  if (selection === undefined) return sql`true`;
  if ('posted' in selection) {
    const { from, to } = selection.posted;
    return sql`g.posted_on between ${from}::date and ${to}::date`;
  }
  return sql`g.machine_id = ${selection.machineId}::uuid and g.worked_on >= m.in_service_on
    and g.category in ('labour', 'earned', 'running')`;
}
