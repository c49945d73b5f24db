import {
  AppError,
  type CostCategory,
  JOB_COST_CATEGORIES,
  type JobDetail,
  type JobLine,
  type JobLinePage,
  type JobLineQuery,
} from '@brakeven/contract';
import {
  type JobLineRow,
  type JobRow,
  type JobSelection,
  listEstimatedOperationHours,
  listJobLineRows,
  listJobOperationSums,
  listJobRows,
  listJobWeekSums,
  type ShopTransaction,
} from '@brakeven/database';
import { rateText, toRate } from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { readEstimate } from '../estimate-jobs/estimate-cost';
import { cutPage, linePositionSchema, readCursor, writeCursor } from '../page-cursor';
import { toLineFacts, toLineFigure, toLineId } from '../show-workings/line-facts';
import { toSourceCell } from '../source-cell';
import { compareJob } from './compare-job';
import { seesMoney, toJob, toJobCost } from './job-dto';

/**
 * A job with its figures, by operation and by week of the shop, and held against its estimate.
 * @throws AppError `not_found`
 */
export function getJob(context: ShopContext, { jobId }: { jobId: string }): Promise<JobDetail> {
  return inShopOf(context, async (trx) => {
    const job = await getJobRow(trx, { jobId });
    const weeks = await listJobWeekSums(trx, jobId, context.shop.weekStart);
    const estimate = seesMoney(context) ? await readEstimate(trx, jobId) : null;
    return {
      ...toJob(context, job),
      byOperation: await listOperations(context, trx, jobId, estimate !== null),
      byWeek: weeks.map(({ total, ...week }) => (seesMoney(context) ? { ...week, total } : week)),
      ...(seesMoney(context) ? { comparison: estimate && (await compareJob(trx, jobId, estimate)) } : {}),
    };
  });
}

/** Operations that were worked, and those that the estimate has besides. */
async function listOperations(
  context: ShopContext,
  trx: ShopTransaction,
  jobId: string,
  isEstimated: boolean,
): Promise<JobDetail['byOperation']> {
  const worked = (await listJobOperationSums(trx, jobId)).map(({ operationId, operation, ...sums }) => ({
    operationId,
    operation,
    ...toJobCost(context, sums),
  }));
  if (!isEstimated) return worked;
  const estimated = await listEstimatedOperationHours(trx, jobId);
  const hoursOf = new Map(estimated.map(({ operationId, hours }) => [operationId, hours]));
  const isWorked = new Set(worked.map(({ operationId }) => operationId));
  const idle = estimated.filter(({ operationId }) => !isWorked.has(operationId));
  return [...worked, ...idle.map(({ hours: _hours, ...names }) => ({ ...names, ...NOTHING }))].map((row) => ({
    ...row,
    estimatedHours: hoursOf.get(row.operationId) ?? NOTHING.hours,
  }));
}

/** What an operation has taken that nobody has worked yet. */
const NOTHING = {
  hours: '0.0000',
  machineHours: '0.0000',
  labour: '0.00',
  overtime: '0.00',
  machine: '0.00',
  overhead: '0.00',
  material: '0.00',
  outside: '0.00',
  total: '0.00',
};

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
  const shown = category ? [category] : JOB_COST_CATEGORIES;
  const categories = seesMoney(context) ? shown : shown.filter(hasMeasure);
  return inShopOf(context, async (trx) => {
    await getJobRow(trx, { jobId });
    const found = await listJobLineRows(trx, jobId, categories, after, limit + 1);
    const { rows, nextCursor } = cutPage(found, limit, ({ postedOn, sourceId, category: last }) =>
      writeCursor(list, { postedOn, sourceId, category: last }),
    );
    return { items: rows.map((row) => toJobLine(context, row)), nextCursor };
  });
}

/** Lines that say something without their money: hours worked and material drawn. */
function hasMeasure(category: CostCategory): boolean {
  return ['labour', 'machine', 'overhead', 'material'].includes(category);
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
  const { category, workedOn, operation, machine, amount } = row;
  const money = {
    rate: rateText(toRate(row.rate)),
    rateFactor: category === 'labour' ? rateText(toRate(row.rateFactor)) : null,
    amount,
    figure: toLineFigure(row),
  };
  return {
    ...toLineFacts(row),
    lineId: toLineId(row),
    workedOn,
    category,
    operation,
    machine,
    ...(seesMoney(context) ? money : {}),
    source: toSourceCell(row),
  };
}
