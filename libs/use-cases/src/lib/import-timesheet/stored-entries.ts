import { employeeDayKey, naturalKey, type NaturalKeyParts } from '@brakeven/costing';
import { type StoredEntryGroup } from '@brakeven/database';
import { type Hours, type LocalDate, sum, toHours } from '@brakeven/values';

/** The entries of a timesheet's days, as the matching and the rules want them; live ones but where it says so. */
export interface StoredEntries {
  /** Entries by natural key. */
  keyCounts: ReadonlyMap<string, number>;
  /** Hours by employee and day. */
  hoursOnFile: ReadonlyMap<string, Hours>;
  /** Entries by everything in the natural key but the hours. */
  workCounts: ReadonlyMap<string, number>;
  /** Entries voided one by one, by natural key. */
  voidedCounts: ReadonlyMap<string, number>;
}

/** Employee, day, job, operation and machine: the same work, whatever its hours. */
export function workKey(parts: Omit<NaturalKeyParts, 'hours'>): string {
  return [parts.employeeId, parts.workedOn, parts.jobId, parts.operationId, parts.machineId ?? ''].join('|');
}

/** Sorts live and voided entries by their keys. */
export function toStoredEntries(
  live: readonly StoredEntryGroup[],
  voided: readonly StoredEntryGroup[],
): StoredEntries {
  const keyCounts = new Map<string, number>();
  const workCounts = new Map<string, number>();
  const hoursOnFile = new Map<string, Hours>();
  for (const group of live) {
    const parts = toKeyParts(group);
    keyCounts.set(naturalKey(parts), group.entries);
    workCounts.set(workKey(parts), (workCounts.get(workKey(parts)) ?? 0) + group.entries);
    const day = employeeDayKey(parts.employeeId, parts.workedOn);
    const hours = toHours(parts.hours.times(group.entries));
    hoursOnFile.set(day, sum([hoursOnFile.get(day) ?? toHours(0), hours]));
  }
  const voidedCounts = new Map(voided.map((group) => [naturalKey(toKeyParts(group)), group.entries]));
  return { keyCounts, workCounts, hoursOnFile, voidedCounts };
}

function toKeyParts(group: StoredEntryGroup): NaturalKeyParts {
  return { ...group, workedOn: group.workedOn as LocalDate, hours: toHours(group.hours) };
}
