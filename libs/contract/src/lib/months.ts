import { z } from 'zod';
import { endpoint } from './endpoint';
import { JOB_STATUSES } from './jobs';
import { rateGapSchema } from './rollup';
import {
  hoursSchema,
  idSchema,
  instantSchema,
  localDateSchema,
  moneySchema,
  monthSchema,
} from './schema-values';
import { COST_CATEGORIES } from './workings';

/** `running`: not over yet, and so not to be closed. */
export const MONTH_STATES = ['closed', 'open', 'running'] as const;
export type MonthState = (typeof MONTH_STATES)[number];

const monthSummarySchema = z.object({
  month: monthSchema,
  state: z.enum(MONTH_STATES),
  closedAt: instantSchema.nullable(),
  closedBy: z.string().nullable(),
  /** Whether it is the next to be closed, or the one that alone can be reopened. */
  isNext: z.boolean(),
  isLatestClosed: z.boolean(),
});
export type MonthSummary = z.infer<typeof monthSummarySchema>;
export const monthClosingSchema = z.object({
  month: monthSchema,
  closedAt: instantSchema,
  closedBy: z.string(),
  reopenedAt: instantSchema.nullable(),
  reopenedBy: z.string().nullable(),
  reopenReason: z.string().nullable(),
});
export type MonthClosing = z.infer<typeof monthClosingSchema>;
export const monthsSchema = z.object({
  closedThrough: localDateSchema.nullable(),
  /** Where what comes late for a closed month is posted; null while none is closed. */
  latePostedOn: localDateSchema.nullable(),
  /** From the first with anything in it to the one that is running, latest first. */
  months: z.array(monthSummarySchema),
  /** Every closing there was, latest first. */
  closings: z.array(monthClosingSchema),
});
export type Months = z.infer<typeof monthsSchema>;

/** Why a month cannot be closed now. */
export const MONTH_BLOCKERS = ['closed', 'running', 'not_next', 'rollup_behind', 'rates_missing'] as const;
export type MonthBlocker = (typeof MONTH_BLOCKERS)[number];

export const monthLateLineSchema = z.object({
  lineId: z.string(),
  postedOn: localDateSchema,
  workedOn: localDateSchema,
  category: z.enum(COST_CATEGORIES),
  label: z.string(),
  /** Whether it takes back what was posted before. */
  isReversal: z.boolean(),
  job: z.string().nullable(),
  jobId: idSchema.nullable(),
  amount: moneySchema,
});
export type MonthLateLine = z.infer<typeof monthLateLineSchema>;

export const monthTieOutSchema = z.object({
  employeeId: idSchema,
  employee: z.string(),
  /** Of the timesheets of the month, by the day of the work. */
  hours: hoursSchema,
  /** The part of `hours` above the weekly threshold, a week's being shared out over its days by hours. */
  overtimeHours: hoursSchema,
  /** In labour lines, and in entries without a wage. */
  costedHours: hoursSchema,
  payrollHours: hoursSchema.nullable(),
  /** payrollHours − hours. */
  difference: hoursSchema.nullable(),
});
export type MonthTieOut = z.infer<typeof monthTieOutSchema>;

export const monthTotalSchema = z.object({
  category: z.enum(COST_CATEGORIES),
  amount: moneySchema,
  /** The part without a job. */
  toOverhead: moneySchema,
  /** The part that came late for a month closed before. */
  late: moneySchema,
  lines: z.number().int(),
});
export type MonthTotal = z.infer<typeof monthTotalSchema>;

export const monthEndSchema = monthSummarySchema.extend({
  from: localDateSchema,
  to: localDateSchema,
  latePostedOn: localDateSchema.nullable(),
  /** What refuses the close; `rollup_behind` is put right by the close itself. */
  blockers: z.array(z.object({ code: z.enum(MONTH_BLOCKERS), message: z.string() })),
  checklist: z.object({
    /** Weekdays without any hours of somebody active who has a wage by then. */
    missingTimesheets: z.array(
      z.object({ employeeId: idSchema, employee: z.string(), days: z.array(localDateSchema) }),
    ),
    refusals: z.array(
      z.object({
        importId: idSchema,
        fileName: z.string(),
        importedAt: instantSchema,
        importedBy: z.string(),
        refused: z.number().int(),
        reviewedAt: instantSchema.nullable(),
        reviewedBy: z.string().nullable(),
      }),
    ),
    /** Finished jobs with cost and without an invoice. */
    uninvoicedJobs: z.array(
      z.object({
        jobId: idSchema,
        number: z.string(),
        title: z.string(),
        customer: z.string().nullable(),
        status: z.enum(JOB_STATUSES),
        cost: moneySchema,
      }),
    ),
    rollup: z.object({ daysWaiting: z.number().int(), through: localDateSchema.nullable() }),
    gaps: z.array(rateGapSchema),
  }),
  tieOut: z.array(monthTieOutSchema),
  totals: z.array(monthTotalSchema),
  /** Lines posted in this month for work of a month closed before. */
  lateIn: z.array(monthLateLineSchema),
  lateInCount: z.number().int(),
  /** Lines of work of this month that are posted later. */
  lateOut: z.array(monthLateLineSchema),
  lateOutCount: z.number().int(),
});
export type MonthEnd = z.infer<typeof monthEndSchema>;

export const payrollHoursInputSchema = z.object({
  hours: z
    .string()
    .trim()
    .regex(/^\d{1,3}(\.\d{1,4})?$/, {
      error: 'Write hours with at most 4 decimals, for example 168.5.',
      abort: true,
    })
    .refine((text) => Number(text) <= 744, 'A month has at most 744 hours.')
    .nullable(),
});
export type PayrollHoursInput = z.infer<typeof payrollHoursInputSchema>;
export const monthReopenSchema = z.object({
  reason: z
    .string()
    .trim()
    .min(1, 'Say why, in a few words: it is kept with the month.')
    .max(500, 'At most 500 characters.'),
});
export const refusalsReviewSchema = z.object({ isReviewed: z.boolean() });

const month = z.object({ month: monthSchema });
export const monthEndpoints = {
  listMonths: endpoint({
    method: 'get',
    path: '/months',
    summary: 'Months with their state, and who closed and reopened them',
    permission: 'months.view',
    response: monthsSchema,
  }),
  getMonth: endpoint({
    method: 'get',
    path: '/months/:month',
    summary: 'A month’s checklist, hours against payroll, totals and late lines',
    permission: 'months.view',
    params: month,
    response: monthEndSchema,
  }),
  closeMonth: endpoint({
    method: 'post',
    path: '/months/:month/close',
    summary: 'Roll up if needed and close the month',
    permission: 'months.close',
    params: month,
    response: monthEndSchema,
  }),
  reopenMonth: endpoint({
    method: 'post',
    path: '/months/:month/reopen',
    summary: 'Reopen the latest closed month, with a reason',
    permission: 'months.reopen',
    params: month,
    body: monthReopenSchema,
    response: monthEndSchema,
  }),
  savePayrollHours: endpoint({
    method: 'patch',
    path: '/months/:month/payroll-hours/:employeeId',
    summary: 'Hours of an employee’s month as payroll has them',
    permission: 'months.close',
    params: month.extend({ employeeId: idSchema }),
    body: payrollHoursInputSchema,
    response: monthTieOutSchema,
  }),
  reviewRefusals: endpoint({
    method: 'post',
    path: '/timesheets/:importId/review',
    summary: 'Say that the refused rows of an import have been looked at, or not',
    permission: 'timesheets.use',
    params: z.object({ importId: idSchema }),
    body: refusalsReviewSchema,
    response: null,
  }),
};
