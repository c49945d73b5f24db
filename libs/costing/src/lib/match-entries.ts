import { type Hours, hoursText, type LocalDate } from '@brakeven/values';

/** What makes two time entries the same work; values as stored, after aliases. */
export interface NaturalKeyParts {
  employeeId: string;
  workedOn: LocalDate;
  jobId: string;
  operationId: string;
  /** As the row gave it; null if it gave none, even if the operation has a default. */
  machineId: string | null;
  hours: Hours;
}

/** A candidate with its place among its likes. */
export interface MatchedEntry<T> {
  candidate: T;
  key: string;
  /** 1 for the first of its key among the candidates, 2 for the second, and so on. */
  nth: number;
  /** True if at least `nth` entries with this key are stored. */
  isAlreadyThere: boolean;
}

/** The natural key of an entry as one text: employee, date, job, operation, machine, hours to four decimals. */
export function naturalKey(parts: NaturalKeyParts): string {
  const { employeeId, workedOn, jobId, operationId, machineId, hours } = parts;
  return [employeeId, workedOn, jobId, operationId, machineId ?? '', hoursText(hours)].join('|');
}

/**
 * Says which candidates are already stored, with multiplicity: if two like it are stored and the file has three,
 * the first two are there and the third is new. Answers in the order of the candidates.
 */
export function matchByNaturalKey<T extends NaturalKeyParts>(
  candidates: readonly T[],
  storedKeyCounts: ReadonlyMap<string, number>,
): MatchedEntry<T>[] {
  const seen = new Map<string, number>();
  return candidates.map((candidate) => {
    const key = naturalKey(candidate);
    const nth = (seen.get(key) ?? 0) + 1;
    seen.set(key, nth);
    return { candidate, key, nth, isAlreadyThere: nth <= (storedKeyCounts.get(key) ?? 0) };
  });
}
