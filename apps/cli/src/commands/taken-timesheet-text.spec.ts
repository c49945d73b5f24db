import { type TimesheetCheck } from '@brakeven/contract';
import { toTakenText } from './taken-timesheet-text';

function toText(change: Partial<TimesheetCheck>): string {
  const sums = {
    rowsRead: 3,
    entriesReady: 2,
    alreadyThere: 0,
    refused: 1,
    hoursRead: '15.0000',
    hoursReady: '15.0000',
    hoursAlreadyThere: '0.0000',
    hoursRefused: '0.0000',
    refusedWithoutHours: 0,
  };
  const rest = { unusedColumns: [], unreadDates: null, controlTotal: null, alreadyImported: null };
  return toTakenText({ ...sums, ...rest, problems: [], ...change } as unknown as TimesheetCheck);
}

describe('toTakenText', () => {
  it('never calls hours that cannot be read 0', () => {
    expect(toText({ refusedWithoutHours: 1 })).toMatch(/Refused +1, hours cannot be read\n/);
    expect(toText({ refused: 3, hoursRefused: '4.0000', refusedWithoutHours: 1 })).toMatch(
      /Refused +3, 4\.0000 hours and those of 1 that cannot be read\n/,
    );
    expect(toText({ hoursRefused: '4.0000' })).toMatch(/Refused +1, 4\.0000 hours\n/);
  });

  it('notes a column that is not used, with the option that says what it is', () => {
    const message = "Column E 'Cell' (BR1) is not used.";
    const unusedColumns = [{ column: 'E', text: 'Cell', samples: ['BR1'], message }];
    expect(toText({ unusedColumns })).toContain(
      `Note: ${message} To use it, say which field it holds: --column <field>=E\n`,
    );
  });

  it('names the orders that read all text dates as they are to be typed', () => {
    const american = { dateFormat: 'MM/DD/YYYY', text: '02/03/2026', date: '2026-02-03' } as const;
    const european = { dateFormat: 'DD/MM/YYYY', text: '02/03/2026', date: '2026-03-02' } as const;
    const one = toText({ unreadDates: { cells: ['A2'], offers: [american] } });
    expect(one).toContain(
      "All of them are read with:\n  --date-format 'MM/DD/YYYY'   02/03/2026 is 2026-02-03\n",
    );
    const two = toText({ unreadDates: { cells: ['A2'], offers: [american, european] } });
    expect(two).toContain('All of them are read with one of:');
    expect(two).toContain("--date-format 'DD/MM/YYYY'   02/03/2026 is 2026-03-02");
    expect(toText({ unreadDates: { cells: ['A2'], offers: [] } })).not.toContain('--date-format');
  });
});
