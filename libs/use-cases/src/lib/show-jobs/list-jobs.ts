import { AppError, type JobListQuery, type JobPage } from '@brakeven/contract';
import { type JobSort, jobSortType, listJobRows, sumJobs } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { cutPage, positionSchema, readCursor, writeCursor } from '../page-cursor';
import { seesMoney, toJob, toJobFigures } from './job-dto';

const MONEY_SORTS: readonly JobSort[] = ['labour', 'machine', 'overhead', 'total', 'quotedPrice'];

/**
 * A page of jobs with their figures, and the totals over all jobs of the filter.
 * @throws AppError `invalid_input` for a cursor of another list; `forbidden` for an order by money to who may not
 *   see it, since the order alone would tell
 */
export async function listJobs(context: ShopContext, query: JobListQuery): Promise<JobPage> {
  const { cursor, limit, sort, direction, status } = query;
  if (MONEY_SORTS.includes(sort) && !seesMoney(context)) {
    throw new AppError('forbidden', 'You may not see money on jobs, so they cannot be sorted by it.');
  }
  const list = `jobs.${sort}.${direction}`;
  const after = readCursor(cursor, list, positionSchema(jobSortType(sort)));
  const selection = { status, search: query.search?.replaceAll('\0', '') };
  return inShopOf(context, async (trx) => {
    const found = await listJobRows(trx, selection, { sort, direction, after, limit: limit + 1 });
    const { jobs, quotedPrice, ...sums } = await sumJobs(trx, selection);
    const { rows, nextCursor } = cutPage(found, limit, (last) =>
      writeCursor(list, { value: last.sortValue, id: last.jobId }),
    );
    return {
      items: rows.map((row) => toJob(context, row)),
      nextCursor,
      totals: { jobs, ...toJobFigures(context, sums), ...(seesMoney(context) ? { quotedPrice } : {}) },
    };
  });
}
