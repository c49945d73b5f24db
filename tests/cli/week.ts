import { toLocalDate } from '@brakeven/values';
import { type SetupData, type TimesheetLine } from '@brakeven/workbook';

const from = toLocalDate('2024-01-01');

/** A shop so small that its costs can be worked out by hand. */
export const SETUP: SetupData = {
  people: [
    { number: '101', name: 'Pia Strand', rateFrom: from, wagePerHour: '28.50', burdenPercent: '22' },
    { number: '102', name: 'Ola Nyström', rateFrom: from, wagePerHour: '31.125', burdenPercent: '25' },
  ],
  customers: [{ name: 'Harbour Rail' }],
  operations: [
    { code: 'FORM', name: 'Form', machine: 'PB2' },
    { code: 'WELD', name: 'Weld', machine: null },
  ],
  machines: [
    {
      code: 'PB2',
      name: 'Press 2',
      kind: 'Press brake',
      inServiceOn: toLocalDate('2024-03-04'),
      ratedForceKn: '533.7865',
      bedLengthMm: '1828.8',
    },
  ],
  machineCosts: [
    { machine: 'PB2', date: toLocalDate('2024-02-01'), kind: 'price', description: null, amount: '1000.00' },
    { machine: 'PB2', date: toLocalDate('2024-02-20'), kind: 'freight', description: null, amount: '150.50' },
  ],
  machineRates: [
    {
      machine: 'PB2',
      validFrom: from,
      machineHourRate: '18',
      chargeOutRate: '95.50',
      runningCostPerHour: '4.125',
    },
  ],
  overhead: [{ validFrom: from, ratePerLabourHour: '12' }],
  jobs: [
    toJob({ number: 'J-100', customer: 'Harbour Rail', isBillable: true }),
    toJob({ number: 'J-200', customer: null, isBillable: false }),
  ],
};

function toJob(job: { number: string; customer: string | null; isBillable: boolean }) {
  return {
    ...job,
    title: 'Trench covers',
    quantity: 12,
    openedOn: from,
    dueOn: null,
    quotedPrice: '900.00',
    status: 'open' as const,
  };
}

const line = (
  day: string,
  employee: string,
  job: string,
  operation: string,
  hours: string,
): TimesheetLine => ({
  workedOn: toLocalDate(day),
  employee,
  job,
  operation,
  machine: null,
  hours,
  good: null,
  scrap: null,
  note: null,
});

/** Three rows, 9.0833 hours. */
export const WEEK: readonly TimesheetLine[] = [
  line('2024-03-04', '101', 'J-100', 'FORM', '7.5'),
  line('2024-03-04', '102', 'J-100', 'WELD', '0.25'),
  line('2024-03-05', '102', 'J-200', 'FORM', '1.3333'),
];

/** The same week with one row of somebody unknown, 2 hours. */
export const WEEK_WITH_STRANGER: readonly TimesheetLine[] = [
  ...WEEK,
  line('2024-03-05', 'Nobody Known', 'J-100', 'WELD', '2'),
];

/**
 * Worked out by hand from SETUP and WEEK, each line rounded half up to the cent:
 * labour 7.5 × 28.50 × 1.22 = 260.775 → 260.78; 0.25 × 31.125 × 1.25 = 9.7265… → 9.73;
 * 1.3333 × 31.125 × 1.25 = 51.8737… → 51.87. Machine 7.5 × 18 = 135.00. Overhead 7.75 × 12 = 93.00.
 */
export const COST_OF_J100 = {
  job: 'J-100',
  through: '2024-03-05',
  hours: '7.7500',
  labour: '270.51',
  machine: '135.00',
  overhead: '93.00',
  total: '498.51',
};

/**
 * Earned 7.5 × 95.50 = 716.25, the other job is not billable. Running cost: labour on the machine 260.78 + 51.87,
 * and 7.5 × 4.125 = 30.9375 → 30.94 and 1.3333 × 4.125 = 5.4998… → 5.50. Two days in service earned 367.16 back,
 * 183.58 a day; 783.34 more take 4.27 days, so 5.
 */
export const PAYBACK_OF_PB2 = {
  machine: 'PB2',
  outlay: '1150.50',
  earned: '716.25',
  runningCost: '349.09',
  earnedBack: '367.16',
  remaining: '783.34',
  asOf: '2024-03-05',
  breakEven: { date: '2024-03-10', method: 'straight-line' },
};
