import { assertPlainText, readCsv } from './read-csv';
import { READ_LIMITS } from './read-limits';
import { readXlsx } from './read-xlsx';
import { type FileBytes, type OnReadProgress, type SheetFile } from './sheet-file';
import { type ContentKind, sniffContent, sniffOle2 } from './sniff-content';
import { toNotWorkbookError, WorkbookError } from './workbook-error';

const NOT_WORKBOOKS: Readonly<Partial<Record<ContentKind, string>>> = {
  picture: 'a picture',
  pdf: 'a PDF document',
  binary: 'some other kind of file',
};

/**
 * Reads a timesheet or set-up file whole: an .xlsx workbook or a .csv file. What the file is comes from its content;
 * a name that says otherwise is refused.
 *
 * Cells keep what the file stores: no value is guessed, and formulas are not calculated.
 * @throws WorkbookError when the file as a whole is refused; the message says what to do
 */
export async function readSheets(
  file: FileBytes,
  onProgress: OnReadProgress = () => undefined,
): Promise<SheetFile> {
  assertFileSize(file.bytes);
  const extension = /\.([^.]+)$/.exec(file.name)?.[1]?.toLowerCase() ?? '';
  const content = sniffContent(file.bytes);
  assertReadableContent(content, file.bytes);
  if (content === 'zip') {
    if (extension !== 'xlsx') throw toWrongNameError(extension, 'a workbook', '.xlsx');
    const sheets = await readXlsx(file.bytes, onProgress);
    return { name: file.name, form: 'xlsx', separator: null, sheets };
  }
  if (extension !== 'csv') throw toWrongNameError(extension, 'plain text', '.csv');
  const { sheet, separator } = readCsv(file.bytes);
  onProgress({ stage: 'rows', done: sheet.rows.length, total: sheet.rows.length });
  return { name: file.name, form: 'csv', separator, sheets: [sheet] };
}

function assertFileSize(bytes: Uint8Array): void {
  if (bytes.length === 0) {
    throw new WorkbookError('file_empty', 'This file is empty. Save it again and send that.');
  }
  if (bytes.length > READ_LIMITS.fileBytesMax) {
    const megabytes = (bytes.length / 1024 / 1024).toFixed(1);
    throw new WorkbookError(
      'file_too_large',
      `This file has ${megabytes} MB; at most ${READ_LIMITS.fileBytesMax / 1024 / 1024} MB can be read. ` +
        'Remove pictures and sheets that are not needed, or split it.',
    );
  }
}

function assertReadableContent(content: ContentKind, bytes: Uint8Array): void {
  const other = NOT_WORKBOOKS[content];
  if (other) throw toNotWorkbookError(other);
  if (content === 'text') assertPlainText(Buffer.from(bytes.subarray(0, 512)).toString('utf8'));
  if (content !== 'ole2') return;
  const kind = sniffOle2(bytes);
  if (kind === 'encrypted') {
    throw new WorkbookError(
      'file_encrypted',
      'This workbook is locked with a password. Save it without the password and send that.',
    );
  }
  if (kind === 'other') throw toNotWorkbookError('an old office document');
  throw new WorkbookError(
    'file_old_xls',
    'This is a workbook of the old .xls kind. Open it in your spreadsheet program and save it as .xlsx.',
  );
}

function toWrongNameError(extension: string, found: string, rightExtension: string): WorkbookError {
  const named = extension === '' ? 'has no ending' : `ends in .${extension}`;
  return new WorkbookError(
    'file_not_workbook',
    `The name of this file ${named}, but inside is ${found}. If it is the right file, save it as ` +
      `${rightExtension} from your spreadsheet program; renaming is not enough.`,
  );
}
