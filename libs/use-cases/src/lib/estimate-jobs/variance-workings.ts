import { type FigureRef, type JobDetail, type Workings } from '@brakeven/contract';
import { RULES } from '@brakeven/costing';
import { type ShopTransaction } from '@brakeven/database';
import { formatHours, formatMass, formatMoney, moneyText, toMass, toMoney } from '@brakeven/values';
import { type ShopContext } from '../context';
import { compareJob } from '../show-jobs/compare-job';
import { toInput, type WorkingsHead } from '../show-workings/workings-request';
import { type StoredEstimate } from './estimate-cost';

type Comparison = NonNullable<JobDetail['comparison']>;
type Row = Comparison['total'] & Partial<Comparison['categories'][number]>;

/**
 * How a cost differs from its estimate, in all or in one category: the two figures that it is between, and how much
 * of it is due to the price of an hour or a weight, how much to the quantity.
 */
export async function readVariance(
  context: ShopContext,
  trx: ShopTransaction,
  head: WorkingsHead & { figure: { jobId: string } },
  stored: StoredEstimate,
): Promise<Workings> {
  const { jobId, category } = head.figure;
  const comparison = await compareJob(trx, jobId, stored);
  if (!comparison) throw new Error('A job with an estimate has no comparison.');
  const row: Row = comparison.categories.find((one) => one.category === category) ?? comparison.total;
  return {
    ...head,
    title: category === undefined ? head.title : `${head.title}: ${category}`,
    rule: [
      RULES.variance,
      `Rate part: ${RULES.variancePartRate}`,
      `Quantity part: ${RULES.variancePartQuantity}`,
    ].join(' '),
    unit: 'money',
    amount: row.variance,
    inputs: toInputs(context, row),
    parts: [
      { label: 'Cost', amount: row.actual, figure: { figure: `job.${category ?? 'total'}`, jobId } },
      {
        label: 'Estimate',
        amount: moneyText(toMoney(toMoney(row.estimate).negated())),
        figure: toEstimateRef(jobId, category),
      },
    ],
    lineCount: 0,
    lines: [],
    nextCursor: null,
  };
}

/** Overtime is estimated at nothing, so that there is nothing to open. */
function toEstimateRef(jobId: string, category: FigureRef['category']): FigureRef | null {
  return category === 'overtime' ? null : { figure: `estimate.${category ?? 'total'}`, jobId };
}

function toInputs(context: ShopContext, row: Row): Workings['inputs'] {
  const money = (amount: string) => formatMoney(amount, context.shop.currency);
  return [
    toInput('Rate part, the price of it', money(row.ratePart)),
    toInput('Quantity part, how much of it', money(row.quantityPart)),
    ...toQuantityInput(context, 'Quantity used', row.category, row.actualQuantity),
    ...toQuantityInput(context, 'Quantity estimated', row.category, row.estimatedQuantity),
  ];
}

function toQuantityInput(
  { shop }: ShopContext,
  label: string,
  category: Row['category'],
  quantity: string | null | undefined,
): Workings['inputs'] {
  if (quantity === null || quantity === undefined) return [];
  const text =
    category === 'material'
      ? formatMass(toMass(quantity, 'kg'), shop.units)
      : `${formatHours(quantity)}\u00a0h`;
  return [toInput(label, text)];
}
