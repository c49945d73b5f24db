import { AppError, type ErrorCode } from '@brakeven/contract';
import { type DatedTable, findRowRefusal, type RowRefusal } from '@brakeven/database';
import {
  D,
  type Decimal,
  formatLocalDate,
  formatMass,
  massIn,
  roundHalfUp,
  toLocalDate,
  toMass,
  type UnitSystem,
} from '@brakeven/values';

/** The field that each rule is about, in the words of whoever writes; a rule without one is told of the whole. */
export type RefusedFields = Partial<Record<RowRefusal['kind'], string>>;

/**
 * Runs work that writes dated rows, and turns the rules of the books that it may break into refusals with plain
 * words in the shop's unit: stock that does not cover, more returned than drawn, dated before the job, at odds with
 * what closed months hold.
 *
 * @throws AppError `conflict` (stock, return, closed months) or `invalid_input` (dated before the job); any other
 *   error as it came
 */
export async function refusingRows<T>(
  units: UnitSystem,
  fields: RefusedFields,
  work: () => Promise<T>,
): Promise<T> {
  try {
    return await work();
  } catch (error) {
    const refusal = findRowRefusal(error);
    if (!refusal) throw error;
    const message = toRefusalWords(refusal, units);
    throw new AppError(CODES[refusal.kind].code, message, {
      issues: [{ field: fields[refusal.kind] ?? '', code: CODES[refusal.kind].issue, message }],
      details: refusal,
      cause: error,
    });
  }
}

const CODES: Readonly<Record<RowRefusal['kind'], { code: ErrorCode; issue: string }>> = {
  stock: { code: 'conflict', issue: 'stock_short' },
  return: { code: 'conflict', issue: 'over_returned' },
  'before-job': { code: 'invalid_input', issue: 'before_job' },
  'closed-issue': { code: 'conflict', issue: 'month_closed' },
  'in-service': { code: 'conflict', issue: 'month_closed' },
};

/** What was refused and what to do about it, in words; weights in pounds or kilograms as the shop shows them. */
export function toRefusalWords(refusal: RowRefusal, units: UnitSystem): string {
  switch (refusal.kind) {
    case 'stock': {
      const missing = toMassWords(refusal.missingKg, units);
      const who = refusal.job === null ? 'an issue takes' : `job ${refusal.job} takes`;
      return `On ${day(refusal.on)} ${who} ${missing} more ${refusal.material} than is in stock. Receive the missing lot of at least ${missing} of ${refusal.material}, dated on or before ${day(refusal.on)}, first.`;
    }
    case 'return': {
      const excess = toMassWords(refusal.excessKg, units);
      return `By ${day(refusal.on)} job ${refusal.job} would have given back ${excess} more ${refusal.material} than it drew. Return ${excess} less, or enter the missing issue to job ${refusal.job}, dated on or before ${day(refusal.on)}, first.`;
    }
    case 'before-job':
      return toBeforeJobWords(refusal);
    case 'closed-issue':
      return `On ${day(refusal.on)}, in a month that is closed, job ${refusal.job} was charged for ${refusal.material}, and that charge stays. After this change the stock could not bear it: value would be left without any metal, or less than nothing. Reopen the month, make this change and close it again, or date what is new in an open month.`;
    case 'in-service':
      return `${refusal.machine} worked on ${day(refusal.on)}, in a month that is closed, and whether that counts towards its payback stays as it is. Give a day that moves past no work up to ${day(refusal.closedThrough)}, or reopen the months first.`;
  }
}

const ROW_WORDS: Readonly<Record<Exclude<DatedTable, 'job'>, string>> = {
  material_issue: 'material',
  outside_service: 'an outside service',
  invoice: 'an invoice',
};

function toBeforeJobWords({ job, openedOn, on, table }: Extract<RowRefusal, { kind: 'before-job' }>): string {
  if (table === 'job') {
    return `Job ${job} has rows dated ${day(on)}, so it cannot be opened on ${day(openedOn)}. Open it on ${day(on)} or before.`;
  }
  return `Job ${job} was opened on ${day(openedOn)}, so ${ROW_WORDS[table]} cannot be dated ${day(on)}. Date it on ${day(openedOn)} or after, or correct the job's opening first.`;
}

const day = (date: string): string => formatLocalDate(toLocalDate(date));

/** Rounded up to what is shown, so that a lot of the weight named is enough. */
function toMassWords(kilograms: string, units: UnitSystem): string {
  const unit = units === 'us' ? 'lb' : 'kg';
  return formatMass(toMass(roundUp(massIn(toMass(D(kilograms), 'kg'), unit)), unit), units);
}

const STEP = D('0.01');

function roundUp(weight: Decimal): Decimal {
  const rounded = roundHalfUp(weight, 2);
  return rounded.lt(weight) ? rounded.plus(STEP) : rounded;
}
