import { type TimesheetProblem } from '@brakeven/contract';
import { naturalKey } from '@brakeven/costing';
import { formatHours, formatLocalDate } from '@brakeven/values';
import { type EntryCandidate } from './resolve-row';
import { type StoredEntries, workKey } from './stored-entries';
import { toCellProblem } from './timesheet-problem';

/** What is to be said of new rows because of what is stored. Takes whole days, matched already. */
export function listStoredWarnings(
  checked: readonly EntryCandidate[],
  stored: StoredEntries,
): TimesheetProblem[] {
  const fresh = checked.filter(({ isAlreadyThere }) => !isAlreadyThere);
  const there = checked.filter(({ isAlreadyThere }) => isAlreadyThere);
  return [...warnOfCorrections(fresh, there, stored), ...warnOfVoided(fresh, stored)];
}

/**
 * A new row beside a stored entry of the same work that the file does not have is most likely that entry
 * corrected. Both would count, so it is said.
 */
function warnOfCorrections(
  fresh: readonly EntryCandidate[],
  there: readonly EntryCandidate[],
  { workCounts }: StoredEntries,
): TimesheetProblem[] {
  const left = new Map<string, number>();
  const countLeft = (candidate: EntryCandidate) =>
    left.get(workKey(candidate)) ?? workCounts.get(workKey(candidate)) ?? 0;
  for (const candidate of there) left.set(workKey(candidate), countLeft(candidate) - 1);
  return fresh
    .filter((candidate) => countLeft(candidate) > 0)
    .map((candidate) => {
      const message = `Hours are already stored for this employee, job, operation and machine on ${dayOf(candidate)} that this file does not have. If the ${formatHours(candidate.hours)} hours here correct them, void the stored entry or undo its import; as it is, both count.`;
      return warn(candidate, 'may_correct_stored', message);
    });
}

/** An entry voided by hand is no longer stored, so its row is new again: it must not come back unseen. */
function warnOfVoided(fresh: readonly EntryCandidate[], { voidedCounts }: StoredEntries): TimesheetProblem[] {
  const left = new Map<string, number>();
  return fresh.flatMap((candidate) => {
    const key = naturalKey(candidate);
    const voided = left.get(key) ?? voidedCounts.get(key) ?? 0;
    left.set(key, voided - 1);
    if (voided <= 0) return [];
    const message = `An entry just like this one, ${formatHours(candidate.hours)} hours on ${dayOf(candidate)}, was voided by hand. The row goes in again; take it out of the sheet if it was voided for good.`;
    return [warn(candidate, 'was_voided', message)];
  });
}

function warn({ row, source }: EntryCandidate, code: string, message: string): TimesheetProblem {
  const place = { row, cells: source.cells };
  return toCellProblem(source.sheet, place, 'hours', { code, severity: 'warning', message });
}

function dayOf({ workedOn }: EntryCandidate): string {
  return formatLocalDate(workedOn);
}
