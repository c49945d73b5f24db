import { sql } from 'kysely';
import { JOB_FIGURE_COLUMNS, JOB_FIGURES, LAST_WORKED_ON } from './job-figures';
import { inReadingOrder } from './keyset';
import { type ShopTransaction } from './tenancy';

/** What a customer's jobs cost and brought; customer and name are null for the jobs without one. */
export interface CustomerFiguresRow {
  customerId: string | null;
  name: string | null;
  jobs: number;
  openJobs: number;
  total: string;
  invoiced: string;
  margin: string;
  marginIsProvisional: boolean;
  workInProgress: string;
  lastWorkedOn: string | null;
}

/** Customers by name, then the jobs that have none, if there are any; or the one customer asked for. */
export async function listCustomerFigureRows(
  trx: ShopTransaction,
  customerId?: string,
): Promise<CustomerFiguresRow[]> {
  const isMeant = customerId === undefined ? sql`true` : sql`customer_id = ${customerId}::uuid`;
  const { rows } = await sql<CustomerFiguresRow>`
    with figures as (
      select j.customer_id, j.job_id, j.status, ${LAST_WORKED_ON} as last_worked_on, ${JOB_FIGURE_COLUMNS} from job j ${JOB_FIGURES}
      where ${customerId === undefined ? sql`true` : sql`j.customer_id = ${customerId}::uuid`}
    )
    select c.customer_id, c.name, count(g.job_id)::int as jobs,
      count(*) filter (where g.status = 'open')::int as open_jobs,
      coalesce(sum(g.total), 0)::numeric(16,2) as total, coalesce(sum(g.invoiced), 0)::numeric(16,2) as invoiced,
      coalesce(sum(g.margin), 0)::numeric(16,2) as margin,
      coalesce(bool_or(g.margin_is_provisional and (g.total <> 0 or g.invoiced <> 0)), false)
        as margin_is_provisional,
      coalesce(sum(g.work_in_progress), 0)::numeric(16,2) as work_in_progress,
      max(g.last_worked_on) as last_worked_on
    from (select customer_id, name from customer where ${isMeant}) c
    full join figures g on g.customer_id = c.customer_id
    group by c.customer_id, c.name
    order by c.name is null, ${inReadingOrder(sql`c.name`)}, c.customer_id`.execute(trx);
  return rows;
}

/** A customer's name; null if there is no such customer. */
export async function findCustomerName(trx: ShopTransaction, customerId: string): Promise<string | null> {
  const found = await trx
    .selectFrom('customer')
    .select('name')
    .where('customerId', '=', customerId)
    .executeTakeFirst();
  return found?.name ?? null;
}

/** The id of another customer of the same name, whatever its case; null if there is none. */
export async function findCustomerNamesake(
  trx: ShopTransaction,
  customerId: string,
  name: string,
): Promise<string | null> {
  const row = await trx
    .selectFrom('customer')
    .select('customerId')
    .where(sql`lower(name)`, '=', sql`lower(${name})`)
    .where('customerId', '<>', customerId)
    .executeTakeFirst();
  return row?.customerId ?? null;
}

/** Renames a customer; tells whether there was one. */
export async function updateCustomerName(
  trx: ShopTransaction,
  customerId: string,
  name: string,
): Promise<boolean> {
  const result = await trx
    .updateTable('customer')
    .set({ name })
    .where('customerId', '=', customerId)
    .executeTakeFirst();
  return result.numUpdatedRows > 0n;
}
