import { type TimesheetCheck } from '@brakeven/contract';

import {
  commitWords,
  count,
  countEntries,
  leaveOutWords,
  percentDone,
  refusedWords,
} from './timesheet-words';

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

describe('rows that are refused', () => {
  const left = (refused: number, refusedWithoutHours: number, entriesReady = 2) =>
    leaveOutWords({
      ...check(entriesReady, refused),
      refusedWithoutHours,
      hoursReady: '15.0000',
      hoursRefused: '4.0000',
    });

  it('are said with their hours as far as those can be read', () => {
    expect(left(1, 0)).toBe(
      '2 entries with 15.00 hours go in. 1 row with 4.00 hours stays out and costs no job anything.',
    );
    expect(left(1, 1, 1)).toBe(
      '1 entry with 15.00 hours goes in. 1 row stays out and costs no job anything; its hours cannot be read.',
    );
    expect(left(3, 3)).toContain('3 rows stay out and cost no job anything; their hours cannot be read.');
    expect(left(3, 1)).toContain(
      '3 rows with 4.00 hours stay out and cost no job anything; the hours of 1 of them cannot be read.',
    );
  });

  it('are counted with those whose hours are in no sum', () => {
    expect(refusedWords({ refused: 9, refusedWithoutHours: 0 })).toBe('9 rows');
    expect(refusedWords({ refused: 1, refusedWithoutHours: 1 })).toBe('1 row, its hours cannot be read');
    expect(refusedWords({ refused: 9, refusedWithoutHours: 2 })).toBe(
      '9 rows, the hours of 2 of them cannot be read',
    );
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
