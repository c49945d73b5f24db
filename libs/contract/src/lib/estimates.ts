import { z } from 'zod';
import { endpoint } from './endpoint';
import { JOB_STATUSES } from './jobs';
import {
  amountInputSchema,
  hoursSchema,
  idSchema,
  localDateSchema,
  moneySchema,
  rateInputSchema,
  rateSchema,
} from './schema-values';
import { workingsQuerySchema, workingsSchema } from './workings';

const number = (places: number, example: string) =>
  z
    .string()
    .trim()
    .regex(
      new RegExp(`^\\d{1,9}(\\.\\d{1,${places}})?$`),
      `Write a number of 0 or more with at most ${places} decimals, for example ${example}.`,
    );
const isAboveZero = (text: string) => Number(text) > 0;
const descriptionSchema = z.string().trim().max(200, 'At most 200 characters.');

/** Share of pieces, hours and material that an estimate allows for scrap. */
export const allowanceInputSchema = number(4, '2.5').refine(
  (text) => Number(text) <= 100,
  'Give a scrap allowance from 0 to 100 percent.',
);
/** Wanted margin as a share of the price. */
export const marginInputSchema = number(4, '20').refine(
  (text) => Number(text) < 100,
  'Give a margin from 0 to below 100 percent of the price.',
);

const operationLineSchema = z
  .object({
    kind: z.literal('operation'),
    operationId: idSchema,
    machineId: idSchema.nullable(),
    setupHours: number(4, '0.5').refine((text) => Number(text) < 100_000, 'Too many hours.'),
    minutesPerPiece: number(4, '3.5').refine((text) => Number(text) < 1_000_000, 'Too many minutes.'),
    pieces: z.number().int().min(1, 'At least one piece.').max(1_000_000, 'At most 1,000,000 pieces.'),
    labourRate: rateInputSchema,
    machineHourRate: rateInputSchema.nullable(),
    overheadRate: rateInputSchema,
    description: descriptionSchema,
  })
  .refine((line) => Number(line.setupHours) + Number(line.minutesPerPiece) > 0, {
    path: ['minutesPerPiece'],
    message: 'Give set-up hours or minutes per piece; one of them must be above 0.',
  })
  .refine((line) => (line.machineId === null) === (line.machineHourRate === null), {
    path: ['machineHourRate'],
    message: 'A machine needs its machine-hour rate, and without a machine there is none.',
  });
const materialLineSchema = z.object({
  kind: z.literal('material'),
  materialId: idSchema,
  /** Without the scrap allowance. */
  weightKg: number(10, '12.5').refine(isAboveZero, 'A weight must be above 0.'),
  pricePerKg: rateInputSchema,
  description: descriptionSchema,
});
const outsideLineSchema = z.object({
  kind: z.literal('outside'),
  amount: amountInputSchema.refine(isAboveZero, 'An amount must be above 0.'),
  description: descriptionSchema,
});

export const estimateLineInputSchema = z.discriminatedUnion('kind', [
  operationLineSchema,
  materialLineSchema,
  outsideLineSchema,
]);
export type EstimateLineInput = z.infer<typeof estimateLineInputSchema>;

/** An estimate as it is saved: whole, its lines in their order. */
export const estimateInputSchema = z.object({
  estimatedOn: localDateSchema,
  scrapAllowancePercent: allowanceInputSchema,
  marginPercent: marginInputSchema,
  lines: z
    .array(estimateLineInputSchema)
    .min(1, 'An estimate needs at least one line.')
    .max(300, 'At most 300 lines.'),
});
export type EstimateInput = z.infer<typeof estimateInputSchema>;

export const estimateCostSchema = z.object({
  hours: hoursSchema,
  labour: moneySchema,
  overtime: moneySchema,
  machine: moneySchema,
  overhead: moneySchema,
  material: moneySchema,
  outside: moneySchema,
  total: moneySchema,
});
export type EstimateCostFigures = z.infer<typeof estimateCostSchema>;

export const estimateSchema = estimateInputSchema.extend({
  cost: estimateCostSchema,
  /** What the price must be for the wanted margin. */
  priceForMargin: moneySchema,
});
export type Estimate = z.infer<typeof estimateSchema>;

const namedSchema = z.object({ id: idSchema, name: z.string() });
/** What lines of an estimate choose from, with the rates that hold on a day; null where none does. */
export const estimateChoicesSchema = z.object({
  on: localDateSchema,
  operations: z.array(namedSchema.extend({ defaultMachineId: idSchema.nullable() })),
  machines: z.array(namedSchema.extend({ machineHourRate: rateSchema.nullable() })),
  materials: z.array(namedSchema.extend({ averagePerKg: rateSchema.nullable() })),
  /** Average wage with burden of the active employees. */
  labourRate: rateSchema.nullable(),
  overheadRate: rateSchema.nullable(),
});
export type EstimateChoices = z.infer<typeof estimateChoicesSchema>;

/** A job whose estimate may be copied, and how that estimate fared. */
export const likeJobSchema = z.object({
  jobId: idSchema,
  number: z.string(),
  title: z.string(),
  customer: z.string().nullable(),
  quantity: z.number().int().nullable(),
  status: z.enum(JOB_STATUSES),
  materials: z.array(z.string()),
  estimate: moneySchema,
  actual: moneySchema,
});
export type LikeJob = z.infer<typeof likeJobSchema>;

export const RATES_OF_COPY = ['copied', 'today'] as const;
export const estimateDraftSchema = estimateInputSchema.extend({
  /** By which numbers of pieces it was scaled; null where a job has no quantity, so that nothing was. */
  scaled: z.object({ from: z.number().int(), to: z.number().int() }).nullable(),
  /** Rates of today that are missing, so that those of the other estimate stayed. */
  ratesKept: z.array(z.string()),
});
export type EstimateDraft = z.infer<typeof estimateDraftSchema>;

const jobId = z.object({ jobId: idSchema });
export const estimateEndpoints = {
  getEstimate: endpoint({
    method: 'get',
    path: '/jobs/:jobId/estimate',
    summary: 'The estimate of a job',
    permission: 'jobs.money',
    versioned: true,
    params: jobId,
    response: z.object({ estimate: estimateSchema.nullable() }),
  }),
  saveEstimate: endpoint({
    method: 'patch',
    path: '/jobs/:jobId/estimate',
    summary: 'Save the estimate of a job whole',
    permission: 'jobs.edit',
    versioned: true,
    params: jobId,
    body: estimateInputSchema,
    response: estimateSchema,
  }),
  deleteEstimate: endpoint({
    method: 'delete',
    path: '/jobs/:jobId/estimate',
    summary: 'Remove the estimate of a job',
    permission: 'jobs.edit',
    versioned: true,
    params: jobId,
    response: null,
  }),
  quotePrice: endpoint({
    method: 'post',
    path: '/jobs/:jobId/quoted-price',
    summary: 'Make a price the quoted price of a job',
    permission: 'jobs.edit',
    params: jobId,
    body: z.object({ quotedPrice: amountInputSchema }),
    response: null,
  }),
  getEstimateChoices: endpoint({
    method: 'get',
    path: '/estimates/choices',
    summary: 'What an estimate chooses from, with the rates of a day',
    permission: 'jobs.money',
    query: z.object({ on: localDateSchema }),
    response: estimateChoicesSchema,
  }),
  listLikeJobs: endpoint({
    method: 'get',
    path: '/jobs/:jobId/like',
    summary: 'Other jobs with an estimate, the likest first, found by title, customer or material',
    permission: 'jobs.money',
    params: jobId,
    query: z.object({ search: z.string().trim().max(100).optional() }),
    response: z.array(likeJobSchema),
  }),
  draftEstimate: endpoint({
    method: 'get',
    path: '/jobs/:jobId/estimate-draft',
    summary: 'The estimate of another job, scaled to this one’s pieces; nothing is saved',
    permission: 'jobs.money',
    params: jobId,
    query: z.object({ fromJobId: idSchema, rates: z.enum(RATES_OF_COPY), on: localDateSchema }),
    response: estimateDraftSchema,
  }),
  getEstimateWorkings: endpoint({
    method: 'get',
    path: '/workings/estimates',
    summary: 'How a figure of an estimate, or of the estimates of jobs, was made',
    permission: 'jobs.money',
    query: workingsQuerySchema,
    response: workingsSchema,
  }),
};
