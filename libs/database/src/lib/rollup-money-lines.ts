import { type RawBuilder, sql } from 'kysely';
import { isDayIn, isInWeeks, isNotFrozen, postedOn, type ResolvedScope, withFrozen } from './rollup-scope';
import { type ShopTransaction } from './tenancy';

/** Rows that carry their own amount: the line's columns from its category to its amount, and the live rows. */
const MONEY_ROWS: readonly { table: string; day: string; id: string; rows: RawBuilder<unknown> }[] = [
  {
    table: 'i',
    day: 'i.issued_on',
    id: 'i.issue_id',
    rows: sql`'material', 'material_issue', i.job_id, -s.weight_kg, s.average_per_kg, -s.amount
      from stock_move s
      join material_issue i on i.shop_id = s.shop_id and i.issue_id = s.source_id
      where s.rank = 1`,
  },
  {
    table: 'o',
    day: 'o.incurred_on',
    id: 'o.outside_service_id',
    rows: sql`'outside', 'outside_service', o.job_id, 1, o.amount, o.amount
      from outside_service o where o.voided_at is null`,
  },
  {
    table: 'v',
    day: 'v.invoiced_on',
    id: 'v.invoice_id',
    rows: sql`'invoiced', 'invoice', v.job_id, s.sign, v.amount, s.sign * v.amount
      from invoice v
      cross join lateral (select case v.kind when 'invoice' then 1 else -1 end as sign) s
      where v.voided_at is null`,
  },
];

/**
 * Writes the lines of material issued (at the stock ledger's amounts), of outside services and of invoices;
 * `toMaterialLine`, `toOutsideLine` and `toInvoiceLine` are the reference.
 */
export async function insertMoneyLines(
  trx: ShopTransaction,
  runId: string,
  scope: ResolvedScope,
): Promise<number> {
  let lines = 0;
  for (const { table, day, id, rows } of MONEY_ROWS) {
    const inserted = await sql`
      ${withFrozen(scope)} line as (
        select ${sql.ref(`${table}.shop_id`)}, ${postedOn(scope, day)} as posted_on, ${sql.ref(day)} as worked_on,
          ${sql.ref(id)} as source_id, ${rows} and ${isDayIn(scope, day)} and ${isNotFrozen(scope, id)}
      )
      insert into cost_line (shop_id, posted_on, worked_on, source_id, category, source_kind, job_id, quantity, rate,
        amount, rate_factor, run_id)
      select line.*, 1, ${runId}::uuid from line
      order by 2, 4`.execute(trx);
    lines += Number(inserted.numAffectedRows ?? 0);
  }
  return lines;
}

/** Takes back, on the first open day, what closed months hold of rows that are voided meanwhile. */
export async function insertReversals(
  trx: ShopTransaction,
  runId: string,
  scope: ResolvedScope,
): Promise<number> {
  if (!scope.hasClosedDays) return 0;
  const inserted = await sql`
    ${withFrozen(scope)} voided as (
      select entry_id as source_id from time_entry where voided_at is not null and ${isInWeeks(scope, 'worked_on')}
      union all
      select issue_id from material_issue where voided_at is not null and ${isInWeeks(scope, 'issued_on')}
      union all
      select outside_service_id from outside_service
      where voided_at is not null and ${isInWeeks(scope, 'incurred_on')}
      union all
      select invoice_id from invoice where voided_at is not null and ${isInWeeks(scope, 'invoiced_on')}
    )
    insert into cost_line (shop_id, posted_on, worked_on, source_id, category, source_kind, job_id, operation_id,
      employee_id, machine_id, quantity, rate, rate_factor, rate_id, amount, run_id)
    select nullif(current_setting('app.shop_id', true), '')::uuid, ${postedOn(scope, 'f.worked_on')}, f.worked_on,
      f.source_id, f.category, f.source_kind, f.job_id, f.operation_id, f.employee_id, f.machine_id, -f.quantity,
      f.rate, f.rate_factor, f.rate_id, -f.amount, ${runId}::uuid
    from frozen f join voided using (source_id)
    where f.category = 'overtime' or ${isDayIn(scope, 'f.worked_on')}
    order by 2, 4, 5`.execute(trx);
  return Number(inserted.numAffectedRows ?? 0);
}
