import { AppError } from '@brakeven/contract';
import {
  type DatedRowValues,
  findDatedRow,
  hasLiveCorrection,
  insertDatedRow,
  lockBooks,
  replaceDatedRow,
  setDatedRowVoided,
  type ShopTransaction,
  type VoidableTable,
} from '@brakeven/database';
import { formatLocalDate, toLocalDate } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext, todayOf } from './context';
import { type ConflictIssues, refusingConflicts } from './refuse-conflict';
import { type RefusedFields, refusingRows } from './refuse-rows';
import { rollUpAfter } from './roll-up-after';

/** Told why costs could not be rolled up after a change that stands. */
export type ChangeTools = Parameters<typeof rollUpAfter>[1];

/** Rows of one kind that are dated and never overwritten. */
export interface DatedRows<T extends VoidableTable> {
  table: T;
  /** The field of the row's date. */
  dateField: keyof DatedRowValues<T> & string;
  fields: RefusedFields;
  conflicts: ConflictIssues;
  /** 'lot', 'outside service': what a message calls one. */
  noun: string;
}

type ToValues<T extends VoidableTable> = (trx: ShopTransaction) => Promise<DatedRowValues<T>>;

/**
 * Adds a dated row under the lock of the books, then rolls up what it changes. Answers the new row's id.
 * @throws AppError `invalid_input` (dated after today, before its job), `conflict` (what the books refuse)
 */
export function addDatedRow<T extends VoidableTable>(
  context: ShopContext,
  rows: DatedRows<T>,
  toValues: ToValues<T>,
  tools: ChangeTools,
): Promise<string> {
  const id = newId();
  return changeBooks(context, rows, tools, async (trx) => {
    const values = await toValues(trx);
    checkDate(context, rows, values);
    await insertDatedRow(trx, rows.table, { shopId: context.shop.shopId, id }, values);
    return id;
  });
}

/**
 * Corrects a dated row: it is voided and another takes its place, whose id is answered.
 * @throws AppError `not_found`; `conflict` if it was voided meanwhile; as `addDatedRow`
 */
export function correctDatedRow<T extends VoidableTable>(
  context: ShopContext,
  rows: DatedRows<T>,
  id: string,
  toValues: ToValues<T>,
  tools: ChangeTools,
): Promise<string> {
  const replacement = { id, newId: newId(), voidedBy: context.actor.name };
  return changeBooks(context, rows, tools, async (trx) => {
    if ((await getDatedRow(trx, rows, id)).isVoided) {
      throw new AppError('conflict', `This ${rows.noun} was voided meanwhile. Load the page again.`);
    }
    const values = await toValues(trx);
    checkDate(context, rows, values);
    await replaceDatedRow(trx, rows.table, replacement, values);
    return replacement.newId;
  });
}

/**
 * Voids a dated row, or takes the voiding back; doing it twice is doing it once.
 * @throws AppError `not_found`; `conflict` (what the books refuse; to restore a row while a correction of it counts)
 */
export async function setVoided<T extends VoidableTable>(
  context: ShopContext,
  rows: DatedRows<T>,
  { id, isVoided }: { id: string; isVoided: boolean },
  tools: ChangeTools,
): Promise<void> {
  await changeBooks(context, rows, tools, async (trx) => {
    const row = await getDatedRow(trx, rows, id);
    if (row.isVoided === isVoided) return;
    if (!isVoided && (await hasLiveCorrection(trx, rows.table, id))) {
      const message = `This ${rows.noun} was corrected, and what took its place counts. Change or void that one instead.`;
      throw new AppError('conflict', message);
    }
    await setDatedRowVoided(trx, rows.table, id, isVoided ? context.actor.name : null);
  });
}

/** One change after the other in a shop, so that two issues at once cannot both take the last sheet. */
async function changeBooks<T extends VoidableTable, R>(
  context: ShopContext,
  { fields, conflicts }: DatedRows<T>,
  tools: ChangeTools,
  work: (trx: ShopTransaction) => Promise<R>,
): Promise<R> {
  const result = await refusingRows(context.shop.units, fields, () =>
    refusingConflicts(conflicts, () =>
      inShopOf(context, async (trx) => {
        await lockBooks(trx, context.shop.shopId);
        return work(trx);
      }),
    ),
  );
  await rollUpAfter(context, tools);
  return result;
}

async function getDatedRow<T extends VoidableTable>(
  trx: ShopTransaction,
  { table, noun }: DatedRows<T>,
  id: string,
): Promise<{ isVoided: boolean }> {
  const row = await findDatedRow(trx, table, id);
  if (row) return row;
  throw new AppError('not_found', `There is no such ${noun}. Load the page again.`);
}

function checkDate<T extends VoidableTable>(
  context: ShopContext,
  { dateField }: DatedRows<T>,
  values: DatedRowValues<T>,
): void {
  const today = todayOf(context);
  const date = toLocalDate(String(values[dateField]));
  if (date <= today) return;
  const message = `${formatLocalDate(date)} is still to come. Date this today, ${formatLocalDate(today)}, or before.`;
  throw new AppError('invalid_input', message, {
    issues: [{ field: dateField, code: 'after_today', message }],
  });
}
