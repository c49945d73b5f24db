import { type RawBuilder, sql } from 'kysely';
import { type ShopTransaction } from './tenancy';

/** Which days a rollup writes anew: the days of the rows themselves, or all of them up to `through`. */
export interface RollupScope {
  days: readonly string[] | 'all';
  through: string;
}

/** A scope with what it follows from the shop's settings and its closed months. */
export interface ResolvedScope extends RollupScope {
  /** The days with the rest of their weeks, up to `through`: overtime is a matter of whole weeks. */
  weekDays: readonly string[] | 'all';
  /** The last day of the latest closed month, `-infinity` before any. */
  closedThrough: string;
  /** Whether rows of closed months are among the days. */
  hasClosedDays: boolean;
  overtime: OvertimeSettings;
}

/** Hours a week above which a premium is owed (null: none is computed), and where it goes. */
export interface OvertimeSettings {
  thresholdHours: string | null;
  overtimeTo: 'overhead' | 'jobs';
  weekStart: number;
}

type ScopeSettings = OvertimeSettings & { closedThrough: string; weekDays: string[]; hasClosedDays: boolean };

/** Reads the settings that a rollup follows. */
export async function resolveScope(trx: ShopTransaction, scope: RollupScope): Promise<ResolvedScope> {
  const days = scope.days === 'all' ? [] : scope.days;
  const { rows } = await sql<ScopeSettings>`
    with week as (
      select distinct day - (extract(dow from day)::integer - s.week_start + 7) % 7 + n as day
      from shop s, unnest(${days}::date[]) day, generate_series(0, 6) n
    )
    select c.closed_through::text, s.overtime_to, s.overtime_threshold_hours as threshold_hours, s.week_start,
      case when s.overtime_threshold_hours is null then ${days}::text[]
        else array(select day::text from week where day <= ${scope.through}::date order by day) end as week_days,
      ${scope.days === 'all'} and c.closed_through > '-infinity'
        or exists (select from week where day <= c.closed_through) as has_closed_days
    from shop s, (select books_closed_through() as closed_through) c
    where s.shop_id = nullif(current_setting('app.shop_id', true), '')::uuid`.execute(trx);
  const [found] = rows;
  if (!found) throw new Error('A rollup needs a shop.');
  const { closedThrough, hasClosedDays, weekDays, ...overtime } = found;
  return {
    ...scope,
    closedThrough,
    hasClosedDays,
    weekDays: scope.days === 'all' ? 'all' : weekDays,
    overtime,
  };
}

/** Whether a row's own day is in the scope. */
export function isDayIn({ days, through }: RollupScope, column: string): RawBuilder<boolean> {
  if (days === 'all') return sql`${sql.ref(column)} <= ${through}::date`;
  return sql`${sql.ref(column)} = any (${days}::date[])`;
}

/** The same for the weeks of the scope. */
export function isInWeeks({ weekDays, through }: ResolvedScope, column: string): RawBuilder<boolean> {
  return isDayIn({ days: weekDays, through }, column);
}

/** Where a row of a day is posted: that day, or the first open day if its month is closed. */
export function postedOn({ closedThrough }: ResolvedScope, column: string): RawBuilder<string> {
  return sql`greatest(${sql.ref(column)}, ${closedThrough}::date + 1)`;
}

/** Whether a posting is on a day in the books that the rows of the scope can post to. */
export function isPostedIn(
  scope: ResolvedScope,
  days: RollupScope['days'] = scope.days,
): RawBuilder<boolean> {
  const { closedThrough, through } = scope;
  const firstOpen = sql`${closedThrough}::date + 1`;
  if (days === 'all')
    return sql`posted_on > ${closedThrough}::date and posted_on <= greatest(${through}::date, ${firstOpen})`;
  return sql`posted_on = any (array(select distinct greatest(day, ${firstOpen}) from unnest(${days}::date[]) day))`;
}

/**
 * `frozen`: what closed months hold of the rows of the scope's weeks, net, so that a line and the one that took it
 * back cancel out. A row with nothing here is not in a closed month yet.
 */
export function frozenLines(scope: ResolvedScope): RawBuilder<unknown> {
  const { closedThrough } = scope;
  const columns = sql`source_id, source_kind, category, worked_on, job_id, operation_id, employee_id, machine_id,
    rate, rate_factor, rate_id`;
  const closed = sql`posted_on <= ${closedThrough}::date`;
  return sql`
    frozen as materialized (
      select ${columns}, sum(quantity) as quantity, sum(amount) as amount
      from (
        select ${columns}, quantity, amount from cost_line
        where ${closed} and posted_on = worked_on and ${isInWeeks(scope, 'posted_on')}
        union all
        select ${columns}, quantity, amount from cost_line
        where ${closed} and posted_on <> worked_on and ${isInWeeks(scope, 'worked_on')}
      ) posted
      group by ${columns}
      having sum(quantity) <> 0 or sum(amount) <> 0
    )`;
}

/** Opens a `with` that has `frozen` if rows of closed months are in the scope. */
export function withFrozen(scope: ResolvedScope): RawBuilder<unknown> {
  return scope.hasClosedDays ? sql`with ${frozenLines(scope)},` : sql`with`;
}

/** Whether a row is not in a closed month; needs `withFrozen`. */
export function isNotFrozen(scope: ResolvedScope, id: string): RawBuilder<boolean> {
  if (!scope.hasClosedDays) return sql`true`;
  return sql`not exists (select from frozen f where f.source_id = ${sql.ref(id)})`;
}
