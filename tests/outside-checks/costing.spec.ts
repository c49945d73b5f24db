import {
  computeEntryLines,
  computeJobCost,
  computePayback,
  type CostedEntry,
  type PaybackDay,
  type RateBook,
} from '@brakeven/costing';
import { addDays, moneyText, toHours, toLocalDate, toMoney, toPercent, toRate } from '@brakeven/values';

const day1 = toLocalDate('2026-03-02');

function bookWith(wage: string, overhead: string, machineHour: string): RateBook {
  const machineRate = {
    id: 'm',
    validFrom: day1,
    machineHourRate: toRate(machineHour),
    chargeOutRate: toRate(0),
    runningCostPerHour: toRate(0),
  };
  return {
    payRates: new Map([
      ['e', [{ id: 'p', validFrom: day1, wagePerHour: toRate(wage), burdenPercent: toPercent(0) }]],
    ]),
    machineRates: new Map([['press', [machineRate]]]),
    overheadRates: [{ id: 'o', validFrom: day1, ratePerLabourHour: toRate(overhead) }],
    inServiceOn: new Map(),
  };
}

function costOf(hours: number, book: RateBook) {
  const entry: CostedEntry = {
    entryId: '1',
    workedOn: day1,
    employeeId: 'e',
    jobId: 'j',
    isBillable: true,
    machineId: 'press',
    hours: toHours(hours),
  };
  return computeJobCost(computeEntryLines(entry, book).lines);
}

// Source: cost-accounting course texts on direct labour and overtime premium; the straight-time part is direct.
// The premium is apart from it: see overtime.spec.ts.
it.each([
  [44, '20', '880.00'],
  [44, '16', '704.00'],
  [40, '10.40', '416.00'],
])('charges %d h at %s as %s of direct labour', (hours, wage, printed) => {
  expect(moneyText(costOf(hours, bookWith(wage, '0', '0')).labour)).toBe(printed);
});

// Source: managerial-accounting course notes on absorption: a predetermined rate × actual hours is what is applied.
it.each([
  [495_000, '2.00', '990000.00'],
  [43_500, '9.50', '413250.00'],
])('applies overhead for %d h at %s as %s', (hours, rate, printed) => {
  expect(moneyText(costOf(hours, bookWith('0', rate, '0')).overhead)).toBe(printed);
});

// Source: cost-accounting problem pages on the machine-hour rate (2.70 an hour with four units of power); 160 h a month.
it('charges 160 machine hours at the published 2.70 an hour as 432.00', () => {
  expect(moneyText(costOf(160, bookWith('0', '0', '2.70')).machine)).toBe('432.00');
});

// Published simple paybacks in periods; one period stands as one day here, and the first whole period that covers the
// outlay is the published figure rounded up.
const PUBLISHED_PAYBACKS: [outlay: number, flows: number[], periods: number, source: string][] = [
  [75_000, [20_000, 30_000, 50_000], 2.5, 'accountancy lecture notes'],
  [10_000, [3000, 3000, 3000, 3000, 3000], 3.333333, 'payback lecture page'],
  [
    100_000,
    [25_000, 25_000, 25_000, 25_000, 25_000],
    4.0,
    'lecture page on simple against discounted payback',
  ],
  [
    260_000,
    [125_000, 125_000, 125_000],
    2.08,
    'managerial-accounting problem set: 75,000 income + 50,000 depreciation',
  ],
  [190_000, [50_000, 50_000, 50_000, 50_000], 3.8, 'managerial-accounting problem set: 30,000 + 20,000'],
];

function daysOf(flows: number[]): PaybackDay[] {
  return flows.map((flow, index) => ({
    workedOn: addDays(day1, index),
    earned: toMoney(flow),
    operatorLabour: toMoney(0),
    running: toMoney(0),
  }));
}

it.each(PUBLISHED_PAYBACKS)('pays %d back with %j in %d periods (%s)', (outlay, flows, periods) => {
  const asOf = addDays(day1, flows.length - 1);
  const payback = computePayback({ outlay: toMoney(outlay), days: daysOf(flows), asOf, inServiceOn: day1 });
  expect(payback.breakEven).toEqual({ date: addDays(day1, Math.ceil(periods) - 1), method: 'reached' });
});

it.each(PUBLISHED_PAYBACKS.filter(([, flows]) => new Set(flows).size === 1))(
  'draws the straight line for %d with %j to %d periods, from the first period alone (%s)',
  (outlay, flows, periods) => {
    const payback = computePayback({
      outlay: toMoney(outlay),
      days: daysOf(flows.slice(0, 1)),
      asOf: day1,
      inServiceOn: day1,
    });
    expect(payback.breakEven).toEqual({
      date: addDays(day1, Math.ceil(periods) - 1),
      method: 'straight-line',
    });
  },
);
