import { PassThrough } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import exceljs from 'exceljs';
import { type Table, writeTableCsv, writeTableWorkbook } from './write-table';

const columns: Table['columns'] = [
  { header: 'Job', kind: 'text', isSummed: false },
  { header: 'Due', kind: 'date', isSummed: false },
  { header: 'Hours', kind: 'hours', isSummed: true },
  { header: 'Margin', kind: 'money', isSummed: true },
];
const ROWS = [
  ['=1+1', '2026-06-01', '7.5000', '-12.50'],
  ['He said "now", twice', null, '0.2500', '1000.10'],
];

function toTable(rows: (string | null)[][]): Table {
  return {
    title: 'Jobs of Tern Hollow Fabrication',
    subtitles: ['Costs through Jun 1, 2026.'],
    sheetName: 'Jobs',
    columns,
    rows: (async function* () {
      for (const row of rows) yield await Promise.resolve(row);
    })(),
  };
}

async function written(write: (target: PassThrough) => Promise<void>): Promise<Buffer> {
  const target = new PassThrough();
  const [content] = await Promise.all([buffer(target), write(target)]);
  return content;
}

async function sheetOf(rows: (string | null)[][]) {
  const workbook = new exceljs.Workbook();
  const content = await written((target) => writeTableWorkbook(toTable(rows), target));
  await workbook.xlsx.load(content as unknown as Parameters<typeof workbook.xlsx.load>[0]);
  const sheet = workbook.getWorksheet('Jobs');
  if (!sheet) throw new Error('There is no sheet.');
  return sheet;
}

describe('a table as CSV', () => {
  it('is RFC 4180 with a mark of its encoding, text that looks like a formula guarded, numbers as they are', async () => {
    const content = await written((target) => writeTableCsv(toTable(ROWS), target));
    expect(content.toString()).toBe(
      "\uFEFFJob,Due,Hours,Margin\r\n'=1+1,2026-06-01,7.5000,-12.50\r\n" +
        '"He said ""now"", twice",,0.2500,1000.10\r\n',
    );
  });

  it.each(['+1', '-1', '@SUM(A1)', '\tx', '\r=x'])('guards %j', async (text) => {
    const content = await written((target) => writeTableCsv(toTable([[text, null, null, null]]), target));
    expect(content.toString()).toContain(`'${text}`);
  });
});

describe('a table as a workbook', () => {
  it('holds text as text, numbers as numbers and live sums with their results', async () => {
    const sheet = await sheetOf(ROWS);
    expect(sheet.getCell('A5').value).toBe('=1+1');
    expect(sheet.getCell('A5').type).toBe(exceljs.ValueType.String);
    expect(sheet.getCell('D5').value).toBe(-12.5);
    expect(sheet.getCell('B5').value).toEqual(new Date('2026-06-01T00:00:00Z'));
    expect(sheet.getCell('B6').value).toBeNull();
    expect(sheet.getCell('A7').value).toBe('Total');
    expect(sheet.getCell('C7').value).toMatchObject({ formula: 'SUM(C5:C6)', result: 7.75 });
    expect(sheet.getCell('D7').value).toMatchObject({ formula: 'SUM(D5:D6)', result: 987.6 });
  });

  it('of no rows sums to 0', async () => {
    const sheet = await sheetOf([]);
    expect(sheet.getCell('D5').value).toBe(0);
  });

  it('ends with an error when whoever asked for it goes away', async () => {
    const target = new PassThrough({ highWaterMark: 16 });
    const rows = Array.from({ length: 500 }, () => ROWS[0] ?? []);
    const writing = writeTableCsv(toTable(rows), target);
    target.destroy();
    await expect(writing).rejects.toThrow();
  });
});
