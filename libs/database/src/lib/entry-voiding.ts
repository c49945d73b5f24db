import { sql } from 'kysely';
import { type ShopTransaction } from './tenancy';

/** An entry as voiding and restoring need it. */
export interface VoidableEntry {
  entryId: string;
  employeeId: string;
  workedOn: string;
  hours: string;
  jobNumber: string;
  isVoided: boolean;
  isImportUndone: boolean;
}

/** Finds an entry, voided or not, and keeps others from changing it until the transaction ends. */
export async function findVoidableEntry(
  trx: ShopTransaction,
  entryId: string,
): Promise<VoidableEntry | null> {
  const { rows } = await sql<VoidableEntry>`
    select t.entry_id, t.employee_id, t.worked_on, t.hours, j.number as job_number,
      t.voided_at is not null as is_voided, coalesce(i.status = 'undone', false) as is_import_undone
    from time_entry t
    join job j on j.shop_id = t.shop_id and j.job_id = t.job_id
    left join timesheet_import i on i.shop_id = t.shop_id and i.import_id = t.import_id
    where t.entry_id = ${entryId}::uuid
    for update of t`.execute(trx);
  return rows[0] ?? null;
}

/** A live entry that came after another was voided and says the same; where it came from. */
export interface ReplacingEntry {
  entryId: string;
  createdAt: Date;
  fileName: string | null;
  sheet: string | null;
  sourceCell: string | null;
}

/**
 * Finds what took a voided entry's place: the same employee, day, job, operation, machine and hours, added after the
 * voiding. Equal rows that stood beside it before are no replacement.
 */
export async function findReplacingEntry(
  trx: ShopTransaction,
  entryId: string,
): Promise<ReplacingEntry | null> {
  const { rows } = await sql<ReplacingEntry>`
    select r.entry_id, r.created_at, i.file_name, i.sheet, r.source_cell
    from time_entry v
    join time_entry r on r.shop_id = v.shop_id and r.employee_id = v.employee_id and r.worked_on = v.worked_on
      and r.job_id = v.job_id and r.operation_id = v.operation_id and r.hours = v.hours
      and r.machine_id is not distinct from v.machine_id and r.created_at >= v.voided_at
    left join timesheet_import i on i.shop_id = r.shop_id and i.import_id = r.import_id
    where v.entry_id = ${entryId}::uuid and r.voided_at is null
    order by r.created_at, r.entry_id
    limit 1`.execute(trx);
  return rows[0] ?? null;
}

/** Voids an entry in a person's name, or restores it with null. */
export async function setEntryVoided(
  trx: ShopTransaction,
  entryId: string,
  voidedBy: string | null,
): Promise<void> {
  const voidedAt = voidedBy === null ? null : sql<Date>`now()`;
  await trx.updateTable('timeEntry').set({ voidedAt, voidedBy }).where('entryId', '=', entryId).execute();
}

/** The live hours of an employee's day. */
export async function sumEmployeeDayHours(
  trx: ShopTransaction,
  employeeId: string,
  workedOn: string,
): Promise<string> {
  const { hours } = await trx
    .selectFrom('timeEntry')
    .select(({ fn }) => fn.coalesce(fn.sum<string>('hours'), sql<string>`0`).as('hours'))
    .where('employeeId', '=', employeeId)
    .where('workedOn', '=', workedOn)
    .where('voidedAt', 'is', null)
    .executeTakeFirstOrThrow();
  return hours;
}

/** Writes down by hand what somebody did; `time_entry` has no audit trigger, as imports would flood the trail. */
export async function insertEntryEvent(
  trx: ShopTransaction,
  shopId: string,
  actor: { userId: string | null; name: string },
  action: 'voided' | 'restored',
  entry: VoidableEntry,
): Promise<void> {
  const { entryId, employeeId, workedOn, hours, jobNumber } = entry;
  const told = { employeeId, workedOn, hours, jobNumber };
  await trx
    .insertInto('auditEvent')
    .values({
      shopId,
      actorId: actor.userId,
      actor: actor.name,
      action,
      subjectKind: 'time_entry',
      subjectId: entryId,
      before: JSON.stringify({ ...told, isVoided: action === 'restored' }),
      after: JSON.stringify({ ...told, isVoided: action === 'voided' }),
    })
    .execute();
}
