import { type DateFormat } from '@brakeven/values';
import { readSheets } from './read-sheets';
import { readTimesheetRows } from './read-timesheet-rows';
import { findTimesheetHeader } from './timesheet-mapping';

async function readDates(dates: string[], dateFormat?: DateFormat) {
  const lines = ['Date,Employee,Job,Op,Hours', ...dates.map((date) => `${date},101,2041,FORM,7.5`)];
  const file = await readSheets({ name: 'week.csv', bytes: Buffer.from(lines.join('\r\n')) });
  const { mapping } = findTimesheetHeader(file);
  return readTimesheetRows(file, { ...mapping, dateFormat: dateFormat ?? mapping.dateFormat });
}

describe('text dates that are not read', () => {
  it('come with the one order that reads all of them', async () => {
    const { unreadDates, rows } = await readDates(['11/02/2026', '11/23/2026']);
    expect(rows.map(({ workedOn }) => workedOn)).toEqual([null, null]);
    expect(unreadDates).toEqual({
      cells: ['A2', 'A3'],
      offers: [{ dateFormat: 'MM/DD/YYYY', text: '11/02/2026', date: '2026-11-02' }],
    });
  });

  it('come with each order when several read all, and what the first would become', async () => {
    expect((await readDates(['02/03/2026', '04/05/2026'])).unreadDates?.offers).toEqual([
      { dateFormat: 'MM/DD/YYYY', text: '02/03/2026', date: '2026-02-03' },
      { dateFormat: 'DD/MM/YYYY', text: '02/03/2026', date: '2026-03-02' },
    ]);
  });

  it('come without an offer when no order reads all, or gives a day of work', async () => {
    expect((await readDates(['11/23/2026', '23/11/2026'])).unreadDates?.offers).toEqual([]);
    expect((await readDates(['11/23/2026', 'Monday'])).unreadDates?.offers).toEqual([]);
    expect((await readDates(['11/23/0226'])).unreadDates?.offers).toEqual([]);
  });

  it('are only those that another order was declared for, and the offer still reads all', async () => {
    const { unreadDates, rows } = await readDates(['02/03/2026', '11/23/2026'], 'DD/MM/YYYY');
    expect(unreadDates?.cells).toEqual(['A3']);
    expect(rows[1]?.problems[0]?.message).toContain('declare that one under Change columns');
    expect(unreadDates?.offers.map(({ dateFormat }) => dateFormat)).toEqual(['MM/DD/YYYY']);
  });

  it('are none when all are read or no date is text', async () => {
    expect((await readDates(['11/23/2026'], 'MM/DD/YYYY')).unreadDates).toBeNull();
    expect((await readDates(['2026-11-23'])).unreadDates).toBeNull();
  });

  it('say where to declare the order', async () => {
    const { rows } = await readDates(['11/23/2026']);
    expect(rows[0]?.problems[0]?.message).toBe(
      "Cell A2 holds the text '11/23/2026', and no order of day and month is declared for text dates in this " +
        'sheet. Declare it under Change columns, or under To settle where it is offered (at the command line: ' +
        '--date-format), or write real dates.',
    );
  });
});
