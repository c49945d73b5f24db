import { type LocalDate } from '@brakeven/values';
import exceljs from 'exceljs';
import { readSheets } from './read-sheets';
import { readTimesheetRows } from './read-timesheet-rows';
import { findTimesheetHeader } from './timesheet-mapping';
import { type TimesheetLine, writeTimesheetWorkbook } from './write-timesheet';

const LINES: readonly TimesheetLine[] = [
  {
    workedOn: '2026-03-02' as LocalDate,
    employee: 'Mara Quill',
    job: '2041',
    operation: 'FORM',
    machine: 'P2',
    hours: '7.5000',
    good: 24,
    scrap: 1,
    note: 'first run',
  },
  {
    workedOn: '2026-03-03' as LocalDate,
    employee: 102,
    job: '2042',
    operation: 'WELD',
    machine: null,
    hours: '2.2500',
    good: null,
    scrap: null,
    note: null,
  },
];

async function open(bytes: Buffer): Promise<exceljs.Worksheet> {
  const workbook = new exceljs.Workbook();
  await workbook.xlsx.load(bytes as unknown as ArrayBuffer);
  const [sheet] = workbook.worksheets;
  if (!sheet) throw new Error('No sheet was written.');
  return sheet;
}

describe('a written timesheet', () => {
  it('has titles above the header, real dates and a live sum with its result', async () => {
    const sheet = await open(
      await writeTimesheetWorkbook({
        title: 'Week 10',
        subtitles: ['Tern Hollow'],
        sheetName: 'W10',
        rows: LINES,
      }),
    );
    expect(sheet.name).toBe('W10');
    expect(sheet.getCell('A1').value).toBe('Week 10');
    expect(sheet.getCell('A2').value).toBe('Tern Hollow');
    expect(sheet.getCell('F4').value).toBe('Hours');
    expect(sheet.getCell('A5').value).toEqual(new Date('2026-03-02T00:00:00Z'));
    expect(sheet.getCell('F7').value).toEqual({ formula: 'SUM(F5:F6)', result: 9.75 });
    expect(sheet.views[0]).toMatchObject({ state: 'frozen', ySplit: 4 });
  });

  it('writes hours as durations when asked to', async () => {
    const bytes = await writeTimesheetWorkbook({ title: 'Week 10', rows: LINES, hoursAs: 'duration' });
    const file = await readSheets({ name: 'week.xlsx', bytes });
    const hours = file.sheets[0]?.rows.flatMap(({ cells }) =>
      cells.filter(({ kind }) => kind === 'duration'),
    );
    expect(hours?.map(({ address, value, text }) => [address, value, text])).toEqual([
      ['F4', 0.3125, '7:30'],
      ['F5', 0.09375, '2:15'],
      ['F6', 0.40625, '9:45'],
    ]);
  });

  it('may end without a total and may be empty', async () => {
    const read = async (bytes: Buffer) => {
      const file = await readSheets({ name: 'week.xlsx', bytes });
      return readTimesheetRows(file, findTimesheetHeader(file).mapping);
    };
    const bare = await read(await writeTimesheetWorkbook({ title: 'Week 10', rows: LINES, hasTotal: false }));
    expect(bare).toMatchObject({ controlTotal: null, rows: [{ hours: '7.5000' }, { employee: '102' }] });
    const empty = await read(await writeTimesheetWorkbook({ title: 'Week 10', rows: [] }));
    expect(empty).toMatchObject({ rows: [], controlTotal: { hours: '0.0000' } });
  });
});
