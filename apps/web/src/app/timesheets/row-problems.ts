import {
  type CheckedRow,
  type TimesheetCheck,
  type TimesheetField,
  type TimesheetProblem,
} from '@brakeven/contract';

/** A row of the check table with what is wrong in it. */
export interface TableRow extends CheckedRow {
  problems: TimesheetProblem[];
  /** The worst problem of each cell. */
  byField: Partial<Record<TimesheetField, TimesheetProblem>>;
}

export type RowFilter = 'all' | 'problems' | CheckedRow['state'];

/** Joins the rows of a check with their problems, in the order of the sheet. */
export function toTableRows(check: Pick<TimesheetCheck, 'rows' | 'problems'>): TableRow[] {
  const byRow = new Map<number | null, TimesheetProblem[]>();
  for (const problem of check.problems) {
    byRow.set(problem.row, [...(byRow.get(problem.row) ?? []), problem]);
  }
  return [...check.rows]
    .sort((a, b) => a.row - b.row)
    .map((row) => {
      const problems = byRow.get(row.row) ?? [];
      return { ...row, problems, byField: toByField(problems) };
    });
}

function toByField(problems: readonly TimesheetProblem[]): TableRow['byField'] {
  const byField: TableRow['byField'] = {};
  for (const problem of problems) {
    if (problem.field === null) continue;
    const known = byField[problem.field];
    if (!known || (known.severity === 'warning' && problem.severity === 'refused')) {
      byField[problem.field] = problem;
    }
  }
  return byField;
}

/** The rows that a filter leaves. */
export function filterRows(rows: readonly TableRow[], filter: RowFilter): TableRow[] {
  if (filter === 'all') return [...rows];
  if (filter === 'problems') return rows.filter((row) => row.problems.length > 0);
  return rows.filter((row) => row.state === filter);
}

/** The problem after (`step` 1) or before (−1) the one at hand, round the end; null when there are none. */
export function stepThrough<T>(items: readonly T[], current: T | null, step: 1 | -1): T | null {
  if (items.length === 0) return null;
  const index = current === null ? -1 : items.indexOf(current);
  if (index === -1) return (step === 1 ? items[0] : items.at(-1)) ?? null;
  return items[(index + step + items.length) % items.length] ?? null;
}

/** Parts the problems that stand in a row of the table from those of the file as a whole: its header, its total. */
export function splitProblems(check: Pick<TimesheetCheck, 'rows' | 'problems'> | null): {
  ofRows: TimesheetProblem[];
  ofFile: TimesheetProblem[];
} {
  const rows = new Set<number | null>(check?.rows.map(({ row }) => row));
  const problems = check?.problems ?? [];
  return {
    ofRows: problems.filter(({ row }) => rows.has(row)),
    ofFile: problems.filter(({ row }) => !rows.has(row)),
  };
}
