import { type EstimateLineInput } from '@brakeven/contract';
import {
  computeEstimate,
  computePriceForMargin,
  type EstimateCost,
  type EstimateLine as CostingLine,
  JOB_COST_CATEGORIES,
} from '@brakeven/costing';
import {
  D,
  type Money,
  parsePercent,
  type Percent,
  sum,
  toHours,
  toMass,
  toMoney,
  toPercent,
  toRate,
  ZERO,
} from '@brakeven/values';

/** What an estimate comes to while it is typed. Lines that cannot be read yet have no cost and are counted. */
export interface EstimatePreview {
  /** By line of the form: hours and cost, null while it cannot be read. */
  lines: ({ hours: string | null; cost: string } | null)[];
  cost: EstimateCost;
  /** What the price must be for the wanted margin; null while that cannot be read. */
  price: Money | null;
  unread: number;
}

/** Costs the lines that can be read; an allowance that cannot be read leaves all of them unread. */
export function previewEstimate(
  lines: readonly (EstimateLineInput | null)[],
  allowanceText: string,
  marginText: string,
): EstimatePreview {
  const allowance = readPercent(allowanceText, 100);
  const readable = allowance ? lines.filter((line) => line !== null) : [];
  const cost = computeEstimate(readable.map(toCostingLine), allowance ?? toPercent(0));
  const margin = readPercent(marginText, 99.9999);
  let at = 0;
  return {
    lines: lines.map((line) => (line && allowance ? toLineCost(cost.lines[at++]) : null)),
    cost,
    price: margin && cost.total.gte(0) ? computePriceForMargin(cost.total, margin) : null,
    unread: lines.length - readable.length,
  };
}

/** The margin that a price leaves, in percent of the price with one decimal; null for no price. */
export function toMarginText(price: string | null | undefined, cost: Money): string | null {
  if (!price || D(price).isZero()) return null;
  return `${D(price).minus(cost).times(100).div(D(price)).toFixed(1)} %`;
}

function toLineCost(figures: EstimateCost['lines'][number] | undefined) {
  const amounts = JOB_COST_CATEGORIES.map((category) => figures?.[category]?.amount ?? toMoney(0));
  return {
    hours: figures?.labour?.quantity?.toFixed(4) ?? null,
    cost: sum([ZERO, ...amounts]).toFixed(2),
  };
}

function toCostingLine(line: EstimateLineInput): CostingLine {
  switch (line.kind) {
    case 'operation':
      return {
        kind: 'operation',
        setupHours: toHours(line.setupHours),
        minutesPerPiece: D(line.minutesPerPiece),
        pieces: D(line.pieces),
        labourRate: toRate(line.labourRate),
        machineHourRate: line.machineHourRate === null ? null : toRate(line.machineHourRate),
        overheadRate: toRate(line.overheadRate),
      };
    case 'material':
      return { kind: 'material', weight: toMass(line.weightKg, 'kg'), pricePerKg: toRate(line.pricePerKg) };
    case 'outside':
      return { kind: 'outside', amount: toMoney(line.amount) };
  }
}

function readPercent(text: string, max: number): Percent | null {
  const percent = parsePercent(text);
  return percent.ok && percent.value.lte(max) ? percent.value : null;
}
