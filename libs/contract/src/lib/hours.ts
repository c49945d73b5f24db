import { z } from 'zod';
import { endpoint } from './endpoint';
import { directionSchema, hoursSchema, idSchema, localDateSchema, pageQuerySchema } from './schema-values';
import { sourceCellSchema } from './workings';

export const ENTRY_SORTS = [
  'workedOn',
  'employee',
  'job',
  'operation',
  'machine',
  'hours',
  'goodPieces',
  'scrapPieces',
] as const;

export const timeEntrySchema = z.object({
  entryId: idSchema,
  workedOn: localDateSchema,
  employeeId: idSchema,
  employee: z.string(),
  jobId: idSchema,
  jobNumber: z.string(),
  jobTitle: z.string(),
  operation: z.string(),
  /** The row's machine, else the operation's default. */
  machine: z.string().nullable(),
  hours: hoursSchema,
  goodPieces: z.number().int().nullable(),
  scrapPieces: z.number().int().nullable(),
  note: z.string().nullable(),
  source: sourceCellSchema.nullable(),
});
export type TimeEntry = z.infer<typeof timeEntrySchema>;

export const entryFilterSchema = z.object({
  from: localDateSchema.optional(),
  to: localDateSchema.optional(),
  employeeId: idSchema.optional(),
  jobId: idSchema.optional(),
  operationId: idSchema.optional(),
  machineId: idSchema.optional(),
  importId: idSchema.optional(),
  /** Matches employee, job number and title, operation, machine, note. */
  search: z.string().trim().max(100).optional(),
});
export type EntryFilter = z.infer<typeof entryFilterSchema>;
export const entryListQuerySchema = pageQuerySchema.extend({
  ...entryFilterSchema.shape,
  sort: z.enum(ENTRY_SORTS).default('workedOn'),
  direction: directionSchema.default('desc'),
});
export type EntryListQuery = z.infer<typeof entryListQuerySchema>;
export const entryPageSchema = z.object({
  items: z.array(timeEntrySchema),
  nextCursor: z.string().nullable(),
});
export type EntryPage = z.infer<typeof entryPageSchema>;
export const entryTotalsSchema = z.object({
  entries: z.number().int(),
  hours: hoursSchema,
  goodPieces: z.number().int(),
  scrapPieces: z.number().int(),
});
export type EntryTotals = z.infer<typeof entryTotalsSchema>;

/** What the filters of the hours page offer. */
export const entryChoicesSchema = z.object({
  employees: z.array(z.object({ id: idSchema, label: z.string() })),
  operations: z.array(z.object({ id: idSchema, label: z.string() })),
  machines: z.array(z.object({ id: idSchema, label: z.string() })),
});
export type EntryChoices = z.infer<typeof entryChoicesSchema>;

export const hoursEndpoints = {
  listEntries: endpoint({
    method: 'get',
    path: '/entries',
    summary: 'A page of time entries; an operator sees the own ones',
    permission: 'hours.own',
    query: entryListQuerySchema,
    response: entryPageSchema,
  }),
  getEntryTotals: endpoint({
    method: 'get',
    path: '/entries/totals',
    summary: 'Totals over all entries of a filter',
    permission: 'hours.own',
    query: entryFilterSchema,
    response: entryTotalsSchema,
  }),
  getEntryChoices: endpoint({
    method: 'get',
    path: '/entries/choices',
    summary: 'What the filters offer',
    permission: 'hours.own',
    response: entryChoicesSchema,
  }),
  voidEntry: endpoint({
    method: 'post',
    path: '/entries/:entryId/void',
    summary: 'Void one entry',
    permission: 'hours.edit',
    params: z.object({ entryId: idSchema }),
    response: null,
  }),
  restoreEntry: endpoint({
    method: 'post',
    path: '/entries/:entryId/restore',
    summary: 'Take back the voiding of one entry',
    permission: 'hours.edit',
    params: z.object({ entryId: idSchema }),
    response: null,
  }),
};
