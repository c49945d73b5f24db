import { computeEstimate, type EstimateCost, type EstimateLine as CostingLine } from '@brakeven/costing';
import {
  type EstimateHeadRow,
  type EstimateLineRow,
  listEstimateHeads,
  listEstimateLines,
  type ShopTransaction,
} from '@brakeven/database';
import { D, toHours, toMass, toMoney, toPercent, toRate } from '@brakeven/values';
import { groupBy } from '../group-by';

/** A line as it is costed, however it is kept. */
export type CostedLine = Pick<
  EstimateLineRow,
  | 'kind'
  | 'setupHours'
  | 'minutesPerPiece'
  | 'pieces'
  | 'labourRate'
  | 'machineHourRate'
  | 'overheadRate'
  | 'weightKg'
  | 'pricePerKg'
  | 'amount'
>;

/** An estimate with what it comes to. */
export interface StoredEstimate {
  head: EstimateHeadRow;
  lines: EstimateLineRow[];
  cost: EstimateCost;
}

/** Reads and costs the estimate of a job; null if it has none. */
export async function readEstimate(trx: ShopTransaction, jobId: string): Promise<StoredEstimate | null> {
  return (await readEstimates(trx, [jobId])).get(jobId) ?? null;
}

/** Reads and costs the estimates of jobs, by job; those without one are absent. */
export async function readEstimates(
  trx: ShopTransaction,
  jobIds: readonly string[],
): Promise<ReadonlyMap<string, StoredEstimate>> {
  if (jobIds.length === 0) return new Map();
  const heads = await listEstimateHeads(trx, jobIds);
  const linesOf = groupBy(await listEstimateLines(trx, jobIds), (line) => line.jobId);
  return new Map(
    heads.map((head) => {
      const lines = linesOf.get(head.jobId) ?? [];
      return [head.jobId, { head, lines, cost: costLines(lines, head.scrapAllowancePercent) }];
    }),
  );
}

/** What lines come to with a scrap allowance. */
export function costLines(lines: readonly CostedLine[], scrapAllowancePercent: string): EstimateCost {
  return computeEstimate(lines.map(toCostingLine), toPercent(scrapAllowancePercent));
}

/** A kept line as costing takes it. */
export function toCostingLine(line: CostedLine): CostingLine {
  switch (line.kind) {
    case 'operation':
      return {
        kind: 'operation',
        setupHours: toHours(present(line.setupHours)),
        minutesPerPiece: D(present(line.minutesPerPiece)),
        pieces: D(present(line.pieces)),
        labourRate: toRate(present(line.labourRate)),
        machineHourRate: line.machineHourRate === null ? null : toRate(line.machineHourRate),
        overheadRate: toRate(present(line.overheadRate)),
      };
    case 'material':
      return {
        kind: 'material',
        weight: toMass(present(line.weightKg), 'kg'),
        pricePerKg: toRate(present(line.pricePerKg)),
      };
    case 'outside':
      return { kind: 'outside', amount: toMoney(present(line.amount)) };
  }
}

/** The table's own check and the contract let no line of a kind be without what the kind needs. */
function present<T>(value: T | null): T {
  if (value === null) throw new Error('A line of an estimate lacks a number of its kind.');
  return value;
}
