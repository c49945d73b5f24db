export { columnNumber } from './cell-address';
export { createReader, type ReaderOptions, type SheetReader } from './create-reader';
export { CSV_SHEET } from './read-csv';
export { READ_LIMITS } from './read-limits';
export { readSheets } from './read-sheets';
export * from './setup-data';
export * from './sheet-file';
export * from './timesheet-row';
export { WorkbookError, type WorkbookErrorCode } from './workbook-error';
export { readTimesheetRows, readTimesheetRowsInTurns } from './read-timesheet-rows';
export {
  describeTimesheetHeader,
  findTimesheetHeader,
  getSheet,
  type HeaderCell,
  headerSignature,
  type TimesheetHeader,
} from './timesheet-mapping';
export { readSetupWorkbook } from './read-setup-workbook';
export { EXPLAINING_SHEET } from './setup-columns';
export { writeSetupTemplate, writeSetupWorkbook } from './write-setup-workbook';
export { type TimesheetLine, type TimesheetWorkbook, writeTimesheetWorkbook } from './write-timesheet';
