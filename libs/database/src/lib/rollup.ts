import { type RawBuilder, sql } from 'kysely';
import { type ShopTransaction } from './tenancy';

/** Which days a rollup writes anew. */
export interface RollupScope {
  /** The days, or all of them up to `through`. */
  days: readonly string[] | 'all';
  through: string;
}

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
 * this transaction and then marks it again, so that no change falls between two rollups.
 */
export async function takeDirtyDays(trx: ShopTransaction, through: string): Promise<string[]> {
  const days = await trx
    .selectFrom('dirtyDay')
    .select('workedOn')
    .where('workedOn', '<=', through)
    .orderBy('workedOn')
    .forUpdate()
    .execute();
  await trx.deleteFrom('dirtyDay').where('workedOn', '<=', through).execute();
  return days.map((day) => day.workedOn);
}

const WRITTEN_TABLES = ['cost_line', 'rate_gap', 'job_day', 'machine_job_day', 'machine_day'] as const;

/**
 * Deletes all that was written for the days of the scope and writes it again from the entries and rates of now:
 * cost lines, gaps, job days, machine days. Amounts are `round(hours × rate × factor, 2)` in numeric, which rounds
 * half away from zero as costing does; `computeEntryLines` is the reference.
 */
export async function rewriteCosts(
  trx: ShopTransaction,
  runId: string,
  scope: RollupScope,
): Promise<WrittenCosts> {
  for (const table of WRITTEN_TABLES)
    await sql`delete from ${sql.table(table)} where ${inScope(scope)}`.execute(trx);
  const lines = await insertLinesAndGaps(trx, runId, scope);
  await insertJobDays(trx, scope);
  await insertMachineDays(trx, scope);
  return { lines, days: scope.days === 'all' ? await countDays(trx, scope) : scope.days.length };
}

/** The latest day in the costs, not after `limit` if one is given; null if there is none. */
export async function findThrough(trx: ShopTransaction, limit?: string): Promise<string | null> {
  let query = trx.selectFrom('jobDay').select((eb) => eb.fn.max('postedOn').as('through'));
  if (limit !== undefined) query = query.where('postedOn', '<=', limit);
  return (await query.executeTakeFirstOrThrow()).through;
}

function inScope({ days, through }: RollupScope, column = 'posted_on'): RawBuilder<boolean> {
  if (days === 'all') return sql`${sql.ref(column)} <= ${through}::date`;
  return sql`${sql.ref(column)} = any (${days}::date[])`;
}

/**
 * Every entry of the scope with the rates valid on its day (null where none is) in the order of the lines' key:
 * sorted before an entry becomes up to five lines, and its categories are listed in alphabetical order below.
 */
const pricedEntries = (scope: RollupScope): RawBuilder<unknown> => sql`
  pay as (
    select *, lead(valid_from, 1, 'infinity') over (partition by employee_id order by valid_from) as valid_until
    from pay_rate
  ),
  overhead as (
    select *, lead(valid_from, 1, 'infinity') over (order by valid_from) as valid_until from overhead_rate
  ),
  machine_price as (
    select *, lead(valid_from, 1, 'infinity') over (partition by machine_id order by valid_from) as valid_until
    from machine_rate
  ),
  priced as (
    select e.shop_id, e.worked_on, e.entry_id, e.job_id, e.operation_id, e.employee_id, m.machine_id, e.hours,
      m.in_service_on <= e.worked_on as is_in_service, j.is_billable,
      p.pay_rate_id, p.wage_per_hour, 1 + p.burden_percent / 100 as burden_factor,
      h.overhead_rate_id, h.rate_per_labour_hour,
      r.machine_rate_id, r.machine_hour_rate, r.charge_out_rate, r.running_cost_per_hour
    from time_entry e
    join job j on j.shop_id = e.shop_id and j.job_id = e.job_id
    join operation o on o.shop_id = e.shop_id and o.operation_id = e.operation_id
    left join machine m on m.shop_id = e.shop_id and m.machine_id = coalesce(e.machine_id, o.default_machine_id)
    left join pay p
      on p.employee_id = e.employee_id and e.worked_on >= p.valid_from and e.worked_on < p.valid_until
    left join overhead h
      on e.worked_on >= h.valid_from and e.worked_on < h.valid_until
    left join machine_price r
      on r.machine_id = m.machine_id and e.worked_on >= r.valid_from and e.worked_on < r.valid_until
    where e.voided_at is null and ${inScope(scope, 'e.worked_on')}
    order by e.worked_on, e.entry_id
  )`;

/**
 * The categories that an entry owes. Earned and running count from the machine's first day in service, earned on
 * billable jobs only.
 */
const DUE = sql`(values
    ('earned', e.is_in_service and e.is_billable, e.machine_rate_id, e.charge_out_rate, 1),
    ('labour', true, e.pay_rate_id, e.wage_per_hour, e.burden_factor),
    ('machine', e.machine_id is not null, e.machine_rate_id, e.machine_hour_rate, 1),
    ('overhead', true, e.overhead_rate_id, e.rate_per_labour_hour, 1),
    ('running', e.is_in_service, e.machine_rate_id, e.running_cost_per_hour, 1)
  ) as due (category, is_due, rate_id, rate, rate_factor)`;

async function insertLinesAndGaps(trx: ShopTransaction, runId: string, scope: RollupScope): Promise<number> {
  const inserted = await sql`
    with ${pricedEntries(scope)},
    gap as (
      insert into rate_gap (shop_id, posted_on, worked_on, category, entry_id, job_id, operation_id, employee_id, machine_id, hours)
      select e.shop_id, e.worked_on, e.worked_on, due.category, e.entry_id, e.job_id, e.operation_id, e.employee_id, e.machine_id,
        e.hours
      from priced e cross join lateral ${DUE}
      where due.is_due and due.rate_id is null
    )
    insert into cost_line (shop_id, posted_on, worked_on, source_id, category, source_kind, job_id, operation_id, employee_id,
      machine_id, quantity, rate, rate_factor, rate_id, amount, run_id)
    select e.shop_id, e.worked_on, e.worked_on, e.entry_id, due.category, 'time_entry', e.job_id, e.operation_id, e.employee_id,
      e.machine_id, e.hours, due.rate, due.rate_factor, due.rate_id,
      round(e.hours * due.rate * due.rate_factor, 2), ${runId}::uuid
    from priced e cross join lateral ${DUE}
    where due.is_due and due.rate_id is not null`.execute(trx);
  return Number(inserted.numAffectedRows ?? 0);
}

/** Lines and gaps alike: a gap has hours but no amount. */
const written = (scope: RollupScope): RawBuilder<unknown> => sql`(
    select shop_id, posted_on, job_id, machine_id, category, quantity as hours, amount, 1 as lines
    from cost_line where ${inScope(scope)}
    union all
    select shop_id, posted_on, job_id, machine_id, category, hours, 0, 0
    from rate_gap where ${inScope(scope)}
  )`;

async function insertJobDays(trx: ShopTransaction, scope: RollupScope): Promise<void> {
  await sql`
    insert into job_day (shop_id, job_id, posted_on, category, hours, amount, lines)
    select w.shop_id, w.job_id, w.posted_on, w.category, sum(w.hours), sum(w.amount), sum(w.lines)
    from ${written(scope)} w
    group by 1, 2, 3, 4
    order by 1, 2, 3, 4`.execute(trx);
}

/** Days in service: every entry of such a day owes a running line, so that these hold its hours. */
async function insertMachineDays(trx: ShopTransaction, scope: RollupScope): Promise<void> {
  await sql`
    insert into machine_job_day (shop_id, posted_on, machine_id, job_id, hours, billable_hours, earned,
      operator_labour, running)
    select w.shop_id, w.posted_on, w.machine_id, w.job_id,
      coalesce(sum(w.hours) filter (where w.category = 'running'), 0),
      coalesce(sum(w.hours) filter (where w.category = 'earned'), 0),
      coalesce(sum(w.amount) filter (where w.category = 'earned'), 0),
      coalesce(sum(w.amount) filter (where w.category = 'labour'), 0),
      coalesce(sum(w.amount) filter (where w.category = 'running'), 0)
    from ${written(scope)} w
    join machine m on m.shop_id = w.shop_id and m.machine_id = w.machine_id and m.in_service_on <= w.posted_on
    group by 1, 2, 3, 4
    order by 1, 2, 3, 4`.execute(trx);
  await sql`
    insert into machine_day (shop_id, machine_id, posted_on, hours, billable_hours, earned, operator_labour, running)
    select shop_id, machine_id, posted_on, sum(hours), sum(billable_hours), sum(earned), sum(operator_labour),
      sum(running)
    from machine_job_day
    where ${inScope(scope)}
    group by 1, 2, 3
    order by 1, 2, 3`.execute(trx);
}

async function countDays(trx: ShopTransaction, scope: RollupScope): Promise<number> {
  const { rows } = await sql<{ days: number }>`
    select count(distinct posted_on) as days from job_day where ${inScope(scope)}`.execute(trx);
  return rows[0]?.days ?? 0;
}
