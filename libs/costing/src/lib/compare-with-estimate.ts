import { type Decimal, type Money, sum, toMoney } from '@brakeven/values';
import { JOB_COST_CATEGORIES, type JobCostCategory } from './cost-categories';
import { type CategoryFigure, type CategoryFigures } from './estimate';
import { type JobCostLine, sumCategory } from './job-cost';
import { roundFraction } from './round-fraction';

/** How far an actual cost is from its estimate, and why. */
export interface Variance {
  estimate: Money;
  actual: Money;
  /** actual − estimate: above 0 it cost more. */
  variance: Money;
  /** (actual rate − estimated rate) × actual quantity */
  ratePart: Money;
  /** variance − ratePart: (actual quantity − estimated quantity) × estimated rate, to the cent */
  quantityPart: Money;
}

/** Variances by category and in all. */
export interface EstimateComparison {
  categories: Record<JobCostCategory, Variance>;
  total: Variance;
}

/** Categories whose amounts have no measure, so that all of their variance is one of rate. */
const WITHOUT_QUANTITY: readonly JobCostCategory[] = ['outside'];

/**
 * Splits what a job cost more or less than estimated into rate and quantity, category by category; a rate is amount ÷
 * quantity, never rounded. The parts add up to the variance to the cent: the rate part is rounded half-up, the
 * quantity part is what is left. Without a quantity on either side all of it is quantity; outside work is all rate.
 * Rules in words: `RULES.variance`, `.variancePartRate`, `.variancePartQuantity`.
 */
export function compareWithEstimate(estimate: CategoryFigures, actual: CategoryFigures): EstimateComparison {
  const pairs = JOB_COST_CATEGORIES.map((category): [JobCostCategory, Variance] => [
    category,
    compare(category, estimate[category], actual[category]),
  ]);
  const categories = Object.fromEntries(pairs) as Record<JobCostCategory, Variance>;
  return { categories, total: addUp(pairs.map(([, variance]) => variance)) };
}

/** What lines of one job come to, as `compareWithEstimate` takes it: amounts, and quantities where there is a measure. */
export function toCategoryFigures(lines: readonly JobCostLine[]): CategoryFigures {
  const figures = JOB_COST_CATEGORIES.map((category): [JobCostCategory, CategoryFigure] => [
    category,
    { amount: sumCategory(lines, category), quantity: sumQuantity(lines, category) },
  ]);
  return Object.fromEntries(figures) as CategoryFigures;
}

function sumQuantity(lines: readonly JobCostLine[], category: JobCostCategory): Decimal | null {
  if (WITHOUT_QUANTITY.includes(category)) return null;
  return sum(lines.filter((line) => line.category === category).map((line) => line.quantity));
}

function compare(category: JobCostCategory, estimate: CategoryFigure, actual: CategoryFigure): Variance {
  const variance = toMoney(actual.amount.minus(estimate.amount));
  const ratePart = WITHOUT_QUANTITY.includes(category) ? variance : computeRatePart(estimate, actual);
  return {
    estimate: estimate.amount,
    actual: actual.amount,
    variance,
    ratePart,
    quantityPart: toMoney(variance.minus(ratePart)),
  };
}

/** (actual ÷ its quantity − estimate ÷ its quantity) × actual quantity, as one fraction. */
function computeRatePart(estimate: CategoryFigure, actual: CategoryFigure): Money {
  if (!estimate.quantity?.gt(0) || !actual.quantity?.gt(0)) return toMoney(0);
  const numerator = actual.amount.times(estimate.quantity).minus(estimate.amount.times(actual.quantity));
  return toMoney(roundFraction(numerator, estimate.quantity, 2));
}

function addUp(variances: readonly Variance[]): Variance {
  const total = (key: keyof Variance): Money => sum(variances.map((variance) => variance[key]));
  return {
    estimate: total('estimate'),
    actual: total('actual'),
    variance: total('variance'),
    ratePart: total('ratePart'),
    quantityPart: total('quantityPart'),
  };
}
