import { type RawBuilder, sql } from 'kysely';
import { JOB_FIGURES, LAST_WORKED_ON } from './job-figures';
import { isJobSelected, JOB_WITH_CUSTOMER, type JobSelection } from './job-selection';
import { allOf, isAfter, type KeysetPosition, orderByKey, type SortKey } from './keyset';
import { type PaybackMachine } from './payback-figures';
import { type ShopTransaction } from './tenancy';
import { type ItemRow, type ItemSums } from './workings-items';

const BY_DATE: SortKey = { expression: sql`x.on_day`, type: 'date', isNullable: true };

/** A page of jobs with cost not yet invoiced, those worked last first; each item's id is the job's. */
export async function listWorkInProgressRows(
  trx: ShopTransaction,
  jobs: JobSelection,
  after: KeysetPosition | null,
  limit: number,
): Promise<ItemRow[]> {
  return listJobItems(trx, workInProgress(jobs), 'work in progress', after, limit);
}

/** Counts and adds up the jobs with cost not yet invoiced. */
export function sumWorkInProgress(trx: ShopTransaction, jobs: JobSelection): Promise<ItemSums> {
  return sumJobItems(trx, workInProgress(jobs));
}

/** A page of what each job beyond the first `listed` brought a machine, those on it last first. */
export function listOtherJobRows(
  trx: ShopTransaction,
  machine: PaybackMachine,
  listed: number,
  after: KeysetPosition | null,
  limit: number,
): Promise<ItemRow[]> {
  return listJobItems(trx, otherJobs(machine, listed), 'earned back', after, limit);
}

/** Counts and adds up what the jobs beyond the first `listed` brought a machine. */
export function sumOtherJobs(
  trx: ShopTransaction,
  machine: PaybackMachine,
  listed: number,
): Promise<ItemSums> {
  return sumJobItems(trx, otherJobs(machine, listed));
}

function workInProgress(jobs: JobSelection): RawBuilder<unknown> {
  return sql`
    select j.job_id, ${LAST_WORKED_ON} as on_day, j.title as label, j.number as job, m.work_in_progress as amount
    from ${JOB_WITH_CUSTOMER} ${JOB_FIGURES}
    where ${allOf([isJobSelected(jobs), sql`m.work_in_progress > 0`])}`;
}

/** In the order of `listMachineJobNets`. */
function otherJobs({ machineId, inServiceOn }: PaybackMachine, listed: number): RawBuilder<unknown> {
  return sql`
    select job_id, on_day, label, job, amount from (
      select n.job_id, n.on_day, j.title as label, j.number as job, n.net as amount,
        row_number() over (order by n.net desc, j.number) as place
      from (
        select shop_id, job_id, max(posted_on) as on_day, sum(earned - operator_labour - running) as net
        from machine_job_day
        where machine_id = ${machineId}::uuid and posted_on >= ${inServiceOn}::date
        group by 1, 2
      ) n
      join job j on j.shop_id = n.shop_id and j.job_id = n.job_id
    ) ranked
    where place > ${listed}`;
}

async function listJobItems(
  trx: ShopTransaction,
  items: RawBuilder<unknown>,
  category: string,
  after: KeysetPosition | null,
  limit: number,
): Promise<ItemRow[]> {
  const id = sql`x.job_id`;
  const { rows } = await sql<ItemRow>`
    select x.job_id as id, x.on_day as "on", ${category}::text as category, x.label, x.job,
      x.amount::numeric(16,2) as amount
    from (${items}) x
    where ${isAfter(BY_DATE, id, 'desc', after)}
    order by ${orderByKey(BY_DATE, id, 'desc')}
    limit ${limit}`.execute(trx);
  return rows;
}

async function sumJobItems(trx: ShopTransaction, items: RawBuilder<unknown>): Promise<ItemSums> {
  const { rows } = await sql<ItemSums>`
    select count(*) as lines, coalesce(sum(x.amount), 0)::numeric(16,2) as amount from (${items}) x`.execute(
    trx,
  );
  return rows[0] ?? { lines: 0, amount: '0.00' };
}
