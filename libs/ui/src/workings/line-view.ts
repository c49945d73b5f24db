import { type FigureRef, type SourceCell, type Workings, type WorkingsLine } from '@brakeven/contract';
import {
  D,
  formatHours,
  formatLocalDate,
  formatMass,
  formatRate,
  massIn,
  toLocalDate,
  toMass,
  toRate,
} from '@brakeven/values';
import { toFigureText } from '../figure/figure';
import { type ShopFormat } from '../shop-format';

type Format = Pick<ShopFormat, 'currency' | 'units'>;

export interface LineView {
  lineId: string;
  on: string | null;
  label: string;
  /** What more there is to say, then job, operation, machine, as far as there are. */
  where: string;
  /** Why it stands on another day than its own. */
  note: string;
  /** '7.50 h × $24.00 × 1.28', or only the quantity where there is no rate. */
  sum: string;
  rateValidFrom: string | null;
  amount: string;
  figure: FigureRef | null;
  source: SourceCell | null;
  /** A time entry that came from no file. */
  isByHand: boolean;
}

/** A line as the drawer shows it. */
export function toLineView(line: WorkingsLine, unit: Workings['unit'], format: Format): LineView {
  return {
    lineId: line.lineId,
    on: line.on,
    label: line.label,
    where: [line.detail, line.job, line.operation, line.machine].filter(Boolean).join(' · '),
    note: toPostingNote(line),
    sum: toSumText(line, unit, format),
    rateValidFrom: line.rateValidFrom,
    amount: toFigureText(line.amount, unit, format.currency),
    figure: line.figure,
    source: line.source,
    isByHand: line.source === null && line.unit === 'hours',
  };
}

/** Says of a line that is late when it was posted, and of one that takes back another which one. */
export function toPostingNote({
  postedOn,
  isLate,
  takesBackOn,
}: Pick<WorkingsLine, 'postedOn' | 'isLate' | 'takesBackOn'>): string {
  if (postedOn === null || !isLate) return '';
  const day = (date: string) => formatLocalDate(toLocalDate(date));
  const posted = `Posted ${day(postedOn)}`;
  if (takesBackOn === null) return `${posted}, late: its month was closed`;
  return `${posted}: takes back what was posted ${day(takesBackOn)}, since the row was voided`;
}

/** A line's quantity in the unit of the shop: hours, a weight, or nothing for what counts as itself. */
export function toQuantityText(
  { quantity, unit }: Pick<WorkingsLine, 'quantity' | 'unit'>,
  format: Format,
): string {
  if (quantity === null || unit === null || unit === 'each') return '';
  return unit === 'hours'
    ? `${formatHours(quantity)}\u00a0h`
    : formatMass(toMass(quantity, 'kg'), format.units);
}

/** A line's rate: per hour as it is, an average per weight in the unit of the shop; nothing for an amount as such. */
export function toLineRateText(
  { unit, rate }: { unit: WorkingsLine['unit']; rate?: string | null },
  { currency, units }: Format,
): string {
  if (rate === null || rate === undefined || unit === null || unit === 'each') return '';
  if (unit === 'hours') return formatRate(rate, currency);
  const weight = units === 'us' ? 'lb' : 'kg';
  const price = D(rate)
    .times(massIn(toMass(1, weight), 'kg'))
    .toDecimalPlaces(4);
  return `${formatRate(toRate(price), currency)} per ${weight}`;
}

function toSumText(line: WorkingsLine, figureUnit: Workings['unit'], format: Format): string {
  // The amount of hours says it already.
  if (figureUnit === 'hours') return '';
  const factors = [toQuantityText(line, format), toLineRateText(line, format)].filter(Boolean);
  if (line.rateFactor !== null) factors.push(D(line.rateFactor).toFixed());
  return factors.join(' × ');
}
