import { type Figure, type FigureRef, type Workings, type WorkingsLine } from '@brakeven/contract';
import { type CategoryFigures, type JobCostCategory, RULES } from '@brakeven/costing';
import { type EstimateLineRow } from '@brakeven/database';
import {
  D,
  formatPercent,
  hoursText,
  moneyText,
  rateText,
  roundHalfUp,
  sum,
  toHours,
  toMoney,
  toPercent,
  toRate,
} from '@brakeven/values';
import { PLAIN_LINE } from '../show-workings/item-workings';
import { type WorkingsHead } from '../show-workings/workings-request';
import { type StoredEstimate } from './estimate-cost';

export type EstimateFigure = Extract<Figure, `estimate.${string}`>;

/** What each figure of an estimate is called. */
export const TITLES: Readonly<Record<EstimateFigure, string>> = {
  'estimate.hours': 'Estimated hours',
  'estimate.labour': 'Estimated labour',
  'estimate.machine': 'Estimated machine cost',
  'estimate.overhead': 'Estimated overhead',
  'estimate.material': 'Estimated material',
  'estimate.outside': 'Estimated outside work',
  'estimate.total': 'Estimated cost',
  'estimate.price': 'Price for the wanted margin',
  'estimate.variance': 'Variance against the estimate',
};

/** Categories that an estimate has lines of; overtime is estimated at nothing. */
const PARTS = [
  { category: 'labour', figure: 'estimate.labour', label: 'Labour', rule: RULES.estimateLabour },
  { category: 'machine', figure: 'estimate.machine', label: 'Machine', rule: RULES.estimateMachine },
  { category: 'overhead', figure: 'estimate.overhead', label: 'Overhead', rule: RULES.estimateOverhead },
  { category: 'material', figure: 'estimate.material', label: 'Material', rule: RULES.estimateMaterial },
  { category: 'outside', figure: 'estimate.outside', label: 'Outside', rule: RULES.estimateOutside },
] as const satisfies readonly {
  category: JobCostCategory;
  figure: EstimateFigure;
  label: string;
  rule: string;
}[];
type EstimatedCategory = (typeof PARTS)[number]['category'];

/** The workings of a figure that is a sum over the lines of one estimate; hours may be those of one operation. */
export function readLineFigure(
  head: WorkingsHead & { figure: FigureRef & { figure: EstimateFigure } },
  stored: StoredEstimate,
): Workings {
  const { figure, operationId } = head.figure;
  const rows = stored.lines.map((row, at): CostedRow => ({ row, figures: stored.cost.lines[at] ?? {} }));
  const wanted = rows.filter(({ row }) => operationId === undefined || row.operationId === operationId);
  if (figure === 'estimate.hours') return toHoursWorkings(head, stored, wanted);
  const parts = PARTS.filter((part) => figure === 'estimate.total' || part.figure === figure);
  const lines = wanted.flatMap((one) => parts.flatMap(({ category }) => toMoneyLine(one, category) ?? []));
  const [first] = parts;
  return {
    ...head,
    ...frame(stored, lines),
    rule: figure === 'estimate.total' || !first ? RULES.estimateTotal : first.rule,
    unit: 'money',
    amount: moneyText(sum(lines.map((line) => toMoney(line.amount)))),
    parts:
      figure === 'estimate.total'
        ? parts.map((part) => ({
            label: part.label,
            amount: moneyText(stored.cost.figures[part.category].amount),
            figure: { figure: part.figure, jobId: stored.head.jobId },
          }))
        : [],
  };
}

interface CostedRow {
  row: EstimateLineRow;
  figures: Partial<CategoryFigures>;
}

function toHoursWorkings(head: WorkingsHead, stored: StoredEstimate, rows: readonly CostedRow[]): Workings {
  const lines = rows.flatMap(({ row, figures }): WorkingsLine[] => {
    if (!figures.labour?.quantity) return [];
    const hours = hoursText(toHours(figures.labour.quantity));
    return [
      { ...toFacts(row), category: 'labour', quantity: hours, unit: 'hours', rate: null, amount: hours },
    ];
  });
  const hours = sum(lines.map((line) => toHours(line.amount)));
  return {
    ...head,
    ...frame(stored, lines),
    rule: RULES.estimateHours,
    unit: 'hours',
    amount: hoursText(hours),
    parts: [],
  };
}

function toMoneyLine({ row, figures }: CostedRow, category: EstimatedCategory): WorkingsLine | null {
  const figure = figures[category];
  if (!figure) return null;
  const rate = toRateOf(row, category);
  return {
    ...toFacts(row),
    category,
    quantity: figure.quantity && roundHalfUp(figure.quantity, 5).toFixed(),
    unit: toUnit(category),
    rate: rate === null ? null : rateText(toRate(rate)),
    amount: moneyText(figure.amount),
  };
}

function toUnit(category: EstimatedCategory): WorkingsLine['unit'] {
  if (category === 'outside') return null;
  return category === 'material' ? 'kg' : 'hours';
}

function toRateOf(row: EstimateLineRow, category: EstimatedCategory): string | null {
  const rates = {
    labour: row.labourRate,
    machine: row.machineHourRate,
    overhead: row.overheadRate,
    material: row.pricePerKg,
    outside: null,
  };
  return rates[category];
}

/** What a line says of itself; pieces and minutes stand in its detail. */
function toFacts(row: EstimateLineRow) {
  const pieces =
    row.kind === 'operation'
      ? `${plain(row.setupHours)} h set-up + ${row.pieces} × ${plain(row.minutesPerPiece)} min`
      : null;
  return {
    ...PLAIN_LINE,
    lineId: row.estimateLineId,
    on: null,
    label: row.material ?? row.operation ?? (row.description || 'Outside work'),
    detail: [pieces, row.kind === 'outside' ? null : row.description].filter(Boolean).join(' · ') || null,
    operation: row.operation,
    machine: row.machine,
  };
}

function plain(text: string | null): string {
  return D(text ?? 0).toFixed();
}

function frame({ head }: StoredEstimate, lines: WorkingsLine[]) {
  const value = formatPercent(toPercent(head.scrapAllowancePercent));
  const allowance = { label: 'Scrap allowance', value, validFrom: head.estimatedOn, figure: null };
  return { inputs: [allowance], lineCount: lines.length, lines, nextCursor: null };
}
