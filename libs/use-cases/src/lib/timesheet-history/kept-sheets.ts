import { type SheetFile, type SheetReader } from '@brakeven/workbook';
import { readUpload, type UploadedFile } from '../import-timesheet/upload';

const FILES_MAX = 4;
/** A file with more rows is read anew each time, lest a few of them fill the memory. */
const ROWS_MAX = 20_000;

/** The sheets read last, by import, in the order of use; each program has one reader. */
const filesByReader = new WeakMap<SheetReader, Map<string, Promise<SheetFile>>>();

/**
 * The sheets of an import's file; the last few are kept, as whoever looks at one cell looks at the next. An import's
 * file never changes. Whether the caller may see it is not asked here.
 * @throws AppError `file_refused`
 */
export async function readKeptSheets(
  importId: string,
  file: UploadedFile,
  reader: SheetReader,
): Promise<SheetFile> {
  const files = filesOf(reader);
  const reading = files.get(importId) ?? readUpload(file, { reader });
  files.delete(importId);
  files.set(importId, reading);
  const [oldest] = files.keys();
  if (files.size > FILES_MAX && oldest !== undefined) files.delete(oldest);
  try {
    const sheets = await reading;
    if (countRows(sheets) > ROWS_MAX) files.delete(importId);
    return sheets;
  } catch (error) {
    files.delete(importId);
    throw error;
  }
}

function filesOf(reader: SheetReader): Map<string, Promise<SheetFile>> {
  const known = filesByReader.get(reader);
  if (known) return known;
  const files = new Map<string, Promise<SheetFile>>();
  filesByReader.set(reader, files);
  return files;
}

function countRows({ sheets }: SheetFile): number {
  return sheets.reduce((count, { rows }) => count + rows.length, 0);
}
