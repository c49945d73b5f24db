import { type CostCategory, type FigureRef, type Workings, type WorkingsLine } from '@brakeven/contract';
import {
  type LineGroup,
  type LineSelection,
  listLineGroups,
  listWorkingsLineRows,
  type ShopTransaction,
  type WorkingsLineRow,
} from '@brakeven/database';
import { D, formatPercent, formatRate, rateText, sum, toPercent, toRate } from '@brakeven/values';
import { cutPage, linePositionSchema, readCursor, writeCursor } from '../page-cursor';
import { toSourceCell } from '../source-cell';
import { type LineFigure, OVERTIME_WEEK, STOCK_ISSUE } from './figures';
import { toLineFacts, toLineFigure, toLineId } from './line-facts';
import { type LinePaging, type WorkingsHead } from './workings-request';

const DECIMALS = { money: 2, hours: 4 } as const;

/** The workings of a figure that is a sum of lines: their sum, the rates they were made with, a page of them. */
export async function readLineWorkings(
  trx: ShopTransaction,
  head: WorkingsHead,
  figure: LineFigure,
  selection: Omit<LineSelection, 'unit' | 'signs'>,
  paging: LinePaging,
  currency: string,
): Promise<Workings> {
  const { unit, signs, rule } = figure;
  const { list, cursor, limit } = paging;
  const wanted = { ...selection, unit, signs };
  const after = readCursor(cursor, list, linePositionSchema);
  const groups = await listLineGroups(trx, wanted);
  const found = await listWorkingsLineRows(trx, wanted, after, limit + 1);
  const { rows, nextCursor } = cutPage(found, limit, ({ postedOn, sourceId, category }) =>
    writeCursor(list, { postedOn, sourceId, category }),
  );
  return {
    ...head,
    rule,
    unit,
    amount: sumGroups(groups, unit),
    inputs: unit === 'money' ? groups.flatMap((group) => toRateInput(group, currency) ?? []) : [],
    parts: figure.parts.map((part) => ({
      label: part.label,
      amount: sumGroups(groups, unit, part.category),
      figure: partRef(head.figure, part.figure),
    })),
    lineCount: groups.reduce((count, group) => count + group.lines, 0),
    lines: rows.map((row) => toWorkingsLine(row, figure)),
    nextCursor,
  };
}

/** The same jobs, machine and days, another figure. */
function partRef(whole: FigureRef, figure: FigureRef['figure']): FigureRef {
  return { ...whole, figure };
}

function sumGroups(
  groups: readonly LineGroup[],
  unit: LineSelection['unit'],
  category?: CostCategory,
): string {
  const counted = groups.filter((group) => category === undefined || group.category === category);
  return sum(counted.map((group) => D(group.amount))).toFixed(DECIMALS[unit]);
}

const RATE_WORDS: Readonly<Partial<Record<CostCategory, (subject: string) => string>>> = {
  labour: (subject) => `Wage of ${subject}`,
  machine: (subject) => `Machine-hour rate of ${subject}`,
  overhead: () => 'Overhead rate per hour of labour',
  earned: (subject) => `Charge-out rate of ${subject}`,
  running: (subject) => `Running cost per hour of ${subject}`,
};

/** Premiums, material and amounts as entered have no rate of the register: each of their lines says more. */
function toRateInput(
  { category, subject, rate, rateFactor, rateValidFrom }: LineGroup,
  currency: string,
): Workings['inputs'][number] | undefined {
  const words = RATE_WORDS[category];
  if (words === undefined || rate === null) return undefined;
  const perHour = `${formatRate(rate, currency)} per hour`;
  const burden = toPercent(
    D(rateFactor ?? '1')
      .minus(1)
      .times(100),
  );
  return {
    label: words(subject ?? 'somebody no longer listed'),
    value: category === 'labour' ? `${perHour} + ${formatPercent(burden)} burden` : perHour,
    validFrom: rateValidFrom,
    figure: null,
  };
}

function toWorkingsLine(row: WorkingsLineRow, figure: LineFigure): WorkingsLine {
  const { category, workedOn, job, operation, machine, amount } = row;
  const isPriced = figure.unit === 'money' && row.rate !== null;
  return {
    ...toLineFacts(row),
    lineId: toLineId(row),
    on: workedOn,
    category,
    job,
    operation,
    machine,
    rate: isPriced ? rateText(toRate(row.rate ?? '0')) : null,
    rateFactor: isPriced && category === 'labour' ? rateText(toRate(row.rateFactor ?? '1')) : null,
    rateValidFrom: isPriced ? row.rateValidFrom : null,
    amount,
    figure: figure === OVERTIME_WEEK || figure === STOCK_ISSUE ? null : toLineFigure(row),
    source: toSourceCell(row),
  };
}
