import { sql } from 'kysely';
import { type Database } from './connect';
import { type ShopTransaction } from './tenancy';

/** The server's version, such as `15.14`. */
export async function findServerVersion(db: Database): Promise<string> {
  const { rows } = await sql<{ serverVersion: string }>`show server_version`.execute(db);
  return (rows[0]?.serverVersion ?? '').split(' ')[0] ?? '';
}

/** Whether the role that is connected gets round row-level security, which the application's must not. */
export async function canBypassTenancy(db: Database): Promise<boolean> {
  const { rows } = await sql<{ canBypass: boolean }>`
    select rolsuper or rolbypassrls as can_bypass from pg_roles where rolname = current_user`.execute(db);
  return rows[0]?.canBypass ?? true;
}

/** Two totals of a shop that ought to be one. */
export interface TotalMismatch {
  total: string;
  ofLines: string;
  ofDays: string;
}

/** Totals that differ between the cost lines and the sums of days that are kept beside them; none is as it should be. */
export async function listTotalMismatches(trx: ShopTransaction): Promise<TotalMismatch[]> {
  const { rows } = await sql<TotalMismatch>`
    with line as (select category, sum(amount) as amount from cost_line where job_id is not null group by 1),
    day as (
      select 'jobs: ' || category as total, category, sum(amount) as amount from job_day group by 1, 2
      union all
      select 'machines: earned', 'earned', sum(earned) from machine_day
      union all
      select 'machines: running', 'running', sum(running) from machine_day
    )
    select coalesce(day.total, 'jobs: ' || line.category) as total,
      coalesce(line.amount, 0)::text as of_lines, coalesce(day.amount, 0)::text as of_days
    from day full join line on line.category = day.category
    where coalesce(line.amount, 0) <> coalesce(day.amount, 0)
    order by 1`.execute(trx);
  return rows;
}
