import { type RawBuilder, sql } from 'kysely';
import {
  allOf,
  containing,
  type Direction,
  inReadingOrder,
  isAfter,
  type KeysetPosition,
  orderByKey,
  type SortKey,
} from './keyset';
import { type ShopTransaction } from './tenancy';

/** Which live entries are meant. */
export interface EntrySelection {
  from?: string;
  to?: string;
  employeeId?: string;
  jobId?: string;
  operationId?: string;
  /** The row's machine, else the operation's default. */
  machineId?: string;
  importId?: string;
  search?: string;
}

/** The table that a sort's names stand in, as far as the entry does not hold the value itself. */
const EMPLOYEE = sql`join employee e on e.shop_id = t.shop_id and e.employee_id = t.employee_id`;
const JOB = sql`join job j on j.shop_id = t.shop_id and j.job_id = t.job_id`;
const OPERATION = sql`join operation o on o.shop_id = t.shop_id and o.operation_id = t.operation_id`;
const MACHINE = sql`${OPERATION}
    left join machine m on m.shop_id = t.shop_id and m.machine_id = coalesce(t.machine_id, o.default_machine_id)`;

interface EntrySortKey extends SortKey {
  joins: RawBuilder<unknown>;
}

const SORT_KEYS = {
  workedOn: { expression: sql`t.worked_on`, type: 'date', joins: sql`` },
  employee: { expression: inReadingOrder(sql`e.name`), type: 'text', joins: EMPLOYEE },
  job: { expression: inReadingOrder(sql`j.number`), type: 'text', joins: JOB },
  operation: { expression: inReadingOrder(sql`o.name`), type: 'text', joins: OPERATION },
  machine: { expression: inReadingOrder(sql`m.name`), type: 'text', isNullable: true, joins: MACHINE },
  hours: { expression: sql`t.hours`, type: 'numeric', joins: sql`` },
  goodPieces: { expression: sql`t.good_pieces`, type: 'numeric', isNullable: true, joins: sql`` },
  scrapPieces: { expression: sql`t.scrap_pieces`, type: 'numeric', isNullable: true, joins: sql`` },
} as const satisfies Record<string, EntrySortKey>;

export type EntrySort = keyof typeof SORT_KEYS;

/** The type that a cursor's value has for a sort. */
export function entrySortType(sort: EntrySort): SortKey['type'] {
  return SORT_KEYS[sort].type;
}

/** Where a page goes on, and how far. */
export interface EntryPaging {
  sort: EntrySort;
  direction: Direction;
  after: KeysetPosition | null;
  limit: number;
}

/** Where a row of a timesheet stood; all null for an entry that came from no file. */
export interface SourceColumns {
  importId: string | null;
  fileName: string | null;
  sheet: string | null;
  sourceRow: number | null;
  sourceCell: string | null;
}

export interface EntryRow extends SourceColumns {
  entryId: string;
  workedOn: string;
  employeeId: string;
  employee: string;
  jobId: string;
  jobNumber: string;
  jobTitle: string;
  operation: string;
  machine: string | null;
  hours: string;
  goodPieces: number | null;
  scrapPieces: number | null;
  note: string | null;
  sortValue: string | null;
}

/**
 * A page of live entries in the order of the sort, by keyset: as fast at any depth. The page is cut before it is
 * joined to its names, so that only a page's rows are.
 */
export async function listEntryRows(
  trx: ShopTransaction,
  selection: EntrySelection,
  { sort, direction, after, limit }: EntryPaging,
): Promise<EntryRow[]> {
  const key: EntrySortKey = SORT_KEYS[sort];
  const id = sql`t.entry_id`;
  const { rows } = await sql<EntryRow>`
    with page as (
      select t.*, ${key.expression} as sort_key
      from time_entry t ${key.joins}
      where ${isSelected(selection)} and ${isAfter(key, id, direction, after)}
      order by ${orderByKey(key, id, direction)}
      limit ${limit}
    )
    select t.entry_id, t.worked_on, t.employee_id, e.name as employee, t.job_id, j.number as job_number,
      j.title as job_title, o.name as operation, m.name as machine, t.hours, t.good_pieces, t.scrap_pieces, t.note,
      t.import_id, i.file_name, i.sheet, t.source_row, t.source_cell, t.sort_key::text as sort_value
    from page t ${EMPLOYEE} ${JOB} ${MACHINE}
    left join timesheet_import i on i.shop_id = t.shop_id and i.import_id = t.import_id
    order by ${orderByKey({ ...key, expression: sql`t.sort_key` }, id, direction)}`.execute(trx);
  return rows;
}

export interface EntrySums {
  entries: number;
  hours: string;
  goodPieces: number;
  scrapPieces: number;
}

/** Sums over all live entries of a selection. */
export async function sumEntries(trx: ShopTransaction, selection: EntrySelection): Promise<EntrySums> {
  const { rows } = await sql<EntrySums>`
    select count(*) as entries, coalesce(sum(t.hours), 0)::numeric(14,4) as hours,
      coalesce(sum(t.good_pieces), 0) as good_pieces, coalesce(sum(t.scrap_pieces), 0) as scrap_pieces
    from time_entry t
    where ${isSelected(selection)}`.execute(trx);
  const [sums] = rows;
  if (!sums) throw new Error('An aggregate gave no row.');
  return sums;
}

/** People, operations and machines by name, as filters offer them. */
export async function listEntryChoices(trx: ShopTransaction) {
  const employees = await trx
    .selectFrom('employee')
    .select(['employeeId as id', 'name as label'])
    .orderBy(inReadingOrder(sql`name`))
    .execute();
  const operations = await trx
    .selectFrom('operation')
    .select(['operationId as id', 'name as label'])
    .orderBy(inReadingOrder(sql`name`))
    .execute();
  const machines = await trx
    .selectFrom('machine')
    .select(['machineId as id', 'name as label'])
    .orderBy(inReadingOrder(sql`name`))
    .execute();
  return { employees, operations, machines };
}

/** Names are looked up in their own short tables, so that the entries are read by index and joined to nothing. */
function isSelected(selection: EntrySelection): RawBuilder<boolean> {
  const conditions: RawBuilder<unknown>[] = [sql`t.voided_at is null`];
  const { from, to, employeeId, jobId, operationId, machineId, importId, search } = selection;
  if (from !== undefined) conditions.push(sql`t.worked_on >= ${from}::date`);
  if (to !== undefined) conditions.push(sql`t.worked_on <= ${to}::date`);
  if (employeeId !== undefined) conditions.push(sql`t.employee_id = ${employeeId}::uuid`);
  if (jobId !== undefined) conditions.push(sql`t.job_id = ${jobId}::uuid`);
  if (operationId !== undefined) conditions.push(sql`t.operation_id = ${operationId}::uuid`);
  if (importId !== undefined) conditions.push(sql`t.import_id = ${importId}::uuid`);
  if (machineId !== undefined) conditions.push(isOnMachine(sql`= ${machineId}::uuid`));
  if (search !== undefined && search !== '') conditions.push(isFound(containing(search)));
  return allOf(conditions);
}

function isOnMachine(matches: RawBuilder<unknown>): RawBuilder<boolean> {
  return sql`(t.machine_id ${matches} or (t.machine_id is null and t.operation_id in
    (select operation_id from operation where default_machine_id ${matches})))`;
}

function isFound(pattern: string): RawBuilder<boolean> {
  const machines = sql`in (select machine_id from machine where name ilike ${pattern})`;
  return sql`(
    t.employee_id in (select employee_id from employee where name ilike ${pattern})
    or t.job_id in (select job_id from job where number ilike ${pattern} or title ilike ${pattern})
    or t.operation_id in (select operation_id from operation where name ilike ${pattern})
    or ${isOnMachine(machines)}
    or t.note ilike ${pattern})`;
}
