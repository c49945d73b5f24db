import { sql } from 'kysely';
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

/** Groups the gaps that the rollup found; with a machine, those that its payback lacks. */
export async function listRateGapRows(trx: ShopTransaction, machineId?: string): Promise<RateGapRow[]> {
  const ofPayback = sql`g.machine_id = ${machineId ?? null} and g.worked_on >= m.in_service_on
    and g.category in ('labour', 'earned', 'running')`;
  const { rows } = await sql<RateGapRow>`
    select g.category, case g.category when 'labour' then e.name when 'overhead' then null else m.name end as subject,
      count(*) as entries, min(g.worked_on) as first_day, max(g.worked_on) as last_day
    from rate_gap g
    left join employee e on e.shop_id = g.shop_id and e.employee_id = g.employee_id
    left join machine m on m.shop_id = g.shop_id and m.machine_id = g.machine_id
    where ${machineId === undefined ? sql`true` : ofPayback}
    group by g.category, 2, case g.category when 'labour' then g.employee_id when 'overhead' then null else g.machine_id end
    order by g.category, 2`.execute(trx);
  return rows;
}
