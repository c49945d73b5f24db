import { type Insertable, sql } from 'kysely';
import { type Tables } from './tables';
import { type ShopTransaction } from './tenancy';

/** Tables whose rows are never overwritten, only voided and replaced, with the column of their ids. */
const ID_COLUMNS = {
  sheetLot: 'lotId',
  materialIssue: 'issueId',
  outsideService: 'outsideServiceId',
  invoice: 'invoiceId',
  pressRun: 'pressRunId',
} as const satisfies Partial<Record<keyof Tables, string>>;

/** A table of dated rows. */
export type VoidableTable = keyof typeof ID_COLUMNS;

/** What a new row holds besides shop and id. */
export type DatedRowValues<T extends VoidableTable> = Omit<
  Insertable<Tables[T]>,
  'shopId' | (typeof ID_COLUMNS)[T] | 'createdAt' | 'voidedAt' | 'voidedBy' | 'corrects'
>;

/** Tells whether a row is there and voided, and keeps others from changing it until the transaction ends. */
export async function findDatedRow(
  trx: ShopTransaction,
  table: VoidableTable,
  id: string,
): Promise<{ isVoided: boolean } | null> {
  const { rows } = await sql<{ isVoided: boolean }>`
    select voided_at is not null as is_voided from ${sql.table(table)}
    where ${sql.ref(ID_COLUMNS[table])} = ${id}::uuid
    for update`.execute(trx);
  return rows[0] ?? null;
}

/** Adds a row. */
export async function insertDatedRow<T extends VoidableTable>(
  trx: ShopTransaction,
  table: T,
  key: { shopId: string; id: string },
  values: DatedRowValues<T>,
): Promise<void> {
  const names = Object.keys(values);
  await sql`
    insert into ${sql.table(table)} (shop_id, ${sql.ref(ID_COLUMNS[table])}, ${sql.join(names.map((name) => sql.ref(name)))})
    values (${key.shopId}, ${key.id}, ${sql.join(Object.values(values))})`.execute(trx);
}

/**
 * Voids a live row in a person's name and puts another in its place, in one statement, so that the books are looked
 * at with both: a lot may be corrected from which issues were drawn. Tells whether there was such a row.
 */
export async function replaceDatedRow<T extends VoidableTable>(
  trx: ShopTransaction,
  table: T,
  { id, newId, voidedBy }: { id: string; newId: string; voidedBy: string },
  values: DatedRowValues<T>,
): Promise<boolean> {
  const idColumn = sql.ref(ID_COLUMNS[table]);
  const names = Object.keys(values);
  const result = await sql`
    with voided as (
      update ${sql.table(table)} set voided_at = now(), voided_by = ${voidedBy}
      where ${idColumn} = ${id}::uuid and voided_at is null
      returning shop_id, coalesce(corrects, ${idColumn}) as corrects
    )
    insert into ${sql.table(table)} (shop_id, ${idColumn}, corrects, ${sql.join(names.map((name) => sql.ref(name)))})
    select shop_id, ${newId}, corrects, ${sql.join(Object.values(values))} from voided`.execute(trx);
  return result.numAffectedRows === 1n;
}

/** Whether a row that took the place of this one, or the one that it took the place of, counts. */
export async function hasLiveCorrection(
  trx: ShopTransaction,
  table: VoidableTable,
  id: string,
): Promise<boolean> {
  const idColumn = ID_COLUMNS[table];
  const { rows } = await sql`
    select from ${sql.table(table)} of_row
    join ${sql.table(table)} other
      on coalesce(other.corrects, ${sql.ref(`other.${idColumn}`)}) = coalesce(of_row.corrects, ${sql.ref(`of_row.${idColumn}`)})
    where ${sql.ref(`of_row.${idColumn}`)} = ${id}::uuid and ${sql.ref(`other.${idColumn}`)} <> ${id}::uuid
      and other.voided_at is null
    limit 1`.execute(trx);
  return rows.length > 0;
}

/** Voids a row in a person's name, or restores it with null. */
export async function setDatedRowVoided(
  trx: ShopTransaction,
  table: VoidableTable,
  id: string,
  voidedBy: string | null,
): Promise<void> {
  const voidedAt = voidedBy === null ? sql`null` : sql`now()`;
  await sql`
    update ${sql.table(table)} set voided_at = ${voidedAt}, voided_by = ${voidedBy}
    where ${sql.ref(ID_COLUMNS[table])} = ${id}::uuid`.execute(trx);
}
