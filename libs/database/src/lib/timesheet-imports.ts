import { type Insertable, type Selectable } from 'kysely';
import { type TimesheetImportTable } from './tables';
import { type ShopTransaction } from './tenancy';

export type TimesheetImportRow = Selectable<TimesheetImportTable>;
/** An import without what only its own page shows. */
export type TimesheetImportSummaryRow = Omit<
  TimesheetImportRow,
  'problems' | 'mapping' | 'shopId' | 'fileSha256' | 'refusalsReviewedAt' | 'refusalsReviewedBy'
>;
/** The kept file with how it was read. */
export interface KeptFile {
  fileName: string;
  sheet: string;
  mapping: unknown;
  content: Buffer;
}

const SUMMARY = [
  'importId',
  'fileName',
  'sheet',
  'status',
  'importedBy',
  'importedAt',
  'undoneBy',
  'undoneAt',
  'rowsRead',
  'entriesAdded',
  'alreadyThere',
  'refused',
  'hoursRead',
  'hoursAdded',
  'firstDay',
  'lastDay',
] as const;

/** The latest import of exactly this file that has not been undone. */
export function findCommittedImport(
  trx: ShopTransaction,
  shopId: string,
  fileSha256: string,
): Promise<Pick<TimesheetImportRow, 'importId' | 'importedAt' | 'importedBy'> | undefined> {
  return trx
    .selectFrom('timesheetImport')
    .select(['importId', 'importedAt', 'importedBy'])
    .where('shopId', '=', shopId)
    .where('fileSha256', '=', fileSha256)
    .where('status', '=', 'committed')
    .orderBy('importId', 'desc')
    .limit(1)
    .executeTakeFirst();
}

/** Adds an import and keeps its file as it came. */
export async function insertImport(
  trx: ShopTransaction,
  row: Insertable<TimesheetImportTable> & { importId: string },
  content: Uint8Array,
): Promise<void> {
  await trx.insertInto('timesheetImport').values(row).execute();
  const { shopId, importId } = row;
  await trx
    .insertInto('timesheetFile')
    .values({ shopId, importId, content: Buffer.from(content) })
    .execute();
}

/** All imports, latest first. */
export function listImportRows(trx: ShopTransaction, shopId: string): Promise<TimesheetImportSummaryRow[]> {
  return trx
    .selectFrom('timesheetImport')
    .select(SUMMARY)
    .where('shopId', '=', shopId)
    .orderBy('importId', 'desc')
    .execute();
}

/** One import with what was refused. */
export function findImportRow(
  trx: ShopTransaction,
  shopId: string,
  importId: string,
): Promise<(TimesheetImportSummaryRow & Pick<TimesheetImportRow, 'problems'>) | undefined> {
  return trx
    .selectFrom('timesheetImport')
    .select([...SUMMARY, 'problems'])
    .where('shopId', '=', shopId)
    .where('importId', '=', importId)
    .executeTakeFirst();
}

/** The kept file of an import. */
export function findKeptFile(
  trx: ShopTransaction,
  shopId: string,
  importId: string,
): Promise<KeptFile | undefined> {
  return trx
    .selectFrom('timesheetImport as i')
    .innerJoin('timesheetFile as f', (join) =>
      join.onRef('f.shopId', '=', 'i.shopId').onRef('f.importId', '=', 'i.importId'),
    )
    .select(['i.fileName', 'i.sheet', 'i.mapping', 'f.content'])
    .where('i.shopId', '=', shopId)
    .where('i.importId', '=', importId)
    .executeTakeFirst();
}

/** Marks an import undone; its row and its file stay. */
export async function markImportUndone(
  trx: ShopTransaction,
  shopId: string,
  importId: string,
  undoneBy: string,
): Promise<void> {
  await trx
    .updateTable('timesheetImport')
    .set({ status: 'undone', undoneBy, undoneAt: new Date() })
    .where('shopId', '=', shopId)
    .where('importId', '=', importId)
    .execute();
}
