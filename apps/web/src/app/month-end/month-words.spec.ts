import { makeMonth, MONTHS } from './month-fixture';
import { canClose, chooseMonth, toChecks, toDayRanges, toVerdict } from './month-words';

const clean = makeMonth().checklist;

describe('the month to look at first', () => {
  it('is the next to be closed, and the running one when all are', () => {
    expect(chooseMonth(MONTHS)).toBe('2026-11');
    const [running, ...others] = MONTHS.months;
    const closed = others.map((one) => ({ ...one, state: 'closed' as const, isNext: false }));
    expect(chooseMonth({ ...MONTHS, months: [...(running ? [running] : []), ...closed] })).toBe('2026-12');
    expect(chooseMonth({ ...MONTHS, months: [] })).toBeNull();
  });
});

describe('the checklist in words', () => {
  const checkOf = (check: string, change: Partial<typeof clean>) =>
    toChecks(makeMonth({ checklist: { ...clean, ...change } })).find((one) => one.check === check);

  it('says that all is well where it is', () => {
    expect(toChecks(makeMonth()).map(({ state }) => state)).toEqual(Array(5).fill('done'));
    expect(toChecks(makeMonth())[0]?.text).toBe('Everybody has hours on every weekday.');
    expect(toChecks(makeMonth({ tieOut: [] }))[0]?.text).toBe('Nobody was to work in this month.');
  });

  it('counts days, rows and jobs, and what is reviewed no longer', () => {
    const missingTimesheets = [
      { employeeId: 'e1', employee: 'Pia Strand', days: ['2026-11-02'] },
      { employeeId: 'e2', employee: 'Teo Brandt', days: ['2026-11-02', '2026-11-03'] },
    ];
    expect(checkOf('timesheets', { missingTimesheets })).toMatchObject({
      state: 'look',
      text: '3 weekdays of 2 employees without any hours.',
    });
    const refusal = {
      importId: 'i1',
      fileName: 'week-45.xlsx',
      importedAt: '2026-11-09T15:00:00.000Z',
      importedBy: 'Ines Marlow',
      refused: 1,
      reviewedAt: null,
      reviewedBy: null,
    };
    expect(checkOf('refusals', { refusals: [refusal] })).toMatchObject({
      state: 'look',
      text: '1 row of 1 timesheet were left out and nobody has reviewed them.',
    });
    const reviewed = { ...refusal, reviewedAt: '2026-11-10T15:00:00.000Z', reviewedBy: 'Ines Marlow' };
    expect(checkOf('refusals', { refusals: [reviewed] })).toMatchObject({
      state: 'done',
      text: 'All have been reviewed.',
    });
  });

  it('lets only missing rates stop the close', () => {
    const gap = {
      category: 'labour' as const,
      subject: 'Pia Strand',
      entries: 2,
      firstDay: '2026-11-02',
      lastDay: '2026-11-03',
    };
    expect(checkOf('rates', { gaps: [gap] })).toMatchObject({ state: 'stops' });
    expect(checkOf('rollup', { rollup: { daysWaiting: 1, through: null } })).toMatchObject({
      state: 'look',
      text: '1 day not rolled up yet. The close does it first.',
    });
  });
});

describe('the verdict on a month', () => {
  it('says whether it is closed, running, ready, or what is left', () => {
    expect(toVerdict(makeMonth({ state: 'closed' }))).toBe('November 2026 is closed');
    expect(toVerdict(makeMonth({ state: 'running' }))).toBe('November 2026 is still running');
    expect(toVerdict(makeMonth())).toBe('November 2026 is ready to be closed');
    const missingTimesheets = [{ employeeId: 'e1', employee: 'Pia Strand', days: ['2026-11-02'] }];
    expect(toVerdict(makeMonth({ checklist: { ...clean, missingTimesheets } }))).toBe(
      'November 2026 can be closed, with 1 thing left to look at',
    );
    const blocked = makeMonth({ blockers: [{ code: 'not_next', message: 'Close October 2026 first.' }] });
    expect(toVerdict(blocked)).toBe('November 2026 cannot be closed yet');
    expect(canClose(blocked)).toBe(false);
  });

  it('lets a month be closed that is only behind, since the close rolls up first', () => {
    const behind = makeMonth({
      blockers: [{ code: 'rollup_behind', message: '1 day is not rolled up yet.' }],
    });
    expect(canClose(behind)).toBe(true);
    expect(toVerdict(behind)).toBe('November 2026 is ready to be closed');
    expect(canClose(makeMonth({ state: 'running' }))).toBe(false);
  });
});

describe('days in words', () => {
  it('are told in runs, which a weekend does not end', () => {
    expect(toDayRanges(['2026-11-02'])).toBe('Nov 2');
    expect(toDayRanges(['2026-11-05', '2026-11-06', '2026-11-09', '2026-11-11'])).toBe(
      'Nov 5 – Nov 9, Nov 11',
    );
    expect(toDayRanges([])).toBe('');
  });
});
