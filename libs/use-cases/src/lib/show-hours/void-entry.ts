import { AppError } from '@brakeven/contract';
import {
  findReplacingEntry,
  findVoidableEntry,
  insertEntryEvent,
  lockBooks,
  type ReplacingEntry,
  setEntryVoided,
  type ShopTransaction,
  sumEmployeeDayHours,
  type VoidableEntry,
} from '@brakeven/database';
import { D, formatHours, formatLocalDate, todayIn, toLocalDate } from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';

const HOURS_PER_DAY = 24;

/**
 * Voids one entry: it counts no longer, and its day is costed again. Voiding it twice is voiding it once.
 * @throws AppError `not_found`
 */
export function voidEntry(context: ShopContext, { entryId }: { entryId: string }): Promise<void> {
  return inShopOf(context, async (trx) => {
    const entry = await getVoidableEntry(trx, entryId);
    if (entry.isVoided) return;
    await setEntryVoided(trx, entryId, context.actor.name);
    await insertEntryEvent(trx, context.shop.shopId, context.actor, 'voided', entry);
  });
}

/**
 * Takes back the voiding of one entry.
 * @throws AppError `not_found`; `conflict` if its whole import was undone, the same entry has been added again
 * meanwhile, or the day would have over 24 hours
 */
export function restoreEntry(context: ShopContext, { entryId }: { entryId: string }): Promise<void> {
  return inShopOf(context, async (trx) => {
    await lockBooks(trx, context.shop.shopId);
    const entry = await getVoidableEntry(trx, entryId);
    if (!entry.isVoided) return;
    await checkRestorable(context, trx, entry);
    await setEntryVoided(trx, entryId, null);
    await insertEntryEvent(trx, context.shop.shopId, context.actor, 'restored', entry);
  });
}

async function getVoidableEntry(trx: ShopTransaction, entryId: string): Promise<VoidableEntry> {
  const entry = await findVoidableEntry(trx, entryId);
  if (entry) return entry;
  throw new AppError('not_found', 'There is no such time entry. Load the hours again.');
}

async function checkRestorable(
  context: ShopContext,
  trx: ShopTransaction,
  entry: VoidableEntry,
): Promise<void> {
  if (entry.isImportUndone) {
    throw new AppError(
      'conflict',
      'The import that brought this entry was undone as a whole. Import the file again instead.',
    );
  }
  const replacing = await findReplacingEntry(trx, entry.entryId);
  if (replacing) throw new AppError('conflict', toReplacedText(context, replacing));
  const onDay = D(await sumEmployeeDayHours(trx, entry.employeeId, entry.workedOn));
  const total = onDay.plus(entry.hours);
  if (total.lte(HOURS_PER_DAY)) return;
  const day = formatLocalDate(toLocalDate(entry.workedOn), 'weekday');
  throw new AppError(
    'conflict',
    `With this entry the employee's ${day} would have ${formatHours(total.toFixed(4))} hours; a day has 24. Void another entry of that day first.`,
  );
}

function toReplacedText({ shop }: ShopContext, replacing: ReplacingEntry): string {
  const { createdAt, fileName, sheet, sourceCell } = replacing;
  const day = formatLocalDate(todayIn(shop.timeZone, createdAt));
  const from = fileName === null ? 'by hand' : `from '${fileName}', sheet ${sheet}, cell ${sourceCell}`;
  return `The same entry was added again ${from} on ${day}, after this one was voided; with both it would count twice. Void that one first if this one is to come back.`;
}
