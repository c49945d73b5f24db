import { AppError, JOB_COST_CATEGORIES, type JobFilter } from '@brakeven/contract';
import { computeMargin } from '@brakeven/costing';
import { findThrough, type JobRow, type KeysetPosition, listJobRows } from '@brakeven/database';
import { hoursText, moneyText, toMoney } from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { readEstimate, readEstimates, type StoredEstimate } from '../estimate-jobs/estimate-cost';
import { getJobRow } from './get-job';
import { seesMoney } from './job-dto';
import { toJobSelection } from './list-jobs';

type Category = (typeof JOB_COST_CATEGORIES)[number];

/** What a job cost, for the command line. */
export interface JobCostSummary extends Record<Category, string> {
  job: string;
  /** The last day in the costs; null before the first rollup. */
  through: string | null;
  hours: string;
  total: string;
  invoiced: string;
  margin: string;
  marginIsProvisional: boolean;
  workInProgress: string;
  /** The same as estimated: `invoiced` is the quoted price; null without an estimate. */
  estimate: EstimateSummary | null;
}

/** What a job was estimated to cost; income and margin are null without a quoted price. */
export interface EstimateSummary extends Record<Category, string> {
  hours: string;
  total: string;
  invoiced: string | null;
  margin: string | null;
}

/**
 * What a job has cost through the last day rolled up, by its number, beside its estimate.
 * @throws AppError `not_found`, `forbidden` without `jobs.money`
 */
export async function getJobCost(context: ShopContext, number: string): Promise<JobCostSummary> {
  if (!seesMoney(context)) throw new AppError('forbidden', 'You may not see money on jobs.');
  return inShopOf(context, async (trx) => {
    const job = await getJobRow(trx, { number: number.trim() });
    const estimate = await readEstimate(trx, job.jobId);
    return toSummary(job, await findThrough(trx), estimate);
  });
}

/** A job of a list as the command line tells it: what `getJobCost` tells, and what the job is. */
export interface ListedJobCost
  extends JobCostSummary, Pick<JobRow, 'number' | 'title' | 'customer' | 'status' | 'quotedPrice' | 'dueOn'> {
  machineHours: string;
  /** Cost − estimate; null without an estimate. */
  variance: string | null;
  lastWorkedOn: string | null;
  entriesWithoutRate: number;
}

const PAGE_SIZE = 500;

/**
 * What all jobs of a filter have cost, by number.
 * @throws AppError `forbidden` without `jobs.money`
 */
export async function listJobCosts(context: ShopContext, filter: JobFilter): Promise<ListedJobCost[]> {
  if (!seesMoney(context)) throw new AppError('forbidden', 'You may not see money on jobs.');
  const selection = toJobSelection(filter);
  return inShopOf(context, async (trx) => {
    const through = await findThrough(trx);
    const jobs: ListedJobCost[] = [];
    let after: KeysetPosition | null = null;
    do {
      const paging = { sort: 'number', direction: 'asc', after, limit: PAGE_SIZE } as const;
      const rows: JobRow[] = await listJobRows(trx, selection, paging);
      const estimates = await readEstimates(
        trx,
        rows.map((row) => row.jobId),
      );
      jobs.push(...rows.map((row) => toListed(row, through, estimates.get(row.jobId) ?? null)));
      const last: JobRow | undefined = rows.at(-1);
      after = last && rows.length === PAGE_SIZE ? { value: last.sortValue, id: last.jobId } : null;
    } while (after !== null);
    return jobs;
  });
}

function toListed(row: JobRow, through: string | null, estimate: StoredEstimate | null): ListedJobCost {
  const { number, title, customer, status, quotedPrice, dueOn } = row;
  const { machineHours, variance, lastWorkedOn, entriesWithoutRate } = row;
  return {
    number,
    title,
    customer,
    status,
    quotedPrice,
    dueOn,
    machineHours,
    lastWorkedOn,
    entriesWithoutRate,
    variance,
    ...toSummary(row, through, estimate),
  };
}

function toSummary(job: JobRow, through: string | null, estimate: StoredEstimate | null): JobCostSummary {
  return {
    job: job.number,
    through,
    hours: job.hours,
    labour: job.labour,
    overtime: job.overtime,
    machine: job.machine,
    overhead: job.overhead,
    material: job.material,
    outside: job.outside,
    total: job.total,
    invoiced: job.invoiced,
    margin: job.margin,
    marginIsProvisional: job.marginIsProvisional,
    workInProgress: job.workInProgress,
    estimate: estimate && toEstimateSummary(estimate, job.quotedPrice),
  };
}

function toEstimateSummary({ cost }: StoredEstimate, quotedPrice: string | null): EstimateSummary {
  const amounts = JOB_COST_CATEGORIES.map((category) => [category, moneyText(cost.figures[category].amount)]);
  return {
    hours: hoursText(cost.hours),
    ...(Object.fromEntries(amounts) as Record<Category, string>),
    total: moneyText(cost.total),
    invoiced: quotedPrice,
    margin: quotedPrice === null ? null : moneyText(computeMargin(toMoney(quotedPrice), cost.total)),
  };
}
