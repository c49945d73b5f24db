import { sql } from 'kysely';
import { isJobSelected, JOB_WITH_CUSTOMER, type JobSelection } from './job-selection';
import { allOf, isAfter, type KeysetPosition, orderByKey, type SortKey } from './keyset';
import { type ShopTransaction } from './tenancy';

/** What is no cost line but has an amount: a cost item, a quoted price, a move of stock, a job's part of a figure. */
export interface ItemRow {
  id: string;
  on: string | null;
  category: string;
  label: string;
  detail?: string | null;
  job: string | null;
  /** Kilograms, signed; only of a move of stock. */
  quantity?: string;
  amount: string;
}

/** How many there are, and their sum. */
export interface ItemSums {
  lines: number;
  amount: string;
}

const BY_DATE: SortKey = { expression: sql`x.on_day`, type: 'date', isNullable: true };

/** A page of a machine's cost items, latest first. */
export async function listOutlayItemRows(
  trx: ShopTransaction,
  machineId: string,
  after: KeysetPosition | null,
  limit: number,
): Promise<ItemRow[]> {
  const id = sql`x.id`;
  const { rows } = await sql<ItemRow>`
    select x.id, x.on_day as "on", x.category, x.label, null as job, x.amount
    from (
      select machine_cost_item_id as id, incurred_on as on_day, kind as category,
        coalesce(nullif(description, ''), kind) as label, amount
      from machine_cost_item where machine_id = ${machineId}::uuid
    ) x
    where ${isAfter(BY_DATE, id, 'desc', after)}
    order by ${orderByKey(BY_DATE, id, 'desc')}
    limit ${limit}`.execute(trx);
  return rows;
}

/** A cost item, and who wrote it down as it is. */
export interface CostItemRow {
  machineCostItemId: string;
  incurredOn: string;
  kind: string;
  description: string;
  amount: string;
  /** Null where the audit trail does not reach back to it. */
  enteredAt: Date | null;
  enteredBy: string | null;
}

/** Finds one of a machine's cost items, with the last that the audit trail tells of it. */
export async function findCostItem(
  trx: ShopTransaction,
  machineId: string,
  costItemId: string,
): Promise<CostItemRow | null> {
  const { rows } = await sql<CostItemRow>`
    select i.machine_cost_item_id, i.incurred_on, i.kind, i.description, i.amount, a.at as entered_at,
      a.actor as entered_by
    from machine_cost_item i
    left join lateral (
      select at, actor from audit_event
      where subject_kind = 'machine_cost_item' and subject_id = i.machine_cost_item_id::text
      order by event_id desc
      limit 1
    ) a on true
    where i.machine_id = ${machineId}::uuid and i.machine_cost_item_id = ${costItemId}::uuid`.execute(trx);
  return rows[0] ?? null;
}

/** Counts and adds up a machine's cost items. */
export async function sumOutlayItems(trx: ShopTransaction, machineId: string): Promise<ItemSums> {
  const { rows } = await sql<ItemSums>`
    select count(*) as lines, coalesce(sum(amount), 0)::numeric(16,2) as amount
    from machine_cost_item where machine_id = ${machineId}::uuid`.execute(trx);
  return rows[0] ?? { lines: 0, amount: '0.00' };
}

/** A page of quoted prices, dated as the job was opened, else as it is due. */
export async function listQuoteRows(
  trx: ShopTransaction,
  jobs: JobSelection,
  after: KeysetPosition | null,
  limit: number,
): Promise<ItemRow[]> {
  const id = sql`x.id`;
  const { rows } = await sql<ItemRow>`
    select x.id, x.on_day as "on", 'quoted price' as category, x.label, x.job, x.amount
    from (
      select j.job_id as id, coalesce(j.opened_on, j.due_on) as on_day, j.title as label, j.number as job,
        j.quoted_price as amount
      from ${JOB_WITH_CUSTOMER}
      where ${allOf([isJobSelected(jobs), sql`j.quoted_price is not null`])}
    ) x
    where ${isAfter(BY_DATE, id, 'desc', after)}
    order by ${orderByKey(BY_DATE, id, 'desc')}
    limit ${limit}`.execute(trx);
  return rows;
}

/** Counts and adds up quoted prices. */
export async function sumQuotes(trx: ShopTransaction, jobs: JobSelection): Promise<ItemSums> {
  const { rows } = await sql<ItemSums>`
    select count(j.quoted_price) as lines, coalesce(sum(j.quoted_price), 0)::numeric(16,2) as amount
    from ${JOB_WITH_CUSTOMER} where ${isJobSelected(jobs)}`.execute(trx);
  return rows[0] ?? { lines: 0, amount: '0.00' };
}

/** An operation's name; null if there is no such operation. */
export async function findOperationName(trx: ShopTransaction, operationId: string): Promise<string | null> {
  const found = await trx
    .selectFrom('operation')
    .select('name')
    .where('operationId', '=', operationId)
    .executeTakeFirst();
  return found?.name ?? null;
}
