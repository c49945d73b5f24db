import { type RawBuilder, sql } from 'kysely';
import { isAfter, type KeysetPosition, orderByKey, type SortKey } from './keyset';
import { type ShopTransaction } from './tenancy';
import { type ItemSums } from './workings-items';

/** Week and threshold that overtime goes by; a threshold of null computes none. */
export interface WeekRule {
  weekStart: number;
  thresholdHours: string | null;
}

/** Days of the work, both ends included. */
export interface WorkedDays {
  from: string;
  to: string;
}

/**
 * The weeks of employees, or of one, of which hours fall in the days: those of the whole week, those in the days, and
 * the days' share of the hours above the threshold (by hours, as a week's premium is shared out), to four decimals.
 */
export function weekShares(
  { from, to }: WorkedDays,
  { weekStart, thresholdHours }: WeekRule,
  employeeId?: string,
): RawBuilder<unknown> {
  return sql`
    select w.*, round(greatest(week_hours - ${thresholdHours}::numeric, 0) * hours / week_hours, 4) as overtime_hours
    from (
      select employee_id,
        worked_on - (extract(dow from worked_on)::integer - ${weekStart}::integer + 7) % 7 as week_from,
        sum(hours) as week_hours,
        coalesce(sum(hours) filter (where worked_on between ${from}::date and ${to}::date), 0) as hours
      from time_entry
      where voided_at is null and worked_on between ${from}::date - 6 and ${to}::date + 6
        and ${employeeId === undefined ? sql`true` : sql`employee_id = ${employeeId}::uuid`}
      group by 1, 2
    ) w
    where w.hours > 0`;
}

/** A week of an employee with hours above the threshold in the days. */
export interface OvertimeWeekRow {
  employeeId: string;
  employee: string;
  weekFrom: string;
  weekHours: string;
  hours: string;
  overtimeHours: string;
}

const BY_WEEK: SortKey = { expression: sql`x.week_from`, type: 'date' };

const overtimeWeeks = (days: WorkedDays, rule: WeekRule, employeeId: string | undefined) =>
  sql`select * from (${weekShares(days, rule, employeeId)}) s where s.overtime_hours > 0`;

/** A page of the weeks with overtime in the days, of one employee or of all, latest first. */
export async function listOvertimeWeekRows(
  trx: ShopTransaction,
  days: WorkedDays,
  rule: WeekRule,
  employeeId: string | undefined,
  after: KeysetPosition | null,
  limit: number,
): Promise<OvertimeWeekRow[]> {
  const id = sql`x.employee_id`;
  const { rows } = await sql<OvertimeWeekRow>`
    select x.employee_id, e.name as employee, x.week_from::text as week_from, x.week_hours, x.hours, x.overtime_hours
    from (${overtimeWeeks(days, rule, employeeId)}) x
    join employee e on e.employee_id = x.employee_id
    where ${isAfter(BY_WEEK, id, 'desc', after)}
    order by ${orderByKey(BY_WEEK, id, 'desc')}
    limit ${limit}`.execute(trx);
  return rows;
}

/** Counts the weeks with overtime in the days, and adds their hours up. */
export async function sumOvertimeWeeks(
  trx: ShopTransaction,
  days: WorkedDays,
  rule: WeekRule,
  employeeId: string | undefined,
): Promise<ItemSums> {
  const { rows } = await sql<ItemSums>`
    select count(*) as lines, coalesce(sum(x.overtime_hours), 0)::numeric(14,4) as amount
    from (${overtimeWeeks(days, rule, employeeId)}) x`.execute(trx);
  return rows[0] ?? { lines: 0, amount: '0.0000' };
}
