import { z } from 'zod';
import { endpoint } from './endpoint';

export const SETUP_SHEETS = [
  'people',
  'customers',
  'operations',
  'machines',
  'machineCosts',
  'machineRates',
  'overhead',
  'jobs',
  'punches',
  'dies',
  'materials',
  'sheetLots',
  'issues',
  'outsideServices',
  'invoices',
  'estimates',
] as const;
export type SetupSheet = (typeof SETUP_SHEETS)[number];

/** What the sheets are called in the workbook. */
export const SETUP_SHEET_NAMES: Readonly<Record<SetupSheet, string>> = {
  people: 'People',
  customers: 'Customers',
  operations: 'Operations',
  machines: 'Machines',
  machineCosts: 'Machine costs',
  machineRates: 'Machine rates',
  overhead: 'Overhead',
  jobs: 'Jobs',
  punches: 'Punches',
  dies: 'Dies',
  materials: 'Materials',
  sheetLots: 'Sheet lots',
  issues: 'Issues',
  outsideServices: 'Outside services',
  invoices: 'Invoices',
  estimates: 'Estimates',
};

/** Rows by sheet. */
export const setupCountsSchema = z.record(z.enum(SETUP_SHEETS), z.number().int());
export type SetupCounts = z.infer<typeof setupCountsSchema>;
export const setupProblemSchema = z.object({
  code: z.string(),
  message: z.string(),
  sheet: z.string(),
  cell: z.string(),
  severity: z.enum(['refused', 'warning']),
});
export type SetupProblem = z.infer<typeof setupProblemSchema>;
export const setupResultSchema = z.object({
  added: setupCountsSchema,
  changed: setupCountsSchema,
  alreadyThere: setupCountsSchema,
  problems: z.array(setupProblemSchema),
});
export type SetupResult = z.infer<typeof setupResultSchema>;

export const setupEndpoints = {
  getSetupTemplate: endpoint({
    method: 'get',
    path: '/setup/template',
    summary: 'An empty set-up workbook that explains itself',
    permission: 'setup.import',
    response: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
  }),
  checkSetup: endpoint({
    method: 'post',
    path: '/setup/check',
    summary: 'Check a set-up workbook; writes nothing',
    permission: 'setup.import',
    upload: true,
    response: setupResultSchema,
  }),
  importSetup: endpoint({
    method: 'post',
    path: '/setup',
    summary: 'Import a set-up workbook, all or nothing',
    permission: 'setup.import',
    upload: true,
    response: setupResultSchema,
  }),
};
