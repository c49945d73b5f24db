import {
  computeEntryLines,
  computeMovingAverage,
  computeOvertimeLines,
  computePostings,
  type CostedEntry,
  type CostSource,
  findPostedMaterial,
  findPostedOvertime,
  type Invoice,
  type MachineRate,
  netFrozenLines,
  type OutsideService,
  type OverheadRate,
  type OvertimeRule,
  type PayRate,
  type PostedLine,
  type Postings,
  type RateBook,
  type SourceLine,
  type StockMove,
  toInvoiceLine,
  toMaterialLine,
  toOutsideLine,
  toSourceLine,
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
    const net = netFrozenLines(frozen, closedThrough);
    const sources = [
      ...(await readEntrySources(trx, book, net)),
      ...(await readIssueSources(trx, net)),
      ...(await readAmountSources(trx)),
    ];
    const postings = computePostings({ sources, stored: frozen, closedThrough });
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

type FrozenLines = ReadonlyMap<string, readonly SourceLine[]>;

async function readEntrySources(
  trx: ShopTransaction,
  book: RateBook,
  frozen: FrozenLines,
): Promise<CostSource[]> {
  const entries = await readEntries(trx);
  const live = entries.filter((entry) => entry.isLive);
  const rule = await readOvertimeRule(trx);
  const overtime = computeOvertimeLines(live, book, rule, findPostedOvertime(frozen));
  return entries.map((entry) => {
    const { lines, gaps } = computeEntryLines(entry, book);
    const isOfEntry = ({ entryId }: { entryId: string }) => entryId === entry.entryId;
    const premiums = overtime.lines.filter((line) => line.sourceId === entry.entryId);
    return {
      sourceId: entry.entryId,
      isLive: entry.isLive,
      lines: [...lines.map(toSourceLine), ...premiums],
      gaps: [...gaps, ...overtime.gaps.filter(isOfEntry)],
    };
  });
}

async function readOvertimeRule(trx: ShopTransaction): Promise<OvertimeRule> {
  const shop = await trx.selectFrom('shop').selectAll().executeTakeFirstOrThrow();
  return {
    thresholdHours: shop.overtimeThresholdHours === null ? null : toHours(shop.overtimeThresholdHours),
    overtimeTo: shop.overtimeTo,
    weekStart: shop.weekStart as DayOfWeek,
  };
}

async function readEntries(trx: ShopTransaction): Promise<(CostedEntry & { isLive: boolean })[]> {
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

async function readIssueSources(trx: ShopTransaction, frozen: FrozenLines): Promise<CostSource[]> {
  const materials = await trx.selectFrom('material').select('materialId').execute();
  const lots = await trx.selectFrom('sheetLot').selectAll().where('voidedAt', 'is', null).execute();
  const issues = await trx.selectFrom('materialIssue').selectAll().execute();
  const posted = findPostedMaterial(frozen);
  const lines = materials.flatMap(({ materialId }) => {
    const moves: StockMove[] = [
      ...lots
        .filter((lot) => lot.materialId === materialId)
        .map((lot) => ({
          kind: 'lot' as const,
          moveId: lot.lotId,
          movedOn: toLocalDate(lot.receivedOn),
          weight: D(lot.weightKg) as Mass,
          landedCost: sum([toMoney(lot.cost), toMoney(lot.freight)]),
        })),
      ...issues
        .filter((issue) => issue.materialId === materialId && issue.voidedAt === null)
        .map((issue) => ({
          kind: issue.kind,
          moveId: issue.issueId,
          movedOn: toLocalDate(issue.issuedOn),
          jobId: issue.jobId,
          weight: D(issue.weightKg) as Mass,
          postedAmount: posted.get(issue.issueId),
        })),
    ];
    const ledger = computeMovingAverage(moves);
    if (!ledger.ok) throw new Error('The database let a stock fall below nothing.');
    return ledger.moves.flatMap((move) => toMaterialLine(move) ?? []);
  });
  return issues.map((issue) => ({
    sourceId: issue.issueId,
    isLive: issue.voidedAt === null,
    lines: lines.filter((line) => line.sourceId === issue.issueId),
  }));
}

async function readAmountSources(trx: ShopTransaction): Promise<CostSource[]> {
  const services = await trx.selectFrom('outsideService').selectAll().execute();
  const invoices = await trx.selectFrom('invoice').selectAll().execute();
  return [
    ...services.map((row): CostSource => {
      const incurredOn = toLocalDate(row.incurredOn);
      const service: OutsideService = { ...row, incurredOn, amount: toMoney(row.amount) };
      const isLive = row.voidedAt === null;
      return {
        sourceId: row.outsideServiceId,
        isLive,
        lines: [toOutsideLine(service)],
      };
    }),
    ...invoices.map((row): CostSource => {
      const invoicedOn = toLocalDate(row.invoicedOn);
      const invoice: Invoice = { ...row, invoicedOn, amount: toMoney(row.amount) };
      const isLive = row.voidedAt === null;
      return { sourceId: row.invoiceId, isLive, lines: [toInvoiceLine(invoice)] };
    }),
  ];
}
