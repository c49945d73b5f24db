import {
  AppError,
  type TimesheetImport,
  type TimesheetImportDetail,
  type TimesheetProblem,
} from '@brakeven/contract';
import { findImportRow, listImportRows, type TimesheetImportSummaryRow } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';

/** All imports of the shop, undone ones too, latest first. */
export async function listImports(context: ShopContext): Promise<TimesheetImport[]> {
  const rows = await inShopOf(context, (trx) => listImportRows(trx, context.shop.shopId));
  return rows.map(toTimesheetImport);
}

/**
 * An import with what was refused or warned of when it came in.
 * @throws AppError `import_not_found`
 */
export async function getImport(
  context: ShopContext,
  { importId }: { importId: string },
): Promise<TimesheetImportDetail> {
  const row = await inShopOf(context, (trx) => findImportRow(trx, context.shop.shopId, importId));
  if (!row) throw toImportNotFound();
  return { ...toTimesheetImport(row), problems: row.problems as TimesheetProblem[] };
}

/** The refusal for an id that names no import of the shop. */
export function toImportNotFound(): AppError {
  return new AppError('import_not_found', 'There is no such import in this shop.');
}

function toTimesheetImport(row: TimesheetImportSummaryRow): TimesheetImport {
  return {
    importId: row.importId,
    fileName: row.fileName,
    sheet: row.sheet,
    importedAt: row.importedAt.toISOString(),
    importedBy: row.importedBy,
    status: row.status,
    undoneAt: row.undoneAt?.toISOString() ?? null,
    undoneBy: row.undoneBy,
    rowsRead: row.rowsRead,
    entriesAdded: row.entriesAdded,
    alreadyThere: row.alreadyThere,
    refused: row.refused,
    hoursRead: row.hoursRead,
    hoursAdded: row.hoursAdded,
    firstDay: row.firstDay,
    lastDay: row.lastDay,
  };
}
