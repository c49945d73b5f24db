import { type TimesheetCheck } from '@brakeven/contract';

import { commitWords, count, countEntries, percentDone } from './timesheet-words';

const check = (entriesReady: number, refused: number) =>
  ({ entriesReady, refused, hoursReady: '418.5000' }) as TimesheetCheck;

describe('commitWords', () => {
  it('says how many entries and hours go in', () => {
    expect(commitWords(check(212, 0))).toBe('Add 212 entries (418.50 h)');
    expect(commitWords(check(1, 0))).toBe('Add 1 entry (418.50 h)');
  });

  it('says what stays out when rows are refused', () => {
    expect(commitWords(check(209, 3))).toBe('Add the 209 good rows, leave 3 out');
  });

  it('offers nothing when nothing is ready', () => {
    expect(commitWords(check(0, 3))).toBeNull();
  });
});

describe('count', () => {
  it('groups thousands and knows one from many', () => {
    expect([count(1, 'row'), count(1204, 'row'), countEntries(0)]).toEqual([
      '1 row',
      '1,204 rows',
      '0 entries',
    ]);
  });
});

describe('percentDone', () => {
  it('is whole percent, at most 100, and unknown without a total', () => {
    expect(percentDone({ done: 1, total: 3 })).toBe(33);
    expect(percentDone({ done: 5, total: 4 })).toBe(100);
    expect(percentDone({ done: 5, total: null })).toBeNull();
  });
});
