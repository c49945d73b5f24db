import {
  computeLines,
  type CostedEntry,
  type EntryLines,
  type MachineRate,
  type OverheadRate,
  type PayRate,
  type RateBook,
} from '@brakeven/costing';
import { type ShopTransaction } from '@brakeven/database';
import { type TestShop } from '@brakeven/test-shop';
import { D, type LocalDate, type Percent, toHours, toLocalDate, toRate } from '@brakeven/values';

/** What costing makes of the shop's rows as they are now: the reference that the rollup is held against. */
export interface ExpectedCosts extends EntryLines {
  inServiceOn: Map<string, LocalDate | null>;
}

/** Reads the entries and rates of a shop and computes their lines without the database. */
export function computeExpectedCosts(shop: TestShop): Promise<ExpectedCosts> {
  return shop.inShop(async (trx) => {
    const book = await readRateBook(trx);
    const { lines, gaps } = computeLines(await readEntries(trx), book);
    return { lines, gaps, inServiceOn: new Map(book.inServiceOn) };
  });
}

async function readRateBook(trx: ShopTransaction): Promise<RateBook> {
  const payRates = await trx.selectFrom('payRate').selectAll().execute();
  const machineRates = await trx.selectFrom('machineRate').selectAll().execute();
  const overheadRates = await trx.selectFrom('overheadRate').selectAll().execute();
  const machines = await trx.selectFrom('machine').selectAll().execute();
  return {
    payRates: groupRates(payRates, 'employeeId', (row): PayRate => ({
      id: row.payRateId,
      validFrom: toLocalDate(row.validFrom),
      wagePerHour: toRate(row.wagePerHour),
      burdenPercent: D(row.burdenPercent) as Percent,
    })),
    machineRates: groupRates(machineRates, 'machineId', (row): MachineRate => ({
      id: row.machineRateId,
      validFrom: toLocalDate(row.validFrom),
      machineHourRate: toRate(row.machineHourRate),
      chargeOutRate: toRate(row.chargeOutRate),
      runningCostPerHour: toRate(row.runningCostPerHour),
    })),
    overheadRates: overheadRates.map((row): OverheadRate => ({
      id: row.overheadRateId,
      validFrom: toLocalDate(row.validFrom),
      ratePerLabourHour: toRate(row.ratePerLabourHour),
    })),
    inServiceOn: new Map(
      machines.map((row) => [row.machineId, row.inServiceOn === null ? null : toLocalDate(row.inServiceOn)]),
    ),
  };
}

function groupRates<Key extends string, Row extends Record<Key, string>, Rate>(
  rows: readonly Row[],
  key: Key,
  toRateOf: (row: Row) => Rate,
): Map<string, Rate[]> {
  const groups = new Map<string, Rate[]>();
  for (const row of rows) groups.set(row[key], [...(groups.get(row[key]) ?? []), toRateOf(row)]);
  return groups;
}

async function readEntries(trx: ShopTransaction): Promise<CostedEntry[]> {
  const entries = await trx.selectFrom('timeEntry').selectAll().where('voidedAt', 'is', null).execute();
  const jobs = await trx.selectFrom('job').select(['jobId', 'isBillable']).execute();
  const operations = await trx.selectFrom('operation').selectAll().execute();
  const isBillable = new Map(jobs.map((job) => [job.jobId, job.isBillable]));
  const defaultMachine = new Map(operations.map((row) => [row.operationId, row.defaultMachineId]));
  return entries.map((entry) => ({
    entryId: entry.entryId,
    workedOn: toLocalDate(entry.workedOn),
    employeeId: entry.employeeId,
    jobId: entry.jobId,
    isBillable: isBillable.get(entry.jobId) ?? false,
    machineId: entry.machineId ?? defaultMachine.get(entry.operationId) ?? null,
    hours: toHours(entry.hours),
  }));
}
