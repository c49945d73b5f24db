import { AppError, type FigureRef, type Workings, type WorkingsQuery } from '@brakeven/contract';
import { RULES } from '@brakeven/costing';
import {
  findIssueMoment,
  findMaterialName,
  type IssueMoment,
  listStockMoveRows,
  type ShopTransaction,
  type StockMoment,
  type StockSelection,
  sumStockMoves,
} from '@brakeven/database';
import {
  D,
  formatLocalDate,
  formatMass,
  formatMoney,
  formatRate,
  massIn,
  roundHalfUp,
  toLocalDate,
  toMass,
  toMoney,
  toRate,
} from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { STOCK_ISSUE } from './figures';
import { readItemWorkings } from './item-workings';
import { readLineWorkings } from './line-workings';
import { type LinePaging, refused, splitRequest, toInput } from './workings-request';

/**
 * How an issue of material was valued: the stock and its average at that moment; and what a stock consists of, move
 * by move.
 * @throws AppError `not_found` (issue, material), `invalid_input` (another figure, nothing named, cursor)
 */
export async function getStockWorkings(context: ShopContext, query: WorkingsQuery): Promise<Workings> {
  const { ref, paging } = splitRequest(query);
  if (ref.figure === 'stock.issue') return inShopOf(context, (trx) => readIssue(context, trx, ref, paging));
  if (ref.figure === 'stock.value') return inShopOf(context, (trx) => readValue(context, trx, ref, paging));
  throw refused('figure', 'Only the value of stock and of what was issued from it can be opened here.');
}

async function readIssue(
  context: ShopContext,
  trx: ShopTransaction,
  { issueId }: FigureRef,
  paging: LinePaging,
): Promise<Workings> {
  if (issueId === undefined) throw refused('issueId', 'Say which issue is meant.');
  const issue = await getIssue(trx, issueId);
  const head = {
    figure: { figure: 'stock.issue' as const, issueId },
    title: `${issue.material} ${KINDS[issue.kind]} ${issue.jobNumber}, ${issue.jobTitle}`,
  };
  const { issuedOn } = issue;
  const selection = { sourceId: issueId, worked: { from: issuedOn, to: issuedOn } };
  const workings = await readLineWorkings(trx, head, STOCK_ISSUE, selection, paging, context.shop.currency);
  return { ...workings, inputs: toIssueInputs(context, issue) };
}

const KINDS = { issue: 'issued to job', return: 'returned from job' } as const;

async function getIssue(trx: ShopTransaction, issueId: string): Promise<IssueMoment> {
  const issue = await findIssueMoment(trx, issueId);
  if (issue) return issue;
  throw new AppError('not_found', 'There is no such issue of material in this shop.');
}

function toIssueInputs(context: ShopContext, issue: IssueMoment): Workings['inputs'] {
  const { moment, weightKg, issuedOn } = issue;
  const weight = toInput('Weight', weightText(context, weightKg));
  const day = toInput('Date', formatLocalDate(toLocalDate(issuedOn)));
  if (moment === null) return [weight, day, toInput('Stock', 'voided: it no longer moves any')];
  return [weight, day, ...toMomentInputs(context, issue, moment)];
}

function toMomentInputs(
  context: ShopContext,
  { materialId, issueId }: IssueMoment,
  { averagePerKg, beforeKg, beforeAmount, afterKg, afterAmount }: StockMoment,
): Workings['inputs'] {
  const { currency } = context.shop;
  const before: FigureRef = { figure: 'stock.value', materialId, issueId };
  return [
    {
      ...toInput(`In stock before it, ${weightText(context, beforeKg)}`, formatMoney(beforeAmount, currency)),
      figure: before,
    },
    toInput('Average then', perWeight(context, averagePerKg)),
    toInput(`In stock after it, ${weightText(context, afterKg)}`, formatMoney(afterAmount, currency)),
  ];
}

async function readValue(
  context: ShopContext,
  trx: ShopTransaction,
  ref: FigureRef,
  paging: LinePaging,
): Promise<Workings> {
  const { materialId, issueId, to } = ref;
  if (materialId === undefined) throw refused('materialId', 'Say which material is meant.');
  const name = await findMaterialName(trx, materialId);
  if (name === null) throw new AppError('not_found', 'There is no such material in this shop.');
  const issue = issueId === undefined ? null : await getIssue(trx, issueId);
  const before = issue && { issuedOn: issue.issuedOn, issueId: issue.issueId };
  const selection: StockSelection = { materialId, to, ...(before && { before }) };
  const sums = await sumStockMoves(trx, selection);
  const workings = await readItemWorkings(
    {
      figure: { figure: 'stock.value', materialId, ...(issueId && { issueId }), ...(to && { to }) },
      title: `Stock of ${name}${describeMoment(issue, to)}`,
      rule: RULES.stock,
    },
    {
      sum: async () => sums,
      list: (after, limit) => listStockMoveRows(trx, selection, after, limit),
      toFigure: ({ id, category }) => (category === 'lot' ? null : { figure: 'stock.issue', issueId: id }),
    },
    paging,
  );
  return { ...workings, inputs: toStockInputs(context, sums) };
}

function describeMoment(issue: IssueMoment | null, to: string | undefined): string {
  if (issue)
    return ` before the issue of ${formatLocalDate(toLocalDate(issue.issuedOn))} to job ${issue.jobNumber}`;
  return to === undefined ? '' : ` through ${formatLocalDate(toLocalDate(to))}`;
}

function toStockInputs(context: ShopContext, { weightKg, amount }: { weightKg: string; amount: string }) {
  const weight = D(weightKg);
  const average = weight.gt(0)
    ? perWeight(context, toMoney(amount).div(weight).toFixed(20))
    : 'none in stock';
  return [toInput('Weight in stock', weightText(context, weightKg)), toInput('Average', average)];
}

function weightText({ shop }: ShopContext, kilograms: string): string {
  return formatMass(toMass(kilograms, 'kg'), shop.units);
}

/** A price per kg as one per unit of the shop, at most six decimals. */
function perWeight({ shop }: ShopContext, pricePerKg: string): string {
  const unit = shop.units === 'us' ? 'lb' : 'kg';
  const price = roundHalfUp(D(pricePerKg).times(massIn(toMass(1, unit), 'kg')), 6);
  return `${formatRate(toRate(price), shop.currency)} per ${unit}`;
}
