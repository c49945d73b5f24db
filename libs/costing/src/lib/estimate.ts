import {
  D,
  type Decimal,
  factorOf,
  type Hours,
  type Mass,
  type Money,
  type Percent,
  type Rate,
  sum,
  toHours,
  toMoney,
} from '@brakeven/values';
import { JOB_COST_CATEGORIES, type JobCostCategory } from './cost-categories';
import { toStockWeight } from './material-weight';
import { ceilFraction, roundFraction } from './round-fraction';

/** An operation as estimated; rates as they were used. */
export interface OperationEstimate {
  kind: 'operation';
  setupHours: Hours;
  minutesPerPiece: Decimal;
  pieces: Decimal;
  /** Wage with burden. */
  labourRate: Rate;
  /** Null for an operation without a machine. */
  machineHourRate: Rate | null;
  overheadRate: Rate;
}

/** Material as estimated, without the scrap allowance. */
export interface MaterialEstimate {
  kind: 'material';
  weight: Mass;
  pricePerKg: Rate;
}

/** Outside work as estimated. */
export interface OutsideEstimate {
  kind: 'outside';
  amount: Money;
}

/** One line of an estimate. */
export type EstimateLine = OperationEstimate | MaterialEstimate | OutsideEstimate;

/** An amount, and the hours or kg behind it; null where there is no measure. */
export interface CategoryFigure {
  amount: Money;
  quantity: Decimal | null;
}

/** A figure for every category of a job's cost. */
export type CategoryFigures = Record<JobCostCategory, CategoryFigure>;

/** What an estimate comes to. */
export interface EstimateCost {
  figures: CategoryFigures;
  /** By line, in the order given; categories that a line does not touch are absent. */
  lines: Partial<CategoryFigures>[];
  hours: Hours;
  total: Money;
}

/**
 * What an estimate costs, by line and by category, each amount half-up to the cent once. Hours of an operation:
 * set-up + pieces × minutes ÷ 60 × (1 + scrap allowance), half-up to four decimals; material: weight × (1 + scrap
 * allowance) × price. Overtime is estimated at 0 of the estimated hours.
 * Rules in words: `RULES.estimateHours`, `.estimateLabour`, `.estimateMaterial`, `.estimateOutside`, `.estimateTotal`.
 */
export function computeEstimate(
  lines: readonly EstimateLine[],
  scrapAllowancePercent: Percent,
): EstimateCost {
  const costs = lines.map((line) => computeEstimateLine(line, scrapAllowancePercent));
  const figures = addUp(costs);
  return {
    figures,
    lines: costs,
    hours: toHours(figures.labour.quantity ?? 0),
    total: sum(Object.values(figures).map((figure) => figure.amount)),
  };
}

/**
 * The price that leaves a margin of so many percent of itself: cost ÷ (1 − margin), rounded up to the cent, so that
 * the margin is reached. Rule in words: `RULES.priceForMargin`.
 * @throws RangeError if the cost is below 0, or the margin is not from 0 to below 100.
 */
export function computePriceForMargin(cost: Money, marginPercent: Percent): Money {
  if (cost.lt(0)) throw new RangeError('A price is made of a cost of 0 or more.');
  if (marginPercent.lt(0) || marginPercent.gte(100)) {
    throw new RangeError('Give a margin from 0 to below 100 percent of the price.');
  }
  return toMoney(ceilFraction(cost.times(100), D(100).minus(marginPercent), 2));
}

function computeEstimateLine(line: EstimateLine, allowance: Percent): Partial<CategoryFigures> {
  switch (line.kind) {
    case 'operation':
      return computeOperation(line, allowance);
    case 'material': {
      const withAllowance = line.weight.times(factorOf(allowance));
      const amount = toMoney(withAllowance.times(line.pricePerKg));
      return { material: { amount, quantity: toStockWeight(withAllowance) } };
    }
    case 'outside':
      return { outside: { amount: line.amount, quantity: null } };
  }
}

function computeOperation(line: OperationEstimate, allowance: Percent): Partial<CategoryFigures> {
  const quantity = operationHours(line, allowance);
  const atRate = (rate: Rate): CategoryFigure => ({ amount: toMoney(quantity.times(rate)), quantity });
  return {
    labour: atRate(line.labourRate),
    overtime: { amount: toMoney(0), quantity },
    ...(line.machineHourRate && { machine: atRate(line.machineHourRate) }),
    overhead: atRate(line.overheadRate),
  };
}

function operationHours(
  { setupHours, minutesPerPiece, pieces }: OperationEstimate,
  allowance: Percent,
): Hours {
  const runMinutes = pieces.times(minutesPerPiece).times(factorOf(allowance));
  return toHours(roundFraction(setupHours.times(60).plus(runMinutes), D(60), 4));
}

function addUp(costs: readonly Partial<CategoryFigures>[]): CategoryFigures {
  const figures = JOB_COST_CATEGORIES.map((category) => {
    const ofCategory = costs.flatMap((cost) => cost[category] ?? []);
    const quantities = ofCategory.flatMap((figure) => figure.quantity ?? []);
    const amount = sum(ofCategory.map((figure) => figure.amount));
    return [category, { amount, quantity: quantities.length > 0 ? sum(quantities) : null }];
  });
  return Object.fromEntries(figures) as CategoryFigures;
}
