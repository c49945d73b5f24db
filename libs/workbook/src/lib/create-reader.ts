import { Worker } from 'node:worker_threads';
import { READ_LIMITS } from './read-limits';
import { readSheets } from './read-sheets';
import { type FileBytes, type OnReadProgress, type SheetFile, type SheetRow } from './sheet-file';
import { NEXT_ROWS, type SheetFileOutline, type WorkerMessage } from './worker-message';
import { WorkbookError } from './workbook-error';

/** Reads files; see {@link readSheets} for what it gives and refuses. */
export interface SheetReader {
  readSheets(file: FileBytes, onProgress?: OnReadProgress): Promise<SheetFile>;
}

export interface ReaderOptions {
  /** The bundled `read-worker.js`. Without it files are read in the calling thread. */
  readonly workerUrl?: URL;
  /** Memory that reading one file may take before it is refused. */
  readonly heapMbMax?: number;
  /** Time that reading one file in a worker may take before it is refused. */
  readonly secondsMax?: number;
}

/**
 * Makes a reader. With `workerUrl` each file is read in a worker thread of its own with bounded memory and time; a
 * worker that needs more becomes a WorkbookError `file_needs_too_much_memory` or `file_takes_too_long`.
 */
export function createReader({
  workerUrl,
  heapMbMax = READ_LIMITS.workerHeapMbMax,
  secondsMax = READ_LIMITS.readSecondsMax,
}: ReaderOptions = {}): SheetReader {
  if (!workerUrl) return { readSheets };
  return {
    readSheets: async (file, onProgress = () => undefined) => {
      const worker = new Worker(workerUrl, {
        workerData: { name: file.name, bytes: file.bytes },
        resourceLimits: { maxOldGenerationSizeMb: heapMbMax },
      });
      const watch = startWatch(secondsMax);
      try {
        return await Promise.race([receiveFile(worker, onProgress), watch.timeUp]);
      } finally {
        watch.stop();
        await worker.terminate();
      }
    },
  };
}

function startWatch(secondsMax: number): { timeUp: Promise<never>; stop: () => void } {
  let timer: NodeJS.Timeout;
  const timeUp = new Promise<never>((_, reject) => {
    timer = setTimeout(() => reject(toTimeError(secondsMax)), secondsMax * 1_000);
  });
  return { timeUp, stop: () => clearTimeout(timer) };
}

function receiveFile(worker: Worker, onProgress: OnReadProgress): Promise<SheetFile> {
  const received = new ReceivedFile();
  return new Promise<SheetFile>((resolve, reject) => {
    const take = (message: WorkerMessage) => {
      if (message.kind === 'progress') onProgress(message.progress);
      else if (message.kind === 'refused') reject(new WorkbookError(message.code, message.message));
      else if (message.kind === 'end') resolve(received.toSheetFile());
      else {
        received.take(message);
        worker.postMessage(NEXT_ROWS);
      }
    };
    worker.on('message', (message: WorkerMessage) => {
      // What is thrown in an event handler would end the whole program, not just this reading.
      try {
        take(message);
      } catch (error) {
        reject(error);
      }
    });
    worker.on('error', (error) => reject(toReaderError(error)));
    worker.on('exit', () => reject(new Error('The reading worker ended before the file was read.')));
  });
}

/** The file as it comes in from the worker, piece by piece. */
class ReceivedFile {
  private outline: SheetFileOutline | null = null;
  private readonly rows: SheetRow[][] = [];

  take(message: Extract<WorkerMessage, { kind: 'outline' | 'rows' }>): void {
    if (message.kind === 'outline') this.outline = message.file;
    else (this.rows[message.sheetIndex] ??= []).push(...message.rows);
  }

  toSheetFile(): SheetFile {
    if (!this.outline) throw new Error('The reading worker sent rows before saying what the file is.');
    const sheets = this.outline.sheets.map(({ rowCount, ...sheet }, index) => {
      const rows = this.rows[index] ?? [];
      if (rows.length !== rowCount) throw new Error(`Sheet '${sheet.name}' came over with rows missing.`);
      return { ...sheet, rows };
    });
    return { ...this.outline, sheets };
  }
}

function toReaderError(error: Error & { code?: string }): Error {
  if (error.code !== 'ERR_WORKER_OUT_OF_MEMORY') return error;
  return new WorkbookError(
    'file_needs_too_much_memory',
    'This workbook needs more memory to read than is allowed. Copy the rows you need into a new workbook, ' +
      'or save it as .csv.',
  );
}

function toTimeError(secondsMax: number): WorkbookError {
  return new WorkbookError(
    'file_takes_too_long',
    `This workbook could not be read in ${secondsMax} seconds. Copy the rows you need into a new workbook, or save ` +
      'it as .csv.',
  );
}
