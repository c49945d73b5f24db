import { type Hours, type Money, sum } from '@brakeven/values';
import { sumEntryHours } from './entry-hours';
import { type CostCategory, type CostLine, type RateGap } from './entry-lines';

/** What a job cost, and what its machine hours would earn at the charge-out rate. */
export interface JobCost {
  hours: Hours;
  machineHours: Hours;
  labour: Money;
  machine: Money;
  overhead: Money;
  /** labour + machine + overhead */
  total: Money;
  earned: Money;
  /** How many lines are missing because no rate was valid; the figures above are too low if it is not 0. */
  gapCount: number;
}

/**
 * Adds up the cost lines of one job; give all of its gaps too, so that hours without a rate still count as hours.
 * Rules in words: `RULES.labour`, `.machine`, `.overhead`, `.jobTotal`, `.hours`, `.machineHours`, `.earned`.
 */
export function computeJobCost(lines: readonly CostLine[], gaps: readonly RateGap[] = []): JobCost {
  const labour = sumCategory(lines, 'labour');
  const machine = sumCategory(lines, 'machine');
  const overhead = sumCategory(lines, 'overhead');
  return {
    hours: sumEntryHours(lines, gaps),
    machineHours: sumEntryHours(lines, gaps, (trace) => trace.machineId !== null),
    labour,
    machine,
    overhead,
    total: sum([labour, machine, overhead]),
    earned: sumCategory(lines, 'earned'),
    gapCount: gaps.length,
  };
}

/** Adds up the amounts of one category. */
export function sumCategory(lines: readonly CostLine[], category: CostCategory): Money {
  return sum(lines.filter((line) => line.category === category).map((line) => line.amount));
}
