import { type TimesheetField, type TimesheetMapping } from '@brakeven/contract';
import { columnOf } from './cell-address';
import { findUnreadDates } from './find-unread-dates';
import { type RawCell, type SheetFile, type SheetRow } from './sheet-file';
import {
  type CellReading,
  readDateCell,
  readHoursCell,
  readLabelCell,
  readNoteCell,
  readPiecesCell,
  type TextForms,
} from './timesheet-cells';
import { getSheet } from './timesheet-mapping';
import { type RowProblem, type SheetNotice, type TimesheetRow, type TimesheetRows } from './timesheet-row';
import { type FieldCells, type SortedRow, sortTimesheetRows } from './timesheet-row-role';
import { listUnusedColumns } from './unused-columns';

type Columns = readonly (readonly [TimesheetField, string])[];

const REQUIRED_CODES = {
  date: 'date_missing',
  employee: 'employee_missing',
  job: 'job_missing',
  operation: 'operation_missing',
  hours: 'hours_missing',
} as const satisfies Partial<Record<TimesheetField, RowProblem['code']>>;

/**
 * Reads the rows below the header as entries. What cannot be read is null with a problem that names the cell; blank
 * rows are skipped. A totals row at the foot becomes the control total; other totals, repeated headers and single
 * texts below the last entry are skipped with a notice.
 * @throws WorkbookError `sheet_not_found`
 */
export function readTimesheetRows(file: SheetFile, mapping: TimesheetMapping): TimesheetRows {
  const steps = readInSteps(file, mapping);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

/**
 * The same as {@link readTimesheetRows}, for large sheets in a program that has others to serve: waits for `nextTurn`
 * every thousand rows.
 * @throws WorkbookError `sheet_not_found`
 */
export async function readTimesheetRowsInTurns(
  file: SheetFile,
  mapping: TimesheetMapping,
  nextTurn: () => Promise<void>,
): Promise<TimesheetRows> {
  const steps = readInSteps(file, mapping);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
    await nextTurn();
  }
}

const ROWS_PER_STEP = 1_000;

function* readInSteps(file: SheetFile, mapping: TimesheetMapping): Generator<undefined, TimesheetRows> {
  const sheet = getSheet(file, mapping.sheet);
  const columns = Object.entries(mapping.columns) as [TimesheetField, string][];
  const forms: TextForms = {
    date1904: sheet.date1904,
    dateFormat: mapping.dateFormat,
    decimalMark: mapping.decimalMark ?? '.',
    knownDays: new Map(),
  };
  const header = sheet.rows.find(({ row }) => row === mapping.headerRow);
  const below = sheet.rows.filter(({ row }) => row > mapping.headerRow);
  const picked = yield* mapInSteps(below, (row) => ({ row, fields: pickFields(row, columns) }));
  const sorted = sortTimesheetRows(picked, header ? pickFields(header, columns) : {});
  const entries = sorted.filter(({ role }) => role === 'entry');
  const lastEntryRow = entries.at(-1)?.row.row ?? mapping.headerRow;
  const total = findControlTotal(sorted, lastEntryRow);
  const control = total ? readControlTotal(total, forms) : { controlTotal: null, notices: [] };
  return {
    sheet: sheet.name,
    rows: yield* mapInSteps(entries, ({ row, fields }) => readEntry(row.row, fields, columns, forms)),
    controlTotal: control.controlTotal,
    problems: [...sorted.flatMap((one) => (one === total ? [] : toNotice(one))), ...control.notices],
    unusedColumns: listUnusedColumns(
      header,
      entries.map(({ row }) => row),
      mapping.columns,
    ),
    unreadDates: findUnreadDates(
      entries.map(({ fields }) => fields.date),
      forms,
    ),
  };
}

function* mapInSteps<T, R>(items: readonly T[], toResult: (item: T) => R): Generator<undefined, R[]> {
  const results: R[] = [];
  for (const item of items) {
    results.push(toResult(item));
    if (results.length % ROWS_PER_STEP === 0) yield;
  }
  return results;
}

function pickFields(row: SheetRow, columns: Columns): FieldCells {
  const byColumn = new Map(row.cells.map((cell) => [columnOf(cell.address), cell]));
  const found = columns.flatMap(([field, column]): [TimesheetField, RawCell][] => {
    const cell = byColumn.get(column);
    return cell ? [[field, cell]] : [];
  });
  return Object.fromEntries(found);
}

function readEntry(row: number, fields: FieldCells, columns: Columns, forms: TextForms): TimesheetRow {
  const problems: RowProblem[] = [];
  const cells = Object.fromEntries(columns.map(([field, column]) => [field, `${column}${row}`]));
  const take = <T>(field: TimesheetField, reading: CellReading<T>): T | null => {
    if (!reading.ok)
      problems.push({ code: reading.code, message: reading.message, cell: cells[field] ?? '', field });
    return reading.ok ? reading.value : null;
  };
  const values = {
    workedOn: take('date', readDateCell(fields.date, forms)),
    employee: take('employee', readLabelCell(fields.employee, 'employee')),
    job: take('job', readLabelCell(fields.job, 'job')),
    operation: take('operation', readLabelCell(fields.operation, 'operation')),
    machine: take('machine', readLabelCell(fields.machine, 'machine')),
    hours: take('hours', readHoursCell(fields.hours, forms)),
    good: take('good', readPiecesCell(fields.good, 'good')),
    scrap: take('scrap', readPiecesCell(fields.scrap, 'scrap')),
    note: take('note', readNoteCell(fields.note)),
  };
  return { row, cells, ...values, problems: [...problems, ...listMissing(row, fields, cells)] };
}

function listMissing(
  row: number,
  fields: FieldCells,
  cells: Readonly<Partial<Record<TimesheetField, string>>>,
): RowProblem[] {
  const required = Object.entries(REQUIRED_CODES) as [keyof typeof REQUIRED_CODES, RowProblem['code']][];
  return required
    .filter(([field]) => !fields[field])
    .map(([field, code]) => ({
      code,
      message: `Row ${row} states no ${field}. Fill it in, or clear the row if it is no entry.`,
      cell: cells[field] ?? `A${row}`,
      field,
    }));
}

/** The totals row below the last entry; a grand total before a plain one before a subtotal, the last of its kind. */
function findControlTotal(sorted: readonly SortedRow[], lastEntryRow: number): SortedRow | undefined {
  const atFoot = sorted.filter(
    ({ role, row, fields }) => role === 'total' && fields.hours && row.row > lastEntryRow,
  );
  const says = (word: RegExp) => (one: SortedRow) => one.row.cells.some(({ text }) => word.test(text));
  return atFoot.findLast(says(/grand/i)) ?? atFoot.findLast((one) => !says(/\bsub/i)(one)) ?? atFoot.at(-1);
}

function readControlTotal(
  { row, fields }: SortedRow,
  forms: TextForms,
): { controlTotal: TimesheetRows['controlTotal']; notices: SheetNotice[] } {
  const reading = readHoursCell(fields.hours, forms);
  const cell = fields.hours?.address ?? `A${row.row}`;
  if (reading.ok && reading.value !== null) {
    return { controlTotal: { row: row.row, hours: reading.value, cell }, notices: [] };
  }
  const why = reading.ok ? '' : ` ${reading.message}`;
  const message = `The totals row ${row.row} could not be compared with the rows above.${why}`;
  return { controlTotal: null, notices: [{ code: 'total_unreadable', severity: 'warning', message, cell }] };
}

function toNotice({ role, row, fields }: SortedRow): SheetNotice[] {
  const first = row.cells[0];
  const cell = (role === 'total' ? fields.hours?.address : first?.address) ?? `A${row.row}`;
  const severity = 'warning';
  if (role === 'total') {
    const message = `Row ${row.row} holds a subtotal, not an entry; it was skipped.`;
    return [{ code: 'subtotal_skipped', severity, message, cell }];
  }
  if (role === 'header') {
    const message = `Row ${row.row} repeats the header; it was skipped.`;
    return [{ code: 'header_repeated', severity, message, cell }];
  }
  if (role !== 'text') return [];
  const message = `Row ${row.row} holds only the text '${first?.text ?? ''}' below the entries; it was skipped.`;
  return [{ code: 'text_row_skipped', severity, message, cell }];
}
