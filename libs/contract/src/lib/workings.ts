import { z } from 'zod';
import { endpoint } from './endpoint';
import { hoursSchema, idSchema, localDateSchema, pageQuerySchema, rateSchema } from './schema-values';

/** Where a row came from: the workbook, its sheet and the cell of the figure. */
export const sourceCellSchema = z.object({
  importId: idSchema,
  fileName: z.string(),
  sheet: z.string(),
  row: z.number().int(),
  cell: z.string(),
});
export type SourceCell = z.infer<typeof sourceCellSchema>;

export const COST_CATEGORIES = [
  'labour',
  'overtime',
  'machine',
  'overhead',
  'material',
  'outside',
  'invoiced',
  'earned',
  'running',
] as const;
export type CostCategory = (typeof COST_CATEGORIES)[number];
/** Those that a job's cost is the sum of. */
export const JOB_COST_CATEGORIES = [
  'labour',
  'overtime',
  'machine',
  'overhead',
  'material',
  'outside',
] as const satisfies readonly CostCategory[];

export const FIGURES = [
  'job.hours',
  'job.machineHours',
  'job.labour',
  'job.machine',
  'job.overhead',
  'job.total',
  'job.earned',
  'job.quotedPrice',
  'payback.outlay',
  'payback.hours',
  'payback.earned',
  'payback.operatorLabour',
  'payback.running',
  'payback.runningCost',
  'payback.earnedBack',
  'payback.remaining',
] as const;
export type Figure = (typeof FIGURES)[number];

/**
 * Which figure is meant. `job.*` without `jobId`: over all jobs that `search` and `status` leave.
 * `payback.*` needs `machineId`; with `jobId` only that job's share, with `from`/`to` only those days.
 */
export const figureRefSchema = z.object({
  figure: z.enum(FIGURES),
  jobId: idSchema.optional(),
  machineId: idSchema.optional(),
  operationId: idSchema.optional(),
  from: localDateSchema.optional(),
  to: localDateSchema.optional(),
  search: z.string().max(100).optional(),
  status: z.string().max(20).optional(),
});
export type FigureRef = z.infer<typeof figureRefSchema>;

export const workingsLineSchema = z.object({
  lineId: z.string(),
  /** Null for a job without dates. */
  on: localDateSchema.nullable(),
  category: z.string(),
  /** Who or what: the employee, or the description of a cost item. */
  label: z.string(),
  job: z.string().nullable(),
  operation: z.string().nullable(),
  machine: z.string().nullable(),
  hours: hoursSchema.nullable(),
  rate: rateSchema.nullable(),
  /** 1 + burden on labour lines, otherwise null. */
  rateFactor: rateSchema.nullable(),
  rateValidFrom: localDateSchema.nullable(),
  /** Signed as it counts in the figure. In the unit of the figure: money 2 decimals, hours 4. */
  amount: z.string(),
  source: sourceCellSchema.nullable(),
});
export type WorkingsLine = z.infer<typeof workingsLineSchema>;

export const workingsSchema = z.object({
  figure: figureRefSchema,
  title: z.string(),
  unit: z.enum(['money', 'hours']),
  amount: z.string(),
  /** The rule in words. */
  rule: z.string(),
  inputs: z.array(z.object({ label: z.string(), value: z.string(), validFrom: localDateSchema.nullable() })),
  /** Figures that this one is made of, signed; they add up to the amount. Empty for a plain sum of lines. */
  parts: z.array(z.object({ label: z.string(), amount: z.string(), figure: figureRefSchema.nullable() })),
  lineCount: z.number().int(),
  lines: z.array(workingsLineSchema),
  nextCursor: z.string().nullable(),
});
export type Workings = z.infer<typeof workingsSchema>;

export const workingsQuerySchema = figureRefSchema.extend(pageQuerySchema.shape);
export type WorkingsQuery = z.infer<typeof workingsQuerySchema>;

export const workingsEndpoints = {
  getJobWorkings: endpoint({
    method: 'get',
    path: '/workings/jobs',
    summary: 'How a figure of jobs was made, page by page',
    permission: 'jobs.money',
    query: workingsQuerySchema,
    response: workingsSchema,
  }),
  getJobHoursWorkings: endpoint({
    method: 'get',
    path: '/workings/job-hours',
    summary: 'The entries behind hours of jobs, without money',
    permission: 'jobs.view',
    query: workingsQuerySchema,
    response: workingsSchema,
  }),
  getPaybackWorkings: endpoint({
    method: 'get',
    path: '/workings/payback',
    summary: 'How a figure of a machine’s payback was made',
    permission: 'payback.view',
    query: workingsQuerySchema,
    response: workingsSchema,
  }),
};
