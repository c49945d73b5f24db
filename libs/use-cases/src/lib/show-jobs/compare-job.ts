import { type CategoryVariance, JOB_COST_CATEGORIES, type JobDetail } from '@brakeven/contract';
import {
  type CategoryFigure,
  type CategoryFigures,
  compareWithEstimate,
  type Variance,
} from '@brakeven/costing';
import { type CategorySum, listJobCategorySums, type ShopTransaction } from '@brakeven/database';
import { D, moneyText, toMoney } from '@brakeven/values';
import { type StoredEstimate } from '../estimate-jobs/estimate-cost';

/** Holds a job's cost against its estimate, category by category. */
export async function compareJob(
  trx: ShopTransaction,
  jobId: string,
  { head, cost }: StoredEstimate,
): Promise<JobDetail['comparison']> {
  const actual = toActualFigures(await listJobCategorySums(trx, jobId));
  const { categories, total } = compareWithEstimate(cost.figures, actual);
  return {
    estimatedOn: head.estimatedOn,
    categories: JOB_COST_CATEGORIES.map((category): CategoryVariance => ({
      category,
      ...toVarianceTexts(categories[category]),
      estimatedQuantity: toQuantityText(cost.figures[category]),
      actualQuantity: toQuantityText(actual[category]),
    })),
    total: toVarianceTexts(total),
  };
}

/** Sums by category as costing takes them; outside services have an amount only. */
function toActualFigures(sums: readonly CategorySum[]): CategoryFigures {
  const pairs = JOB_COST_CATEGORIES.map((category): [string, CategoryFigure] => {
    const found = sums.find((sums) => sums.category === category);
    const quantity = category === 'outside' ? null : D(found?.quantity ?? 0);
    return [category, { amount: toMoney(found?.amount ?? 0), quantity }];
  });
  return Object.fromEntries(pairs) as CategoryFigures;
}

function toVarianceTexts({ estimate, actual, variance, ratePart, quantityPart }: Variance) {
  return {
    estimate: moneyText(estimate),
    actual: moneyText(actual),
    variance: moneyText(variance),
    ratePart: moneyText(ratePart),
    quantityPart: moneyText(quantityPart),
  };
}

function toQuantityText({ quantity }: CategoryFigure): string | null {
  return quantity === null ? null : quantity.toFixed();
}
