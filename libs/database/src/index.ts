export * from './lib/connect';
export * from './lib/migrate';
export * from './lib/tables';
export * from './lib/tenancy';
export * from './lib/timesheet-entries';
export * from './lib/timesheet-imports';
export * from './lib/timesheet-memory';
export * from './lib/timesheet-register';
