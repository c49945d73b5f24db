import { sql } from 'kysely';
import { JOB_FIGURE_COLUMNS, JOB_FIGURES } from './job-figures';
import { isJobSelected, JOB_WITH_CUSTOMER, type JobSelection } from './job-selection';
import { isAfter, type KeysetPosition, orderByKey, type SortKey } from './keyset';
import { type ShopTransaction } from './tenancy';
import { type ItemRow, type ItemSums } from './workings-items';

/** What is summed over the estimates of jobs. */
export type EstimateSum = 'estimate' | 'estimated_hours' | 'variance';

const BY_DATE: SortKey = { expression: sql`x.on_day`, type: 'date' };

const itemsOf = (jobs: JobSelection, column: EstimateSum) => sql`
  select g.job_id as id, s.estimated_on as on_day, 'estimate' as category, g.title as label, g.number as job,
    g.${sql.raw(column)} as amount
  from (
    select j.job_id, j.number, j.title, ${JOB_FIGURE_COLUMNS} from ${JOB_WITH_CUSTOMER} ${JOB_FIGURES}
    where ${isJobSelected(jobs)}
  ) g
  join estimate s on s.job_id = g.job_id
  where g.${sql.raw(column)} is not null`;

/** A page of jobs with what is summed over their estimates, latest estimated first. */
export async function listEstimateItems(
  trx: ShopTransaction,
  jobs: JobSelection,
  column: EstimateSum,
  after: KeysetPosition | null,
  limit: number,
): Promise<ItemRow[]> {
  const id = sql`x.id`;
  const { rows } = await sql<ItemRow>`
    select x.id, x.on_day as "on", x.category, x.label, x.job, x.amount from (${itemsOf(jobs, column)}) x
    where ${isAfter(BY_DATE, id, 'desc', after)}
    order by ${orderByKey(BY_DATE, id, 'desc')}
    limit ${limit}`.execute(trx);
  return rows;
}

/** Counts the estimates of jobs and adds up what is summed over them. */
export async function sumEstimateItems(
  trx: ShopTransaction,
  jobs: JobSelection,
  column: EstimateSum,
): Promise<ItemSums> {
  const { rows } = await sql<ItemSums>`
    select count(*) as lines, coalesce(sum(x.amount), 0)::text as amount
    from (${itemsOf(jobs, column)}) x`.execute(trx);
  return rows[0] ?? { lines: 0, amount: '0' };
}
