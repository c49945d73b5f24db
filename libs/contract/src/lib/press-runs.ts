import { z } from 'zod';
import { endpoint } from './endpoint';
import { bendLengthInputSchema, materialCodeSchema, thicknessInputSchema } from './forming';
import {
  countInputSchema,
  directionSchema,
  hoursSchema,
  idSchema,
  instantSchema,
  localDateSchema,
  pageQuerySchema,
  positiveQuantityInputSchema,
  quantitySchema,
} from './schema-values';

/** Lengths are in mm, forces in kN. Shares are of 1. */
export const pressRunSchema = z.object({
  pressRunId: idSchema,
  runOn: localDateSchema,
  jobId: idSchema,
  jobNumber: z.string(),
  jobTitle: z.string(),
  machineId: idSchema,
  machine: z.string(),
  punchId: idSchema.nullable(),
  punch: z.string().nullable(),
  dieOpeningId: idSchema,
  die: z.string(),
  openingMm: quantitySchema,
  materialCode: z.string(),
  /** The code again, if the material is no longer there. */
  material: z.string(),
  thicknessMm: quantitySchema,
  bendLengthMm: quantitySchema,
  strokes: z.number().int(),
  pieces: z.number().int(),
  /** As both rules computed it when the run was logged. */
  forceLowKn: quantitySchema,
  forceHighKn: quantitySchema,
  /** As the press's gauge showed it at most; null if nobody read it. */
  highestForceKn: quantitySchema.nullable(),
  /** What the gauge showed, else the higher of the rules. */
  forceUsedKn: quantitySchema,
  /** The lowest rating known of press, die and punch over this length; null if none is known. */
  ratedKn: quantitySchema.nullable(),
  ratingOf: z.enum(['press', 'die', 'punch']).nullable(),
  /** Force used ÷ rating. */
  share: z.number().nullable(),
  isAboveLine: z.boolean(),
  isGood: z.boolean(),
  note: z.string().nullable(),
  /** The time entry that it goes with. */
  entryId: idSchema.nullable(),
  loggedBy: z.string(),
  voidedAt: instantSchema.nullable(),
  voidedBy: z.string().nullable(),
});
export type PressRun = z.infer<typeof pressRunSchema>;

export const pressRunInputSchema = z.object({
  jobId: idSchema,
  machineId: idSchema,
  punchId: idSchema.nullable().default(null),
  dieOpeningId: idSchema,
  materialCode: materialCodeSchema,
  thicknessMm: thicknessInputSchema,
  bendLengthMm: bendLengthInputSchema,
  strokes: countInputSchema,
  pieces: z
    .number()
    .int('Pieces are whole, such as 40.')
    .min(0, 'Pieces are 0 or more, such as 40.')
    .max(1_000_000, 'At most a million.'),
  highestForceKn: positiveQuantityInputSchema
    .refine(
      (text) => Number(text) <= 100_000,
      'A force is above 0 and at most 100,000 kN, such as 22 US tons.',
    )
    .nullable()
    .default(null),
  /** Left out: today. */
  runOn: localDateSchema.optional(),
  isGood: z.boolean().default(true),
  note: z.string().trim().max(300, 'At most 300 characters.').nullable().default(null),
  entryId: idSchema.nullable().default(null),
});
export type PressRunInput = z.input<typeof pressRunInputSchema>;

export const PRESS_RUN_SORTS = [
  'runOn',
  'job',
  'machine',
  'material',
  'openingMm',
  'bendLengthMm',
  'strokes',
  'pieces',
  'forceUsedKn',
  'share',
] as const;
export const pressRunFilterSchema = z.object({
  from: localDateSchema.optional(),
  to: localDateSchema.optional(),
  jobId: idSchema.optional(),
  machineId: idSchema.optional(),
  dieOpeningId: idSchema.optional(),
  materialCode: materialCodeSchema.optional(),
  /** Only runs above the shop's line. */
  aboveLine: z.enum(['true']).optional(),
  /** Matches job number and title, machine, die, note. */
  search: z.string().trim().max(100).optional(),
});
export type PressRunFilter = z.infer<typeof pressRunFilterSchema>;
export const pressRunQuerySchema = pageQuerySchema.extend({
  ...pressRunFilterSchema.shape,
  show: z.enum(['live', 'voided']).default('live'),
  sort: z.enum(PRESS_RUN_SORTS).default('runOn'),
  direction: directionSchema.default('desc'),
});
export type PressRunQuery = z.infer<typeof pressRunQuerySchema>;
export const pressRunPageSchema = z.object({
  items: z.array(pressRunSchema),
  nextCursor: z.string().nullable(),
});
export type PressRunPage = z.infer<typeof pressRunPageSchema>;

/** How the runs of a filter lie by their share of the rating. */
export const forceDistributionSchema = z.object({
  forceLinePercent: quantitySchema,
  runs: z.number().int(),
  strokes: z.number().int(),
  runsAboveLine: z.number().int(),
  strokesAboveLine: z.number().int(),
  /** Runs for which no rating is known. */
  runsWithoutRating: z.number().int(),
  highestShare: z.number().nullable(),
  /** Ten percent each from 0 to 100, from (excluded) to (included); the last one is all above 100. */
  bins: z.array(
    z.object({
      fromPercent: z.number().int(),
      toPercent: z.number().int().nullable(),
      runs: z.number().int(),
      strokes: z.number().int(),
    }),
  ),
});
export type ForceDistribution = z.infer<typeof forceDistributionSchema>;

/** What a run can be logged on. An operator is offered the own time entries only. */
export const pressRunChoicesSchema = z.object({
  jobs: z.array(z.object({ jobId: idSchema, number: z.string(), title: z.string() })),
  /** Time entries of the job asked for, latest first. */
  entries: z.array(
    z.object({
      entryId: idSchema,
      workedOn: localDateSchema,
      employee: z.string(),
      operation: z.string(),
      hours: hoursSchema,
    }),
  ),
});
export type PressRunChoices = z.infer<typeof pressRunChoicesSchema>;

/** What the last good run of a job used. */
export const setupCardSchema = z.object({
  jobId: idSchema,
  jobNumber: z.string(),
  jobTitle: z.string(),
  /** One for each material, thickness and bend length, the latest good one; empty if there was none. */
  runs: z.array(
    pressRunSchema.extend({
      noseRadiusMm: quantitySchema.nullable(),
      dieAngle: quantitySchema.nullable(),
    }),
  ),
});
export type SetupCard = z.infer<typeof setupCardSchema>;

const pressRunId = z.object({ pressRunId: idSchema });
const jobId = z.object({ jobId: idSchema });
export const pressRunEndpoints = {
  listPressRuns: endpoint({
    method: 'get',
    path: '/press-runs',
    summary: 'A page of press runs; an operator sees those logged by the own account',
    permission: 'press-runs.log',
    query: pressRunQuerySchema,
    response: pressRunPageSchema,
  }),
  getPressRunChoices: endpoint({
    method: 'get',
    path: '/press-runs/choices',
    summary: 'Jobs and time entries that a run can be logged on',
    permission: 'press-runs.log',
    query: z.object({ jobId: idSchema.optional() }),
    response: pressRunChoicesSchema,
  }),
  getForceDistribution: endpoint({
    method: 'get',
    path: '/press-runs/distribution',
    summary: 'How press runs lie by their share of the rating',
    permission: 'press-runs.view',
    query: pressRunFilterSchema,
    response: forceDistributionSchema,
  }),
  createPressRun: endpoint({
    method: 'post',
    path: '/press-runs',
    summary: 'Log a press run',
    permission: 'press-runs.log',
    body: pressRunInputSchema,
    response: pressRunSchema,
  }),
  correctPressRun: endpoint({
    method: 'patch',
    path: '/press-runs/:pressRunId',
    summary:
      'Correct a press run: it is voided and another takes its place; an operator only one logged by the own account',
    permission: 'press-runs.log',
    params: pressRunId,
    body: pressRunInputSchema,
    response: pressRunSchema,
  }),
  voidPressRun: endpoint({
    method: 'post',
    path: '/press-runs/:pressRunId/void',
    summary: 'Void a press run; an operator only one logged by the own account',
    permission: 'press-runs.log',
    params: pressRunId,
    response: null,
  }),
  restorePressRun: endpoint({
    method: 'post',
    path: '/press-runs/:pressRunId/restore',
    summary: 'Take back the voiding of a press run, unless a correction of it counts',
    permission: 'press-runs.log',
    params: pressRunId,
    response: null,
  }),
  getSetupCard: endpoint({
    method: 'get',
    path: '/jobs/:jobId/setup-card',
    summary: 'What the last good press runs of a job used',
    permission: 'forming.use',
    params: jobId,
    response: setupCardSchema,
  }),
};
