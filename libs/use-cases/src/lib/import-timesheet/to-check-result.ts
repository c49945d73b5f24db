import {
  type CheckedRow,
  LIMITS,
  TIMESHEET_FIELDS,
  type TimesheetCheck,
  type TimesheetMapping,
  type TimesheetProblem,
} from '@brakeven/contract';
import { type TimesheetRegister } from '@brakeven/database';
import { D, formatHours, type Hours, hoursText, type LocalDate, sum, toHours } from '@brakeven/values';
import { type SheetFile, type SheetRow, type TimesheetRow } from '@brakeven/workbook';
import { groupBy } from '../group-by';
import { type AssessedRow, type Assessment } from './assess-timesheet';
import { type TimesheetReading } from './read-timesheet';
import { toNameLabel } from './resolve-name';

/** Problems told one by one; a file with more has one cause, and the counts stay exact. */
export const PROBLEMS_LISTED_MAX = 5_000;

/**
 * What a check answers. The hours read are those ready, already there and refused together, and so are the rows:
 * asserted, since everything that is shown of a file rests on it.
 */
export function toCheckResult(reading: TimesheetReading, assessment: Assessment): TimesheetCheck {
  const { rows, alreadyImported, register } = assessment;
  const totals = toTotals(rows);
  const controlTotal = compareControlTotal(reading, totals.hoursRead);
  const problems = [...listControlProblems(reading, totals.hoursRead, controlTotal), ...assessment.problems];
  const kept = rows.filter(({ state }) => state !== 'refused');
  const days = [...new Set(kept.flatMap(({ row }) => row.workedOn ?? []))].sort();
  const shown = chooseShownRows(rows, problems);
  return {
    file: reading.file,
    sheets: reading.sheetFile.sheets.map((sheet) => ({
      name: sheet.name,
      rows: sheet.rows.length,
      isHidden: sheet.isHidden,
    })),
    mapping: reading.mapping,
    mappingFrom: reading.mappingFrom,
    headerCells: [...reading.headerCells],
    missingFields: reading.missingFields,
    unusedColumns: (reading.timesheet?.unusedColumns ?? []).map((one) => ({
      ...one,
      samples: [...one.samples],
    })),
    unreadDates: toUnreadDates(reading),
    ...totals,
    controlTotal,
    alreadyImported: alreadyImported && {
      ...alreadyImported,
      importedAt: alreadyImported.importedAt.toISOString(),
    },
    firstDay: days[0] ?? null,
    lastDay: days.at(-1) ?? null,
    byEmployee: sumByEmployee(kept, register),
    byDay: sumByDay(kept, days),
    problems: limitProblems(problems),
    rows: toCheckedRows(shown, reading),
    rowsNotShown: rows.length - shown.length,
  };
}

function toUnreadDates({ timesheet }: TimesheetReading): TimesheetCheck['unreadDates'] {
  if (!timesheet?.unreadDates) return null;
  const { cells, offers } = timesheet.unreadDates;
  return { cells: cells.slice(0, PROBLEMS_LISTED_MAX), offers: [...offers] };
}

type Totals = Pick<
  TimesheetCheck,
  | 'rowsRead'
  | 'entriesReady'
  | 'alreadyThere'
  | 'refused'
  | 'hoursRead'
  | 'hoursReady'
  | 'hoursAlreadyThere'
  | 'hoursRefused'
  | 'refusedWithoutHours'
>;

function toTotals(rows: readonly AssessedRow[]): Totals {
  const [ready, there, refused] = (['ready', 'already-there', 'refused'] as const).map((state) =>
    sumRows(rows.filter((row) => row.state === state)),
  ) as [RowSum, RowSum, RowSum];
  const all = sumRows(rows);
  const parts = sum([ready.hours, there.hours, refused.hours]);
  if (!parts.eq(all.hours) || ready.rows + there.rows + refused.rows !== all.rows) {
    throw new Error('The parts of a timesheet do not add up to what was read.');
  }
  return {
    rowsRead: all.rows,
    entriesReady: ready.rows,
    alreadyThere: there.rows,
    refused: refused.rows,
    hoursRead: hoursText(all.hours),
    hoursReady: hoursText(ready.hours),
    hoursAlreadyThere: hoursText(there.hours),
    hoursRefused: hoursText(refused.hours),
    refusedWithoutHours: rows.filter(({ state, hours }) => state === 'refused' && hours === null).length,
  };
}

interface RowSum {
  rows: number;
  hours: Hours;
}

function sumRows(rows: readonly AssessedRow[]): RowSum {
  return { rows: rows.length, hours: sum(rows.flatMap(({ hours }) => hours ?? [])) };
}

/** The sheet's own total against all hours that could be read, refused rows included: both saw the same cells. */
function compareControlTotal(
  { timesheet }: TimesheetReading,
  hoursRead: string,
): TimesheetCheck['controlTotal'] {
  if (!timesheet?.controlTotal) return null;
  const { cell, hours } = timesheet.controlTotal;
  const difference = toHours(D(hours).minus(D(hoursRead)));
  return { cell, hours, agrees: difference.isZero(), difference: hoursText(difference) };
}

function listControlProblems(
  { timesheet }: TimesheetReading,
  hoursRead: string,
  controlTotal: TimesheetCheck['controlTotal'],
): TimesheetProblem[] {
  if (!timesheet?.controlTotal || !controlTotal || controlTotal.agrees) return [];
  const { hours, cell } = controlTotal;
  const message = `The total in ${cell} says ${formatHours(hours)} hours, the rows above it that can be read add up to ${formatHours(hoursRead)}. Look for a row that is missing, unreadable or counted twice.`;
  const place = { sheet: timesheet.sheet, cell, row: timesheet.controlTotal.row, field: 'hours' } as const;
  return [{ ...place, code: 'control_total_differs', severity: 'warning', message, alias: null }];
}

function sumByEmployee(
  kept: readonly AssessedRow[],
  { employees }: TimesheetRegister,
): TimesheetCheck['byEmployee'] {
  const groups = groupBy(kept, ({ candidate }) => candidate?.employeeId);
  return employees.flatMap(({ employeeId, number, name }) => {
    const rows = groups.get(employeeId);
    if (!rows) return [];
    const employee = toNameLabel({ targetId: employeeId, code: number, name });
    return [{ employee, entries: rows.length, hours: hoursText(sumRows(rows).hours) }];
  });
}

function sumByDay(kept: readonly AssessedRow[], days: readonly LocalDate[]): TimesheetCheck['byDay'] {
  const groups = groupBy(kept, ({ row }) => row.workedOn);
  return days.map((workedOn) => {
    const rows = groups.get(workedOn) ?? [];
    return { workedOn, entries: rows.length, hours: hoursText(sumRows(rows).hours) };
  });
}

function limitProblems(problems: readonly TimesheetProblem[]): TimesheetProblem[] {
  const listed = problems.slice(0, PROBLEMS_LISTED_MAX);
  const [first] = problems.slice(PROBLEMS_LISTED_MAX);
  if (!first) return listed;
  const more = problems.length - PROBLEMS_LISTED_MAX;
  const subject = more === 1 ? '1 more problem' : `${more} more problems`;
  const message = `${subject} from row ${first.row} on ${more === 1 ? 'is' : 'are'} not listed. Put right those above and check again; so many have one cause, such as a column that holds something else.`;
  return [
    ...listed,
    { ...first, code: 'more_problems', severity: 'warning', message, row: null, field: null, alias: null },
  ];
}

/** All rows with a listed problem, then the first others, up to the limit; in the order of the sheet. */
function chooseShownRows(rows: readonly AssessedRow[], problems: readonly TimesheetProblem[]): AssessedRow[] {
  const troubled = new Set(problems.slice(0, PROBLEMS_LISTED_MAX).map(({ row }) => row));
  const withProblems = rows.filter(({ row }) => troubled.has(row.row));
  const others = rows.filter(({ row }) => !troubled.has(row.row));
  return [...withProblems, ...others.slice(0, Math.max(0, LIMITS.checkRowsShown - withProblems.length))];
}

function toCheckedRows(shown: readonly AssessedRow[], reading: TimesheetReading): CheckedRow[] {
  const { mapping, sheetFile } = reading;
  const wanted = new Set(shown.map(({ row }) => row.row));
  const sheetRows = findSheetRows(sheetFile, mapping, wanted);
  return shown.map(({ row, state }) => ({
    row: row.row,
    state,
    cells: toCells(row, sheetRows.get(row.row)),
  }));
}

function findSheetRows(
  { sheets }: SheetFile,
  mapping: TimesheetMapping | null,
  wanted: ReadonlySet<number>,
): Map<number, SheetRow> {
  const sheet = sheets.find(({ name }) => name === mapping?.sheet);
  return new Map(sheet?.rows.filter(({ row }) => wanted.has(row)).map((row) => [row.row, row]));
}

function toCells(row: TimesheetRow, sheetRow: SheetRow | undefined): CheckedRow['cells'] {
  const texts = new Map(sheetRow?.cells.map(({ address, text }) => [address, text]));
  return Object.fromEntries(
    TIMESHEET_FIELDS.flatMap((field) => {
      const address = row.cells[field];
      return address ? [[field, { address, text: texts.get(address) ?? '' }]] : [];
    }),
  );
}
