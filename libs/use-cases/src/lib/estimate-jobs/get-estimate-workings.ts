import { AppError, type FigureRef, type Workings, type WorkingsQuery } from '@brakeven/contract';
import { computePriceForMargin, RULES } from '@brakeven/costing';
import {
  type EstimateSum,
  type JobTotals,
  listEstimateItems,
  type ShopTransaction,
  sumEstimateItems,
  sumJobs,
} from '@brakeven/database';
import {
  D,
  formatMoney,
  formatPercent,
  hoursText,
  moneyText,
  toHours,
  toMoney,
  toPercent,
} from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { getJobRow } from '../show-jobs/get-job';
import { readItemWorkings } from '../show-workings/item-workings';
import {
  type LinePaging,
  readJobFilter,
  refused,
  splitRequest,
  toInput,
  type WorkingsHead,
} from '../show-workings/workings-request';
import { readEstimate, type StoredEstimate } from './estimate-cost';
import { type EstimateFigure, readLineFigure, TITLES } from './estimate-line-workings';
import { readVariance } from './variance-workings';

/**
 * How a figure of a job's estimate was made, line by line; of several jobs, job by job.
 * @throws AppError `not_found` (job, or no estimate), `invalid_input` (another figure, status or cursor)
 */
export async function getEstimateWorkings(context: ShopContext, query: WorkingsQuery): Promise<Workings> {
  const { ref, paging } = splitRequest(query);
  const { figure, jobId } = ref;
  if (!isEstimateFigure(figure)) throw refused('figure', 'This is no figure of an estimate.');
  return inShopOf(context, (trx) =>
    jobId === undefined
      ? readOfJobs(context, trx, { ...ref, figure }, paging)
      : readOfJob(context, trx, { ...ref, figure, jobId }),
  );
}

type EstimateRef = FigureRef & { figure: EstimateFigure };

function isEstimateFigure(figure: FigureRef['figure']): figure is EstimateFigure {
  return figure.startsWith('estimate.');
}

async function readOfJob(
  context: ShopContext,
  trx: ShopTransaction,
  ref: EstimateRef & { jobId: string },
): Promise<Workings> {
  const job = await getJobRow(trx, { jobId: ref.jobId });
  const stored = await readEstimate(trx, ref.jobId);
  if (!stored) throw new AppError('not_found', `Job ${job.number} has no estimate.`);
  const head = { figure: ref, title: `${TITLES[ref.figure]} of job ${job.number}, ${job.title}` };
  switch (ref.figure) {
    case 'estimate.price':
      return toPrice(head, stored, ref.jobId);
    case 'estimate.variance':
      return readVariance(context, trx, { ...head, figure: ref }, stored);
    default:
      return readLineFigure(head, stored);
  }
}

function toPrice(head: WorkingsHead, { head: kept, cost }: StoredEstimate, jobId: string): Workings {
  const margin = toPercent(kept.marginPercent);
  const price = computePriceForMargin(cost.total, margin);
  const input = { label: 'Wanted margin, of the price', value: formatPercent(margin), validFrom: null };
  return toMadeOf(
    { ...head, rule: RULES.priceForMargin, amount: moneyText(price) },
    [
      { label: 'Estimated cost', amount: moneyText(cost.total), figure: { figure: 'estimate.total', jobId } },
      { label: 'Margin', amount: moneyText(toMoney(price.minus(cost.total))), figure: null },
    ],
    [{ ...input, figure: null }],
  );
}

function toMadeOf(
  head: WorkingsHead & { rule: string; amount: string },
  parts: Workings['parts'],
  inputs: Workings['inputs'] = [],
): Workings {
  return { ...head, unit: 'money', inputs, parts, lineCount: 0, lines: [], nextCursor: null };
}

/** Figures that are summed over jobs. */
const SUMS: Partial<Record<EstimateFigure, { column: EstimateSum; rule: string }>> = {
  'estimate.total': { column: 'estimate', rule: RULES.estimateTotal },
  'estimate.hours': { column: 'estimated_hours', rule: RULES.estimateHours },
  'estimate.variance': { column: 'variance', rule: RULES.variance },
};

const NOT_ESTIMATED = 'Jobs without an estimate are left out.';
const NOT_COMPARED = 'Jobs without an estimate, and those on which nothing was spent, are left out.';

async function readOfJobs(
  context: ShopContext,
  trx: ShopTransaction,
  ref: EstimateRef,
  paging: LinePaging,
): Promise<Workings> {
  const { figure } = ref;
  const summed = SUMS[figure];
  if (!summed) throw refused('jobId', 'Say of which job this figure is.');
  const { jobs, whose } = await readJobFilter(trx, ref);
  const workings = await readItemWorkings(
    {
      figure: ref,
      title: `${TITLES[figure]} of ${whose}`,
      rule: `${summed.rule} ${figure === 'estimate.variance' ? NOT_COMPARED : NOT_ESTIMATED}`,
    },
    {
      sum: () => sumEstimateItems(trx, jobs, summed.column),
      list: (after, limit) => listEstimateItems(trx, jobs, summed.column, after, limit),
      toFigure: ({ id }) => ({ figure, jobId: id }),
    },
    paging,
  );
  if (figure === 'estimate.hours')
    return { ...workings, unit: 'hours', amount: hoursText(toHours(workings.amount)) };
  const inputs = figure === 'estimate.variance' ? toVarianceInputs(context, await sumJobs(trx, jobs)) : [];
  return { ...workings, inputs, amount: moneyText(toMoney(D(workings.amount))) };
}

/** Two figures of the same jobs, so that their difference is the variance. */
function toVarianceInputs(
  { shop }: ShopContext,
  { comparedJobs, comparedCost, comparedEstimate }: JobTotals,
): Workings['inputs'] {
  const money = (amount: string) => formatMoney(amount, shop.currency);
  const whose = comparedJobs === 1 ? '1 job' : `${comparedJobs} jobs`;
  return [
    toInput(`Cost of ${whose} with an estimate`, money(comparedCost)),
    toInput('Their estimate', money(comparedEstimate)),
  ];
}
