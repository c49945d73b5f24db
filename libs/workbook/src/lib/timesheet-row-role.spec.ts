import { readSheets } from './read-sheets';
import { readTimesheetRows, readTimesheetRowsInTurns } from './read-timesheet-rows';
import { type SheetFile } from './sheet-file';
import { findTimesheetHeader } from './timesheet-mapping';

const HEADER = 'Date,Employee,Job,Operation,Hours,Good,Note,Checked';
const ENTRY = '2026-03-02,101,2041,FORM,7.5,,,';

function openCsv(...lines: string[]): Promise<SheetFile> {
  return readSheets({ name: 'week.csv', bytes: Buffer.from([HEADER, ...lines].join('\n')) });
}

async function read(...lines: string[]) {
  const file = await openCsv(...lines);
  const { rows, controlTotal, problems } = readTimesheetRows(file, findTimesheetHeader(file).mapping);
  return {
    entries: rows.map(({ row, problems }) => (problems.length > 0 ? `${row} refused` : `${row} ready`)),
    total: controlTotal && `${controlTotal.row}: ${controlTotal.hours}`,
    notices: problems.map(({ code, cell }) => `${code} ${cell}`),
  };
}

describe('what a row is', () => {
  it('hours with nothing else between entries are a refused entry, not a skipped total', async () => {
    expect(await read(ENTRY, ',,,,4,,,', ENTRY)).toEqual({
      entries: ['2 ready', '3 refused', '4 ready'],
      total: null,
      notices: [],
    });
  });

  it('so are they above a labelled total', async () => {
    const found = await read(ENTRY, ',,,,4,,,', 'Total,,,,11.5,,,');
    expect(found).toEqual({ entries: ['2 ready', '3 refused'], total: '4: 11.5000', notices: [] });
  });

  it('a row of hours and pieces at the very end is a total', async () => {
    expect(await read(ENTRY, ENTRY, ',,,,15,48,,')).toMatchObject({
      entries: ['2 ready', '3 ready'],
      total: '4: 15.0000',
    });
  });

  it('a job, operation or machine makes an entry, whatever else says total', async () => {
    expect(await read('2026-03-02,101,2041,FORM,7.5,,total rework,', '2026-03-02,,2041,,2,,total,')).toEqual({
      entries: ['2 ready', '3 refused'],
      total: null,
      notices: [],
    });
  });

  it('a day with a total of its own is a subtotal', async () => {
    expect(await read(ENTRY, '2026-03-02,Total,,,7.5,,,', ENTRY)).toMatchObject({
      entries: ['2 ready', '4 ready'],
      notices: ['subtotal_skipped E3'],
    });
  });

  it('a totals row without hours is passed over', async () => {
    const found = await read(ENTRY, 'Total,,,,,48,,');
    expect(found).toEqual({ entries: ['2 ready'], total: null, notices: ['subtotal_skipped A3'] });
  });

  it('a total that cannot be read is said to be so', async () => {
    const found = await read(ENTRY, 'Total,,,,7 1/2,,,');
    expect(found).toEqual({ entries: ['2 ready'], total: null, notices: ['total_unreadable E3'] });
  });

  it('texts alone are refused between entries and passed over below them', async () => {
    const found = await read(ENTRY, 'Monday,,,,,,,', ENTRY, 'Signed:,M. Quill,,,,,,');
    expect(found).toEqual({
      entries: ['2 ready', '3 refused', '4 ready'],
      total: null,
      notices: ['text_row_skipped A5'],
    });
  });

  it('what stands in columns that are not mapped makes no row', async () => {
    expect(await read(ENTRY, ',,,,,,,yes', ENTRY)).toEqual({
      entries: ['2 ready', '4 ready'],
      total: null,
      notices: [],
    });
  });

  it('a dated row without hours is refused, also at the end', async () => {
    expect(await read(ENTRY, '2026-03-03,101,,,,,,')).toMatchObject({ entries: ['2 ready', '3 refused'] });
  });
});

it('reads the same in turns, letting others go first every thousand rows', async () => {
  const file = await openCsv(...Array.from({ length: 2_500 }, () => ENTRY));
  const { mapping } = findTimesheetHeader(file);
  let turns = 0;
  const read = await readTimesheetRowsInTurns(file, mapping, async () => {
    turns += 1;
  });
  expect(read).toEqual(readTimesheetRows(file, mapping));
  expect(turns).toBeGreaterThanOrEqual(4);
});
