export * from './lib/connect';
export * from './lib/migrate';
export * from './lib/tables';
export * from './lib/tenancy';
