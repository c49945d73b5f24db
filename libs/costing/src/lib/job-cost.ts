import { type Hours, type Money, sum, toMoney } from '@brakeven/values';
import { type CostCategory, JOB_COST_CATEGORIES, type JobCostCategory } from './cost-categories';
import { type GapHours, type LineHours, sumHoursOf } from './entry-hours';

/** Where a job stands. */
export const JOB_STATUSES = ['quoted', 'open', 'finished', 'invoiced', 'lost', 'cancelled'] as const;

/** One status of a job. */
export type JobStatus = (typeof JOB_STATUSES)[number];

/** What a line needs for a job's cost; every line of the books has it. */
export interface JobCostLine extends LineHours {
  amount: Money;
}

/** How a job stands, apart from its lines. */
export interface JobStanding {
  status: JobStatus;
  isBillable: boolean;
  /** Null without a quote. */
  quotedPrice: Money | null;
}

/** What a job cost in each category. */
export type CategoryCosts = Record<JobCostCategory, Money>;

/** What a job cost, what was invoiced for it, and what its machine hours would earn at the charge-out rate. */
export interface JobCost extends CategoryCosts {
  hours: Hours;
  machineHours: Hours;
  /** The sum of `JOB_COST_CATEGORIES`. */
  total: Money;
  /** Invoices less credit notes. */
  invoiced: Money;
  /** invoiced − total */
  margin: Money;
  /** True until the job is finished or invoiced: costs may still come. */
  marginIsProvisional: boolean;
  /** Whether it is finished and invoices are still to come: the margin is no loss yet. */
  isToInvoice: boolean;
  /** Cost not yet invoiced, not below 0; nought unless the job is billable, and open or finished. */
  workInProgress: Money;
  earned: Money;
  /** How many lines are missing because no rate was valid; the figures above are too low if it is not 0. */
  gapCount: number;
}

/**
 * Adds up the lines of one job; give all of its gaps too, so that hours without a rate still count as hours. Lines
 * that take back others count against them. Sums are exact: nothing is rounded here.
 * Rules in words: those of each category, `RULES.jobTotal`, `.margin`, `.workInProgress`, `.hours`, `.machineHours`.
 */
export function computeJobCost(
  lines: readonly JobCostLine[],
  gaps: readonly GapHours[] = [],
  standing: JobStanding = { status: 'open', isBillable: true, quotedPrice: null },
): JobCost {
  const costs = sumCosts(lines);
  const total = sum(Object.values(costs));
  const invoiced = sumCategory(lines, 'invoiced');
  return {
    hours: sumHoursOf('labour', lines, gaps),
    machineHours: sumHoursOf('machine', lines, gaps),
    ...costs,
    total,
    invoiced,
    margin: computeMargin(invoiced, total),
    marginIsProvisional: isMarginProvisional(standing.status),
    isToInvoice: isToInvoice(invoiced, standing),
    workInProgress: computeWorkInProgress(total, invoiced, standing),
    earned: sumCategory(lines, 'earned'),
    gapCount: gaps.length,
  };
}

/** Adds up the amounts of one category. */
export function sumCategory(
  lines: readonly { category: CostCategory; amount: Money }[],
  category: CostCategory,
): Money {
  return sum(lines.filter((line) => line.category === category).map((line) => line.amount));
}

/** invoiced − cost; below 0 where a job lost money. Rule in words: `RULES.margin`. */
export function computeMargin(invoiced: Money, total: Money): Money {
  return toMoney(invoiced.minus(total));
}

/** Whether a margin may still change by the job's own work. */
export function isMarginProvisional(status: JobStatus): boolean {
  return status !== 'finished' && status !== 'invoiced';
}

/** Whether a finished billable job has no invoice yet, or invoices below its quoted price. */
export function isToInvoice(invoiced: Money, { status, isBillable, quotedPrice }: JobStanding): boolean {
  if (status !== 'finished' || !isBillable) return false;
  return invoiced.isZero() || (quotedPrice !== null && invoiced.lt(quotedPrice));
}

/**
 * Cost not yet invoiced of a billable job that is open or finished, not below 0; the shop's own work is an expense.
 * Rule in words: `RULES.workInProgress`.
 */
export function computeWorkInProgress(
  total: Money,
  invoiced: Money,
  { status, isBillable }: Pick<JobStanding, 'status' | 'isBillable'>,
): Money {
  const isInProgress = isBillable && (status === 'open' || status === 'finished');
  return toMoney(isInProgress && total.gt(invoiced) ? total.minus(invoiced) : 0);
}

function sumCosts(lines: readonly JobCostLine[]): CategoryCosts {
  const sums = JOB_COST_CATEGORIES.map((category) => [category, sumCategory(lines, category)]);
  return Object.fromEntries(sums) as CategoryCosts;
}
