/**
 * Categories of cost lines. Those of `JOB_COST_CATEGORIES` make a job's cost, `invoiced` its income, and `earned` and
 * `running` a machine's payback.
 */
export const COST_CATEGORIES = [
  'labour',
  'overtime',
  'machine',
  'overhead',
  'material',
  'outside',
  'invoiced',
  'earned',
  'running',
] as const;

/** One category of cost lines. */
export type CostCategory = (typeof COST_CATEGORIES)[number];

/** Those that a job's cost is the sum of. */
export const JOB_COST_CATEGORIES = [
  'labour',
  'overtime',
  'machine',
  'overhead',
  'material',
  'outside',
] as const satisfies readonly CostCategory[];

/** One category of a job's cost. */
export type JobCostCategory = (typeof JOB_COST_CATEGORIES)[number];
