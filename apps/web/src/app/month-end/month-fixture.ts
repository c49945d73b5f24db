import { type MonthEnd, type Months } from '@brakeven/contract';

/** An ended month in which nothing is missing. */
export function makeMonth(change: Partial<MonthEnd> = {}): MonthEnd {
  return {
    month: '2026-11',
    state: 'open',
    closedAt: null,
    closedBy: null,
    isNext: true,
    isLatestClosed: false,
    from: '2026-11-01',
    to: '2026-11-30',
    latePostedOn: null,
    blockers: [],
    checklist: {
      missingTimesheets: [],
      refusals: [],
      uninvoicedJobs: [],
      rollup: { daysWaiting: 0, through: '2026-11-30' },
      gaps: [],
    },
    tieOut: [
      {
        employeeId: 'e1',
        employee: 'Pia Strand',
        hours: '168.5000',
        overtimeHours: '4.0000',
        costedHours: '168.5000',
        payrollHours: null,
        difference: null,
      },
    ],
    totals: [
      { category: 'labour', amount: '6000.00', toOverhead: '0.00', late: '100.00', lines: 40 },
      { category: 'overtime', amount: '60.50', toOverhead: '60.50', late: '0.00', lines: 5 },
      { category: 'invoiced', amount: '9000.00', toOverhead: '0.00', late: '0.00', lines: 2 },
    ],
    lateIn: [],
    lateInCount: 0,
    lateOut: [],
    lateOutCount: 0,
    ...change,
  };
}

/** November to be closed, December running, October closed. */
export const MONTHS: Months = {
  closedThrough: '2026-10-31',
  latePostedOn: '2026-11-01',
  months: [
    {
      month: '2026-12',
      state: 'running',
      closedAt: null,
      closedBy: null,
      isNext: false,
      isLatestClosed: false,
    },
    { month: '2026-11', state: 'open', closedAt: null, closedBy: null, isNext: true, isLatestClosed: false },
    {
      month: '2026-10',
      state: 'closed',
      closedAt: '2026-11-03T15:00:00.000Z',
      closedBy: 'Ines Marlow',
      isNext: false,
      isLatestClosed: true,
    },
  ],
  closings: [
    {
      month: '2026-10',
      closedAt: '2026-11-03T15:00:00.000Z',
      closedBy: 'Ines Marlow',
      reopenedAt: null,
      reopenedBy: null,
      reopenReason: null,
    },
  ],
};
