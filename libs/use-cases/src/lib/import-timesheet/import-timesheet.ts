import {
  AppError,
  type TimesheetCheck,
  type TimesheetImported,
  type TimesheetOptions,
} from '@brakeven/contract';
import { lockBooks, saveAliases, saveMapping, type ShopTransaction } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { rollUpAfter } from '../roll-up-after';
import { assessTimesheet, type Assessment } from './assess-timesheet';
import { listAliasesToSave } from './name-indexes';
import { readTimesheet, type TimesheetReading } from './read-timesheet';
import { toCheckResult } from './to-check-result';
import { type UploadedFile, type UploadTools } from './upload';
import { writeImport } from './write-import';

/**
 * Takes a timesheet in: reads it, checks it as `checkTimesheet` does, and writes what is new in one transaction,
 * together with the file itself, the chosen spellings and the chosen mapping. Then costs are rolled up.
 *
 * Once it has what a file says, the shop is left as it is: the same file again adds nothing.
 * @throws AppError `file_refused`, `invalid_input`, `mapping_incomplete`, and `rows_refused` (with the check as
 *   details) unless the good rows were asked for; nothing is written then
 */
export async function importTimesheet(
  context: ShopContext,
  file: UploadedFile,
  options: Partial<TimesheetOptions>,
  tools: UploadTools,
): Promise<TimesheetImported> {
  const reading = await readTimesheet(context, file, options, tools);
  const imported = await inShopOf(context, async (trx) => {
    // Whoever comes second waits here, and then finds the entries of whoever came first.
    await lockBooks(trx, context.shop.shopId);
    const assessment = await assessTimesheet(trx, context, reading, options, tools);
    const check = toCheckResult(reading, assessment);
    refuseIncomplete(check);
    refuseBadRows(check, options.goodRows ?? false);
    await remember(trx, context, reading, assessment, options);
    const importId =
      check.entriesReady === 0 ? null : await writeImport(trx, context, file, check, assessment, tools);
    return { ...check, importId, entriesAdded: check.entriesReady, hoursAdded: check.hoursReady };
  });
  if (imported.importId !== null) await rollUpAfter(context, tools);
  tools.onProgress?.({ ...countAdded(imported), stage: 'done', message: 'The timesheet is in' });
  return imported;
}

function refuseIncomplete(check: TimesheetCheck): void {
  if (check.missingFields.length === 0) return;
  const [message = 'The columns are not known.'] = check.problems.map((problem) => problem.message);
  const issues = check.missingFields.map((field) => ({
    field: `mapping.columns.${field}`,
    code: 'column_missing',
    message: `Say which column holds ${field}.`,
  }));
  throw new AppError('mapping_incomplete', message, { issues, details: check });
}

const ISSUES_MAX = 100;

function refuseBadRows(check: TimesheetCheck, goodRowsOnly: boolean): void {
  if (check.refused === 0 || goodRowsOnly) return;
  const subject = `${check.refused} of ${check.rowsRead} ${check.rowsRead === 1 ? 'row' : 'rows'}`;
  const message =
    check.refused === 1
      ? `${subject} is refused, so nothing was written. Put it right, or import the good rows without it.`
      : `${subject} are refused, so nothing was written. Put them right, or import the good rows without them.`;
  const issues = check.problems
    .filter(({ severity }) => severity === 'refused')
    .slice(0, ISSUES_MAX)
    .map(({ sheet, cell, code, message }) => ({ field: `${sheet}!${cell}`, code, message }));
  throw new AppError('rows_refused', message, { issues, details: check });
}

/** A recognised mapping is not kept: what the header words say is found as well next time. */
async function remember(
  trx: ShopTransaction,
  context: ShopContext,
  { mapping, mappingFrom, headerSignature }: TimesheetReading,
  { register }: Assessment,
  { aliases = [] }: Partial<TimesheetOptions>,
): Promise<void> {
  const { shopId } = context.shop;
  await saveAliases(trx, shopId, listAliasesToSave(register, aliases));
  if (mappingFrom !== 'chosen' || headerSignature === null) return;
  await saveMapping(trx, shopId, { headerSignature, mapping });
}

function countAdded({ entriesAdded }: TimesheetImported): { done: number; total: number } {
  return { done: entriesAdded, total: entriesAdded };
}
