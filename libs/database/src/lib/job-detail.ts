import { type Insertable, sql, type Updateable } from 'kysely';
import { JOB_SUMS, type JobSums } from './job-figures';
import { inReadingOrder } from './keyset';
import { LINE_FACT_JOINS, type LineFactRow, LINE_FACTS, type LinePosition } from './line-facts';
import { type JobTable } from './tables';
import { type ShopTransaction } from './tenancy';

/** A job's figures by operation; gaps count with their hours, as in the job's own figures. */
export async function listJobOperationSums(
  trx: ShopTransaction,
  jobId: string,
): Promise<(JobSums & { operationId: string; operation: string })[]> {
  const { rows } = await sql<JobSums & { operationId: string; operation: string }>`
    select o.operation_id, o.name as operation, ${JOB_SUMS}
    from (
      select shop_id, operation_id, category, quantity as hours, amount from cost_line where job_id = ${jobId}::uuid
      union all
      select shop_id, operation_id, category, hours, 0 from rate_gap where job_id = ${jobId}::uuid
    ) d
    join operation o on o.shop_id = d.shop_id and o.operation_id = d.operation_id
    group by o.operation_id, o.name
    order by ${inReadingOrder(sql`o.name`)}, o.operation_id`.execute(trx);
  return rows;
}

/** A job's hours and cost by week; `weekStart` is the first day of the week, Sunday 0. */
export async function listJobWeekSums(
  trx: ShopTransaction,
  jobId: string,
  weekStart: number,
): Promise<{ weekFrom: string; hours: string; total: string }[]> {
  const { rows } = await sql<JobSums & { weekFrom: string }>`
    select d.posted_on - ((extract(dow from d.posted_on)::int - ${weekStart}::int + 7) % 7) as week_from, ${JOB_SUMS}
    from job_day d
    where d.job_id = ${jobId}::uuid
    group by 1
    order by 1`.execute(trx);
  return rows.map(({ weekFrom, hours, total }) => ({ weekFrom, hours, total }));
}

/** A cost line of a job, with what its row says. */
export interface JobLineRow extends LineFactRow {
  rate: string;
  rateFactor: string;
  amount: string;
}

/** A page of a job's cost lines, latest first. */
export async function listJobLineRows(
  trx: ShopTransaction,
  jobId: string,
  categories: readonly string[],
  after: LinePosition | null,
  limit: number,
): Promise<JobLineRow[]> {
  const isAfter = after
    ? sql`(posted_on, source_id, category) < (${after.postedOn}::date, ${after.sourceId}::uuid, ${after.category})`
    : sql`true`;
  const { rows } = await sql<JobLineRow>`
    select ${LINE_FACTS}, l.rate, l.rate_factor, l.amount
    from (
      select * from cost_line
      where job_id = ${jobId}::uuid and category = any (${categories}::text[]) and ${isAfter}
      order by posted_on desc, source_id desc, category desc
      limit ${limit}
    ) l
    ${LINE_FACT_JOINS}
    order by l.posted_on desc, l.source_id desc, l.category desc`.execute(trx);
  return rows;
}

/** Adds a job. */
export async function insertJob(trx: ShopTransaction, row: Insertable<JobTable>): Promise<void> {
  await trx.insertInto('job').values(row).execute();
}

/** Changes a job; tells whether there was one. */
export async function updateJobRow(
  trx: ShopTransaction,
  jobId: string,
  change: Updateable<JobTable>,
): Promise<boolean> {
  const result = await trx.updateTable('job').set(change).where('jobId', '=', jobId).executeTakeFirst();
  return result.numUpdatedRows > 0n;
}

/** Customers by name. */
export function listCustomerRows(trx: ShopTransaction): Promise<{ customerId: string; name: string }[]> {
  return trx
    .selectFrom('customer')
    .select(['customerId', 'name'])
    .orderBy(inReadingOrder(sql`name`))
    .execute();
}

/** The customer of a name, whatever its case; one that is new is added. */
export async function obtainCustomer(trx: ShopTransaction, shopId: string, name: string): Promise<string> {
  const find = () =>
    trx
      .selectFrom('customer')
      .select('customerId')
      .where(sql`lower(name)`, '=', sql`lower(${name})`)
      .orderBy(sql`name = ${name}`, 'desc')
      .executeTakeFirst();
  const known = await find();
  if (known) return known.customerId;
  const added = await trx
    .insertInto('customer')
    .values({ shopId, name })
    .onConflict((conflict) => conflict.doNothing())
    .returning('customerId')
    .executeTakeFirst();
  if (added) return added.customerId;
  // Somebody added the same name meanwhile: it can be seen now.
  const theirs = await find();
  if (!theirs) throw new Error('A customer is taken and yet not there.');
  return theirs.customerId;
}
