import { type TimesheetProblem } from '@brakeven/contract';
import { addDays, formatHours, formatLocalDate, sum, toLocalDate } from '@brakeven/values';
import { type ResolvedRow } from './resolve-row';

/**
 * One warning for all rows that would go in for a month that is closed: they are taken, and posted late. It points
 * at the date of the first.
 */
export function listLateWarnings(
  sheet: string,
  rows: readonly (ResolvedRow & { state: 'ready' | 'already-there' | 'refused' })[],
  closedThrough: string | null,
): TimesheetProblem[] {
  if (closedThrough === null) return [];
  const late = rows.filter(
    ({ state, candidate }) => state === 'ready' && candidate !== null && candidate.workedOn <= closedThrough,
  );
  const [first] = late;
  if (!first) return [];
  const end = toLocalDate(closedThrough);
  const hours = formatHours(sum(late.flatMap((one) => one.hours ?? [])));
  const subject = late.length === 1 ? `1 row (${hours} h) is` : `${late.length} rows (${hours} h) are`;
  const message = `${subject} dated in a closed month: the books are closed through ${formatLocalDate(end)}. Imported, they will be posted on ${formatLocalDate(addDays(end, 1))}, late. To post them on their own days, have the month reopened first.`;
  const cell = first.row.cells.date ?? `A${first.row.row}`;
  return [
    { code: 'posted_late', severity: 'warning', message, sheet, cell, row: null, field: 'date', alias: null },
  ];
}
