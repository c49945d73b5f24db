import { type CheckedRow, type TimesheetProblem } from '@brakeven/contract';

import { filterRows, splitProblems, stepThrough, toTableRows } from './row-problems';

const row = (number: number, state: CheckedRow['state'] = 'ready'): CheckedRow => ({
  row: number,
  state,
  cells: { hours: { address: `F${number}`, text: '7.5' } },
});
const problem = (number: number | null, change: Partial<TimesheetProblem> = {}): TimesheetProblem => ({
  code: 'hours_over_24',
  severity: 'refused',
  message: 'More than a day has.',
  sheet: 'Hours',
  cell: `F${number}`,
  row: number,
  field: 'hours',
  alias: null,
  ...change,
});

describe('toTableRows', () => {
  it('puts rows back in the order of the sheet, each with its own problems', () => {
    const rows = toTableRows({ rows: [row(9, 'refused'), row(7)], problems: [problem(9), problem(null)] });
    expect(rows.map((item) => [item.row, item.problems.length])).toEqual([
      [7, 0],
      [9, 1],
    ]);
  });

  it('shows the refusal where a cell has a warning too', () => {
    const warning = problem(9, { severity: 'warning', code: 'job_not_open' });
    const [only] = toTableRows({ rows: [row(9)], problems: [warning, problem(9)] });
    expect(only?.byField.hours?.severity).toBe('refused');
  });
});

describe('splitProblems', () => {
  it('parts what concerns the file, such as its total at the foot, from what stands in an entry', () => {
    const total = problem(44, { severity: 'warning', code: 'control_total' });
    const { ofRows, ofFile } = splitProblems({
      rows: [row(9)],
      problems: [problem(9), total, problem(null)],
    });
    expect(ofRows.map(({ cell }) => cell)).toEqual(['F9']);
    expect(ofFile.map(({ row: at }) => at)).toEqual([44, null]);
    expect(splitProblems(null)).toEqual({ ofRows: [], ofFile: [] });
  });
});

describe('filterRows', () => {
  const rows = toTableRows({
    rows: [row(7), row(8, 'already-there'), row(9, 'refused')],
    problems: [problem(9)],
  });

  it('leaves those with problems, those of a state, or all', () => {
    expect(filterRows(rows, 'problems').map((item) => item.row)).toEqual([9]);
    expect(filterRows(rows, 'already-there').map((item) => item.row)).toEqual([8]);
    expect(filterRows(rows, 'all')).toHaveLength(3);
  });
});

describe('stepThrough', () => {
  it('goes forward and back, round the end', () => {
    expect(stepThrough(['a', 'b', 'c'], 'c', 1)).toBe('a');
    expect(stepThrough(['a', 'b', 'c'], 'a', -1)).toBe('c');
  });

  it('begins at the first going forward and at the last going back, and finds nothing in nothing', () => {
    expect(stepThrough(['a', 'b'], null, 1)).toBe('a');
    expect(stepThrough(['a', 'b'], null, -1)).toBe('b');
    expect(stepThrough([], null, 1)).toBeNull();
  });
});
