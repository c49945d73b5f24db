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
import { COST_CATEGORIES, sourceCellSchema } from './workings';

export const JOB_STATUSES = ['quoted', 'open', 'finished', 'invoiced', 'lost', 'cancelled'] as const;
export type JobStatus = (typeof JOB_STATUSES)[number];
export const JOB_SORTS = [
  'number',
  'customer',
  'title',
  'status',
  'dueOn',
  'hours',
  'machineHours',
  'labour',
  'machine',
  'overhead',
  'total',
  'quotedPrice',
  'lastWorkedOn',
] as const;

/** Sums over a job's cost lines. Money is absent for those without `jobs.money`. */
export const jobFiguresSchema = z.object({
  hours: hoursSchema,
  machineHours: hoursSchema,
  labour: moneySchema.optional(),
  machine: moneySchema.optional(),
  overhead: moneySchema.optional(),
  total: moneySchema.optional(),
});
export type JobFigures = z.infer<typeof jobFiguresSchema>;

export const jobSchema = jobFiguresSchema.extend({
  jobId: idSchema,
  number: z.string(),
  customer: z.string().nullable(),
  title: z.string(),
  quantity: z.number().int().nullable(),
  openedOn: localDateSchema.nullable(),
  dueOn: localDateSchema.nullable(),
  quotedPrice: moneySchema.nullable().optional(),
  isBillable: z.boolean(),
  status: z.enum(JOB_STATUSES),
  lastWorkedOn: localDateSchema.nullable(),
  /** Entries on the job that have no rate on their date, so that its cost is not complete. */
  entriesWithoutRate: z.number().int(),
});
export type Job = z.infer<typeof jobSchema>;

export const jobFilterSchema = z.object({
  search: z.string().trim().max(100).optional(),
  status: z.enum(JOB_STATUSES).optional(),
});
export const jobListQuerySchema = pageQuerySchema.extend({
  ...jobFilterSchema.shape,
  sort: z.enum(JOB_SORTS).default('number'),
  direction: directionSchema.default('desc'),
});
export type JobListQuery = z.infer<typeof jobListQuerySchema>;
export const jobPageSchema = z.object({
  items: z.array(jobSchema),
  nextCursor: z.string().nullable(),
  /** Over all jobs of the filter, not only this page. */
  totals: jobFiguresSchema.extend({ jobs: z.number().int(), quotedPrice: moneySchema.optional() }),
});
export type JobPage = z.infer<typeof jobPageSchema>;

export const jobDetailSchema = jobSchema.extend({
  byOperation: z.array(jobFiguresSchema.extend({ operationId: idSchema, operation: z.string() })),
  byWeek: z.array(z.object({ weekFrom: localDateSchema, hours: hoursSchema, total: moneySchema.optional() })),
});
export type JobDetail = z.infer<typeof jobDetailSchema>;

/** A cost line of a job as its page lists it; money is absent without `jobs.money`. */
export const jobLineSchema = z.object({
  lineId: z.string(),
  workedOn: localDateSchema,
  category: z.enum(COST_CATEGORIES),
  employee: z.string(),
  operation: z.string(),
  machine: z.string().nullable(),
  hours: hoursSchema,
  rate: rateSchema.optional(),
  rateFactor: rateSchema.nullable().optional(),
  amount: moneySchema.optional(),
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
  listCustomers: endpoint({
    method: 'get',
    path: '/customers',
    summary: 'Names of customers',
    permission: 'jobs.view',
    response: z.array(z.object({ customerId: idSchema, name: z.string() })),
  }),
};
