export { columnNumber } from './lib/cell-address';
export { createReader, type ReaderOptions, type SheetReader } from './lib/create-reader';
export { CSV_SHEET } from './lib/read-csv';
export { READ_LIMITS } from './lib/read-limits';
export { readSheets } from './lib/read-sheets';
export * from './lib/setup-data';
export * from './lib/sheet-file';
export * from './lib/timesheet-row';
export { WorkbookError, type WorkbookErrorCode } from './lib/workbook-error';
export { readTimesheetRows, readTimesheetRowsInTurns } from './lib/read-timesheet-rows';
export {
  describeTimesheetHeader,
  findTimesheetHeader,
  getSheet,
  type HeaderCell,
  headerSignature,
  type TimesheetHeader,
} from './lib/timesheet-mapping';
export { readSetupWorkbook } from './lib/read-setup-workbook';
export { EXPLAINING_SHEET } from './lib/setup-columns';
export { writeSetupTemplate, writeSetupWorkbook } from './lib/write-setup-workbook';
export * from './lib/write-table';
export { type TimesheetLine, type TimesheetWorkbook, writeTimesheetWorkbook } from './lib/write-timesheet';
