import { parentPort, workerData } from 'node:worker_threads';
import { readSheets } from './lib/read-sheets';
import { type FileBytes, type SheetFile } from './lib/sheet-file';
import { NEXT_ROWS, type WorkerMessage } from './lib/worker-message';
import { WorkbookError } from './lib/workbook-error';

const ROWS_PER_MESSAGE = 1_000;

/** Entry of the worker thread: reads the file of `workerData` and hands its rows over in pieces, as asked. */
async function serveFile(): Promise<void> {
  try {
    const file = await readSheets(workerData as FileBytes, (progress) =>
      send({ kind: 'progress', progress }),
    );
    handOver(file);
  } catch (error) {
    if (!(error instanceof WorkbookError)) throw error;
    send({ kind: 'refused', code: error.code, message: error.message });
  }
}

function handOver(file: SheetFile): void {
  const pieces = listPieces(file);
  parentPort?.on('message', (message) => {
    if (message !== NEXT_ROWS) return;
    const next = pieces.next();
    send(next.done ? { kind: 'end' } : next.value);
    if (next.done) parentPort?.close();
  });
  const sheets = file.sheets.map(({ rows, ...sheet }) => ({ ...sheet, rowCount: rows.length }));
  send({ kind: 'outline', file: { ...file, sheets } });
}

function* listPieces(file: SheetFile): Generator<WorkerMessage, undefined> {
  for (const [sheetIndex, { rows }] of file.sheets.entries()) {
    for (let start = 0; start < rows.length; start += ROWS_PER_MESSAGE) {
      yield { kind: 'rows', sheetIndex, rows: rows.slice(start, start + ROWS_PER_MESSAGE) };
    }
  }
  return undefined;
}

function send(message: WorkerMessage): void {
  parentPort?.postMessage(message);
}

void serveFile();
