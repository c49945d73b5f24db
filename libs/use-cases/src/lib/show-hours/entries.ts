import {
  type EntryChoices,
  type EntryFilter,
  type EntryListQuery,
  type EntryPage,
  type EntryTotals,
  hasPermission,
  type TimeEntry,
} from '@brakeven/contract';
import {
  type EntryRow,
  type EntrySelection,
  entrySortType,
  listEntryChoices,
  listEntryRows,
  sumEntries,
} from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { cutPage, positionSchema, readCursor, writeCursor } from '../page-cursor';
import { toSourceCell } from '../source-cell';

/**
 * A page of live time entries; who may only see the own hours gets those.
 * @throws AppError `invalid_input` for a cursor of another list
 */
export async function listEntries(context: ShopContext, query: EntryListQuery): Promise<EntryPage> {
  const { cursor, limit, sort, direction, ...filter } = query;
  const list = `entries.${sort}.${direction}`;
  const after = readCursor(cursor, list, positionSchema(entrySortType(sort)));
  const selection = toSelection(context, filter);
  if (selection === null) return { items: [], nextCursor: null };
  const found = await inShopOf(context, (trx) =>
    listEntryRows(trx, selection, { sort, direction, after, limit: limit + 1 }),
  );
  const { rows, nextCursor } = cutPage(found, limit, (last) =>
    writeCursor(list, { value: last.sortValue, id: last.entryId }),
  );
  return { items: rows.map(toTimeEntry), nextCursor };
}

/** Totals over all entries of a filter, not only a page of them. */
export async function getEntryTotals(context: ShopContext, filter: EntryFilter): Promise<EntryTotals> {
  const selection = toSelection(context, filter);
  if (selection === null) return { entries: 0, hours: '0.0000', goodPieces: 0, scrapPieces: 0 };
  return inShopOf(context, (trx) => sumEntries(trx, selection));
}

/** What the filters offer: to who sees only the own hours, no other people. */
export async function getEntryChoices(context: ShopContext): Promise<EntryChoices> {
  const choices = await inShopOf(context, listEntryChoices);
  if (seesAll(context)) return choices;
  const employees = choices.employees.filter(({ id }) => id === context.actor.employeeId);
  return { ...choices, employees };
}

function seesAll({ actor }: ShopContext): boolean {
  return hasPermission(actor.role, 'hours.all');
}

/** Null if nothing can be seen: an account without an employee, or the hours of somebody else. */
function toSelection(context: ShopContext, filter: EntryFilter): EntrySelection | null {
  const search = filter.search?.replaceAll('\0', '');
  if (seesAll(context)) return { ...filter, search };
  const { employeeId } = context.actor;
  if (employeeId === null || (filter.employeeId ?? employeeId) !== employeeId) return null;
  return { ...filter, search, employeeId };
}

function toTimeEntry(row: EntryRow): TimeEntry {
  const { entryId, workedOn, employeeId, employee, jobId, jobNumber, jobTitle, operation, machine } = row;
  const { hours, goodPieces, scrapPieces, note } = row;
  return {
    entryId,
    workedOn,
    employeeId,
    employee,
    jobId,
    jobNumber,
    jobTitle,
    operation,
    machine,
    hours,
    goodPieces,
    scrapPieces,
    note,
    source: toSourceCell(row),
  };
}
