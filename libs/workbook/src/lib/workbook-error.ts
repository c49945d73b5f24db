/** Why a file as a whole cannot be read. A problem in one cell is never a WorkbookError. */
export type WorkbookErrorCode =
  | 'file_empty'
  | 'file_too_large'
  | 'file_old_xls'
  | 'file_encrypted'
  | 'file_truncated'
  | 'file_not_workbook'
  | 'file_form_unsupported'
  | 'file_unpacks_too_large'
  | 'file_needs_too_much_memory'
  | 'file_takes_too_long'
  | 'too_many_rows'
  | 'too_many_cells'
  | 'csv_not_utf8'
  | 'csv_quotes_broken'
  | 'csv_separator_unknown'
  | 'header_not_found'
  | 'sheet_not_found';

/** A file that is refused whole; the message says what to do about it. */
export class WorkbookError extends Error {
  override readonly name = 'WorkbookError';

  constructor(
    readonly code: WorkbookErrorCode,
    message: string,
  ) {
    super(message);
  }
}

/** The error for a file that is no workbook at all; `found` says what it seems to be. */
export function toNotWorkbookError(found = 'something else'): WorkbookError {
  return new WorkbookError(
    'file_not_workbook',
    `This file is not a workbook but ${found}, whatever its name says. ` +
      'Send the timesheet itself, saved as .xlsx or as .csv.',
  );
}
