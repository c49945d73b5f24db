import { type Insertable, sql } from 'kysely';
import { JOB_FIGURES } from './job-figures';
import { JOB_WITH_CUSTOMER } from './job-selection';
import { containing, inReadingOrder } from './keyset';
import { type EstimateLineTable, type EstimateTable, type JobTable } from './tables';
import { type ShopTransaction } from './tenancy';

export interface EstimateHeadRow {
  jobId: string;
  estimatedOn: string;
  scrapAllowancePercent: string;
  marginPercent: string;
}

/** A line of an estimate with the names of what it refers to. */
export interface EstimateLineRow extends Omit<
  EstimateLineTable,
  'shopId' | 'description' | 'estimateLineId'
> {
  estimateLineId: string;
  description: string;
  operation: string | null;
  machine: string | null;
  material: string | null;
}

/** The heads of the estimates of jobs; a job without one has none. */
export function listEstimateHeads(
  trx: ShopTransaction,
  jobIds: readonly string[],
): Promise<EstimateHeadRow[]> {
  return trx
    .selectFrom('estimate')
    .select(['jobId', 'estimatedOn', 'scrapAllowancePercent', 'marginPercent'])
    .where('jobId', 'in', [...jobIds])
    .execute();
}

/** The lines of the estimates of jobs, each job's in their order. */
export async function listEstimateLines(
  trx: ShopTransaction,
  jobIds: readonly string[],
): Promise<EstimateLineRow[]> {
  const { rows } = await sql<EstimateLineRow>`
    select l.job_id, l.estimate_line_id, l.position, l.kind, l.operation_id, o.name as operation, l.machine_id,
      m.name as machine, l.setup_hours, l.minutes_per_piece, l.pieces, l.labour_rate, l.machine_hour_rate,
      l.overhead_rate, l.material_id, t.name as material, l.weight_kg, l.price_per_kg, l.description, l.amount
    from estimate_line l
    left join operation o on o.shop_id = l.shop_id and o.operation_id = l.operation_id
    left join machine m on m.shop_id = l.shop_id and m.machine_id = l.machine_id
    left join material t on t.shop_id = l.shop_id and t.material_id = l.material_id
    where l.job_id = any (${[...jobIds]}::uuid[])
    order by l.job_id, l.position`.execute(trx);
  return rows;
}

/** Holds a job's estimate until the transaction ends: two who save at once save one after the other. */
export async function lockEstimate(trx: ShopTransaction, jobId: string): Promise<void> {
  await trx.selectFrom('job').select('jobId').where('jobId', '=', jobId).forUpdate().execute();
}

/** Writes an estimate in place of the one that the job has, if any. */
export async function replaceEstimate(
  trx: ShopTransaction,
  head: Insertable<EstimateTable>,
  lines: readonly Insertable<EstimateLineTable>[],
): Promise<void> {
  const { shopId, jobId, ...values } = head;
  await lockEstimate(trx, jobId);
  await trx
    .insertInto('estimate')
    .values({ shopId, jobId, ...values })
    .onConflict((conflict) => conflict.columns(['shopId', 'jobId']).doUpdateSet(values))
    .execute();
  await trx.deleteFrom('estimateLine').where('jobId', '=', jobId).execute();
  await trx
    .insertInto('estimateLine')
    .values([...lines])
    .execute();
}

/** Removes a job's estimate; tells whether there was one. */
export async function deleteEstimateRows(trx: ShopTransaction, jobId: string): Promise<boolean> {
  await trx.deleteFrom('estimateLine').where('jobId', '=', jobId).execute();
  const result = await trx.deleteFrom('estimate').where('jobId', '=', jobId).executeTakeFirst();
  return result.numDeletedRows > 0n;
}

/** Machines with the machine-hour rate of a day; null where none is valid. */
export async function listMachineHourRates(
  trx: ShopTransaction,
  on: string,
): Promise<{ id: string; name: string; machineHourRate: string | null }[]> {
  const { rows } = await sql<{ id: string; name: string; machineHourRate: string | null }>`
    select m.machine_id as id, m.name, (
      select r.machine_hour_rate from machine_rate r
      where r.shop_id = m.shop_id and r.machine_id = m.machine_id and r.valid_from <= ${on}::date
      order by r.valid_from desc limit 1
    ) as machine_hour_rate
    from machine m order by ${inReadingOrder(sql`m.name`)}, m.machine_id`.execute(trx);
  return rows;
}

/** What is in stock of each material on a day: weight and value, and the last average for what is used up. */
export interface StockRow {
  id: string;
  name: string;
  balanceKg: string | null;
  balanceAmount: string | null;
  averagePerKg: string | null;
}

/** Materials with their stock at the end of a day; null for those that nothing has come of. */
export async function listStockOn(trx: ShopTransaction, on: string): Promise<StockRow[]> {
  const { rows } = await sql<StockRow>`
    select t.material_id as id, t.name, s.balance_kg, s.balance_amount, s.average_per_kg
    from material t
    left join lateral (
      select s.* from stock_move s
      where s.shop_id = t.shop_id and s.material_id = t.material_id and s.moved_on <= ${on}::date
      order by s.moved_on desc, s.rank desc, s.source_id desc limit 1
    ) s on true
    order by ${inReadingOrder(sql`t.name`)}, t.material_id`.execute(trx);
  return rows;
}

/** Wages of active employees as they are on a day; who has none is left out. */
export async function listWagesOn(
  trx: ShopTransaction,
  on: string,
): Promise<{ wagePerHour: string; burdenPercent: string }[]> {
  const { rows } = await sql<{ wagePerHour: string; burdenPercent: string }>`
    select r.wage_per_hour, r.burden_percent
    from employee e
    cross join lateral (
      select r.wage_per_hour, r.burden_percent from pay_rate r
      where r.shop_id = e.shop_id and r.employee_id = e.employee_id and r.valid_from <= ${on}::date
      order by r.valid_from desc limit 1
    ) r
    where e.is_active`.execute(trx);
  return rows;
}

/** The overhead rate of a day; null before the first. */
export async function findOverheadRateOn(trx: ShopTransaction, on: string): Promise<string | null> {
  const rate = await trx
    .selectFrom('overheadRate')
    .select('ratePerLabourHour')
    .where('validFrom', '<=', on)
    .orderBy('validFrom', 'desc')
    .limit(1)
    .executeTakeFirst();
  return rate?.ratePerLabourHour ?? null;
}

export interface LikeJobRow {
  jobId: string;
  number: string;
  title: string;
  customer: string | null;
  quantity: number | null;
  status: JobTable['status'];
  materials: string[];
  estimate: string;
  actual: string;
}

/**
 * Other jobs that have an estimate: those that a search finds by number, title, customer or material, and otherwise
 * those of the same customer and with words of the same title first, later numbers before earlier ones.
 */
export async function listLikeJobRows(
  trx: ShopTransaction,
  jobId: string,
  search: string,
  limit: number,
): Promise<LikeJobRow[]> {
  const pattern = containing(search);
  const { rows } = await sql<LikeJobRow>`
    select j.job_id, j.number, j.title, c.name as customer, j.quantity, j.status, t.materials,
      e.estimate, f.total as actual
    from ${JOB_WITH_CUSTOMER} ${JOB_FIGURES}
    cross join job this
    cross join lateral (
      select coalesce(array_agg(distinct t.name order by t.name), '{}') as materials
      from estimate_line l join material t on t.shop_id = l.shop_id and t.material_id = l.material_id
      where l.shop_id = j.shop_id and l.job_id = j.job_id
    ) t
    where this.job_id = ${jobId}::uuid and j.job_id <> this.job_id and e.estimate is not null
      and (${search} = '' or j.number ilike ${pattern} or j.title ilike ${pattern} or c.name ilike ${pattern}
        or exists (select from unnest(t.materials) m(name) where m.name ilike ${pattern}))
    order by (
      select count(*) from regexp_split_to_table(lower(this.title), '[^[:alnum:]]+') word
      where length(word) > 2 and position(word in lower(j.title)) > 0
    ) desc, (j.customer_id = this.customer_id) desc nulls last, ${inReadingOrder(sql`j.number`)} desc, j.job_id
    limit ${limit}`.execute(trx);
  return rows;
}

/** Makes a price the quoted one of a job; tells whether there is such a job. */
export async function updateQuotedPrice(
  trx: ShopTransaction,
  jobId: string,
  quotedPrice: string,
): Promise<boolean> {
  const result = await trx
    .updateTable('job')
    .set({ quotedPrice })
    .where('jobId', '=', jobId)
    .executeTakeFirst();
  return result.numUpdatedRows > 0n;
}
