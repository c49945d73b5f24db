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
import { type LineFigure } from './figures';
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
    inputs: unit === 'money' ? groups.map((group) => toInput(group, currency)) : [],
    parts: figure.parts.map((part) => ({
      label: part.label,
      amount: sumGroups(groups, unit, part.category),
      figure: partRef(head.figure, part.figure),
    })),
    lineCount: groups.reduce((count, group) => count + group.lines, 0),
    lines: rows.map((row) => toWorkingsLine(row, unit)),
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

const RATE_WORDS: Readonly<Record<CostCategory, (subject: string) => string>> = {
  labour: (subject) => `Wage of ${subject}`,
  overtime: (subject) => `Overtime premium of ${subject}, over all hours of the week`,
  machine: (subject) => `Machine-hour rate of ${subject}`,
  overhead: () => 'Overhead rate per hour of labour',
  material: (subject) => `Average cost of ${subject}`,
  outside: () => 'Outside service',
  invoiced: () => 'Invoice',
  earned: (subject) => `Charge-out rate of ${subject}`,
  running: (subject) => `Running cost per hour of ${subject}`,
};

function toInput({ category, subject, rate, rateFactor, rateValidFrom }: LineGroup, currency: string) {
  const perHour = `${formatRate(rate ?? '0', currency)} per hour`;
  const burden = toPercent(
    D(rateFactor ?? '1')
      .minus(1)
      .times(100),
  );
  return {
    label: RATE_WORDS[category](subject ?? 'somebody no longer listed'),
    value: category === 'labour' ? `${perHour} + ${formatPercent(burden)} burden` : perHour,
    validFrom: rateValidFrom,
  };
}

function toWorkingsLine(row: WorkingsLineRow, unit: LineSelection['unit']): WorkingsLine {
  const { sourceId, category, workedOn, employee, job, operation, machine, hours, amount } = row;
  const isPriced = unit === 'money' && row.rate !== null;
  return {
    lineId: `${sourceId}.${category}`,
    on: workedOn,
    category,
    label: employee,
    job,
    operation,
    machine,
    hours,
    rate: isPriced ? rateText(toRate(row.rate ?? '0')) : null,
    rateFactor: isPriced && category === 'labour' ? rateText(toRate(row.rateFactor ?? '1')) : null,
    rateValidFrom: isPriced ? row.rateValidFrom : null,
    amount,
    source: toSourceCell(row),
  };
}
