import { addDays, hoursFromDays, hoursText, sum, toHours, toLocalDate } from '@brakeven/values';
import fc from 'fast-check';
import { readSheets } from './read-sheets';
import { readTimesheetRows } from './read-timesheet-rows';
import { findTimesheetHeader } from './timesheet-mapping';
import { type TimesheetLine, writeTimesheetWorkbook } from './write-timesheet';

jest.setTimeout(60_000);

const RUNS = 25;
const TEN_THOUSANDTHS_PER_DAY = 240_000;

/** Names and notes as people type them; digits at the end keep them from reading as a total. */
const words = fc
  .array(fc.constantFrom('Mara', 'Ivo', 'Zoë', 'O’Neil', '<&>', '"x"', '=1+1', '-', 'süß', '_x0041_'), {
    minLength: 1,
  })
  .map((parts) => `${parts.join(' ')} 7`);
const count = fc.option(fc.integer({ min: 0, max: 5_000 }));

const line = fc.record<TimesheetLine>({
  workedOn: fc.integer({ min: 0, max: 25_000 }).map((days) => addDays(toLocalDate('1995-01-01'), days)),
  employee: fc.oneof(words, fc.integer({ min: 1, max: 99_999 })),
  job: fc.oneof(words, fc.integer({ min: 1, max: 99_999 })),
  operation: words,
  machine: fc.option(words),
  hours: fc.integer({ min: 1, max: TEN_THOUSANDTHS_PER_DAY }).map((n) => hoursText(toHours(n / 10_000))),
  good: count,
  scrap: count,
  note: fc.option(words),
});

async function writeAndRead(rows: readonly TimesheetLine[], hoursAs: 'number' | 'duration') {
  const bytes = await writeTimesheetWorkbook({ title: 'Total hours of the week', rows, hoursAs });
  const file = await readSheets({ name: 'week.xlsx', bytes });
  return readTimesheetRows(file, findTimesheetHeader(file).mapping);
}

function toExpected(one: TimesheetLine, hours: string) {
  return { ...one, employee: String(one.employee), job: String(one.job), hours, problems: [] };
}

describe(`written and read again (${process.env['TZ'] ?? 'local'} time)`, () => {
  it('entries come back as they were, hours as numbers', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(line, { minLength: 1, maxLength: 12 }), async (rows) => {
        const read = await writeAndRead(rows, 'number');
        expect(read.rows).toMatchObject(rows.map((one) => toExpected(one, one.hours)));
        expect(read.controlTotal?.hours).toBe(hoursText(sum(rows.map(({ hours }) => toHours(hours)))));
      }),
      { numRuns: RUNS },
    );
  });

  it('hours as durations come back rounded to the second, no further off', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(line, { minLength: 1, maxLength: 12 }), async (rows) => {
        const read = await writeAndRead(rows, 'duration');
        const expected = rows.map((one) =>
          toExpected(one, hoursText(hoursFromDays(toHours(one.hours).div(24)))),
        );
        expect(read.rows).toMatchObject(expected);
      }),
      { numRuns: RUNS },
    );
  });
});
