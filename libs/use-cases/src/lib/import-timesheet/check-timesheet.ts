import { type TimesheetCheck, type TimesheetOptions } from '@brakeven/contract';
import { inShopOf, type ShopContext } from '../context';
import { assessTimesheet } from './assess-timesheet';
import { readTimesheet } from './read-timesheet';
import { toCheckResult } from './to-check-result';
import { type UploadedFile, type UploadTools } from './upload';

/**
 * Reads and checks a timesheet against the shop; writes nothing. Chosen spellings and mapping are tried, not kept.
 * A file whose columns are not all known is answered with what was found, for mapping by hand.
 * @throws AppError `file_refused`, `invalid_input`
 */
export async function checkTimesheet(
  context: ShopContext,
  file: UploadedFile,
  options: Partial<TimesheetOptions>,
  tools: UploadTools,
): Promise<TimesheetCheck> {
  const reading = await readTimesheet(context, file, options, tools);
  const assessment = await inShopOf(context, (trx) => assessTimesheet(trx, context, reading, options, tools));
  const check = toCheckResult(reading, assessment);
  const { rowsRead } = check;
  tools.onProgress?.({ stage: 'done', done: rowsRead, total: rowsRead, message: 'The check is done' });
  return check;
}
