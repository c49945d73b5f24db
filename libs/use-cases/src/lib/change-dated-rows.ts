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

/** Rows of one kind that are dated and never overwritten, each part of what a parent has: a job, a material. */
export interface DatedRows<T extends VoidableTable, Id extends string, Parent, Body, Item> {
  table: T;
  /** What a request calls the id of a row. */
  idField: Id;
  /** The field of the row's date. */
  dateField: keyof DatedRowValues<T> & string;
  fields: RefusedFields;
  conflicts: ConflictIssues;
  /** 'lot', 'outside service': what a message calls one. */
  noun: string;
  /** What the row that is corrected is part of; refuses a row that is not there. */
  getParent(trx: ShopTransaction, id: string): Promise<Parent>;
  /** What is kept of a row; refuses a parent that is not there, and a body that comes to nothing. */
  toValues(trx: ShopTransaction, parent: Parent, body: Body): Promise<DatedRowValues<T>>;
  /** A row as it is answered once it is written and rolled up. */
  toItem(context: ShopContext, id: string, values: DatedRowValues<T>): Promise<Item>;
}

/** What may be done to rows of one kind. */
export interface DatedRowChanges<Id extends string, Parent, Body, Item> {
  /**
   * Adds a row under the lock of the books, then rolls up what it changes.
   * @throws AppError `not_found` (parent), `invalid_input` (dated after today, before its job), `conflict` (what the
   *   books refuse)
   */
  create(context: ShopContext, parent: Parent, body: Body, tools?: ChangeTools): Promise<Item>;
  /**
   * Corrects a row: it is voided and another takes its place.
   * @throws AppError `not_found`; `conflict` if it was voided meanwhile; as `create`
   */
  correct(context: ShopContext, ref: Record<Id, string>, body: Body, tools?: ChangeTools): Promise<Item>;
  /**
   * Voids a row; doing it twice is doing it once.
   * @throws AppError `not_found`, `conflict` (what the books refuse)
   */
  void(context: ShopContext, ref: Record<Id, string>, tools?: ChangeTools): Promise<void>;
  /**
   * Takes the voiding of a row back; doing it twice is doing it once.
   * @throws AppError `not_found`, `invalid_input`, `conflict` (what the books refuse by now; while a correction of the
   *   row counts)
   */
  restore(context: ShopContext, ref: Record<Id, string>, tools?: ChangeTools): Promise<void>;
}

/** The changes of rows of one kind, which are the same for all kinds. */
export function changeDatedRows<T extends VoidableTable, Id extends string, Parent, Body, Item>(
  rows: DatedRows<T, Id, Parent, Body, Item>,
): DatedRowChanges<Id, Parent, Body, Item> {
  return {
    create: async (context, parent, body, tools = {}) => {
      const toValues: ToValues<T> = (trx) => rows.toValues(trx, parent, body);
      const { id, values } = await addRow(context, rows, toValues, tools);
      return rows.toItem(context, id, values);
    },
    correct: async (context, ref, body, tools = {}) => {
      const toValues: ToValues<T> = async (trx) =>
        rows.toValues(trx, await rows.getParent(trx, ref[rows.idField]), body);
      const { id, values } = await correctRow(context, rows, ref[rows.idField], toValues, tools);
      return rows.toItem(context, id, values);
    },
    void: (context, ref, tools = {}) => setVoided(context, rows, ref[rows.idField], true, tools),
    restore: (context, ref, tools = {}) => setVoided(context, rows, ref[rows.idField], false, tools),
  };
}

/** How rows of a kind are kept and refused, whatever their parents and bodies. */
type KeptRows<T extends VoidableTable> = Pick<
  DatedRows<T, string, never, never, unknown>,
  'table' | 'dateField' | 'fields' | 'conflicts' | 'noun'
>;
type ToValues<T extends VoidableTable> = (trx: ShopTransaction) => Promise<DatedRowValues<T>>;

interface WrittenRow<T extends VoidableTable> {
  id: string;
  values: DatedRowValues<T>;
}

function addRow<T extends VoidableTable>(
  context: ShopContext,
  rows: KeptRows<T>,
  toValues: ToValues<T>,
  tools: ChangeTools,
): Promise<WrittenRow<T>> {
  const id = newId();
  return changeBooks(context, rows, tools, async (trx) => {
    const values = await toValues(trx);
    checkDate(context, rows, values);
    await insertDatedRow(trx, rows.table, { shopId: context.shop.shopId, id }, values);
    return { id, values };
  });
}

function correctRow<T extends VoidableTable>(
  context: ShopContext,
  rows: KeptRows<T>,
  id: string,
  toValues: ToValues<T>,
  tools: ChangeTools,
): Promise<WrittenRow<T>> {
  const replacement = { id, newId: newId(), voidedBy: context.actor.name };
  return changeBooks(context, rows, tools, async (trx) => {
    if ((await getDatedRow(trx, rows, id)).isVoided) {
      throw new AppError('conflict', `This ${rows.noun} was voided meanwhile. Load the page again.`);
    }
    const values = await toValues(trx);
    checkDate(context, rows, values);
    await replaceDatedRow(trx, rows.table, replacement, values);
    return { id: replacement.newId, values };
  });
}

async function setVoided<T extends VoidableTable>(
  context: ShopContext,
  rows: KeptRows<T>,
  id: string,
  isVoided: boolean,
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
  { fields, conflicts }: KeptRows<T>,
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
  { table, noun }: KeptRows<T>,
  id: string,
): Promise<{ isVoided: boolean }> {
  const row = await findDatedRow(trx, table, id);
  if (row) return row;
  throw new AppError('not_found', `There is no such ${noun}. Load the page again.`);
}

function checkDate<T extends VoidableTable>(
  context: ShopContext,
  { dateField }: KeptRows<T>,
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
