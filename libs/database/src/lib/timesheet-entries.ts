import { sql } from 'kysely';
import { v7 as newId } from 'uuid';
import { type ShopTransaction } from './tenancy';

/** Entries that are alike in everything that makes the natural key. */
export interface StoredEntryGroup {
  employeeId: string;
  workedOn: string;
  jobId: string;
  operationId: string;
  machineId: string | null;
  hours: string;
  entries: number;
}

/** An entry as a timesheet gives it. */
export interface NewTimeEntry {
  workedOn: string;
  employeeId: string;
  jobId: string;
  operationId: string;
  machineId: string | null;
  /** At most four decimals. */
  hours: string;
  goodPieces: number | null;
  scrapPieces: number | null;
  note: string | null;
  sourceRow: number;
  sourceCell: string;
}

export interface VoidedEntries {
  entriesVoided: number;
  hoursVoided: string;
}

/** The live entries of the given days, counted by natural key. */
export async function countStoredEntries(
  trx: ShopTransaction,
  shopId: string,
  days: readonly string[],
): Promise<StoredEntryGroup[]> {
  if (days.length === 0) return [];
  const { rows } = await sql<StoredEntryGroup>`
    select employee_id, worked_on, job_id, operation_id, machine_id, hours, count(*) as entries
    from time_entry
    where shop_id = ${shopId} and worked_on = any(${[...days]}::date[]) and voided_at is null
    group by employee_id, worked_on, job_id, operation_id, machine_id, hours`.execute(trx);
  return rows;
}

/** The entries of the given days that somebody voided one by one, not by undoing their import; counted likewise. */
export async function countVoidedEntries(
  trx: ShopTransaction,
  shopId: string,
  days: readonly string[],
): Promise<StoredEntryGroup[]> {
  if (days.length === 0) return [];
  const { rows } = await sql<StoredEntryGroup>`
    select employee_id, worked_on, job_id, operation_id, machine_id, hours, count(*) as entries
    from time_entry t
    where shop_id = ${shopId} and worked_on = any(${[...days]}::date[]) and voided_at is not null
      and not exists (select from timesheet_import i
        where i.shop_id = t.shop_id and i.import_id = t.import_id and i.status = 'undone')
    group by employee_id, worked_on, job_id, operation_id, machine_id, hours`.execute(trx);
  return rows;
}

/** Entries that one statement writes; more gain nothing, fewer cost round trips. */
export const ENTRIES_PER_INSERT = 1_000;

/**
 * Adds entries of an import in one statement: one array a column, which is most of the speed of COPY.
 * Give at most {@link ENTRIES_PER_INSERT}, in the order of their days, so that neighbours in time are neighbours
 * in the indexes.
 */
export async function insertTimeEntries(
  trx: ShopTransaction,
  shopId: string,
  importId: string,
  entries: readonly NewTimeEntry[],
): Promise<void> {
  const column = <K extends keyof NewTimeEntry>(name: K) => entries.map((entry) => entry[name]);
  await sql`
    insert into time_entry (shop_id, import_id, entry_id, worked_on, employee_id, job_id, operation_id, machine_id,
      hours, good_pieces, scrap_pieces, note, source_row, source_cell)
    select ${shopId}::uuid, ${importId}::uuid, given.*
    from unnest(${entries.map(() => newId())}::uuid[], ${column('workedOn')}::date[],
      ${column('employeeId')}::uuid[], ${column('jobId')}::uuid[], ${column('operationId')}::uuid[],
      ${column('machineId')}::uuid[], ${column('hours')}::numeric[], ${column('goodPieces')}::integer[],
      ${column('scrapPieces')}::integer[], ${column('note')}::text[], ${column('sourceRow')}::integer[],
      ${column('sourceCell')}::text[]) as given`.execute(trx);
}

/** Voids all entries of an import that are still live, and says how many and how many hours those were. */
export async function voidImportEntries(
  trx: ShopTransaction,
  shopId: string,
  importId: string,
  voidedBy: string,
): Promise<VoidedEntries> {
  const { rows } = await sql<VoidedEntries>`
    with voided as (
      update time_entry set voided_at = now(), voided_by = ${voidedBy}
      where shop_id = ${shopId} and import_id = ${importId} and voided_at is null
      returning hours
    )
    select count(*) as entries_voided, coalesce(sum(hours), 0)::numeric(12,4) as hours_voided
    from voided`.execute(trx);
  const [voided] = rows;
  if (!voided) throw new Error('An aggregate without groups always has one row.');
  return voided;
}
