import { type LocalDate } from '@brakeven/values';

/** A day as the workbook library takes it: midnight UTC, which it writes as a whole serial number. */
export function toWorkbookDate(date: LocalDate): Date {
  return new Date(`${date}T00:00:00Z`);
}
