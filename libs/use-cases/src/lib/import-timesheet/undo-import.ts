import { AppError, type TimesheetUndone } from '@brakeven/contract';
import { findImportRow, lockBooks, markImportUndone, voidImportEntries } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { rollUpAfter } from '../roll-up-after';
import { toImportNotFound } from '../timesheet-history/list-imports';
import { type UploadTools } from './upload';

/**
 * Takes a whole import back: voids those of its entries that are still live and says how many and how many hours
 * those were. The import and its file stay in the history, and the file can come again.
 * @throws AppError `import_not_found`, `already_undone`
 */
export async function undoImport(
  context: ShopContext,
  { importId }: { importId: string },
  _body?: unknown,
  tools: Partial<UploadTools> = {},
): Promise<TimesheetUndone> {
  const { shopId } = context.shop;
  const undone = await inShopOf(context, async (trx) => {
    await lockBooks(trx, shopId);
    const row = await findImportRow(trx, shopId, importId);
    if (!row) throw toImportNotFound();
    if (row.status === 'undone') {
      throw new AppError('already_undone', `'${row.fileName}' was already undone by ${row.undoneBy}.`);
    }
    const voided = await voidImportEntries(trx, shopId, importId, context.actor.name);
    await markImportUndone(trx, shopId, importId, context.actor.name);
    return voided;
  });
  await rollUpAfter(context, tools);
  return undone;
}
