import { type TimesheetCheck } from '@brakeven/contract';
import {
  ENTRIES_PER_INSERT,
  insertImport,
  insertTimeEntries,
  type NewTimeEntry,
  type ShopTransaction,
} from '@brakeven/database';
import { hoursText } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { type ShopContext } from '../context';
import { type Assessment } from './assess-timesheet';
import { type EntryCandidate } from './resolve-row';
import { toStorableJson, toStorableText } from './storable-text';
import { type UploadedFile, type UploadTools } from './upload';

/**
 * Writes an import: its record, the file as it came, and the ready rows as entries, by day and then by row.
 * @returns the id of the import
 */
export async function writeImport(
  trx: ShopTransaction,
  context: ShopContext,
  file: UploadedFile,
  check: TimesheetCheck,
  assessment: Assessment,
  { onProgress }: UploadTools,
): Promise<string> {
  const importId = newId();
  const entries = listNewEntries(assessment);
  await insertImport(trx, toImportRow(importId, context, check, entries), file.bytes);
  for (let start = 0; start < entries.length; start += ENTRIES_PER_INSERT) {
    onProgress?.({ stage: 'writing', done: start, total: entries.length, message: 'Writing the entries' });
    const batch = entries.slice(start, start + ENTRIES_PER_INSERT);
    await insertTimeEntries(trx, context.shop.shopId, importId, batch);
  }
  onProgress?.({
    stage: 'writing',
    done: entries.length,
    total: entries.length,
    message: 'Writing the entries',
  });
  return importId;
}

function listNewEntries({ rows }: Assessment): NewTimeEntry[] {
  return rows
    .flatMap(({ state, candidate }) => (state === 'ready' && candidate ? [toNewEntry(candidate)] : []))
    .sort((a, b) => a.workedOn.localeCompare(b.workedOn) || a.sourceRow - b.sourceRow);
}

function toNewEntry(candidate: EntryCandidate): NewTimeEntry {
  const { workedOn, employeeId, jobId, operationId, machineId, hours, good, scrap, note, row, source } =
    candidate;
  return {
    workedOn,
    employeeId,
    jobId,
    operationId,
    machineId,
    hours: hoursText(hours),
    goodPieces: good,
    scrapPieces: scrap,
    note: note === null ? null : toStorableText(note),
    sourceRow: row,
    sourceCell: source.cells.hours ?? `A${row}`,
  };
}

function toImportRow(
  importId: string,
  { shop, actor }: ShopContext,
  check: TimesheetCheck,
  entries: readonly NewTimeEntry[],
): Parameters<typeof insertImport>[1] {
  return {
    shopId: shop.shopId,
    importId,
    fileName: toStorableText(check.file.name),
    fileSha256: check.file.sha256,
    sheet: toStorableText(check.mapping?.sheet ?? ''),
    mapping: toStorableJson(check.mapping),
    importedBy: actor.name,
    rowsRead: check.rowsRead,
    entriesAdded: check.entriesReady,
    alreadyThere: check.alreadyThere,
    refused: check.refused,
    hoursRead: check.hoursRead,
    hoursAdded: check.hoursReady,
    firstDay: entries[0]?.workedOn ?? null,
    lastDay: entries.at(-1)?.workedOn ?? null,
    problems: toStorableJson(check.problems),
  };
}
