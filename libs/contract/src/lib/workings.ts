import { z } from 'zod';
import { endpoint } from './endpoint';
import { idSchema, localDateSchema, pageQuerySchema, quantitySchema, rateSchema } from './schema-values';

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

/** Figures of jobs. */
export const JOB_FIGURES = [
  'job.hours',
  'job.machineHours',
  'job.labour',
  'job.overtime',
  'job.machine',
  'job.overhead',
  'job.material',
  'job.outside',
  'job.total',
  'job.invoiced',
  'job.margin',
  'job.workInProgress',
  'job.earned',
  'job.quotedPrice',
] as const;

/** Figures of a machine's payback. */
export const PAYBACK_FIGURES = [
  'payback.outlay',
  'payback.costItem',
  'payback.hours',
  'payback.billableHours',
  'payback.earned',
  'payback.operatorLabour',
  'payback.running',
  'payback.runningCost',
  'payback.earnedBack',
  'payback.remaining',
  'payback.netCash',
  'payback.pacePerWeek',
  'payback.otherJobs',
] as const;

/** What stands behind single lines: the week of a premium, the stock at the moment of an issue. */
export const SOURCE_FIGURES = ['overtime.week', 'stock.issue', 'stock.value'] as const;

/** What the books hold of days, whatever job it is of or none. */
export const BOOKS_FIGURES = [
  'books.labour',
  'books.overtime',
  'books.machine',
  'books.overhead',
  'books.material',
  'books.outside',
  'books.cost',
  'books.invoiced',
  'books.earned',
  'books.running',
] as const;

/** Hours of days, of one employee or of all, as a month's are held against payroll. */
export const HOURS_FIGURES = [
  'hours.timesheets',
  'hours.overtime',
  'hours.costed',
  'hours.difference',
] as const;

/** Figures of a job's estimate. */
export const ESTIMATE_FIGURES = [
  'estimate.hours',
  'estimate.labour',
  'estimate.machine',
  'estimate.overhead',
  'estimate.material',
  'estimate.outside',
  'estimate.total',
  'estimate.price',
  'estimate.variance',
] as const;

export const FIGURES = [
  ...JOB_FIGURES,
  ...PAYBACK_FIGURES,
  ...SOURCE_FIGURES,
  ...BOOKS_FIGURES,
  ...HOURS_FIGURES,
  ...ESTIMATE_FIGURES,
] as const;
export type Figure = (typeof FIGURES)[number];

/**
 * Which figure is meant. `job.*` without `jobId`: over all jobs that `customerId`, `search` and `status` leave, or
 * over those that have no customer.
 * `payback.*` needs `machineId`; with `jobId` only that job's share, with `from`/`to` only those days;
 * `payback.costItem` needs `costItemId` too. `overtime.week` needs `employeeId` and, as `from`, a day of the week;
 * `books.*` is of the days in the books from `from` through `to`; with `part` only what went to overhead, or came late.
 * `hours.*` is of the days worked from `from` through `to`, and of all employees without `employeeId`;
 * `hours.difference` is of a whole month.
 * `stock.issue` needs `issueId`; `stock.value` needs `materialId`, and is before the issue if there is an `issueId`.
 */
export const figureRefSchema = z.object({
  figure: z.enum(FIGURES),
  jobId: idSchema.optional(),
  machineId: idSchema.optional(),
  operationId: idSchema.optional(),
  employeeId: idSchema.optional(),
  customerId: idSchema.optional(),
  costItemId: idSchema.optional(),
  materialId: idSchema.optional(),
  issueId: idSchema.optional(),
  /** Of `estimate.variance`. */
  category: z.enum(JOB_COST_CATEGORIES).optional(),
  part: z.enum(['overhead', 'late']).optional(),
  /** Of jobs: only those that have none. */
  without: z.literal('customer').optional(),
  from: localDateSchema.optional(),
  to: localDateSchema.optional(),
  search: z.string().max(100).optional(),
  status: z.string().max(20).optional(),
});
export type FigureRef = z.infer<typeof figureRefSchema>;

/** What a line's quantity counts: hours, kg, or the row itself, once. */
export const LINE_UNITS = ['hours', 'kg', 'each'] as const;
export type LineUnit = (typeof LINE_UNITS)[number];

/** What a line of any source says about itself, beside its money. */
export const lineFactsSchema = z.object({
  /** The day in the books. */
  postedOn: localDateSchema,
  /** Posted later than the day of the row, because the month of that day is closed. */
  isLate: z.boolean(),
  /** The day in the books of the line that this one takes back, or null. */
  takesBackOn: localDateSchema.nullable(),
  /** Who or what: the employee, the material, the vendor, the number of the invoice. */
  label: z.string(),
  /** What more there is to say of it: sheets and pieces, a description, a note. */
  detail: z.string().nullable(),
  /** Below 0 in a return, a credit note and a line that takes back another. */
  quantity: quantitySchema,
  unit: z.enum(LINE_UNITS),
});
export type LineFacts = z.infer<typeof lineFactsSchema>;

export const workingsLineSchema = lineFactsSchema.extend({
  lineId: z.string(),
  /** The day of the row itself; null for a job without dates. */
  on: localDateSchema.nullable(),
  /** Null for what is no cost line. */
  postedOn: localDateSchema.nullable(),
  category: z.string(),
  job: z.string().nullable(),
  operation: z.string().nullable(),
  machine: z.string().nullable(),
  quantity: quantitySchema.nullable(),
  unit: z.enum(LINE_UNITS).nullable(),
  rate: rateSchema.nullable(),
  /** 1 + burden on labour lines, otherwise null. */
  rateFactor: rateSchema.nullable(),
  rateValidFrom: localDateSchema.nullable(),
  /** Signed as it counts in the figure. In the unit of the figure: money 2 decimals, hours 4. */
  amount: z.string(),
  /** A figure that tells how this row was made, where there is more to tell. */
  figure: figureRefSchema.nullable(),
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
  inputs: z.array(
    z.object({
      label: z.string(),
      value: z.string(),
      validFrom: localDateSchema.nullable(),
      /** The input may be a figure itself. */
      figure: figureRefSchema.nullable(),
    }),
  ),
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
  getOvertimeWorkings: endpoint({
    method: 'get',
    path: '/workings/overtime',
    summary: 'How the overtime premium of an employee’s week was made, and over which entries it was spread',
    permission: 'jobs.money',
    query: workingsQuerySchema,
    response: workingsSchema,
  }),
  getBooksWorkings: endpoint({
    method: 'get',
    path: '/workings/books',
    summary: 'The lines behind a total of a month',
    permission: 'months.view',
    query: workingsQuerySchema,
    response: workingsSchema,
  }),
  getHoursWorkings: endpoint({
    method: 'get',
    path: '/workings/hours',
    summary: 'The entries, weeks or lines behind hours of a month, as they are held against payroll',
    permission: 'months.view',
    query: workingsQuerySchema,
    response: workingsSchema,
  }),
  getStockWorkings: endpoint({
    method: 'get',
    path: '/workings/stock',
    summary: 'The stock of a material at the moment of an issue, and the average it went out at',
    permission: 'materials.money',
    query: workingsQuerySchema,
    response: workingsSchema,
  }),
};
