import { createHash } from 'node:crypto';
import { type TimesheetOptions } from '@brakeven/contract';
import { listSavedMappings } from '@brakeven/database';
import { readTimesheetRowsInTurns, type SheetFile, type TimesheetRows } from '@brakeven/workbook';
import { inShopOf, type ShopContext } from '../context';
import { findMapping, type FoundMapping } from './find-mapping';
import { nextTurn } from './next-turn';
import { readUpload, toFileError, type UploadedFile, type UploadTools } from './upload';

/** A timesheet as it was read, before any name is looked up or rule asked. */
export interface TimesheetReading extends FoundMapping {
  file: { name: string; bytes: number; sha256: string };
  sheetFile: SheetFile;
  /** Null as long as the mapping is not complete. */
  timesheet: TimesheetRows | null;
}

/**
 * Reads the file, finds which column holds what, and reads the rows with it. Looks only at what the shop has
 * remembered of mappings; writes nothing.
 * @throws AppError `file_refused`, `invalid_input`
 */
export async function readTimesheet(
  context: ShopContext,
  file: UploadedFile,
  options: Partial<TimesheetOptions>,
  tools: UploadTools,
): Promise<TimesheetReading> {
  const sheetFile = await readUpload(file, tools);
  const saved = await inShopOf(context, (trx) => listSavedMappings(trx, context.shop.shopId));
  const found = findMapping(sheetFile, options.mapping, saved);
  await nextTurn();
  return {
    ...found,
    file: { name: file.name, bytes: file.bytes.byteLength, sha256: toSha256(file.bytes) },
    sheetFile,
    timesheet: await readRows(sheetFile, found),
  };
}

async function readRows(
  file: SheetFile,
  { mapping, missingFields }: FoundMapping,
): Promise<TimesheetRows | null> {
  if (!mapping || missingFields.length > 0) return null;
  try {
    return await readTimesheetRowsInTurns(file, mapping, nextTurn);
  } catch (error) {
    throw toFileError(error);
  }
}

function toSha256(bytes: Uint8Array): string {
  return createHash('sha256').update(bytes).digest('hex');
}
