import { type CheckedRow, type TimesheetCheck, type TimesheetProblem } from '@brakeven/contract';

const COLUMNS = { date: 'A', employee: 'B', job: 'C', operation: 'D', hours: 'E' } as const;

/** A row of a checked timesheet: 7.5 hours of Jo Alvarez unless said otherwise. */
export function sampleRow(row: number, change: Partial<CheckedRow> = {}): CheckedRow {
  const texts = { date: '2026-11-23', employee: 'Jo Alvarez', job: '2231', operation: 'FORM', hours: '7.5' };
  const cells = Object.fromEntries(
    Object.entries(texts).map(([field, text]) => [
      field,
      { address: `${COLUMNS[field as 'date']}${row}`, text },
    ]),
  );
  return { row, state: 'ready', cells, ...change };
}

/** A refused cell in the hours column unless said otherwise. */
export function sampleProblem(row: number | null, change: Partial<TimesheetProblem> = {}): TimesheetProblem {
  return {
    code: 'hours_unreadable',
    severity: 'refused',
    message: "'7:90' is not a number of hours.",
    sheet: 'Hours',
    cell: `E${row ?? 1}`,
    row,
    field: 'hours',
    alias: null,
    ...change,
  };
}

/** A name that nobody has, with one near match. */
export function sampleUnknownName(row: number, spelling = 'J. Alvares'): TimesheetProblem {
  return sampleProblem(row, {
    code: 'employee_unknown',
    message: `'${spelling}' is not an employee.`,
    cell: `B${row}`,
    field: 'employee',
    alias: { kind: 'employee', spelling, offers: [{ targetId: 'e-104', label: '104 · Jo Alvarez' }] },
  });
}

/** A check of three good rows of 7.5 hours unless said otherwise. */
export function sampleCheck(change: Partial<TimesheetCheck> = {}): TimesheetCheck {
  return {
    file: { name: 'week 48.xlsx', bytes: 18_000, sha256: '0'.repeat(64) },
    sheets: [{ name: 'Hours', rows: 8, isHidden: false }],
    mapping: { sheet: 'Hours', headerRow: 4, columns: { ...COLUMNS } },
    mappingFrom: 'recognised',
    headerCells: [
      { column: 'A', text: 'Date', sample: '2026-11-23' },
      { column: 'B', text: 'Emp', sample: 'Jo Alvarez' },
      { column: 'F', text: 'Was', sample: 'FORM' },
    ],
    missingFields: [],
    unusedColumns: [],
    unreadDates: null,
    rowsRead: 3,
    entriesReady: 3,
    alreadyThere: 0,
    refused: 0,
    hoursRead: '22.5000',
    hoursReady: '22.5000',
    hoursAlreadyThere: '0.0000',
    hoursRefused: '0.0000',
    refusedWithoutHours: 0,
    controlTotal: null,
    alreadyImported: null,
    firstDay: '2026-11-23',
    lastDay: '2026-11-24',
    byEmployee: [{ employee: '104 · Jo Alvarez', entries: 3, hours: '22.5000' }],
    byDay: [{ workedOn: '2026-11-23', entries: 3, hours: '22.5000' }],
    problems: [],
    rows: [sampleRow(5), sampleRow(6), sampleRow(7)],
    rowsNotShown: 0,
    ...change,
  };
}
