import { type Hours, toHours, toLocalDate } from '@brakeven/values';
import { checkTimesheet, employeeDayKey, type TimesheetCandidate } from './check-timesheet';

const today = toLocalDate('2026-03-06');

function candidateOf(
  changes: Partial<Omit<TimesheetCandidate, 'hours' | 'workedOn'>> & {
    hours?: string;
    workedOn?: string;
  } = {},
): TimesheetCandidate {
  const { hours = '7.5', workedOn = '2026-03-02', row = 5, ...rest } = changes;
  const cells = {
    date: `A${row}`,
    employee: `B${row}`,
    job: `C${row}`,
    operation: `D${row}`,
    hours: `F${row}`,
  };
  return {
    row,
    source: { sheet: 'Hours', cells: { ...cells, good: `G${row}` } },
    workedOn: toLocalDate(workedOn),
    employeeId: 'ana',
    firstRateOn: toLocalDate('2026-01-01'),
    jobNumber: '1042',
    jobStatus: 'open',
    hours: toHours(hours),
    good: null,
    scrap: null,
    ...rest,
  };
}

function check(candidates: TimesheetCandidate[], onFile: Record<string, string> = {}) {
  const hoursOnFile = new Map<string, Hours>(
    Object.entries(onFile).map(([date, hours]) => [employeeDayKey('ana', toLocalDate(date)), toHours(hours)]),
  );
  return checkTimesheet({ candidates, today, hoursOnFile });
}

function codesOf(candidates: TimesheetCandidate[], onFile: Record<string, string> = {}) {
  return check(candidates, onFile).map((problem) => `${problem.row} ${problem.code}`);
}

it('finds nothing wrong with a good row', () => {
  expect(check([candidateOf({ good: 12, scrap: '0' })])).toEqual([]);
});

describe('hours of a row', () => {
  it.each([
    ['0', ['5 hours_not_positive']],
    ['-2', ['5 hours_not_positive']],
    ['0.0001', []],
    ['24', []],
    ['24.0001', ['5 hours_over_24']],
  ])('%s give %j', (hours, expected) => {
    expect(codesOf([candidateOf({ hours })])).toEqual(expected);
  });

  it('are refused with the cell, and words that say what is accepted', () => {
    expect(check([candidateOf({ hours: '0' })])).toEqual([
      {
        code: 'hours_not_positive',
        severity: 'refused',
        message: '0.00 hours is not work. Write hours above 0 and up to 24, such as 7.5 or 7:30.',
        row: 5,
        field: 'hours',
        sheet: 'Hours',
        cell: 'F5',
      },
    ]);
  });
});

describe("an employee's day", () => {
  it('may hold 24 hours over all rows', () => {
    expect(codesOf([candidateOf({ hours: '16', row: 5 }), candidateOf({ hours: '8', row: 6 })])).toEqual([]);
  });

  it('refuses all of its rows above that, and names the sum', () => {
    const problems = check([
      candidateOf({ hours: '16', row: 5 }),
      candidateOf({ hours: '8.25', row: 6 }),
      candidateOf({ hours: '8', row: 7, workedOn: '2026-03-03' }),
    ]);
    expect(problems.map((problem) => [problem.row, problem.code])).toEqual([
      [5, 'day_over_24'],
      [6, 'day_over_24'],
    ]);
    expect(problems[0]?.message).toContain('Mon, Mar 2, 2026 adds up to 24.25 hours; a day has 24.');
  });

  it('counts what is on file, and says so', () => {
    const [problem] = check([candidateOf({ hours: '10' })], { '2026-03-02': '14.5' });
    expect(problem?.code).toBe('day_over_24');
    expect(problem?.message).toContain('24.50 hours (10.00 new in this file, 14.50 on file)');
    expect(codesOf([candidateOf({ hours: '9.5' })], { '2026-03-02': '14.5' })).toEqual([]);
  });

  it('does not count a row again that is there already', () => {
    const again = [
      candidateOf({ hours: '14', row: 5, isAlreadyThere: true }),
      candidateOf({ hours: '10', row: 6 }),
    ];
    expect(codesOf(again, { '2026-03-02': '14' })).toEqual([]);
  });

  it('does not count a row whose own hours are refused', () => {
    expect(codesOf([candidateOf({ hours: '240', row: 5 }), candidateOf({ hours: '8', row: 6 })])).toEqual([
      '5 hours_over_24',
    ]);
  });

  it('is one employee alone', () => {
    const other = candidateOf({ hours: '16', row: 6, employeeId: 'ben' });
    expect(codesOf([candidateOf({ hours: '16' }), other])).toEqual([]);
  });

  it('is checked in a moment even if a whole file falls on it', () => {
    const rows = Array.from({ length: 20_000 }, (_, row) => candidateOf({ hours: '0.01', row }));
    expect(check(rows)).toHaveLength(20_000);
  });
});

describe('dates', () => {
  it('may be today, not tomorrow', () => {
    expect(codesOf([candidateOf({ workedOn: '2026-03-06' })])).toEqual([]);
    const [problem] = check([candidateOf({ workedOn: '2026-03-07' })]);
    expect(problem).toMatchObject({ code: 'future_date', field: 'date', cell: 'A5', severity: 'refused' });
    expect(problem?.message).toContain('Mar 7, 2026 has not come yet (today is Mar 6, 2026)');
  });

  it("may be the day of the employee's first wage, not the day before", () => {
    expect(codesOf([candidateOf({ workedOn: '2026-01-01' })])).toEqual([]);
    const [problem] = check([candidateOf({ workedOn: '2025-12-31' })]);
    expect(problem).toMatchObject({ code: 'before_first_rate', field: 'date', severity: 'refused' });
    expect(problem?.message).toContain('valid from Jan 1, 2026');
  });

  it('need a wage at all', () => {
    const [problem] = check([candidateOf({ firstRateOn: null })]);
    expect(problem).toMatchObject({ code: 'before_first_rate' });
    expect(problem?.message).toContain('has no wage yet');
  });
});

it('warns of a job that is not open, without refusing', () => {
  expect(check([candidateOf({ jobStatus: 'invoiced' })])).toEqual([
    expect.objectContaining({
      code: 'job_not_open',
      severity: 'warning',
      field: 'job',
      cell: 'C5',
      message: expect.stringContaining('Job 1042 is invoiced, not open.'),
    }),
  ]);
});

describe('pieces', () => {
  it.each([
    [{ good: -1 }, ['5 pieces_negative']],
    [{ good: 12.5 }, ['5 pieces_not_whole']],
    [{ scrap: '-0.5' }, ['5 pieces_negative']],
    [{ good: 0, scrap: 3 }, []],
  ])('%j give %j', (changes, expected) => {
    expect(codesOf([candidateOf(changes)])).toEqual(expected);
  });

  it('point at their cell, or at none if the row has none', () => {
    const problems = check([candidateOf({ good: -1, scrap: -1 })]);
    expect(problems.map((problem) => [problem.field, problem.cell])).toEqual([
      ['good', 'G5'],
      ['scrap', null],
    ]);
  });
});

it('shows every problem of a row at once, in the order of the rows', () => {
  const bad = candidateOf({ row: 6, workedOn: '2026-03-09', hours: '25', jobStatus: 'lost', good: 0.5 });
  expect(codesOf([candidateOf({ row: 5, hours: '0' }), bad])).toEqual([
    '5 hours_not_positive',
    '6 hours_over_24',
    '6 future_date',
    '6 job_not_open',
    '6 pieces_not_whole',
  ]);
});

it('leaves rows alone that are stored already', () => {
  expect(check([candidateOf({ isAlreadyThere: true, jobStatus: 'finished' })])).toEqual([]);
});
