import { getCell, loadFixture, readFixture } from '../../testing/fixture-file';
import { packRawXlsx } from '../../testing/raw-xlsx';
import { readSheets } from './read-sheets';
import { type ReadProgress } from './sheet-file';
import { assertSheetSize } from './sheet-xml';
import { type WorkbookErrorCode } from './workbook-error';

jest.setTimeout(60_000);

describe('files that are refused whole', () => {
  it.each<[string, WorkbookErrorCode, RegExp]>([
    ['not-ok/empty.xlsx', 'file_empty', /save it again/i],
    ['not-ok/old.xls', 'file_old_xls', /save it as \.xlsx/],
    ['not-ok/old-renamed.xlsx', 'file_old_xls', /save it as \.xlsx/],
    ['not-ok/encrypted.xlsx', 'file_encrypted', /without the password/],
    ['not-ok/truncated.xlsx', 'file_truncated', /save it again/],
    ['not-ok/damaged.xlsx', 'file_truncated', /damaged/],
    ['not-ok/renamed-picture.xlsx', 'file_not_workbook', /a picture/],
    ['not-ok/renamed-pdf.xlsx', 'file_not_workbook', /a PDF/],
    ['not-ok/renamed-text.xlsx', 'file_not_workbook', /ends in \.xlsx, but inside is plain text/],
    ['not-ok/renamed-workbook.csv', 'file_not_workbook', /ends in \.csv, but inside is a workbook/],
    ['not-ok/renamed-folder.xlsx', 'file_not_workbook', /a folder of other files/],
    ['not-ok/web-page.csv', 'file_not_workbook', /a web page/],
    ['not-ok/opendocument.ods', 'file_not_workbook', /save it as \.xlsx/],
    ['not-ok/opendocument-renamed.xlsx', 'file_form_unsupported', /OpenDocument/],
    ['not-ok/zip-bomb.xlsx', 'file_unpacks_too_large', /at most 200 MB/],
    ['not-ok/not-utf8.csv', 'csv_not_utf8', /CSV UTF-8/],
    ['not-ok/utf16.csv', 'csv_not_utf8', /CSV UTF-8/],
    ['not-ok/tabs.csv', 'csv_separator_unknown', /commas or semicolons/],
    ['not-ok/quotes-broken.csv', 'csv_quotes_broken', /line 2/],
  ])('%s: %s', async (path, code, message) => {
    await expect(readFixture(path)).rejects.toMatchObject({
      name: 'WorkbookError',
      code,
      message: expect.stringMatching(message),
    });
  });

  it('refuses a file over 10 MB before looking into it', async () => {
    const file = { name: 'big.xlsx', bytes: new Uint8Array(10 * 1024 * 1024 + 1) };
    await expect(readSheets(file)).rejects.toMatchObject({ code: 'file_too_large' });
  });

  it('refuses a sheet of more than 100,000 rows before reading its cells', async () => {
    const rows = Array.from(
      { length: 100_001 },
      (_, at) => `<row r="${at + 1}"><c r="A${at + 1}"><v>1</v></c></row>`,
    );
    await expect(readSheets({ name: 'long.xlsx', bytes: packRawXlsx(rows.join('')) })).rejects.toMatchObject({
      code: 'too_many_rows',
      message: expect.stringContaining('100,001 rows'),
    });
    expect(() => assertSheetSize({ rowsFilled: 100_000, cells: 900_000 }, 'Full')).not.toThrow();
  });

  it('refuses a CSV file of more than 100,000 rows', async () => {
    const bytes = Buffer.from('1,2\n'.repeat(100_001));
    await expect(readSheets({ name: 'long.csv', bytes })).rejects.toMatchObject({ code: 'too_many_rows' });
  });

  it('refuses a sheet of more than two million formatted cells', () => {
    const refused = () => assertSheetSize({ rowsFilled: 1, cells: 2_000_001 }, 'Wide');
    expect(refused).toThrow(expect.objectContaining({ code: 'too_many_cells' }));
  });

  it('refuses a sheet whose XML ends in the middle', async () => {
    const bytes = packRawXlsx('<row r="1"><c r="A1"><v>1</v></c><row');
    await expect(readSheets({ name: 'half.xlsx', bytes })).rejects.toMatchObject({ code: 'file_truncated' });
  });
});

describe('cells', () => {
  it('keeps the kind, value, address and format of each', async () => {
    const file = await readFixture('ok/formula-hours.xlsx');
    expect(file).toMatchObject({ name: 'formula-hours.xlsx', form: 'xlsx', separator: null });
    expect(getCell(file, 'A2')).toEqual({
      address: 'A2',
      kind: 'date',
      value: 46_083,
      text: '2026-03-02',
      hasFormula: false,
    });
    expect(getCell(file, 'A3')).toMatchObject({ kind: 'date', value: 46_084, hasFormula: true });
    expect(getCell(file, 'B2')).toMatchObject({ kind: 'number', value: 101, text: '101', isPercent: false });
    expect(getCell(file, 'B3')).toMatchObject({ kind: 'text', value: 'Mara Quill', hasFormula: true });
    expect(getCell(file, 'F3')).toMatchObject({ kind: 'duration', value: 0.09375, text: '2:15' });
    expect(() => getCell(file, 'E3')).toThrow('no cell E3');
  });

  it('hands over the serial of the 1904 system as it is, with the flag beside it', async () => {
    for (const path of ['ok/date-1904.xlsx', 'ok/date-1904-libreoffice.xlsx']) {
      const file = await readFixture(path);
      expect(file.sheets[0]?.date1904).toBe(true);
      // 2026-03-02 is day 46,083 of the 1900 system; the systems lie 1,462 days apart.
      expect(getCell(file, 'A2')).toMatchObject({ kind: 'date', value: 44_621, text: '2026-03-02' });
    }
  });

  it('says so when a formula has no stored result, and keeps error values', async () => {
    const missing = await readFixture('not-ok/formula-without-result.xlsx');
    expect(getCell(missing, 'F2')).toEqual({
      address: 'F2',
      kind: 'formula-without-result',
      value: null,
      text: '',
      hasFormula: true,
    });
    const errors = await readFixture('not-ok/error-cells.xlsx');
    expect(getCell(errors, 'F2')).toMatchObject({ kind: 'error', value: '#N/A', hasFormula: false });
    expect(getCell(errors, 'C3')).toMatchObject({ kind: 'error', value: '#REF!', hasFormula: true });
  });

  it('takes the value of a merged range from its top left cell alone', async () => {
    const file = await readFixture('ok/covered-by-merge.xlsx');
    expect(getCell(file, 'F2')).toMatchObject({ value: 7.5 });
    expect(() => getCell(file, 'F3')).toThrow('no cell F3');
    const title = await readFixture('ok/merged-title.xlsx');
    expect(title.sheets[0]?.rows[0]?.cells.map(({ address }) => address)).toEqual(['A1']);
  });

  it('reads hidden sheets and notes that they are', async () => {
    const { sheets } = await readFixture('ok/hidden-sheet.xlsx');
    expect(sheets.map(({ name, isHidden }) => [name, isHidden])).toEqual([
      ['Week 10', true],
      ['Week 11', false],
    ]);
  });

  it('decodes escaped and phonetic shared text, booleans and percentages', async () => {
    const cells = [
      '<c r="A1" t="inlineStr"><is><t>two_x000D_lines &amp; more</t></is></c>',
      '<c r="B1" t="b"><v>1</v></c>',
      '<c r="C1" s="1"><v>0.28</v></c>',
      '<c r="D1" t="str"><f>1</f><v></v></c>',
      '<c r="E1" t="s"><f>A1</f><v>0</v></c>',
    ];
    const styles = '<cellXfs><xf numFmtId="0"/><xf numFmtId="10"/></cellXfs>';
    const file = await readSheets({
      name: 'kinds.xlsx',
      bytes: packRawXlsx(`<row r="1">${cells.join('')}</row>`, { styles }),
    });
    expect(getCell(file, 'A1').value).toBe('two\rlines & more');
    expect(getCell(file, 'B1')).toMatchObject({ kind: 'boolean', value: true, text: 'TRUE' });
    expect(getCell(file, 'C1')).toMatchObject({ kind: 'number', value: 0.28, isPercent: true, text: '28%' });
    expect(() => getCell(file, 'D1')).toThrow('no cell D1');
    // A formula whose result points into the shared texts is no number, whatever the pointer.
    expect(getCell(file, 'E1').kind).toBe('formula-without-result');
  });

  it('reads CSV fields as text cells with their places', async () => {
    const file = await readFixture('ok/quoted.csv');
    expect(file).toMatchObject({ form: 'csv', separator: ',' });
    expect(file.sheets[0]).toMatchObject({ name: 'CSV', isHidden: false });
    expect(getCell(file, 'B2')).toMatchObject({ kind: 'text', value: 'Quill, Mara' });
    expect(getCell(file, 'I2').value).toBe('said "done";\nthen left');
    expect(getCell(file, 'I4').value).toBe('3/8" plate');
    expect((await readFixture('ok/semicolon-decimal-comma.csv')).separator).toBe(';');
    expect(getCell(await readFixture('ok/utf8-bom.csv'), 'A1').value).toBe('Date');
  });
});

it('tells how far it is', async () => {
  const told: ReadProgress[] = [];
  await readSheets(loadFixture('ok/two-weeks.xlsx'), (progress) => told.push(progress));
  expect(told.map(({ stage }) => stage)).toEqual(expect.arrayContaining(['unpack', 'parse', 'rows']));
  expect(told.every(({ done, total }) => done >= 0 && done <= total)).toBe(true);
  expect(told.at(-1)).toEqual({ stage: 'rows', done: 3, total: 3 });
});
