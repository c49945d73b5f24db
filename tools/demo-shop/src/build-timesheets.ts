import { addDays, formatLocalDate, type LocalDate } from '@brakeven/values';
import { type TimesheetLine, type TimesheetWorkbook } from '@brakeven/workbook';
import { type PlannedEntry } from './plan-weeks';
import { SHOP } from './story';

/** From this week on the bookkeeper keeps hours as h:mm. */
const DURATIONS_FROM_WEEK = 26;

/** A week's timesheet as the bookkeeper has it. */
export function buildTimesheet(
  week: number,
  monday: LocalDate,
  entries: readonly PlannedEntry[],
): TimesheetWorkbook {
  return {
    title: `${SHOP.name}: timesheet, week of ${formatLocalDate(monday, 'long')}`,
    subtitles: ['Kept by Ines Holloway. Hours in quarters, one row for each piece of work.'],
    sheetName: 'Hours',
    rows: entries.map((entry) => toLine(entry, monday)),
    hoursAs: week < DURATIONS_FROM_WEEK ? 'number' : 'duration',
  };
}

/**
 * The week that is not in yet, with three things to settle: a name that is spelt otherwise, a job that does not
 * exist and hours that cannot be read.
 */
export function buildUnsettledTimesheet(
  monday: LocalDate,
  entries: readonly PlannedEntry[],
): TimesheetWorkbook {
  const rows = entries.map((entry) => toLine(entry, monday));
  const [first, second, third, ...rest] = rows;
  if (!first || !second || !third) throw new Error('The week has too few entries.');
  return {
    title: `${SHOP.name}: timesheet, week of ${formatLocalDate(monday, 'long')}`,
    subtitles: ['Not imported yet: try it under Timesheets.'],
    sheetName: 'Hours',
    rows: [
      { ...first, employee: 'Tobbias Ren' },
      { ...second, job: '9999' },
      { ...third, hours: '26.0000' },
      ...rest,
    ],
    hasTotal: false,
  };
}

function toLine(entry: PlannedEntry, monday: LocalDate): TimesheetLine {
  return {
    workedOn: addDays(monday, entry.day),
    employee: entry.employee.name,
    job: Number(entry.job.number),
    operation: entry.operation,
    machine: entry.machine,
    hours: (entry.quarterHours / 4).toFixed(4),
    good: entry.good,
    scrap: entry.scrap,
    note: entry.note,
  };
}
