import { hoursText, moneyText, toLocalDate } from '@brakeven/values';
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

it('what came late counts on its day in the books, if it was done in service', () => {
  const postedOn = toLocalDate('2026-04-01');
  const entries = [
    entryOf({ entryId: 'a' }),
    entryOf({ entryId: 'b', hours: '1' }),
    entryOf({ entryId: 'c', workedOn: '2026-02-15' }),
  ];
  const lines = computeLines(entries, bookOf()).lines.map((line) =>
    line.entryId === 'a' ? line : { ...line, postedOn },
  );
  const days = computeMachineDays(lines, bookOf().inServiceOn);
  expect(days.map((day) => [day.workedOn, hoursText(day.hours), moneyText(day.earned)])).toEqual([
    ['2026-03-02', '7.5000', '712.50'],
    ['2026-04-01', '1.0000', '95.00'],
  ]);
});
