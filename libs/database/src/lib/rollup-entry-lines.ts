import { type RawBuilder, sql } from 'kysely';
import { isDayIn, isNotFrozen, postedOn, type ResolvedScope, withFrozen } from './rollup-scope';
import { type ShopTransaction } from './tenancy';

/** The machine of an entry is the row's own, else its operation's. */
const ENTRIES = sql`time_entry e
    join job j on j.shop_id = e.shop_id and j.job_id = e.job_id
    join operation o on o.shop_id = e.shop_id and o.operation_id = e.operation_id
    left join machine m on m.shop_id = e.shop_id and m.machine_id = coalesce(e.machine_id, o.default_machine_id)`;

const isOwing = (scope: ResolvedScope): RawBuilder<boolean> => sql`
  e.voided_at is null and ${isDayIn(scope, 'e.worked_on')} and ${isNotFrozen(scope, 'e.entry_id')}`;

/**
 * The entries of the scope with the rates valid on their day (null where none is) in the order of the lines' key:
 * sorted before an entry becomes up to five lines, and its categories are listed in alphabetical order below.
 */
const pricedEntries = (scope: ResolvedScope): RawBuilder<unknown> => sql`
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
    select e.shop_id, ${postedOn(scope, 'e.worked_on')} as posted_on, e.worked_on, e.entry_id, e.job_id,
      e.operation_id, e.employee_id, m.machine_id, e.hours,
      m.in_service_on <= e.worked_on as is_in_service, j.is_billable,
      p.pay_rate_id, p.wage_per_hour, 1 + p.burden_percent / 100 as burden_factor,
      h.overhead_rate_id, h.rate_per_labour_hour,
      r.machine_rate_id, r.machine_hour_rate, r.charge_out_rate, r.running_cost_per_hour
    from ${ENTRIES}
    left join pay p
      on p.employee_id = e.employee_id and e.worked_on >= p.valid_from and e.worked_on < p.valid_until
    left join overhead h
      on e.worked_on >= h.valid_from and e.worked_on < h.valid_until
    left join machine_price r
      on r.machine_id = m.machine_id and e.worked_on >= r.valid_from and e.worked_on < r.valid_until
    where ${isOwing(scope)}
    order by 2, e.entry_id
  )`;

/**
 * Writes the lines that entries owe: labour, machine, overhead, and earned and running from the machine's first day
 * in service, earned on billable jobs only. Amounts are `round(hours × rate × factor, 2)` in numeric, which rounds
 * half away from zero as costing does; `computeEntryLines` is the reference.
 */
export async function insertEntryLines(
  trx: ShopTransaction,
  runId: string,
  scope: ResolvedScope,
): Promise<number> {
  const inserted = await sql`
    ${withFrozen(scope)} ${pricedEntries(scope)}
    insert into cost_line (shop_id, posted_on, worked_on, source_id, category, source_kind, job_id, operation_id,
      employee_id, machine_id, quantity, rate, rate_factor, rate_id, amount, run_id)
    select e.shop_id, e.posted_on, e.worked_on, e.entry_id, due.category, 'time_entry', e.job_id, e.operation_id,
      e.employee_id, e.machine_id, e.hours, due.rate, due.rate_factor, due.rate_id,
      round(e.hours * due.rate * due.rate_factor, 2), ${runId}::uuid
    from priced e cross join lateral (values
      ('earned', e.is_in_service and e.is_billable, e.machine_rate_id, e.charge_out_rate, 1),
      ('labour', true, e.pay_rate_id, e.wage_per_hour, e.burden_factor),
      ('machine', e.machine_id is not null, e.machine_rate_id, e.machine_hour_rate, 1),
      ('overhead', true, e.overhead_rate_id, e.rate_per_labour_hour, 1),
      ('running', e.is_in_service, e.machine_rate_id, e.running_cost_per_hour, 1)
    ) as due (category, is_due, rate_id, rate, rate_factor)
    where due.is_due and due.rate_id is not null`.execute(trx);
  return Number(inserted.numAffectedRows ?? 0);
}

/** Notes each category that an entry owes without a rate: its day lies before the first one, or there is none. */
export async function insertRateGaps(trx: ShopTransaction, scope: ResolvedScope): Promise<void> {
  await sql`
    ${withFrozen(scope)}
    pay as (select employee_id, min(valid_from) as first_on from pay_rate group by 1),
    machine_price as (select machine_id, min(valid_from) as first_on from machine_rate group by 1),
    overhead as (select coalesce(min(valid_from), 'infinity') as first_on from overhead_rate),
    dated as (
      select e.shop_id, e.worked_on, e.entry_id, e.job_id, e.operation_id, e.employee_id, m.machine_id, e.hours,
        m.in_service_on <= e.worked_on as is_in_service, j.is_billable,
        e.worked_on < coalesce(p.first_on, 'infinity') as lacks_pay,
        e.worked_on < h.first_on as lacks_overhead,
        e.worked_on < coalesce(r.first_on, 'infinity') as lacks_machine
      from ${ENTRIES}
      left join pay p on p.employee_id = e.employee_id
      left join machine_price r on r.machine_id = m.machine_id
      cross join overhead h
      where ${isOwing(scope)}
    )
    insert into rate_gap (shop_id, posted_on, worked_on, category, entry_id, job_id, operation_id, employee_id,
      machine_id, hours)
    select e.shop_id, ${postedOn(scope, 'e.worked_on')}, e.worked_on, due.category, e.entry_id, e.job_id,
      e.operation_id, e.employee_id, e.machine_id, e.hours
    from dated e cross join lateral (values
      ('earned', e.is_in_service and e.is_billable and e.lacks_machine),
      ('labour', e.lacks_pay),
      ('machine', e.machine_id is not null and e.lacks_machine),
      ('overhead', e.lacks_overhead),
      ('running', e.is_in_service and e.lacks_machine)
    ) as due (category, is_lacking)
    where (e.lacks_pay or e.lacks_overhead or e.lacks_machine) and due.is_lacking`.execute(trx);
}
