import { addDays, toLocalDate } from '@brakeven/values';
import fc from 'fast-check';

/** Work and rates fall into these days. */
export const FIRST_DAY = toLocalDate('2026-02-20');
const DAYS = 14;

const aDay = fc.integer({ min: 0, max: DAYS - 1 }).map((n) => addDays(FIRST_DAY, n) as string);
const aRate = fc.integer({ min: 0, max: 250_000_000 }).map((millionths) => (millionths / 1e6).toFixed(6));
const aBurden = fc.integer({ min: 0, max: 600_000 }).map((parts) => (parts / 1e4).toFixed(4));
const someHours = fc.integer({ min: 1, max: 240_000 }).map((parts) => (parts / 1e4).toFixed(4));
const aWeight = fc.integer({ min: 1, max: 9_000_000 }).map((parts) => (parts / 1e4).toFixed(4));
const anAmount = fc.integer({ min: 1, max: 500_000 }).map((cents) => (cents / 100).toFixed(2));
/** Which of a list, whatever its length. */
const pick = fc.nat({ max: 999 });

/** A number for each reference; each is taken modulo what there is when it is applied. */
const anEntry = fc.record({
  day: aDay,
  employee: pick,
  job: pick,
  operation: pick,
  machine: fc.option(pick),
  hours: someHours,
});
const someEntries = fc.record({
  kind: fc.constant('addEntries' as const),
  entries: fc.array(anEntry, { minLength: 1, maxLength: 5 }),
});
const anIssue = fc.record({
  kind: fc.constant('addIssue' as const),
  material: pick,
  job: pick,
  day: aDay,
  weight: fc.integer({ min: 1, max: 900_000 }).map((parts) => (parts / 1e4).toFixed(4)),
  isReturn: fc.nat({ max: 3 }).map((n) => n === 0),
});
const aChange = fc.oneof(
  { arbitrary: someEntries, weight: 4 },
  fc.record({ kind: fc.constant('voidEntry' as const), entry: pick }),
  fc.record({ kind: fc.constant('restoreEntry' as const), entry: pick }),
  fc.record({ kind: fc.constant('setWage' as const), rate: pick, wage: aRate, burden: aBurden }),
  fc.record({
    kind: fc.constant('moveRate' as const),
    table: fc.constantFrom('payRate', 'machineRate', 'overheadRate'),
    rate: pick,
    day: aDay,
  }),
  fc.record({
    kind: fc.constant('deleteRate' as const),
    table: fc.constantFrom('payRate', 'machineRate', 'overheadRate'),
    rate: pick,
  }),
  fc.record({
    kind: fc.constant('addPayRate' as const),
    employee: pick,
    day: aDay,
    wage: aRate,
    burden: aBurden,
  }),
  fc.record({
    kind: fc.constant('addMachineRate' as const),
    machine: pick,
    day: aDay,
    rates: fc.tuple(aRate, aRate, aRate),
  }),
  fc.record({ kind: fc.constant('addOverheadRate' as const), day: aDay, rate: aRate }),
  fc.record({ kind: fc.constant('setInService' as const), machine: pick, day: fc.option(aDay) }),
  fc.record({ kind: fc.constant('setDefaultMachine' as const), operation: pick, machine: fc.option(pick) }),
  fc.record({ kind: fc.constant('flipBillable' as const), job: pick }),
  fc.record({
    kind: fc.constant('addLot' as const),
    material: pick,
    day: aDay,
    weight: aWeight,
    cost: anAmount,
    freight: anAmount,
  }),
  { arbitrary: anIssue, weight: 4 },
  fc.record({
    kind: fc.constantFrom('addOutsideService' as const, 'addInvoice' as const, 'addCreditNote' as const),
    job: pick,
    day: aDay,
    amount: anAmount,
  }),
  fc.record({
    kind: fc.constant('flipVoided' as const),
    table: fc.constantFrom('sheetLot', 'materialIssue', 'outsideService', 'invoice'),
    row: pick,
  }),
  fc.record({
    kind: fc.constant('setOvertime' as const),
    threshold: fc.option(fc.integer({ min: 1, max: 160 })),
    to: fc.constantFrom('overhead' as const, 'jobs' as const),
    weekStart: fc.integer({ min: 0, max: 6 }),
  }),
  { arbitrary: fc.record({ kind: fc.constant('closeMonth' as const) }), weight: 2 },
  fc.record({ kind: fc.constant('reopenMonth' as const) }),
  fc.record({ kind: fc.constant('rollUp' as const) }),
);

/** A change to a shop, or a rollup in between. */
export type Change = typeof aChange extends fc.Arbitrary<infer T> ? T : never;

/** Changes that build a shop's entries and rates from nothing and then turn them over. */
export const someChanges: fc.Arbitrary<Change[]> = fc.array(aChange, { minLength: 12, maxLength: 60 });
