import { hoursText, moneyText } from '@brakeven/values';
import { bookOf, entryOf } from '../../testing/example-shop';
import { computeLines, type CostedEntry } from './entry-lines';
import { computeMachineDays } from './machine-day';

function daysOf(entries: CostedEntry[], book = bookOf()) {
  const { lines, gaps } = computeLines(entries, book);
  return computeMachineDays(lines, book.inServiceOn, gaps).map((day) => ({
    machineId: day.machineId,
    workedOn: day.workedOn,
    hours: hoursText(day.hours),
    billableHours: hoursText(day.billableHours),
    earned: moneyText(day.earned),
    operatorLabour: moneyText(day.operatorLabour),
    running: moneyText(day.running),
  }));
}

describe('the days of a machine', () => {
  it('hold all hours and labour, but earn on billable jobs alone', () => {
    // earned 7.5 × 95; labour 234.00 + 1 × 19.75 × 1.2825 = 25.33; running 46.88 + 6.25
    const entries = [
      entryOf({ entryId: 'a' }),
      entryOf({ entryId: 'b', employeeId: 'ben', jobId: 'upkeep', isBillable: false, hours: '1' }),
    ];
    expect(daysOf(entries)).toEqual([
      {
        machineId: 'press',
        workedOn: '2026-03-02',
        hours: '8.5000',
        billableHours: '7.5000',
        earned: '712.50',
        operatorLabour: '259.33',
        running: '53.13',
      },
    ]);
  });

  it('leave out work before the first day in service, and work without a machine', () => {
    const entries = [
      entryOf({ entryId: 'early', workedOn: '2026-02-15' }),
      entryOf({ entryId: 'hand', machineId: null }),
      entryOf({ entryId: 'saw', machineId: 'saw' }),
      entryOf({ entryId: 'first', workedOn: '2026-02-16' }),
    ];
    expect(daysOf(entries).map((day) => day.workedOn)).toEqual(['2026-02-16']);
  });

  it('come sorted by machine and date', () => {
    const inServiceOn = new Map([...bookOf().inServiceOn, ['saw', entryOf().workedOn] as const]);
    const entries = [
      entryOf({ entryId: '1', machineId: 'saw' }),
      entryOf({ entryId: '2', workedOn: '2026-03-03' }),
      entryOf({ entryId: '3' }),
    ];
    expect(daysOf(entries, bookOf({ inServiceOn })).map((day) => `${day.machineId} ${day.workedOn}`)).toEqual(
      ['press 2026-03-02', 'press 2026-03-03', 'saw 2026-03-02'],
    );
  });

  it('keep the hours that have no rate', () => {
    expect(daysOf([entryOf()], bookOf({ machineRates: new Map() }))).toMatchObject([
      { hours: '7.5000', billableHours: '7.5000', earned: '0.00', operatorLabour: '234.00', running: '0.00' },
    ]);
  });
});
