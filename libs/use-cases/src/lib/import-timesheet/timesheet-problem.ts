import { type TimesheetProblem as RuleProblem } from '@brakeven/costing';
import { type AliasKind, type TimesheetField, type TimesheetProblem } from '@brakeven/contract';
import { type RowProblem, type SheetNotice, type TimesheetRow } from '@brakeven/workbook';
import { type FoundMapping } from './find-mapping';
import { type NameResolution } from './resolve-name';

type UnresolvedName = Extract<NameResolution, { found: false }>;

/** A cell that could not be read. */
export function toReadProblem(sheet: string, row: number, problem: RowProblem): TimesheetProblem {
  const { code, message, cell, field } = problem;
  return { code, severity: 'refused', message, sheet, cell, row, field, alias: null };
}

/** A row of the sheet that is no entry and was passed over. */
export function toNoticeProblem(
  sheet: string,
  { code, severity, message, cell }: SheetNotice,
): TimesheetProblem {
  return {
    code,
    severity,
    message,
    sheet,
    cell,
    row: Number(/\d+$/.exec(cell)?.[0]),
    field: null,
    alias: null,
  };
}

/** A name that stands for nothing known, or for several. */
export function toNameProblem(
  sheet: string,
  { row, cells }: TimesheetRow,
  kind: AliasKind,
  { spelling, unresolved }: { spelling: string; unresolved: UnresolvedName },
): TimesheetProblem {
  const { code, message, offers } = unresolved;
  const alias = { kind, spelling, offers };
  return {
    code,
    severity: 'refused',
    message,
    sheet,
    cell: cells[kind] ?? `A${row}`,
    row,
    field: kind,
    alias,
  };
}

/** A rule that a row breaks. */
export function toRuleProblem({ cell, ...problem }: RuleProblem): TimesheetProblem {
  return { ...problem, cell: cell ?? `A${problem.row}`, alias: null };
}

/** What is wrong with one cell of a row, found while looking it up or comparing it with what is stored. */
export function toCellProblem(
  sheet: string,
  { row, cells }: Pick<TimesheetRow, 'row' | 'cells'>,
  field: TimesheetField,
  problem: Pick<TimesheetProblem, 'code' | 'severity' | 'message'>,
): TimesheetProblem {
  return { ...problem, sheet, cell: cells[field] ?? `A${row}`, row, field, alias: null };
}

/** What is wrong with the file before any row can be read, or beside its rows. */
export function listFileProblems(
  found: FoundMapping,
  firstSheet: string,
  rowsRead: number | null,
): TimesheetProblem[] {
  const { mapping, missingFields, headerProblem, otherSheets } = found;
  const sheet = mapping?.sheet ?? firstSheet;
  const at = { sheet, cell: `A${mapping?.headerRow ?? 1}`, row: null, field: null, alias: null };
  if (headerProblem)
    return [{ ...at, code: 'header_not_found', severity: 'refused', message: headerProblem }];
  if (missingFields.length > 0) {
    const message = `No column is known to hold ${missingFields.join(', ')}. Say which column holds what.`;
    return [{ ...at, code: 'mapping_incomplete', severity: 'refused', message }];
  }
  const others: TimesheetProblem[] = otherSheets.map((other) => ({
    ...at,
    sheet: other,
    cell: 'A1',
    code: 'sheet_not_read',
    severity: 'warning',
    message: `Sheet '${other}' looks like a timesheet too and is not read: one sheet goes in at a time. To import it as well, choose it and send the file again.`,
  }));
  if (rowsRead !== 0) return others;
  const message = `There are no entries below the header in row ${mapping?.headerRow} of sheet '${sheet}'.`;
  return [...others, { ...at, code: 'no_entries', severity: 'warning', message }];
}
