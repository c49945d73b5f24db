export * from './setup-data';
export * from './sheet-file';
export * from './timesheet-row';
export * from './workbook-error';
