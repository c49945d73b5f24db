import { readFixture } from '../../testing/fixture-file';
import { findHeaderField } from './timesheet-header-words';
import { describeTimesheetHeader, findTimesheetHeader, headerSignature } from './timesheet-mapping';
import { readSheets } from './read-sheets';
import { type SheetFile } from './sheet-file';

function readCsvText(text: string): Promise<SheetFile> {
  return readSheets({ name: 'week.csv', bytes: Buffer.from(text) });
}

describe('header wordings', () => {
  it.each([
    ['Work date', 'date'],
    ['Emp #', 'employee'],
    ['Employee no.', 'employee'],
    ['Employee (number or name)', 'employee'],
    ['Name', 'employee'],
    ['Job #', 'job'],
    ['Job No', 'job'],
    ['WORK ORDER', 'job'],
    ['Job/WO', 'job'],
    ['Op', 'operation'],
    ['Operation code', 'operation'],
    ['Task', 'operation'],
    ['Press', 'machine'],
    ['Machine', 'machine'],
    ['Mach', 'machine'],
    ['Mach.', 'machine'],
    ['Mach #', 'machine'],
    ['M/C', 'machine'],
    ['M/C No.', 'machine'],
    ['Equip', 'machine'],
    ['Equipment', 'machine'],
    ['Work center', 'machine'],
    ['Work ctr.', 'machine'],
    ['Mach. / Press', 'machine'],
    ['Workday', 'date'],
    ['Empl.', 'employee'],
    ['Done by', 'employee'],
    ['Job card', 'job'],
    ['Works order no.', 'job'],
    ['Opn.', 'operation'],
    ['Labor hrs', 'hours'],
    ['Pcs OK', 'good'],
    ['Rej.', 'scrap'],
    ['Notes & comments', 'note'],
    ['Hrs', 'hours'],
    ['Hours worked', 'hours'],
    ['Hours (h:mm)', 'hours'],
    ['Time', 'hours'],
    ['Qty good', 'good'],
    ['Good pcs.', 'good'],
    ['Pieces', 'good'],
    ['Rejects', 'scrap'],
    ['Scrap qty', 'scrap'],
    ['Remarks', 'note'],
    ['notes:', 'note'],
  ])('%s is %s', (text, field) => {
    expect(findHeaderField(text)?.field).toBe(field);
  });

  it.each([
    'Regular hours',
    'OT hours',
    'Start',
    'Customer',
    'Job title',
    'Good/Scrap',
    'Good and scrap',
    'Setup hrs',
    '',
  ])('%p is left to the user', (text) => {
    expect(findHeaderField(text)).toBeNull();
  });
});

describe('finding the header', () => {
  it('finds it on any sheet in the first 30 rows', async () => {
    const header = findTimesheetHeader(await readFixture('ok/header-on-row-7.xlsx'));
    expect(header.mapping).toEqual({
      sheet: 'Hours',
      headerRow: 7,
      columns: {
        date: 'A',
        employee: 'B',
        job: 'C',
        operation: 'D',
        machine: 'E',
        hours: 'F',
        good: 'G',
        scrap: 'H',
        note: 'I',
      },
    });
    expect(header.missing).toEqual([]);
    expect(header.headerCells[1]).toEqual({ column: 'B', text: 'Employee', sample: '101' });
    const late = await readCsvText(`${'-,-\n'.repeat(30)}Date,Employee,Job,Operation,Hours\n`);
    expect(() => findTimesheetHeader(late)).toThrow('first 30 rows');
  });

  it('prefers a visible, filled sheet and names the others that fit', async () => {
    const hidden = findTimesheetHeader(await readFixture('ok/hidden-sheet.xlsx'));
    expect(hidden.mapping.sheet).toBe('Week 11');
    const two = findTimesheetHeader(await readFixture('ok/two-weeks.xlsx'));
    expect(two.mapping.sheet).toBe('Week 10');
    expect(two.alsoOnSheets).toEqual(['Week 11']);
  });

  it('takes the surest of two columns for one field', async () => {
    const file = await readCsvText(
      'Name,Emp #,Work date,Day,Job,Op,Time,Hours\nx,1,2026-03-02,Mon,1,F,7:00,7.5\n',
    );
    expect(findTimesheetHeader(file).mapping.columns).toMatchObject({ employee: 'B', date: 'C', hours: 'H' });
  });

  it('offers a header in unknown words for mapping by hand', async () => {
    const header = findTimesheetHeader(await readFixture('ok/unknown-headers.xlsx'));
    expect(header.mapping).toEqual({ sheet: 'Week 10', headerRow: 1, columns: {} });
    expect(header.missing).toEqual(['date', 'employee', 'job', 'operation', 'hours']);
    expect(header.headerCells.map(({ column, text }) => `${column}=${text}`)).toContain('F=Ore');
  });

  it('says which required fields it misses', async () => {
    const file = await readCsvText('Date,Employee,Job,Hours\n2026-03-02,1,2041,7.5\n');
    expect(findTimesheetHeader(file).missing).toEqual(['operation']);
  });

  it('says what it looked for when there is no header at all', async () => {
    const file = await readFixture('not-ok/no-header.xlsx');
    expect(() => findTimesheetHeader(file)).toThrow(/Sheets: 'Week 10'.*hours \(hours, hours worked/);
  });

  it('describes a row that the user chose', async () => {
    const file = await readFixture('ok/header-on-row-7.xlsx');
    expect(describeTimesheetHeader(file, { sheet: 'Hours', headerRow: 7 }).missing).toEqual([]);
    expect(() => describeTimesheetHeader(file, { sheet: 'Hours', headerRow: 3 })).toThrow('Row 3');
    expect(() => describeTimesheetHeader(file, { sheet: 'Nope', headerRow: 7 })).toThrow("no sheet 'Nope'");
  });
});

describe('what is declared for texts', () => {
  const withDates = (...dates: string[]) =>
    readCsvText(
      `Date,Employee,Job,Operation,Hours\n${dates.map((date) => `${date},1,2041,F,1`).join('\n')}\n`,
    );

  it('declares an order of dates only when it can be no other', async () => {
    const iso = findTimesheetHeader(await withDates('2026-03-02', 'soon', '2026-03-03'));
    expect(iso.mapping.dateFormat).toBe('YYYY-MM-DD');
    expect(findTimesheetHeader(await withDates('2 Mar 2026')).mapping.dateFormat).toBe('DD MMM YYYY');
    const slashes = findTimesheetHeader(await withDates('03/02/2026', '03/13/2026'));
    expect(slashes.mapping.dateFormat).toBeUndefined();
    expect(slashes.dateFormats).toEqual(['MM/DD/YYYY']);
    expect(findTimesheetHeader(await withDates('03/02/2026')).dateFormats).toEqual([
      'MM/DD/YYYY',
      'DD/MM/YYYY',
    ]);
    expect(findTimesheetHeader(await withDates('soon')).dateFormats).toEqual([]);
  });

  it.each<[string[], string | undefined]>([
    [['7,5', '8'], ','],
    [['0,375'], ','],
    [['1,250'], undefined],
    [['7,5', '7.5'], undefined],
    [['8', '7:30'], undefined],
  ])('hours %p of a semicolon file: decimal mark %p', async (hours, mark) => {
    const rows = hours.map((text) => `2026-03-02;1;2041;F;${text}`).join('\n');
    const file = await readCsvText(`Date;Employee;Job;Operation;Hours\n${rows}\n`);
    expect(findTimesheetHeader(file).mapping.decimalMark).toBe(mark);
  });
});

describe('header signature', () => {
  const cells = [
    { column: 'A', text: 'Emp. #' },
    { column: 'B', text: 'Hours (h)' },
  ];

  it('is the same for the same header in other clothes', () => {
    const same = [
      { column: 'A', text: 'EMP NO' },
      { column: 'B', text: ' hours' },
      { column: 'C', text: '' },
    ];
    expect(headerSignature(same)).toBe(headerSignature(cells));
  });

  it('differs when a column moves or is called otherwise', () => {
    const moved = [
      { column: 'B', text: 'Emp. #' },
      { column: 'A', text: 'Hours' },
    ];
    expect(headerSignature(moved)).not.toBe(headerSignature(cells));
    expect(headerSignature([...cells, { column: 'C', text: 'Job' }])).not.toBe(headerSignature(cells));
  });
});
