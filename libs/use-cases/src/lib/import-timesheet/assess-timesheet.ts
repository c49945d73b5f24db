import { type TimesheetOptions, type TimesheetProblem } from '@brakeven/contract';
import { checkTimesheet as checkRules, matchByNaturalKey } from '@brakeven/costing';
import {
  countStoredEntries,
  countVoidedEntries,
  findCommittedImport,
  getClosedThrough,
  readTimesheetRegister,
  type ShopTransaction,
  type TimesheetImportRow,
  type TimesheetRegister,
} from '@brakeven/database';
import { type TimesheetRow } from '@brakeven/workbook';
import { type ShopContext, todayOf } from '../context';
import { groupBy } from '../group-by';
import { listLateWarnings } from './late-warning';
import { createNameIndexes } from './name-indexes';
import { ITEMS_PER_TURN, nextTurn } from './next-turn';
import { type TimesheetReading } from './read-timesheet';
import { type EntryCandidate, type ResolvedRow, resolveRow, type RowLookup } from './resolve-row';
import { type StoredEntries, toStoredEntries } from './stored-entries';
import { listStoredWarnings } from './stored-warnings';
import { listFileProblems, toNoticeProblem, toRuleProblem } from './timesheet-problem';
import { type UploadTools } from './upload';

/** A row with its verdict. */
export interface AssessedRow extends ResolvedRow {
  state: 'ready' | 'already-there' | 'refused';
}

/** All that is to be said of a timesheet against what the shop has. */
export interface Assessment {
  rows: AssessedRow[];
  /** In the order of the rows; what concerns the whole file comes first. */
  problems: TimesheetProblem[];
  alreadyImported: Pick<TimesheetImportRow, 'importId' | 'importedAt' | 'importedBy'> | null;
  register: TimesheetRegister;
}

/**
 * Holds the rows of a timesheet against the shop: looks up names, finds what is already there, asks the rules.
 * Reads only; run it under the books' lock to act on what it says.
 */
export async function assessTimesheet(
  trx: ShopTransaction,
  context: ShopContext,
  reading: TimesheetReading,
  options: Partial<TimesheetOptions>,
  tools: UploadTools,
): Promise<Assessment> {
  const { shopId } = context.shop;
  const register = await readTimesheetRegister(trx, shopId);
  const alreadyImported = (await findCommittedImport(trx, shopId, reading.file.sha256)) ?? null;
  const resolved = await resolveRows(reading, register, options, tools);
  const candidates = resolved.flatMap(({ candidate }) => candidate ?? []);
  const days = [...new Set(candidates.map(({ workedOn }) => workedOn))];
  const stored = toStoredEntries(
    await countStoredEntries(trx, shopId, days),
    await countVoidedEntries(trx, shopId, days),
  );
  const judged = await judgeCandidates(candidates, stored, context);
  const rowProblems = [...resolved.flatMap((row) => row.problems), ...judged.problems].sort(byRow);
  const sheetProblems = listSheetProblems(reading);
  const rows = toAssessedRows(resolved, [...sheetProblems, ...rowProblems], judged.rowsThere);
  const late = listLateWarnings(reading.timesheet?.sheet ?? '', rows, await getClosedThrough(trx));
  const problems = [...sheetProblems, ...late, ...rowProblems];
  return { rows, problems, alreadyImported, register };
}

async function resolveRows(
  { timesheet }: TimesheetReading,
  register: TimesheetRegister,
  options: Partial<TimesheetOptions>,
  { onProgress }: UploadTools,
): Promise<ResolvedRow[]> {
  const indexes = createNameIndexes(register, options.aliases ?? []);
  const rows = timesheet?.rows ?? [];
  const lookup: RowLookup = {
    sheet: timesheet?.sheet ?? '',
    indexes,
    employees: new Map(register.employees.map((employee) => [employee.employeeId, employee])),
    jobs: new Map(register.jobs.map((job) => [job.jobId, job])),
  };
  const resolved: ResolvedRow[] = [];
  for (const batch of listBatches(rows)) {
    resolved.push(...batch.map((row) => resolveRow(row, lookup)));
    const progress = { done: resolved.length, total: rows.length };
    onProgress?.({ stage: 'checking', ...progress, message: 'Checking the rows' });
    await nextTurn();
  }
  return resolved;
}

function* listBatches(rows: readonly TimesheetRow[]): Generator<readonly TimesheetRow[]> {
  for (let start = 0; start < rows.length; start += ITEMS_PER_TURN) {
    yield rows.slice(start, start + ITEMS_PER_TURN);
  }
}

/** A day is judged whole, since an employee's day is what rules and matching look across; days do not mix. */
async function judgeCandidates(
  candidates: readonly EntryCandidate[],
  stored: StoredEntries,
  context: ShopContext,
): Promise<{ problems: TimesheetProblem[]; rowsThere: Set<number> }> {
  const today = todayOf(context);
  const problems: TimesheetProblem[] = [];
  const rowsThere = new Set<number>();
  for (const batch of listDayBatches(candidates)) {
    const checked = matchByNaturalKey(batch, stored.keyCounts).map(({ candidate, isAlreadyThere }) => ({
      ...candidate,
      isAlreadyThere,
    }));
    for (const { row, isAlreadyThere } of checked) if (isAlreadyThere) rowsThere.add(row);
    const broken = checkRules({ candidates: checked, today, hoursOnFile: stored.hoursOnFile });
    for (const problem of broken) problems.push(toRuleProblem(problem));
    for (const problem of listStoredWarnings(checked, stored)) problems.push(problem);
    await nextTurn();
  }
  return { problems, rowsThere };
}

function* listDayBatches(candidates: readonly EntryCandidate[]): Generator<EntryCandidate[]> {
  let batch: EntryCandidate[] = [];
  for (const day of groupBy(candidates, ({ workedOn }) => workedOn).values()) {
    batch = batch.concat(day);
    if (batch.length < ITEMS_PER_TURN) continue;
    yield batch;
    batch = [];
  }
  if (batch.length > 0) yield batch;
}

function listSheetProblems(reading: TimesheetReading): TimesheetProblem[] {
  const { timesheet, sheetFile } = reading;
  const firstSheet = sheetFile.sheets[0]?.name ?? '';
  const notices = timesheet?.problems.map((notice) => toNoticeProblem(timesheet.sheet, notice)) ?? [];
  return [...listFileProblems(reading, firstSheet, timesheet?.rows.length ?? null), ...notices];
}

function toAssessedRows(
  resolved: readonly ResolvedRow[],
  problems: readonly TimesheetProblem[],
  rowsThere: ReadonlySet<number>,
): AssessedRow[] {
  const refused = new Set(problems.filter(({ severity }) => severity === 'refused').map(({ row }) => row));
  return resolved.map((one) => {
    if (refused.has(one.row.row)) return { ...one, state: 'refused' };
    return { ...one, state: rowsThere.has(one.row.row) ? 'already-there' : 'ready' };
  });
}

function byRow(a: TimesheetProblem, b: TimesheetProblem): number {
  return (a.row ?? 0) - (b.row ?? 0);
}
