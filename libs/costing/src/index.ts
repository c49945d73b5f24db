export * from './check-timesheet';
export * from './effective-dated';
export * from './entry-lines';
export * from './job-cost';
export * from './machine-day';
export * from './match-entries';
export * from './payback';
export * from './rules';
