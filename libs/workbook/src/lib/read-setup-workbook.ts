import { type UnitSystem } from '@brakeven/values';
import { columnOf } from './cell-address';
import { readSetupCell, type SetupColumnContext, type SetupTrouble, type SetupValue } from './setup-cells';
import { EXPLAINING_SHEET, findSetupColumn, findSetupPlan, SETUP_PLANS } from './setup-columns';
import { type SetupData, type SetupFile, type SetupProblem, type SetupRowSource } from './setup-data';
import { type SetupSheetPlan } from './setup-plan';
import { findColumnUnit, listUnitsInWords } from './setup-quantities';
import { type RawCell, type Sheet, type SheetFile, type SheetRow } from './sheet-file';

type Values = Readonly<Record<string, SetupValue | null>>;
interface ReadRow extends SetupRowSource {
  readonly values: Values;
}
/** Columns of a sheet by letter. */
type Columns = ReadonlyMap<string, SetupColumnContext>;

interface SheetReading {
  readonly rows: readonly ReadRow[];
  readonly problems: readonly SetupProblem[];
}

const HEADER_ROWS_SEARCHED = 10;

/**
 * Reads a set-up workbook. Sheet names and headers decide, whatever their order, case and spaces; a sheet that is
 * missing states nothing, and one that is not part of the set-up is passed over with a warning.
 *
 * Rows that cannot be read whole are left out of the lists, each with a `refused` problem: while there is one, the
 * lists are not to be imported. Amounts are rounded half-up once (money to 2, rates to 6, percentages to 4 decimals);
 * forces and lengths are exact in kN and mm. `units` gives the unit of columns whose header names none.
 */
export function readSetupWorkbook(file: SheetFile, { units }: { units: UnitSystem }): SetupFile {
  const problems: SetupProblem[] = [];
  const lists: Partial<Record<keyof SetupData, readonly ReadRow[]>> = {};
  for (const sheet of file.sheets) {
    const plan = findSetupPlan(sheet.name);
    if (!plan) {
      problems.push(...noticeUnknownSheet(sheet));
      continue;
    }
    const reading = readSheet(sheet, plan, units);
    lists[plan.list] = [...(lists[plan.list] ?? []), ...reading.rows];
    problems.push(...reading.problems);
  }
  const entries = SETUP_PLANS.map(({ list }) => [list, (lists[list] ?? []).map(toListRow)]);
  // Each column's reader gives the type that SetupData states for its key; the plan ties the two together.
  return { ...(Object.fromEntries(entries) as Omit<SetupFile, 'problems'>), problems };
}

function toListRow({ row, cells, values }: ReadRow): Values & SetupRowSource {
  return { ...values, row, cells } as Values & SetupRowSource;
}

function noticeUnknownSheet({ name, rows }: Sheet): SetupProblem[] {
  if (rows.length === 0 || name === EXPLAINING_SHEET) return [];
  const known = SETUP_PLANS.map(({ sheet }) => sheet).join(', ');
  const message = `Sheet '${name}' is not part of the set-up and was not read. Sheets that are: ${known}.`;
  return [{ code: 'sheet_unknown', severity: 'warning', message, sheet: name, cell: 'A1' }];
}

function readSheet(sheet: Sheet, plan: SetupSheetPlan, units: UnitSystem): SheetReading {
  const header = findHeader(sheet, plan);
  if (!header) {
    if (sheet.rows.length === 0) return { rows: [], problems: [] };
    return { rows: [], problems: [toMissingColumns(sheet, plan, plan.columns, 1)] };
  }
  const { columns, problems } = readHeader(sheet, header, plan, units);
  const found = new Set([...columns.values()].map(({ column }) => column.key));
  const missing = plan.columns.filter(({ isRequired, key }) => isRequired && !found.has(key));
  if (missing.length > 0) {
    return { rows: [], problems: [...problems, toMissingColumns(sheet, plan, missing, header.row)] };
  }
  const below = sheet.rows.filter(({ row }) => row > header.row);
  return readRows(sheet, plan, columns, below, problems);
}

/** The row with most known headers among the first ones. */
function findHeader(sheet: Sheet, plan: SetupSheetPlan): SheetRow | undefined {
  const count = ({ cells }: SheetRow) => cells.filter(({ text }) => findSetupColumn(plan, text)).length;
  const rows = sheet.rows.filter((row) => row.row <= HEADER_ROWS_SEARCHED && count(row) > 0);
  return rows.sort((a, b) => count(b) - count(a))[0];
}

function readHeader(
  sheet: Sheet,
  header: SheetRow,
  plan: SetupSheetPlan,
  units: UnitSystem,
): { columns: Columns; problems: SetupProblem[] } {
  const columns = new Map<string, SetupColumnContext>();
  const problems: SetupProblem[] = [];
  for (const { address, text } of header.cells) {
    const column = findSetupColumn(plan, text);
    const report = toReporter(sheet, address, problems);
    if (!column) {
      const message = `Column '${text}' is not part of sheet '${plan.sheet}' and was not read.`;
      report('warning', { code: 'column_unknown', message });
      continue;
    }
    if ([...columns.values()].some((one) => one.column === column)) {
      report('refused', {
        code: 'column_twice',
        message: `Column '${column.header}' stands here a second time.`,
      });
      continue;
    }
    const unit = findColumnUnit(column.kind, text, units);
    if (unit === undefined) {
      const message = `The unit in '${text}' is not known. Use ${listUnitsInWords(column.kind)}.`;
      report('refused', { code: 'unit_unknown', message });
    }
    columns.set(columnOf(address), { column, date1904: sheet.date1904, unit: unit ?? '' });
  }
  return { columns, problems };
}

function readRows(
  sheet: Sheet,
  plan: SetupSheetPlan,
  columns: Columns,
  below: readonly SheetRow[],
  headerProblems: readonly SetupProblem[],
): SheetReading {
  const problems = [...headerProblems];
  const rows: ReadRow[] = [];
  const rowsByKey = new Map<string, ReadRow>();
  const isUnitKnown = !headerProblems.some(({ code }) => code === 'unit_unknown');
  for (const row of below) {
    const filled = row.cells.filter(({ address }) => columns.has(columnOf(address)));
    if (filled.length === 0 || !isUnitKnown) continue;
    const reading = readRow(sheet, plan, columns, row.row, filled);
    const completed = completeRow(plan, reading.row, rows);
    const key = toUniqueKey(plan, completed);
    const twin = key === null ? undefined : rowsByKey.get(key);
    const troubles = [...reading.problems, ...checkRow(sheet, plan, completed, twin, reading)];
    problems.push(...troubles);
    if (troubles.some(({ severity }) => severity === 'refused')) continue;
    rows.push(completed);
    if (key !== null) rowsByKey.set(key, completed);
  }
  return { rows, problems };
}

interface RowReading {
  readonly row: ReadRow;
  readonly problems: readonly SetupProblem[];
  /** Keys of cells that hold something, readable or not. */
  readonly filledKeys: ReadonlySet<string>;
}

function readRow(
  sheet: Sheet,
  plan: SetupSheetPlan,
  columns: Columns,
  row: number,
  filled: readonly RawCell[],
): RowReading {
  const problems: SetupProblem[] = [];
  const values: Record<string, SetupValue | null> = Object.fromEntries(
    plan.columns.map(({ key }) => [key, null]),
  );
  const cells: Record<string, string> = {};
  for (const [letters, { column }] of columns) cells[column.key] = `${letters}${row}`;
  const filledKeys = new Set<string>();
  for (const cell of filled) {
    const context = columns.get(columnOf(cell.address));
    if (!context) continue;
    filledKeys.add(context.column.key);
    const reading = readSetupCell(cell, context);
    const report = toReporter(sheet, cell.address, problems);
    if (!reading.ok) report('refused', reading);
    else {
      values[context.column.key] = reading.value;
      if (reading.warning) report('warning', reading.warning);
    }
  }
  return { row: { row, cells, values }, problems, filledKeys };
}

/** What a row may leave out: a later rate the name, and what its columns say of blank cells. */
function completeRow(plan: SetupSheetPlan, row: ReadRow, above: readonly ReadRow[]): ReadRow {
  const values = { ...row.values };
  for (const { key, ifBlank } of plan.columns) values[key] ??= ifBlank ?? null;
  if (plan.list !== 'people' || values['name'] !== null) return { ...row, values };
  const earlier = above.find((one) => one.values['number'] === values['number']);
  return { ...row, values: { ...values, name: earlier?.values['name'] ?? null } };
}

function checkRow(
  sheet: Sheet,
  plan: SetupSheetPlan,
  row: ReadRow,
  twin: ReadRow | undefined,
  { filledKeys }: RowReading,
): SetupProblem[] {
  const problems: SetupProblem[] = [];
  const isBlank = (key: string) => !filledKeys.has(key) && row.values[key] === null;
  for (const { key, header } of plan.columns.filter(({ key }) => isNeeded(plan, key, isBlank))) {
    if (!isBlank(key)) continue;
    const message = `Row ${row.row} of sheet '${sheet.name}' states no ${header}.`;
    toReporter(
      sheet,
      row.cells[key] ?? `A${row.row}`,
      problems,
    )('refused', { code: 'cell_missing', message });
  }
  if (twin) {
    const words = plan.uniqueBy.map((key) => String(row.values[key])).join(', ');
    const message = `Row ${row.row} of sheet '${sheet.name}' states '${words}' again; it stands in row ${twin.row}.`;
    const cell = row.cells[plan.uniqueBy[0] ?? ''] ?? `A${row.row}`;
    toReporter(sheet, cell, problems)('refused', { code: 'row_twice', message });
  }
  return problems;
}

/** A person's rate is stated whole or not at all; the name must be known. */
function isNeeded(plan: SetupSheetPlan, key: string, isBlank: (key: string) => boolean): boolean {
  const column = plan.columns.find((one) => one.key === key);
  if (plan.list !== 'people' || column?.isRequired) return column?.isRequired ?? false;
  return key === 'name' || !['rateFrom', 'wagePerHour', 'burdenPercent'].every(isBlank);
}

/** What no two rows of the sheet may share, as one text; null where equal rows may stand. */
function toUniqueKey({ uniqueBy }: SetupSheetPlan, { values }: ReadRow): string | null {
  if (uniqueBy.length === 0) return null;
  return uniqueBy.map((key) => String(values[key] ?? '').toLowerCase()).join('\n');
}

function toMissingColumns(
  sheet: Sheet,
  plan: SetupSheetPlan,
  missing: readonly { readonly header: string }[],
  row: number,
): SetupProblem {
  const headers = missing.map(({ header }) => `'${header}'`).join(', ');
  const message = `Sheet '${sheet.name}' has no column ${headers}. Add it to the row of headers.`;
  return { code: 'column_missing', severity: 'refused', message, sheet: sheet.name, cell: `A${row}` };
}

function toReporter(sheet: Sheet, cell: string, problems: SetupProblem[]) {
  return (severity: SetupProblem['severity'], { code, message }: SetupTrouble): void => {
    problems.push({ code, severity, message, sheet: sheet.name, cell });
  };
}
