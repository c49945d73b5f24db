import { AppError, type Job, type JobInput, type JobStatus } from '@brakeven/contract';
import {
  insertJob,
  listCustomerRows,
  obtainCustomer,
  type ShopTransaction,
  updateJobRow,
} from '@brakeven/database';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';
import { refusingConflicts } from '../refuse-conflict';
import { refusingRows } from '../refuse-rows';
import { getJobRow } from './get-job';
import { toJob } from './job-dto';

const CONFLICTS = {
  job_shop_id_number_key: { field: 'number', message: 'Another job has this number.' },
};

/**
 * Adds a job; a customer whose name is new is added with it.
 * @throws AppError `conflict` (number taken)
 */
export function createJob(context: ShopContext, body: JobInput): Promise<Job> {
  const jobId = newId();
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      const values = await toValues(context, trx, body);
      await insertJob(trx, { shopId: context.shop.shopId, jobId, ...values });
      return toJob(context, await getJobRow(trx, { jobId }));
    }),
  );
}

/**
 * Changes a job; making it billable or not marks its days for the next rollup.
 * @throws AppError `not_found`, `conflict` (number taken), `invalid_input` (opened after its own dated rows)
 */
export function updateJob(context: ShopContext, { jobId }: { jobId: string }, body: JobInput): Promise<Job> {
  return refusingRows(context.shop.units, { 'before-job': 'openedOn' }, () =>
    refusingConflicts(CONFLICTS, () =>
      inShopOf(context, async (trx) => {
        const isThere = await updateJobRow(trx, jobId, await toValues(context, trx, body));
        if (!isThere) throw new AppError('not_found', 'There is no such job. Load the jobs again.');
        return toJob(context, await getJobRow(trx, { jobId }));
      }),
    ),
  );
}

/**
 * Says where a job stands: its margin is final once it is finished, and its work in progress follows.
 * @throws AppError `not_found`
 */
export function changeJobStatus(
  context: ShopContext,
  { jobId }: { jobId: string },
  { status }: { status: JobStatus },
): Promise<Job> {
  return inShopOf(context, async (trx) => {
    const isThere = await updateJobRow(trx, jobId, { status });
    if (!isThere) throw new AppError('not_found', 'There is no such job. Load the jobs again.');
    return toJob(context, await getJobRow(trx, { jobId }));
  });
}

/** Names of customers, for the form. */
export function listCustomers(context: ShopContext): Promise<{ customerId: string; name: string }[]> {
  return inShopOf(context, listCustomerRows);
}

async function toValues(context: ShopContext, trx: ShopTransaction, body: JobInput) {
  const { customer, ...values } = body;
  const customerId = customer ? await obtainCustomer(trx, context.shop.shopId, customer) : null;
  return { ...values, customerId };
}
