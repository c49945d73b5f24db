import { AppError, type JobFilter, type JobListQuery, type JobPage, type JobSort } from '@brakeven/contract';
import { type JobSelection, jobSortType, type JobTotals, listJobRows, sumJobs } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { cutPage, positionSchema, readCursor, writeCursor } from '../page-cursor';
import { seesMoney, toJob, toJobFigures } from './job-dto';

/** What may be sorted by without seeing money; an order by money, or by an estimate, would tell it. */
const PLAIN_SORTS: readonly JobSort[] = [
  'number',
  'customer',
  'title',
  'status',
  'quantity',
  'openedOn',
  'dueOn',
  'hours',
  'machineHours',
  'lastWorkedOn',
];

/**
 * A page of jobs with their figures, and the totals over all jobs of the filter.
 * @throws AppError `invalid_input` for a cursor of another list; `forbidden` for an order by money to who may not
 *   see it, since the order alone would tell
 */
export async function listJobs(context: ShopContext, query: JobListQuery): Promise<JobPage> {
  const { cursor, limit, sort, direction } = query;
  checkJobSort(context, sort);
  const list = `jobs.${sort}.${direction}`;
  const after = readCursor(cursor, list, positionSchema(jobSortType(sort)));
  const selection = toJobSelection(query);
  return inShopOf(context, async (trx) => {
    const found = await listJobRows(trx, selection, { sort, direction, after, limit: limit + 1 });
    const sums = await sumJobs(trx, selection);
    const { rows, nextCursor } = cutPage(found, limit, (last) =>
      writeCursor(list, { value: last.sortValue, id: last.jobId }),
    );
    return {
      items: rows.map((row) => toJob(context, row)),
      nextCursor,
      totals: toTotals(context, sums),
    };
  });
}

function toTotals(context: ShopContext, sums: JobTotals): JobPage['totals'] {
  const { jobs, quotedPrice, comparedJobs, comparedCost, comparedEstimate } = sums;
  const ofMoney = seesMoney(context) ? { quotedPrice, comparedJobs, comparedCost, comparedEstimate } : {};
  return { jobs, ...toJobFigures(context, sums), ...ofMoney };
}

/**
 * Refuses an order by what the actor may not see.
 * @throws AppError `forbidden`
 */
export function checkJobSort(context: ShopContext, sort: JobSort): void {
  if (isPlainSort(sort) || seesMoney(context)) return;
  throw new AppError('forbidden', 'You may not see money on jobs, so they cannot be sorted by it.');
}

/** A filter as the database takes it. */
export function toJobSelection({ search, status, customerId }: JobFilter): JobSelection {
  return { status, customerId, search: search?.replaceAll('\0', '') };
}

/** Whether a column tells nothing of money or of estimates. */
export function isPlainSort(sort: JobSort): boolean {
  return PLAIN_SORTS.includes(sort);
}
