import { type Workings } from '@brakeven/contract';
import { D, type Decimal, sum } from '@brakeven/values';
import { toFigureText } from '../figure/figure';

export interface WorkingsCheck {
  /** `open`: not all lines are loaded yet, so that they cannot be added up. */
  state: 'agrees' | 'disagrees' | 'open';
  text: string;
}

/**
 * Adds up what is shown and holds it against the figure, to the last decimal: the parts, and the rows once all of them
 * are loaded. Empty if the figure has neither.
 */
export function checkWorkings(workings: Workings, currency: string): WorkingsCheck[] {
  const { parts, lines, lineCount, unit } = workings;
  const checks: WorkingsCheck[] = [];
  if (parts.length > 0) checks.push(compare(sumOf(parts), workings, `The ${parts.length} parts`, currency));
  if (lineCount === 0) return checks;
  if (lines.length < lineCount) {
    const shown = toFigureText(sumOf(lines).toFixed(), unit, currency);
    const text = `${countText(lines.length)} of ${countText(lineCount)} rows shown; they make ${shown} so far.`;
    return [...checks, { state: 'open', text }];
  }
  const subject = lineCount === 1 ? 'The one row' : `The ${countText(lineCount)} rows`;
  return [...checks, compare(sumOf(lines), workings, subject, currency)];
}

function compare(
  total: Decimal,
  { amount, unit }: Workings,
  subject: string,
  currency: string,
): WorkingsCheck {
  const verb = subject.endsWith('one row') ? 'makes' : 'add up to';
  const text = `${subject} ${verb} ${toFigureText(total.toFixed(), unit, currency)}`;
  if (total.eq(D(amount))) return { state: 'agrees', text: `${text}, exactly the figure.` };
  return {
    state: 'disagrees',
    text: `${text}, not ${toFigureText(amount, unit, currency)}. Costs may have changed meanwhile: close this and open it again.`,
  };
}

function sumOf(items: readonly { amount: string }[]): Decimal {
  return sum(items.map((item) => D(item.amount)));
}

function countText(count: number): string {
  return count.toLocaleString('en-US');
}
