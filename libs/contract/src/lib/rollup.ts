import { z } from 'zod';
import { endpoint } from './endpoint';
import { idSchema, instantSchema, localDateSchema } from './schema-values';
import { COST_CATEGORIES } from './workings';

/** Entries that have no rate of a category on their date; their cost is missing, not zero. */
export const rateGapSchema = z.object({
  category: z.enum(COST_CATEGORIES),
  /** The employee or machine without a rate; null for overhead. */
  subject: z.string().nullable(),
  entries: z.number().int(),
  firstDay: localDateSchema,
  lastDay: localDateSchema,
});
export type RateGap = z.infer<typeof rateGapSchema>;

export const rollupStatusSchema = z.object({
  /** Latest work date in the costs; null before the first rollup. */
  through: localDateSchema.nullable(),
  entriesWaiting: z.number().int(),
  daysWaiting: z.number().int(),
  lastRunAt: instantSchema.nullable(),
  isRunning: z.boolean(),
  gaps: z.array(rateGapSchema),
});
export type RollupStatus = z.infer<typeof rollupStatusSchema>;
export const rollupResultSchema = z.object({
  shop: z.string(),
  days: z.number().int(),
  lines: z.number().int(),
  through: localDateSchema.nullable(),
});
export type RollupResult = z.infer<typeof rollupResultSchema>;

export const auditEventSchema = z.object({
  eventId: idSchema,
  at: instantSchema,
  actor: z.string(),
  action: z.string(),
  subjectKind: z.string(),
  subjectId: z.string(),
  before: z.record(z.string(), z.unknown()).nullable(),
  after: z.record(z.string(), z.unknown()).nullable(),
});
export type AuditEvent = z.infer<typeof auditEventSchema>;

export const rollupEndpoints = {
  getRollupStatus: endpoint({
    method: 'get',
    path: '/rollup',
    summary: 'Through which day costs are rolled up, and what waits',
    permission: 'rollup.view',
    response: rollupStatusSchema,
  }),
  runRollup: endpoint({
    method: 'post',
    path: '/rollup',
    summary: 'Roll up what has changed',
    permission: 'rollup.run',
    response: rollupResultSchema,
  }),
  listAuditEvents: endpoint({
    method: 'get',
    path: '/audit',
    summary: 'Who changed what, latest first',
    permission: 'audit.view',
    query: z.object({
      cursor: z.string().max(100).optional(),
      limit: z.coerce.number().int().min(1).max(200).default(50),
    }),
    response: z.object({ items: z.array(auditEventSchema), nextCursor: z.string().nullable() }),
  }),
};
