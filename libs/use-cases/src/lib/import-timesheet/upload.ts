import { AppError, type Progress } from '@brakeven/contract';
import { type OnReadProgress, type SheetFile, type SheetReader, WorkbookError } from '@brakeven/workbook';

/** A file as it was sent. */
export interface UploadedFile {
  name: string;
  bytes: Uint8Array;
}

/** What long work on a file needs from whoever started it. */
export interface UploadTools {
  reader: SheetReader;
  /** Told how far the work is; what it throws stops the work, and a transaction under way is rolled back. */
  onProgress?: (progress: Progress) => void;
  /** Told why costs could not be rolled up after the work itself was done; the days stay marked and wait. */
  onRollupFailed?: (error: unknown) => void;
}

/** A file to hand out. */
export interface FileDownload {
  fileName: string;
  mediaType: string;
  bytes: Uint8Array;
}

export const XLSX_MEDIA_TYPE = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

const READING_WORDS = {
  unpack: 'Unpacking the file',
  parse: 'Reading the sheets',
  rows: 'Taking the rows over',
} as const;

/**
 * Reads an uploaded file whole.
 * @throws AppError `file_refused` with the words of the reader, its own code as the issue's code
 */
export async function readUpload(
  file: UploadedFile,
  { reader, onProgress }: UploadTools,
): Promise<SheetFile> {
  const onReadProgress: OnReadProgress = ({ stage, done, total }) =>
    onProgress?.({ stage: 'reading', done, total, message: READING_WORDS[stage] });
  try {
    return await reader.readSheets(file, onReadProgress);
  } catch (error) {
    throw toFileError(error);
  }
}

/** A refusal by the workbook reader as one of ours; anything else as it is. */
export function toFileError(error: unknown): unknown {
  if (!(error instanceof WorkbookError)) return error;
  const { code, message } = error;
  return new AppError('file_refused', message, { issues: [{ field: 'file', code, message }], cause: error });
}
