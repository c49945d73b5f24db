import { z } from 'zod';
import { endpoint } from './endpoint';
import { rateGapSchema } from './rollup';
import {
  hoursSchema,
  idSchema,
  localDateSchema,
  moneySchema,
  monthSchema,
  quantitySchema,
  rateSchema,
} from './schema-values';

export const BREAK_EVEN_METHODS = ['reached', 'straight-line', 'not-at-this-pace', 'no-data'] as const;
export type BreakEvenMethod = (typeof BREAK_EVEN_METHODS)[number];

export const paybackFiguresSchema = z.object({
  outlay: moneySchema,
  earned: moneySchema,
  operatorLabour: moneySchema,
  running: moneySchema,
  /** operatorLabour + running. */
  runningCost: moneySchema,
  /** earned − runningCost. */
  earnedBack: moneySchema,
  /** outlay − earnedBack, not below 0. */
  remaining: moneySchema,
  asOf: localDateSchema.nullable(),
  breakEven: z.object({ date: localDateSchema.nullable(), method: z.enum(BREAK_EVEN_METHODS) }),
});
export type PaybackFigures = z.infer<typeof paybackFiguresSchema>;

export const paybackSchema = paybackFiguresSchema.extend({
  machine: z.object({
    machineId: idSchema,
    code: z.string(),
    name: z.string(),
    kind: z.string(),
    inServiceOn: localDateSchema.nullable(),
    ratedForceKn: quantitySchema.nullable(),
    bedLengthMm: quantitySchema.nullable(),
  }),
  basis: z.literal('charge-out'),
  hours: hoursSchema,
  /** Net benefit a week over the pace window, null without data. */
  pacePerWeek: moneySchema.nullable(),
  /** Days that the pace is taken from: at most 182. */
  paceDays: z.number().int(),
  /** Cumulative net cash, −outlay at the in-service date, one point a day with work. */
  curve: z.array(z.object({ on: localDateSchema, netCash: moneySchema })),
  /** The month of `asOf`. */
  month: z
    .object({
      month: monthSchema,
      hours: hoursSchema,
      billableHours: hoursSchema,
      /** Null when more than one rate was valid in the month. */
      chargeOutRate: rateSchema.nullable(),
      earned: moneySchema,
      operatorLabour: moneySchema,
      running: moneySchema,
      net: moneySchema,
    })
    .nullable(),
  topJobs: z.array(
    z.object({
      jobId: idSchema,
      number: z.string(),
      title: z.string(),
      /** What its hours on the machine earned, less what those cost to run. */
      net: moneySchema,
      /** What the whole job lost, by all of its cost and its invoices; null if it did not, or is not done. */
      loss: moneySchema.nullable(),
    }),
  ),
  otherJobs: z.object({ jobs: z.number().int(), net: moneySchema }),
  gaps: z.array(rateGapSchema),
});
export type Payback = z.infer<typeof paybackSchema>;

export const paybackEndpoints = {
  getPayback: endpoint({
    method: 'get',
    path: '/machines/:machineId/payback',
    summary: 'Has the machine paid for itself, and when will it',
    permission: 'payback.view',
    params: z.object({ machineId: idSchema }),
    response: paybackSchema,
  }),
};
