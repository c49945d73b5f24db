import { type RawBuilder, sql } from 'kysely';
import { isInWeeks, postedOn, type ResolvedScope, withFrozen } from './rollup-scope';
import { type ShopTransaction } from './tenancy';

/**
 * Writes the overtime lines of the scope's weeks, and a gap for each entry of a week with overtime in which a wage is
 * missing; `computeOvertimeLines` is the reference. The premium is one exact fraction rounded once, and its shares are
 * cut in whole cents, what is left going to the largest remainders. Entries in a closed month keep what they have.
 */
export async function insertOvertimeLines(
  trx: ShopTransaction,
  runId: string,
  scope: ResolvedScope,
): Promise<number> {
  if (scope.overtime.thresholdHours === null) return 0;
  const { rows } = await sql<{ lines: number }>`
    ${withFrozen(scope)} ${weeksWithPremium(scope)},
    gap as (
      insert into rate_gap (shop_id, posted_on, worked_on, category, entry_id, job_id, operation_id, employee_id,
        machine_id, hours)
      select shop_id, ${postedOn(scope, 'worked_on')}, worked_on, 'overtime', entry_id, job_id, operation_id,
        employee_id, machine_id, hours
      from owing where rest is null
    ),
    cut as (
      select *, div(cents * hours, open_hours) as units, mod(cents * hours, open_hours) as remainder
      from owing where rest <> 0
    ),
    shared as (
      select *, units + case when row_number() over (partition by employee_id, week_from
          order by remainder desc, worked_on, entry_id)
        <= cents - sum(units) over (partition by employee_id, week_from) then 1 else 0 end as share
      from cut
    ),
    line as (
      insert into cost_line (shop_id, posted_on, worked_on, source_id, category, source_kind, job_id, operation_id,
        employee_id, machine_id, quantity, rate, rate_factor, rate_id, amount, run_id)
      select shop_id, ${postedOn(scope, 'worked_on')} as posted_on, worked_on, entry_id, 'overtime', 'time_entry',
        ${scope.overtime.overtimeTo === 'jobs' ? sql`job_id` : sql`null::uuid`}, operation_id, employee_id, machine_id,
        hours, rate, 1, null, sign(rest) * share / 100, ${runId}::uuid
      from shared where share > 0
      order by 2, entry_id
      returning 1
    )
    select count(*) as lines from line`.execute(trx);
  return rows[0]?.lines ?? 0;
}

/** `owing`: the open entries of weeks that have a premium to share out, or (`rest` null) owe one that is unknown. */
const weeksWithPremium = (scope: ResolvedScope): RawBuilder<unknown> => {
  const { thresholdHours, weekStart } = scope.overtime;
  const threshold = sql`${thresholdHours}::numeric`;
  return sql`
    worked as (
      select e.shop_id, e.worked_on, e.entry_id, e.job_id, e.operation_id, e.employee_id,
        coalesce(e.machine_id, o.default_machine_id) as machine_id, e.hours,
        e.worked_on - (extract(dow from e.worked_on)::integer - ${weekStart}::integer + 7) % 7 as week_from,
        f.source_id is null as is_open, coalesce(f.overtime, 0) as kept
      from time_entry e
      join operation o on o.shop_id = e.shop_id and o.operation_id = e.operation_id
      left join (${keptPremiums(scope)}) f on f.source_id = e.entry_id
      where e.voided_at is null and ${isInWeeks(scope, 'e.worked_on')}
    ),
    long_week as (
      select employee_id, week_from, sum(hours) as hours, sum(kept) as kept,
        coalesce(sum(hours) filter (where is_open), 0) as open_hours
      from worked
      group by 1, 2
      having sum(hours) > ${threshold} or sum(kept) <> 0
    ),
    paid as (
      select w.employee_id, w.week_from, bool_and(p.wage_per_hour is not null) as is_known,
        sum(w.hours * p.wage_per_hour) as pay
      from long_week
      join worked w using (employee_id, week_from)
      left join lateral (
        select wage_per_hour from pay_rate p
        where p.employee_id = w.employee_id and p.valid_from <= w.worked_on
        order by p.valid_from desc limit 1
      ) p on true
      group by 1, 2
    ),
    week as (
      select employee_id, week_from, hours, open_hours, kept,
        case when hours <= ${threshold} then 0
          when is_known then round((pay * (hours - ${threshold}))::numeric(60,30) / (2 * hours), 2) end as premium
      from long_week join paid using (employee_id, week_from)
    ),
    owing as (
      select w.*, k.open_hours, k.premium - k.kept as rest, abs(k.premium - k.kept) * 100 as cents,
        round(k.premium::numeric(60,30) / k.hours, 6) as rate
      from week k join worked w using (employee_id, week_from)
      where w.is_open
    )`;
};

/** What entries posted in a closed month have there as overtime. */
function keptPremiums(scope: ResolvedScope): RawBuilder<unknown> {
  if (!scope.hasClosedDays) return sql`select null::uuid as source_id, 0 as overtime where false`;
  return sql`select source_id, sum(amount) filter (where category = 'overtime') as overtime from frozen group by 1`;
}

/**
 * A rollup that stops within a week has shared out the premium of the days up to there: the days after it that are
 * in the books already wait for the next one.
 */
export async function markRestOfWeek(trx: ShopTransaction, scope: ResolvedScope): Promise<void> {
  if (scope.overtime.thresholdHours === null) return;
  await sql`
    insert into dirty_day (shop_id, worked_on)
    select distinct d.shop_id, d.posted_on from job_day d
    where d.posted_on > ${scope.through}::date and d.posted_on <= ${scope.through}::date + 6
      - (extract(dow from ${scope.through}::date)::integer - ${scope.overtime.weekStart}::integer + 7) % 7
    on conflict (shop_id, worked_on) do nothing`.execute(trx);
}
