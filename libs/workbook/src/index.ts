export { CSV_SHEET } from './read-csv';
export { READ_LIMITS } from './read-limits';
export { readSheets } from './read-sheets';
export * from './setup-data';
export * from './sheet-file';
export * from './timesheet-row';
export { WorkbookError, type WorkbookErrorCode } from './workbook-error';
