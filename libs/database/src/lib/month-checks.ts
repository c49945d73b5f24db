import { sql } from 'kysely';
import { type WeekRule, weekShares, type WorkedDays } from './overtime-weeks';
import { type JobTable } from './tables';
import { type ShopTransaction } from './tenancy';

/** Days of a period on which somebody has no hours. */
export interface MissingTimesheetRow {
  employeeId: string;
  employee: string;
  days: string[];
}

/** Weekdays of a period without any hours of an active employee who has a wage by then, by name. */
export async function listMissingTimesheetRows(
  trx: ShopTransaction,
  from: string,
  to: string,
): Promise<MissingTimesheetRow[]> {
  const { rows } = await sql<MissingTimesheetRow>`
    select e.employee_id, e.name as employee, array_agg(day::date::text order by day) as days
    from employee e
    join generate_series(${from}::date, ${to}::date, interval '1 day') day on extract(isodow from day) <= 5
    where e.is_active
      and exists (select from pay_rate p where p.employee_id = e.employee_id and p.valid_from <= day::date)
      and not exists (
        select from time_entry t
        where t.employee_id = e.employee_id and t.worked_on = day::date and t.voided_at is null
      )
    group by e.employee_id, e.name
    order by e.name, e.employee_id`.execute(trx);
  return rows;
}

/** A timesheet of which rows were refused. */
export interface RefusalRow {
  importId: string;
  fileName: string;
  importedAt: Date;
  importedBy: string;
  refused: number;
  reviewedAt: Date | null;
  reviewedBy: string | null;
}

/** Imports with hours in a period of which rows were refused, reviewed or not, latest first. */
export function listRefusalRows(trx: ShopTransaction, from: string, to: string): Promise<RefusalRow[]> {
  return trx
    .selectFrom('timesheetImport')
    .select([
      'importId',
      'fileName',
      'importedAt',
      'importedBy',
      'refused',
      'refusalsReviewedAt as reviewedAt',
      'refusalsReviewedBy as reviewedBy',
    ])
    .where('status', '=', 'committed')
    .where('refused', '>', 0)
    .where('firstDay', '<=', to)
    .where('lastDay', '>=', from)
    .orderBy('importedAt', 'desc')
    .execute();
}

/** Notes who has looked at the refused rows of an import, or that nobody has; tells whether there is one. */
export async function markRefusalsReviewed(
  trx: ShopTransaction,
  importId: string,
  reviewedBy: string | null,
): Promise<boolean> {
  const result = await trx
    .updateTable('timesheetImport')
    .set({
      refusalsReviewedBy: reviewedBy,
      refusalsReviewedAt: reviewedBy === null ? null : new Date(),
    })
    .where('importId', '=', importId)
    .executeTakeFirst();
  return result.numUpdatedRows > 0n;
}

/** A job that has cost and no invoice. */
export interface UninvoicedJobRow {
  jobId: string;
  number: string;
  title: string;
  customer: string | null;
  status: JobTable['status'];
  cost: string;
}

/** Billable jobs that are finished or said to be invoiced, have cost by the end of a period, and no invoice; dearest first. */
export async function listUninvoicedJobRows(
  trx: ShopTransaction,
  to: string,
  costCategories: readonly string[],
): Promise<UninvoicedJobRow[]> {
  const { rows } = await sql<UninvoicedJobRow>`
    select j.job_id, j.number, j.title, c.name as customer, j.status, cost.amount as cost
    from job j
    left join customer c on c.shop_id = j.shop_id and c.customer_id = j.customer_id
    cross join lateral (
      select sum(d.amount) as amount from job_day d
      where d.job_id = j.job_id and d.posted_on <= ${to}::date and d.category = any (${costCategories}::text[])
    ) cost
    where j.status in ('finished', 'invoiced') and j.is_billable and cost.amount > 0
      and not exists (
        select from invoice i where i.job_id = j.job_id and i.voided_at is null and i.kind = 'invoice'
      )
    order by cost.amount desc, j.number`.execute(trx);
  return rows;
}

/** Days up to `to` whose costs may have changed since they were rolled up. */
export async function countDaysWaiting(trx: ShopTransaction, to: string): Promise<number> {
  const row = await trx
    .selectFrom('dirtyDay')
    .select((eb) => eb.fn.countAll<number>().as('days'))
    .where('workedOn', '<=', to)
    .executeTakeFirstOrThrow();
  return row.days;
}

/** An employee's hours of a period, from three sides. */
export interface TieOutRow {
  employeeId: string;
  employee: string;
  hours: string;
  overtimeHours: string;
  costedHours: string;
  payrollHours: string | null;
}

/**
 * Hours of a month by employee: of the timesheets, of them above the weekly threshold (a week's are shared out over
 * its days by hours, as its premium is, so that a week across two months counts in both), those in the cost lines or
 * without a wage, and those of payroll. By name; without those who have nothing anywhere, or the one asked for only.
 */
export async function listTieOutRows(
  trx: ShopTransaction,
  days: WorkedDays,
  rule: WeekRule,
  employeeId?: string,
): Promise<TieOutRow[]> {
  const { from, to } = days;
  const isMeant = (column: string) =>
    employeeId === undefined ? sql`true` : sql`${sql.ref(column)} = ${employeeId}`;
  const { rows } = await sql<TieOutRow>`
    with worked as (
      select employee_id, sum(hours) as hours, sum(overtime_hours) as overtime_hours
      from (${weekShares(days, rule, employeeId)}) week
      group by employee_id
    ),
    costed as (
      select employee_id, sum(hours) as hours
      from (
        select employee_id, quantity as hours from cost_line
        where posted_on between ${from}::date and ${to}::date and posted_on = worked_on and category = 'labour'
        union all
        select employee_id, quantity from cost_line
        where worked_on between ${from}::date and ${to}::date and posted_on <> worked_on and category = 'labour'
        union all
        select employee_id, hours from rate_gap
        where worked_on between ${from}::date and ${to}::date and category = 'labour'
      ) line
      where ${isMeant('employee_id')}
      group by employee_id
    )
    select e.employee_id, e.name as employee, coalesce(w.hours, 0) as hours,
      coalesce(w.overtime_hours, 0) as overtime_hours, coalesce(c.hours, 0) as costed_hours, p.hours as payroll_hours
    from employee e
    left join worked w on w.employee_id = e.employee_id
    left join costed c on c.employee_id = e.employee_id
    left join payroll_hours p on p.employee_id = e.employee_id and p.month = ${from}::date
    where ${isMeant('e.employee_id')}
      and (${employeeId !== undefined} or e.is_active or num_nonnulls(w.hours, c.hours, p.hours) > 0)
    order by e.name, e.employee_id`.execute(trx);
  return rows;
}

/** Keeps the hours of an employee's month as payroll has them; null forgets them. */
export async function savePayrollHoursRow(
  trx: ShopTransaction,
  { hours, ...key }: { shopId: string; employeeId: string; month: string; hours: string | null },
): Promise<void> {
  if (hours === null) {
    await trx
      .deleteFrom('payrollHours')
      .where('employeeId', '=', key.employeeId)
      .where('month', '=', key.month)
      .execute();
    return;
  }
  await trx
    .insertInto('payrollHours')
    .values({ ...key, hours })
    .onConflict((conflict) => conflict.columns(['shopId', 'employeeId', 'month']).doUpdateSet({ hours }))
    .execute();
}
