import { type TimesheetProblem } from '@brakeven/contract';

import { groupUnknownNames, withChosenName, withoutChosenName } from './group-unknown-names';

const unknown = (row: number, spelling: string, kind: 'employee' | 'job' = 'employee'): TimesheetProblem => ({
  code: 'employee_unknown',
  severity: 'refused',
  message: `Nobody is called ${spelling}.`,
  sheet: 'Week 48',
  cell: `B${row}`,
  row,
  field: kind,
  alias: { kind, spelling, offers: [{ targetId: 'id-1', label: '104 Jo Alvarez' }] },
});

describe('groupUnknownNames', () => {
  it('gathers every row of one spelling and keeps where it was first met', () => {
    const names = groupUnknownNames([unknown(7, 'J. Alvares'), unknown(9, 'J. Alvares'), unknown(9, 'Bo')]);
    expect(names.map(({ spelling, rows, firstCell }) => ({ spelling, rows, firstCell }))).toEqual([
      { spelling: 'J. Alvares', rows: [7, 9], firstCell: 'B7' },
      { spelling: 'Bo', rows: [9], firstCell: 'B9' },
    ]);
  });

  it('keeps the same spelling of an employee and of a job apart, and passes over other problems', () => {
    const other: TimesheetProblem = { ...unknown(3, 'x'), code: 'hours_missing', alias: null };
    const names = groupUnknownNames([unknown(7, '2231'), other, unknown(7, '2231', 'job')]);
    expect(names.map(({ kind }) => kind)).toEqual(['employee', 'job']);
  });
});

describe('chosen names', () => {
  const choice = { kind: 'employee', spelling: 'Bo', targetId: 'a', label: 'Bo Tran' } as const;

  it('hold one choice a spelling, the last one', () => {
    const twice = withChosenName([choice], { ...choice, targetId: 'b', label: 'Bo Lindqvist' });
    expect(twice).toEqual([{ ...choice, targetId: 'b', label: 'Bo Lindqvist' }]);
  });

  it('can be taken back without touching another kind', () => {
    const job = { ...choice, kind: 'job' } as const;
    expect(withoutChosenName([choice, job], choice)).toEqual([job]);
  });
});
