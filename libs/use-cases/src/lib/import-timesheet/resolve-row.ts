import { type TimesheetProblem } from '@brakeven/contract';
import { type NaturalKeyParts, type TimesheetCandidate } from '@brakeven/costing';
import { type TimesheetRegister } from '@brakeven/database';
import { D, type Hours, type LocalDate, toHours } from '@brakeven/values';
import { type TimesheetRow } from '@brakeven/workbook';
import { type NameIndexes } from './name-indexes';
import { resolveName } from './resolve-name';
import { toCellProblem, toNameProblem, toReadProblem } from './timesheet-problem';

/** A row whose cells were all read and whose names all stand for something known. */
export interface EntryCandidate extends TimesheetCandidate, NaturalKeyParts {
  workedOn: LocalDate;
  employeeId: string;
  hours: Hours;
  good: number | null;
  scrap: number | null;
  note: string | null;
}

/** A row with its names looked up: a candidate, or the problems that keep it from being one. */
export interface ResolvedRow {
  row: TimesheetRow;
  /** Null if the cell could not be read. */
  hours: Hours | null;
  candidate: EntryCandidate | null;
  problems: TimesheetProblem[];
}

/** What rows are looked up in. */
export interface RowLookup {
  sheet: string;
  indexes: NameIndexes;
  employees: ReadonlyMap<string, TimesheetRegister['employees'][number]>;
  jobs: ReadonlyMap<string, TimesheetRegister['jobs'][number]>;
}

/** More hours than this in one cell are a slip that would drown every total; they count as not read. */
const HOURS_READ_LIMIT = D(100_000);
/** What the database keeps of pieces. */
const PIECES_MAX = 2_147_483_647;

/** Looks up the names of a row. All its problems come at once, so that it is put right in one go. */
export function resolveRow(row: TimesheetRow, lookup: RowLookup): ResolvedRow {
  const problems = row.problems.map((problem) => toReadProblem(lookup.sheet, row.row, problem));
  const hours = readHours(row, lookup.sheet, problems);
  checkPiecesFit(row, lookup.sheet, problems);
  const employeeId = findTarget('employee', row, lookup, problems);
  const jobId = findTarget('job', row, lookup, problems);
  const operationId = findTarget('operation', row, lookup, problems);
  const machineId = findTarget('machine', row, lookup, problems);
  const job = jobId === null ? undefined : lookup.jobs.get(jobId);
  const isWhole = row.workedOn && employeeId && job && operationId && hours && problems.length === 0;
  if (!isWhole) return { row, hours, candidate: null, problems };
  const candidate = {
    row: row.row,
    source: { sheet: lookup.sheet, cells: row.cells },
    workedOn: row.workedOn,
    employeeId,
    firstRateOn: (lookup.employees.get(employeeId)?.firstRateOn ?? null) as LocalDate | null,
    jobId: job.jobId,
    jobNumber: job.number,
    jobStatus: job.status,
    operationId,
    machineId,
    hours,
    good: row.good,
    scrap: row.scrap,
    note: row.note,
  };
  return { row, hours, candidate, problems };
}

function readHours(row: TimesheetRow, sheet: string, problems: TimesheetProblem[]): Hours | null {
  if (row.hours === null) return null;
  const hours = toHours(row.hours);
  if (hours.abs().lt(HOURS_READ_LIMIT)) return hours;
  const message =
    'More hours than any total can hold. Write hours above 0 and up to 24, such as 7.5 or 7:30.';
  problems.push(toCellProblem(sheet, row, 'hours', { code: 'hours_over_24', severity: 'refused', message }));
  return null;
}

function checkPiecesFit(row: TimesheetRow, sheet: string, problems: TimesheetProblem[]): void {
  for (const field of ['good', 'scrap'] as const) {
    if ((row[field] ?? 0) <= PIECES_MAX) continue;
    const message = `More pieces than can be kept (${PIECES_MAX}). Write the pieces made, such as 12.`;
    problems.push(
      toCellProblem(sheet, row, field, { code: 'pieces_too_many', severity: 'refused', message }),
    );
  }
}

function findTarget(
  kind: 'employee' | 'job' | 'operation' | 'machine',
  row: TimesheetRow,
  { sheet, indexes }: RowLookup,
  problems: TimesheetProblem[],
): string | null {
  const spelling = row[kind];
  if (spelling === null) return null;
  const resolution = resolveName(indexes[kind], spelling);
  if (resolution.found) return resolution.targetId;
  problems.push(toNameProblem(sheet, row, kind, { spelling, unresolved: resolution }));
  return null;
}
