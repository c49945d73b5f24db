import { type SourceCell, type Workings, type WorkingsLine } from '@brakeven/contract';
import { D, formatHours, formatRate } from '@brakeven/values';
import { toFigureText } from '../figure/figure';

export interface LineView {
  lineId: string;
  on: string | null;
  label: string;
  /** Job, operation, machine, as far as there are. */
  where: string;
  /** '7.50 h × $24.00 × 1.28'. */
  sum: string;
  rateValidFrom: string | null;
  amount: string;
  source: SourceCell | null;
}

/** A line as the drawer shows it. */
export function toLineView(line: WorkingsLine, unit: Workings['unit'], currency: string): LineView {
  return {
    lineId: line.lineId,
    on: line.on,
    label: line.label,
    where: [line.job, line.operation, line.machine].filter(Boolean).join(' · '),
    sum: toSumText(line, currency),
    rateValidFrom: line.rateValidFrom,
    amount: toFigureText(line.amount, unit, currency),
    source: line.source,
  };
}

function toSumText({ hours, rate, rateFactor }: WorkingsLine, currency: string): string {
  if (hours === null || rate === null) return '';
  const factors = [`${formatHours(hours)}\u00a0h`, formatRate(rate, currency)];
  if (rateFactor !== null) factors.push(D(rateFactor).toFixed());
  return factors.join(' × ');
}
