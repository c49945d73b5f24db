import { timesheetImportDetailSchema, timesheetImportSchema } from '@brakeven/contract';
import { toLocalDate } from '@brakeven/values';
import { writeTimesheetWorkbook } from '@brakeven/workbook';
import {
  createTimesheetShop,
  GOOD_ROWS,
  toCsv,
  type TimesheetShop,
} from '../import-timesheet/testing/timesheet-shop';
import { undoImport } from '../import-timesheet/undo-import';
import { getImportFile } from './get-import-file';
import { getSheetExcerpt } from './get-sheet-excerpt';
import { getImport, listImports } from './list-imports';

const NOBODY = '01900000-0000-7000-8000-000000000000';

describe('the history of timesheets', () => {
  let shop: TimesheetShop;
  let other: TimesheetShop;
  beforeAll(async () => {
    shop = await createTimesheetShop();
    other = await createTimesheetShop();
  });
  afterAll(() => Promise.all([shop.close(), other.close()]));

  const take = async (file = toCsv(GOOD_ROWS), goodRows = false) =>
    (await shop.take(file, { goodRows })).importId ?? '';

  it('lists imports, latest first, with who undid which', async () => {
    const first = await take(toCsv(['2026-03-02,12,J-1041,FORM,,1,,,'], { name: 'first.csv' }));
    const second = await take(toCsv(GOOD_ROWS, { name: 'second.csv' }));
    await undoImport(shop.bookkeeper, { importId: second });
    const imports = await listImports(shop.bookkeeper);
    imports.forEach((one) => timesheetImportSchema.parse(one));
    expect(imports).toMatchObject([
      {
        importId: second,
        fileName: 'second.csv',
        status: 'undone',
        undoneBy: 'Test bookkeeper',
        entriesAdded: 3,
      },
      { importId: first, fileName: 'first.csv', status: 'committed', undoneBy: null, undoneAt: null },
    ]);
    expect(await listImports(other.bookkeeper)).toEqual([]);
  });

  it('keeps what was refused with the import', async () => {
    const importId = await take(
      toCsv(['2026-03-03,99,J-1041,FORM,,1,,,', '2026-03-03,12,J-1041,FORM,,3,,,']),
      true,
    );
    const detail = await getImport(shop.bookkeeper, { importId });
    expect(timesheetImportDetailSchema.parse(detail)).toEqual(detail);
    expect(detail).toMatchObject({
      refused: 1,
      hoursRead: '4.0000',
      hoursAdded: '3.0000',
      problems: [{ code: 'employee_unknown', cell: 'B2' }],
    });
  });

  it('gives the file back byte for byte', async () => {
    const file = toCsv(['2026-03-04,12,J-1041,FORM,,3,,,'], { name: 'café.csv' });
    const kept = await getImportFile(shop.bookkeeper, { importId: await take(file) });
    expect(kept).toMatchObject({ fileName: 'café.csv', mediaType: 'text/csv' });
    expect(Buffer.from(kept.bytes).equals(Buffer.from(file.bytes))).toBe(true);
  });

  it('shows the rows around a row with the header, dates as dates', async () => {
    const rows = Array.from({ length: 12 }, (_, n) => ({
      workedOn: toLocalDate(`2026-01-${10 + n}`),
      employee: 12,
      job: 'J-1041',
      operation: 'FORM',
      machine: null,
      hours: '7.5000',
      good: null,
      scrap: null,
      note: n === 8 ? 'late' : null,
    }));
    const bytes = await writeTimesheetWorkbook({ title: 'Week 3', sheetName: 'Hours', rows });
    const imported = await shop.take({ name: 'week.xlsx', bytes });
    const headerRow = imported.mapping?.headerRow ?? 0;
    const importId = imported.importId ?? '';
    const excerpt = await getSheetExcerpt(
      shop.bookkeeper,
      { importId, sheet: 'Hours', row: headerRow + 9 },
      shop.tools,
    );
    expect(excerpt).toMatchObject({ fileName: 'week.xlsx', sheet: 'Hours' });
    expect(excerpt.rows.map(({ row }) => row - headerRow)).toEqual([0, 5, 6, 7, 8, 9, 10, 11, 12, 13]);
    expect(excerpt.rows[0]?.cells[0]).toEqual({ address: `A${headerRow}`, text: 'Date' });
    const row = excerpt.rows.find((one) => one.row === headerRow + 9);
    expect(row?.cells.map(({ text }) => text)).toEqual([
      '2026-01-18',
      '12',
      'J-1041',
      'FORM',
      '',
      '7.5',
      '',
      '',
      'late',
    ]);
    expect(excerpt.columns).toEqual([...'ABCDEFGHI']);
    expect((await getImportFile(shop.bookkeeper, { importId })).mediaType).toContain('spreadsheetml');
  });

  it('refuses what is not there, and what another shop has', async () => {
    const importId = await take(toCsv(['2026-03-05,12,J-1041,FORM,,2,,,']));
    for (const [context, id] of [
      [shop.bookkeeper, NOBODY],
      [other.bookkeeper, importId],
    ] as const) {
      const refusal = { code: 'import_not_found' };
      await expect(getImport(context, { importId: id })).rejects.toMatchObject(refusal);
      await expect(getImportFile(context, { importId: id })).rejects.toMatchObject(refusal);
      const place = { importId: id, sheet: 'CSV', row: 2 };
      await expect(getSheetExcerpt(context, place, shop.tools)).rejects.toMatchObject(refusal);
    }
    const nowhere = { importId, sheet: 'Week 9', row: 2 };
    await expect(getSheetExcerpt(shop.bookkeeper, nowhere, shop.tools)).rejects.toMatchObject({
      code: 'not_found',
    });
  });
});
