import { z } from 'zod';
import { endpoint } from './endpoint';
import {
  amountInputSchema,
  codeInputSchema,
  directionSchema,
  hoursSchema,
  idSchema,
  localDateSchema,
  moneySchema,
  nameInputSchema,
  pageQuerySchema,
  rateSchema,
} from './schema-values';
import {
  COST_CATEGORIES,
  JOB_COST_CATEGORIES,
  figureRefSchema,
  lineFactsSchema,
  sourceCellSchema,
} from './workings';

/** Hours or kg as text, as many decimals as it takes. */
const quantityTextSchema = z.string().regex(/^-?\d+(\.\d+)?$/);

export const JOB_STATUSES = ['quoted', 'open', 'finished', 'invoiced', 'lost', 'cancelled'] as const;
export type JobStatus = (typeof JOB_STATUSES)[number];
export const JOB_SORTS = [
  'number',
  'customer',
  'title',
  'status',
  'quantity',
  'openedOn',
  'dueOn',
  'hours',
  'machineHours',
  'labour',
  'overtime',
  'machine',
  'overhead',
  'material',
  'outside',
  'total',
  'quotedPrice',
  'estimatedHours',
  'estimate',
  'variance',
  'invoiced',
  'margin',
  'workInProgress',
  'lastWorkedOn',
] as const;
export type JobSort = (typeof JOB_SORTS)[number];

/** What work has cost, from its cost lines. Money is absent for those without `jobs.money`. */
export const jobCostSchema = z.object({
  hours: hoursSchema,
  machineHours: hoursSchema,
  labour: moneySchema.optional(),
  overtime: moneySchema.optional(),
  machine: moneySchema.optional(),
  overhead: moneySchema.optional(),
  material: moneySchema.optional(),
  outside: moneySchema.optional(),
  /** The sum of the categories. */
  total: moneySchema.optional(),
});
export type JobCostFigures = z.infer<typeof jobCostSchema>;

/** A job's cost beside its income and its estimate; over several jobs, sums of theirs. */
export const jobFiguresSchema = jobCostSchema.extend({
  /** Invoices less credit notes. */
  invoiced: moneySchema.optional(),
  /** invoiced − total */
  margin: moneySchema.optional(),
  /** True until the job is finished or invoiced, and over several jobs while it is true of one. */
  marginIsProvisional: z.boolean().optional(),
  /** Whether it is finished and invoices are still to come, or one of several jobs is. */
  isToInvoice: z.boolean().optional(),
  /** Cost not yet invoiced of billable jobs open or finished, not below 0. */
  workInProgress: moneySchema.optional(),
  /** Estimated cost and hours; null without an estimate. */
  estimate: moneySchema.nullable().optional(),
  estimatedHours: hoursSchema.nullable().optional(),
  /** total − estimate of jobs that have one and cost something: above 0 it cost more. */
  variance: moneySchema.nullable().optional(),
});
export type JobFigures = z.infer<typeof jobFiguresSchema>;

export const jobSchema = jobFiguresSchema.extend({
  jobId: idSchema,
  number: z.string(),
  customerId: idSchema.nullable(),
  customer: z.string().nullable(),
  title: z.string(),
  quantity: z.number().int().nullable(),
  openedOn: localDateSchema.nullable(),
  dueOn: localDateSchema.nullable(),
  quotedPrice: moneySchema.nullable().optional(),
  isBillable: z.boolean(),
  status: z.enum(JOB_STATUSES),
  lastWorkedOn: localDateSchema.nullable(),
  /** Entries on the job without a rate on their date, or of a week whose premium lacks one: its cost is not complete. */
  entriesWithoutRate: z.number().int(),
});
export type Job = z.infer<typeof jobSchema>;

export const jobFilterSchema = z.object({
  search: z.string().trim().max(100).optional(),
  status: z.enum(JOB_STATUSES).optional(),
  customerId: idSchema.optional(),
});
export type JobFilter = z.infer<typeof jobFilterSchema>;
export const jobListQuerySchema = pageQuerySchema.extend({
  ...jobFilterSchema.shape,
  sort: z.enum(JOB_SORTS).default('number'),
  direction: directionSchema.default('desc'),
});
export type JobListQuery = z.infer<typeof jobListQuerySchema>;

/** Which columns of the jobs a file gets, in their order; money only for those who may see it. */
export const jobExportQuerySchema = z.object({
  ...jobFilterSchema.shape,
  sort: z.enum(JOB_SORTS).default('lastWorkedOn'),
  direction: directionSchema.default('desc'),
  columns: z
    .string()
    .max(600)
    .transform((text) => text.split(','))
    .pipe(z.array(z.enum(JOB_SORTS)).min(1).max(JOB_SORTS.length)),
});
export type JobExportQuery = z.infer<typeof jobExportQuerySchema>;
export const jobPageSchema = z.object({
  items: z.array(jobSchema),
  nextCursor: z.string().nullable(),
  /** Over all jobs of the filter, not only this page. */
  totals: jobFiguresSchema.extend({
    jobs: z.number().int(),
    quotedPrice: moneySchema.optional(),
    /** Jobs that have a variance, their cost and their estimate: cost − estimate is `variance`. */
    comparedJobs: z.number().int().optional(),
    comparedCost: moneySchema.optional(),
    comparedEstimate: moneySchema.optional(),
  }),
});
export type JobPage = z.infer<typeof jobPageSchema>;

/** How far a category's cost is from its estimate, and why: the two parts add up to the variance. */
export const varianceSchema = z.object({
  estimate: moneySchema,
  actual: moneySchema,
  variance: moneySchema,
  /** (actual rate − estimated rate) × actual quantity */
  ratePart: moneySchema,
  /** (actual quantity − estimated quantity) × estimated rate */
  quantityPart: moneySchema,
});
export const categoryVarianceSchema = varianceSchema.extend({
  category: z.enum(JOB_COST_CATEGORIES),
  /** Hours or kg; null where there is no measure. */
  estimatedQuantity: quantityTextSchema.nullable(),
  actualQuantity: quantityTextSchema.nullable(),
});
export type CategoryVariance = z.infer<typeof categoryVarianceSchema>;

export const jobDetailSchema = jobSchema.extend({
  byOperation: z.array(
    jobCostSchema.extend({
      operationId: idSchema,
      operation: z.string(),
      /** 0 for work that the estimate does not have; absent without an estimate. */
      estimatedHours: hoursSchema.optional(),
    }),
  ),
  byWeek: z.array(z.object({ weekFrom: localDateSchema, hours: hoursSchema, total: moneySchema.optional() })),
  /** Absent without `jobs.money`, null without an estimate. */
  comparison: z
    .object({
      estimatedOn: localDateSchema,
      categories: z.array(categoryVarianceSchema),
      total: varianceSchema,
    })
    .nullable()
    .optional(),
});
export type JobDetail = z.infer<typeof jobDetailSchema>;

/** A cost line of a job as its page lists it; money is absent without `jobs.money`. */
export const jobLineSchema = lineFactsSchema.extend({
  lineId: z.string(),
  /** The day of the row itself. */
  workedOn: localDateSchema,
  category: z.enum(COST_CATEGORIES),
  operation: z.string().nullable(),
  machine: z.string().nullable(),
  rate: rateSchema.optional(),
  rateFactor: rateSchema.nullable().optional(),
  amount: moneySchema.optional(),
  /** Tells how the amount was made where it is no product of the rate: the week of a premium, the stock of an issue. */
  figure: figureRefSchema.nullable().optional(),
  source: sourceCellSchema.nullable(),
});
export type JobLine = z.infer<typeof jobLineSchema>;
export const jobLinePageSchema = z.object({
  items: z.array(jobLineSchema),
  nextCursor: z.string().nullable(),
});
export type JobLinePage = z.infer<typeof jobLinePageSchema>;
export const jobLineQuerySchema = pageQuerySchema.extend({ category: z.enum(COST_CATEGORIES).optional() });
export type JobLineQuery = z.infer<typeof jobLineQuerySchema>;

export const jobInputSchema = z.object({
  number: codeInputSchema,
  /** By name; a new name adds the customer. */
  customer: z.string().trim().max(200).nullable(),
  title: nameInputSchema,
  quantity: z.number().int().min(1).max(1_000_000).nullable(),
  openedOn: localDateSchema.nullable(),
  dueOn: localDateSchema.nullable(),
  quotedPrice: amountInputSchema.nullable(),
  isBillable: z.boolean(),
  status: z.enum(JOB_STATUSES),
});
export type JobInput = z.infer<typeof jobInputSchema>;

const jobId = z.object({ jobId: idSchema });
export const jobEndpoints = {
  listJobs: endpoint({
    method: 'get',
    path: '/jobs',
    summary: 'A page of jobs with their figures',
    permission: 'jobs.view',
    query: jobListQuerySchema,
    response: jobPageSchema,
  }),
  getJob: endpoint({
    method: 'get',
    path: '/jobs/:jobId',
    summary: 'A job',
    permission: 'jobs.view',
    params: jobId,
    response: jobDetailSchema,
  }),
  listJobLines: endpoint({
    method: 'get',
    path: '/jobs/:jobId/lines',
    summary: 'A page of a job’s cost lines',
    permission: 'jobs.view',
    params: jobId,
    query: jobLineQuerySchema,
    response: jobLinePageSchema,
  }),
  exportJobsCsv: endpoint({
    method: 'get',
    path: '/exports/jobs.csv',
    summary: 'All jobs of a filter as CSV',
    permission: 'jobs.view',
    query: jobExportQuerySchema,
    response: 'text/csv',
  }),
  exportJobsWorkbook: endpoint({
    method: 'get',
    path: '/exports/jobs.xlsx',
    summary: 'All jobs of a filter as a workbook with live sums',
    permission: 'jobs.view',
    query: jobExportQuerySchema,
    response: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
  }),
  createJob: endpoint({
    method: 'post',
    path: '/jobs',
    summary: 'Add a job',
    permission: 'jobs.edit',
    body: jobInputSchema,
    response: jobSchema,
  }),
  updateJob: endpoint({
    method: 'patch',
    path: '/jobs/:jobId',
    summary: 'Change a job',
    permission: 'jobs.edit',
    params: jobId,
    body: jobInputSchema,
    response: jobSchema,
  }),
  changeJobStatus: endpoint({
    method: 'post',
    path: '/jobs/:jobId/status',
    summary: 'Say where a job stands',
    permission: 'jobs.edit',
    params: jobId,
    body: z.object({ status: z.enum(JOB_STATUSES) }),
    response: jobSchema,
  }),
  listCustomers: endpoint({
    method: 'get',
    path: '/customers',
    summary: 'Names of customers',
    permission: 'jobs.view',
    response: z.array(z.object({ customerId: idSchema, name: z.string() })),
  }),
};
