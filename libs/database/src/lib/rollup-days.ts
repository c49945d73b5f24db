import { type RawBuilder, sql } from 'kysely';
import { isPostedIn, type ResolvedScope } from './rollup-scope';
import { type ShopTransaction } from './tenancy';

/** Overtime is written for whole weeks, all else for the days of the scope. */
const isWritten = (scope: ResolvedScope): RawBuilder<boolean> => sql`(
  category <> 'overtime' and ${isPostedIn(scope)} or category = 'overtime' and ${isPostedIn(scope, scope.weekDays)})`;

/** Takes out what was summed up by day for the scope. */
export async function deleteDays(trx: ShopTransaction, scope: ResolvedScope): Promise<void> {
  await sql`delete from job_day where ${isWritten(scope)}`.execute(trx);
  for (const table of ['machine_job_day', 'machine_day'])
    await sql`delete from ${sql.table(table)} where ${isPostedIn(scope)}`.execute(trx);
}

/** Lines and gaps alike: a gap has hours but no amount. */
const written = (condition: RawBuilder<boolean>): RawBuilder<unknown> => sql`(
    select shop_id, posted_on, worked_on, job_id, machine_id, category,
      case source_kind when 'time_entry' then quantity else 0 end as hours, amount, 1 as lines
    from cost_line where job_id is not null and ${condition}
    union all
    select shop_id, posted_on, worked_on, job_id, machine_id, category, hours, 0, 0
    from rate_gap where ${condition}
  )`;

/** Sums the lines of each job and category up by day. */
export async function insertJobDays(trx: ShopTransaction, scope: ResolvedScope): Promise<void> {
  await sql`
    insert into job_day (shop_id, job_id, posted_on, category, hours, amount, lines)
    select w.shop_id, w.job_id, w.posted_on, w.category, sum(w.hours), sum(w.amount), sum(w.lines)
    from ${written(isWritten(scope))} w
    group by 1, 2, 3, 4
    order by 1, 2, 3, 4`.execute(trx);
}

/** Days in service: every entry of such a day owes a running line, so that these hold its hours. */
export async function insertMachineDays(trx: ShopTransaction, scope: ResolvedScope): Promise<void> {
  const isOfPayback = sql<boolean>`category in ('labour', 'earned', 'running') and ${isPostedIn(scope)}`;
  await sql`
    insert into machine_job_day (shop_id, posted_on, machine_id, job_id, hours, billable_hours, earned,
      operator_labour, running)
    select w.shop_id, w.posted_on, w.machine_id, w.job_id,
      coalesce(sum(w.hours) filter (where w.category = 'running'), 0),
      coalesce(sum(w.hours) filter (where w.category = 'earned'), 0),
      coalesce(sum(w.amount) filter (where w.category = 'earned'), 0),
      coalesce(sum(w.amount) filter (where w.category = 'labour'), 0),
      coalesce(sum(w.amount) filter (where w.category = 'running'), 0)
    from ${written(isOfPayback)} w
    join machine m on m.shop_id = w.shop_id and m.machine_id = w.machine_id and m.in_service_on <= w.worked_on
    group by 1, 2, 3, 4
    order by 1, 2, 3, 4`.execute(trx);
  await sql`
    insert into machine_day (shop_id, machine_id, posted_on, hours, billable_hours, earned, operator_labour, running)
    select shop_id, machine_id, posted_on, sum(hours), sum(billable_hours), sum(earned), sum(operator_labour),
      sum(running)
    from machine_job_day
    where ${isPostedIn(scope)}
    group by 1, 2, 3
    order by 1, 2, 3`.execute(trx);
}
