import {
  computeShopPostings,
  type CostedEntry,
  type Invoice,
  type MachineRate,
  type OutsideService,
  type OverheadRate,
  type OvertimeRule,
  type PayRate,
  type PostedLine,
  type Postings,
  type RateBook,
  type StockMove,
  type Voidable,
} from '@brakeven/costing';
import { getClosedThrough, type ShopTransaction } from '@brakeven/database';
import { type TestShop } from '@brakeven/test-shop';
import {
  D,
  type DayOfWeek,
  type LocalDate,
  type Mass,
  type Percent,
  sum,
  toHours,
  toLocalDate,
  toMoney,
  toRate,
} from '@brakeven/values';

/** What costing makes of the shop's rows as they are now: the reference that the rollup is held against. */
export interface ExpectedCosts extends Postings {
  /** What closed months hold, which nothing changes. */
  frozen: PostedLine[];
  closedThrough: LocalDate | null;
  inServiceOn: Map<string, LocalDate | null>;
}

/** Reads the rows, rates and settings of a shop and computes the lines of its open days without the database. */
export function computeExpectedCosts(shop: TestShop): Promise<ExpectedCosts> {
  return shop.inShop(async (trx) => {
    const book = await readRateBook(trx);
    const found = await getClosedThrough(trx);
    const closedThrough = found === null ? null : toLocalDate(found);
    const frozen = await readFrozenLines(trx, found);
    const postings = computeShopPostings({
      entries: await readEntries(trx),
      stock: await readStock(trx),
      outsideServices: await readOutsideServices(trx),
      invoices: await readInvoices(trx),
      book,
      overtime: await readOvertimeRule(trx),
      stored: frozen,
      closedThrough,
    });
    return { ...postings, frozen, closedThrough, inServiceOn: new Map(book.inServiceOn) };
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

async function readFrozenLines(trx: ShopTransaction, closedThrough: string | null): Promise<PostedLine[]> {
  if (closedThrough === null) return [];
  const rows = await trx.selectFrom('costLine').selectAll().where('postedOn', '<=', closedThrough).execute();
  return rows.map((row) => ({
    sourceKind: row.sourceKind,
    sourceId: row.sourceId,
    workedOn: toLocalDate(row.workedOn),
    postedOn: toLocalDate(row.postedOn),
    category: row.category,
    jobId: row.jobId,
    employeeId: row.employeeId,
    machineId: row.machineId,
    quantity: D(row.quantity),
    rate: toRate(row.rate),
    rateFactor: D(row.rateFactor),
    rateId: row.rateId,
    amount: toMoney(row.amount),
  }));
}

async function readOvertimeRule(trx: ShopTransaction): Promise<OvertimeRule> {
  const shop = await trx.selectFrom('shop').selectAll().executeTakeFirstOrThrow();
  return {
    thresholdHours: shop.overtimeThresholdHours === null ? null : toHours(shop.overtimeThresholdHours),
    overtimeTo: shop.overtimeTo,
    weekStart: shop.weekStart as DayOfWeek,
  };
}

async function readEntries(trx: ShopTransaction): Promise<Voidable<CostedEntry>[]> {
  const entries = await trx.selectFrom('timeEntry').selectAll().execute();
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
    isLive: entry.voidedAt === null,
  }));
}

/** The moves of each material. */
async function readStock(trx: ShopTransaction): Promise<Voidable<StockMove>[][]> {
  const materials = await trx.selectFrom('material').select('materialId').execute();
  const lots = await trx.selectFrom('sheetLot').selectAll().execute();
  const issues = await trx.selectFrom('materialIssue').selectAll().execute();
  return materials.map(({ materialId }) => [
    ...lots
      .filter((lot) => lot.materialId === materialId)
      .map((lot) => ({
        kind: 'lot' as const,
        moveId: lot.lotId,
        movedOn: toLocalDate(lot.receivedOn),
        weight: D(lot.weightKg) as Mass,
        landedCost: sum([toMoney(lot.cost), toMoney(lot.freight)]),
        isLive: lot.voidedAt === null,
      })),
    ...issues
      .filter((issue) => issue.materialId === materialId)
      .map((issue) => ({
        kind: issue.kind,
        moveId: issue.issueId,
        movedOn: toLocalDate(issue.issuedOn),
        jobId: issue.jobId,
        weight: D(issue.weightKg) as Mass,
        isLive: issue.voidedAt === null,
      })),
  ]);
}

async function readOutsideServices(trx: ShopTransaction): Promise<Voidable<OutsideService>[]> {
  const rows = await trx.selectFrom('outsideService').selectAll().execute();
  return rows.map((row) => ({
    ...row,
    incurredOn: toLocalDate(row.incurredOn),
    amount: toMoney(row.amount),
    isLive: row.voidedAt === null,
  }));
}

async function readInvoices(trx: ShopTransaction): Promise<Voidable<Invoice>[]> {
  const rows = await trx.selectFrom('invoice').selectAll().execute();
  return rows.map((row) => ({
    ...row,
    invoicedOn: toLocalDate(row.invoicedOn),
    amount: toMoney(row.amount),
    isLive: row.voidedAt === null,
  }));
}
