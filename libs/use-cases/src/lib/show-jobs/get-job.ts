import {
  AppError,
  JOB_COST_CATEGORIES,
  type JobDetail,
  type JobLine,
  type JobLinePage,
  type JobLineQuery,
} from '@brakeven/contract';
import {
  findThrough,
  type JobLineRow,
  type JobRow,
  type JobSelection,
  listJobLineRows,
  listJobOperationSums,
  listJobRows,
  listJobWeekSums,
  type ShopTransaction,
} from '@brakeven/database';
import { rateText, toRate } from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { cutPage, linePositionSchema, readCursor, writeCursor } from '../page-cursor';
import { toSourceCell } from '../source-cell';
import { seesMoney, toJob, toJobFigures } from './job-dto';

/**
 * A job with its figures, by operation and by week of the shop.
 * @throws AppError `not_found`
 */
export function getJob(context: ShopContext, { jobId }: { jobId: string }): Promise<JobDetail> {
  return inShopOf(context, async (trx) => {
    const job = await getJobRow(trx, { jobId });
    const operations = await listJobOperationSums(trx, jobId);
    const weeks = await listJobWeekSums(trx, jobId, context.shop.weekStart);
    return {
      ...toJob(context, job),
      byOperation: operations.map(({ operationId, operation, ...sums }) => ({
        operationId,
        operation,
        ...toJobFigures(context, sums),
      })),
      byWeek: weeks.map(({ total, ...week }) => (seesMoney(context) ? { ...week, total } : week)),
    };
  });
}

/**
 * A page of the lines that a job's cost is the sum of, latest first; of one category if asked for.
 * @throws AppError `not_found`, `invalid_input` for a cursor of another list
 */
export async function listJobLines(
  context: ShopContext,
  query: { jobId: string } & JobLineQuery,
): Promise<JobLinePage> {
  const { jobId, category, cursor, limit } = query;
  const list = `job-lines.${category ?? 'cost'}`;
  const after = readCursor(cursor, list, linePositionSchema);
  const categories = category ? [category] : JOB_COST_CATEGORIES;
  return inShopOf(context, async (trx) => {
    await getJobRow(trx, { jobId });
    const found = await listJobLineRows(trx, jobId, categories, after, limit + 1);
    const { rows, nextCursor } = cutPage(found, limit, ({ postedOn, sourceId, category: last }) =>
      writeCursor(list, { postedOn, sourceId, category: last }),
    );
    return { items: rows.map((row) => toJobLine(context, row)), nextCursor };
  });
}

/** What a job cost, for the command line. */
export interface JobCostSummary {
  job: string;
  /** The last day in the costs; null before the first rollup. */
  through: string | null;
  hours: string;
  labour: string;
  machine: string;
  overhead: string;
  total: string;
}

/**
 * What a job has cost through the last day rolled up, by its number.
 * @throws AppError `not_found`
 */
export function getJobCost(context: ShopContext, number: string): Promise<JobCostSummary> {
  return inShopOf(context, async (trx) => {
    const job = await getJobRow(trx, { number: number.trim() });
    const { hours, labour, machine, overhead, total } = job;
    return { job: job.number, through: await findThrough(trx), hours, labour, machine, overhead, total };
  });
}

/** Reads the one job that is meant. */
export async function getJobRow(trx: ShopTransaction, selection: JobSelection): Promise<JobRow> {
  const paging = { sort: 'number', direction: 'asc', after: null, limit: 1 } as const;
  const [job] = await listJobRows(trx, selection, paging);
  if (job) return job;
  const words = selection.number === undefined ? '' : ` ${selection.number}`;
  throw new AppError('not_found', `There is no job${words}. Check the number on the Jobs page.`);
}

function toJobLine(context: ShopContext, row: JobLineRow): JobLine {
  const { sourceId, category, workedOn, employee, operation, machine, hours, amount } = row;
  const money = {
    rate: rateText(toRate(row.rate)),
    rateFactor: category === 'labour' ? rateText(toRate(row.rateFactor)) : null,
    amount,
  };
  return {
    lineId: `${sourceId}.${category}`,
    workedOn,
    category,
    employee,
    operation,
    machine,
    hours,
    ...(seesMoney(context) ? money : {}),
    source: toSourceCell(row),
  };
}
