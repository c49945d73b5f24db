import { AppError, timesheetImportedSchema } from '@brakeven/contract';
import { toLocalDate } from '@brakeven/values';
import { writeTimesheetWorkbook } from '@brakeven/workbook';
import { importTimesheet } from './import-timesheet';
import { createTimesheetShop, GOOD_ROWS, toCsv, type TimesheetShop } from './testing/timesheet-shop';
import { type UploadTools } from './upload';

const LINE = {
  workedOn: toLocalDate('2026-03-02'),
  employee: 12,
  job: 'J-1041',
  operation: 'FORM',
  machine: 'P2',
  hours: '7.5000',
  good: 40,
  scrap: null,
  note: null,
};
const FORMING = '2026-03-02,12,J-1041,FORM,,2,,,';

describe('importTimesheet', () => {
  let shop: TimesheetShop;
  beforeEach(async () => {
    shop = await createTimesheetShop();
  });
  afterEach(() => shop.close());

  const listImports = () =>
    shop.inShop((trx) => trx.selectFrom('timesheetImport').selectAll().orderBy('importId').execute());
  const countRows = async (table: 'timesheetFile' | 'nameAlias' | 'savedMapping') =>
    (await shop.inShop((trx) => trx.selectFrom(table).select('shopId').execute())).length;

  it('takes rows of a closed month, warned of, and has them posted late', async () => {
    await shop.addOverheadRate({ validFrom: '2025-01-01', ratePerLabourHour: '10' });
    await shop.addMonthClose('2026-02-01');
    const early = '2026-02-27,12,J-1041,WELD,,8,,,';
    const file = toCsv([
      '2026-02-26,99,J-1041,WELD,,8,,,',
      early,
      '2026-02-26,12,J-1041,WELD,,4.5,,,',
      ...GOOD_ROWS,
    ]);
    const check = await shop.check(file);
    expect(check).toMatchObject({ entriesReady: 5, refused: 1 });
    expect(check.problems[0]).toMatchObject({
      code: 'posted_late',
      severity: 'warning',
      cell: 'A3',
      row: null,
      message: expect.stringContaining('2 rows (12.50 h) are dated in a closed month'),
    });
    expect(check.problems[0]?.message).toContain('posted on Mar 1, 2026, late');
    await shop.take(file, { goodRows: true });
    const late = await shop.inShop((trx) =>
      trx
        .selectFrom('costLine')
        .select(['postedOn', 'workedOn', 'quantity'])
        .where('category', '=', 'labour')
        .whereRef('postedOn', '<>', 'workedOn')
        .orderBy('workedOn')
        .execute(),
    );
    expect(late).toEqual([
      { postedOn: '2026-03-01', workedOn: '2026-02-26', quantity: '4.5000' },
      { postedOn: '2026-03-01', workedOn: '2026-02-27', quantity: '8.0000' },
    ]);
    expect((await shop.check(toCsv([early]))).problems).toEqual([]);
  });

  it('writes the entries with file, row and cell, and keeps the file as it came', async () => {
    const file = toCsv(GOOD_ROWS);
    const imported = await shop.take(file);
    expect(timesheetImportedSchema.parse(imported)).toEqual(imported);
    expect(imported).toMatchObject({ entriesAdded: 3, hoursAdded: '16.2500', alreadyThere: 0, refused: 0 });
    expect(await shop.listEntries()).toEqual([
      '2026-03-02 12 J-1041 FORM P2 7.5000',
      '2026-03-02 14 J-1041 WELD - 8.0000',
      '2026-03-03 12 J-1041 FORM P2 0.7500',
    ]);
    const entries = await shop.inShop((trx) =>
      trx
        .selectFrom('timeEntry')
        .select(['importId', 'sourceRow', 'sourceCell', 'goodPieces', 'scrapPieces', 'note'])
        .orderBy('sourceRow')
        .execute(),
    );
    const { importId } = imported;
    expect(entries).toEqual([
      { importId, sourceRow: 2, sourceCell: 'F2', goodPieces: 40, scrapPieces: 1, note: 'first run' },
      { importId, sourceRow: 3, sourceCell: 'F3', goodPieces: null, scrapPieces: null, note: null },
      { importId, sourceRow: 4, sourceCell: 'F4', goodPieces: 3, scrapPieces: null, note: null },
    ]);
    expect(await listImports()).toMatchObject([
      {
        importId,
        fileName: 'week.csv',
        sheet: 'CSV',
        status: 'committed',
        importedBy: 'Test bookkeeper',
        rowsRead: 3,
        entriesAdded: 3,
        hoursAdded: '16.2500',
        firstDay: '2026-03-02',
        lastDay: '2026-03-03',
        problems: [],
      },
    ]);
    const [kept] = await shop.inShop((trx) => trx.selectFrom('timesheetFile').selectAll().execute());
    expect(kept?.content.equals(Buffer.from(file.bytes))).toBe(true);
  });

  it('reads a real workbook the same', async () => {
    const bytes = await writeTimesheetWorkbook({ title: 'Week 10', rows: [LINE] });
    const imported = await shop.take({ name: 'week.xlsx', bytes });
    expect(imported).toMatchObject({ entriesAdded: 1, hoursAdded: '7.5000', problems: [] });
    expect(imported.controlTotal).toMatchObject({ hours: '7.5000', agrees: true });
  });

  it('adds nothing the second time, and says when the file was imported', async () => {
    const first = await shop.take(toCsv(GOOD_ROWS));
    const second = await shop.take(toCsv(GOOD_ROWS, { name: 'copy.csv' }));
    expect(second).toMatchObject({
      importId: null,
      entriesAdded: 0,
      hoursAdded: '0.0000',
      alreadyThere: 3,
      hoursAlreadyThere: '16.2500',
      alreadyImported: { importId: first.importId, importedBy: 'Test bookkeeper' },
    });
    expect(await shop.listEntries()).toHaveLength(3);
    expect(await listImports()).toHaveLength(1);
  });

  it('adds of a longer file only what is new', async () => {
    await shop.take(toCsv(GOOD_ROWS));
    const longer = await shop.take(toCsv([...GOOD_ROWS, FORMING]));
    expect(longer).toMatchObject({
      entriesAdded: 1,
      alreadyThere: 3,
      hoursAdded: '2.0000',
      alreadyImported: null,
    });
    expect(await shop.listEntries()).toHaveLength(4);
  });

  it('knows two equal rows for two entries, and the third of them for a new one', async () => {
    await shop.take(toCsv([FORMING, FORMING]));
    const again = await shop.take(toCsv([FORMING, FORMING, FORMING]));
    expect(again).toMatchObject({ entriesAdded: 1, alreadyThere: 2 });
    expect(await shop.listEntries()).toHaveLength(3);
  });

  it('takes the same work in another spelling for the same work', async () => {
    await shop.take(toCsv([FORMING]));
    const again = await shop.take(toCsv(['2026-03-02,dana quill,j-1041,forming,,2:00,,,']));
    expect(again).toMatchObject({ entriesAdded: 0, alreadyThere: 1 });
  });

  it('writes nothing at all when a row is refused, and hands the check over', async () => {
    const bad = '2026-03-02,99,J-1041,FORM,,2,,,';
    const aliases = [{ kind: 'job', spelling: 'trench', targetId: shop.ids.job1041 } as const];
    const answer = shop.take(toCsv([...GOOD_ROWS, bad]), { aliases });
    await expect(answer).rejects.toBeInstanceOf(AppError);
    await expect(answer).rejects.toMatchObject({
      code: 'rows_refused',
      issues: [{ field: 'CSV!B5', code: 'employee_unknown' }],
      details: { rowsRead: 4, entriesReady: 3, refused: 1 },
    });
    expect(await shop.listEntries()).toEqual([]);
    expect(await listImports()).toEqual([]);
    expect(await countRows('nameAlias')).toBe(0);
  });

  it('imports the good rows without the refused ones when asked, and the rest once they are put right', async () => {
    const good = await shop.take(toCsv([...GOOD_ROWS, '2026-03-02,99,J-1041,FORM,,2,,,']), {
      goodRows: true,
    });
    expect(good).toMatchObject({ entriesAdded: 3, refused: 1, hoursRead: '18.2500', hoursRefused: '2.0000' });
    const corrected = await shop.take(toCsv([...GOOD_ROWS, FORMING]));
    expect(corrected).toMatchObject({ entriesAdded: 1, alreadyThere: 3, hoursAdded: '2.0000' });
  });

  it('takes in a file it knows once an alias makes refused rows good', async () => {
    const file = toCsv([FORMING, '2026-03-02,D. Quil,J-1041,WELD,,1,,,']);
    await shop.take(file, { goodRows: true });
    const aliases = [{ kind: 'employee', spelling: 'D. Quil', targetId: shop.ids.dana } as const];
    const again = await shop.take(file, { aliases });
    expect(again).toMatchObject({ entriesAdded: 1, alreadyThere: 1, refused: 0 });
    expect(again.alreadyImported).not.toBeNull();
    expect(await listImports()).toHaveLength(2);
  });

  it('remembers a chosen spelling, and another choice in its place, for this shop alone', async () => {
    const file = (hours: string) => toCsv([`2026-03-02,The New One,J-1041,FORM,,${hours},,,`]);
    const choose = (targetId: string) => ({
      aliases: [{ kind: 'employee', spelling: 'The New One', targetId } as const],
    });
    await shop.take(file('1'), choose(shop.ids.dana));
    await shop.take(file('2'));
    await shop.take(file('3'), choose(shop.ids.ivo));
    await shop.take(file('4'));
    expect((await shop.listEntries()).map((entry) => entry.split(' ')[1])).toEqual(['12', '12', '14', '14']);
    expect(await countRows('nameAlias')).toBe(1);
    const other = await createTimesheetShop();
    await expect(other.take(file('1'))).rejects.toMatchObject({ code: 'rows_refused' });
    await other.close();
  });

  it('remembers a chosen mapping for the same header, wherever it stands, for this shop alone', async () => {
    const header = 'Tag,Wer,Auftrag,Was,Zeit';
    const columns = { date: 'A', employee: 'B', job: 'C', operation: 'D', hours: 'E' };
    const mapping = { sheet: 'CSV', headerRow: 1, columns, dateFormat: 'DD.MM.YYYY' } as const;
    await shop.take(toCsv(['02.03.2026,12,J-1041,FORM,1'], { header }), { mapping });
    const next = toCsv(['tag,WER,Auftrag,Was,Zeit', '03.03.2026,12,J-1041,FORM,1'], { header: 'Woche 10' });
    const imported = await shop.take(next);
    expect(imported).toMatchObject({
      mappingFrom: 'remembered',
      entriesAdded: 1,
      mapping: { headerRow: 2, columns },
    });
    const other = await createTimesheetShop();
    await expect(other.take(next)).rejects.toMatchObject({ code: 'mapping_incomplete' });
    await other.close();
  });

  it('does not remember what the header words say by themselves', async () => {
    await shop.take(toCsv(GOOD_ROWS));
    expect(await countRows('savedMapping')).toBe(0);
  });

  it('asks for the columns it could not find', async () => {
    const answer = shop.take(toCsv(['2026-03-02,12,J-1041,FORM'], { header: 'Date,Employee,Job,Operation' }));
    await expect(answer).rejects.toMatchObject({
      code: 'mapping_incomplete',
      issues: [{ field: 'mapping.columns.hours' }],
      details: { missingFields: ['hours'] },
    });
  });

  it('leaves nothing behind when it is stopped in the middle', async () => {
    const rows = Array.from(
      { length: 1_500 },
      (_, n) => `2026-02-${10 + (n % 9)},12,J-1041,FORM,,0.00${n % 9}1,,,`,
    );
    const tools = {
      ...shop.tools,
      onProgress: ({ stage, done }: { stage: string; done: number }) => {
        if (stage === 'writing' && done === 1_000) throw new Error('the plug is pulled');
      },
    };
    const mapping = {
      sheet: 'CSV',
      headerRow: 1,
      columns: { date: 'A', employee: 'B', job: 'C', operation: 'D', hours: 'F' },
      dateFormat: 'YYYY-MM-DD',
    } as const;
    const aliases = [{ kind: 'job', spelling: 'trench', targetId: shop.ids.job1041 } as const];
    const answer = importTimesheet(shop.bookkeeper, toCsv(rows), { mapping, aliases }, tools);
    await expect(answer).rejects.toThrow('the plug is pulled');
    expect(await shop.listEntries()).toEqual([]);
    expect(await listImports()).toEqual([]);
    expect(
      await Promise.all((['timesheetFile', 'nameAlias', 'savedMapping'] as const).map(countRows)),
    ).toEqual([0, 0, 0]);
    expect(await shop.take(toCsv(rows))).toMatchObject({ entriesAdded: 1_500 });
  });

  it('makes one of two equal imports at once', async () => {
    const both = await Promise.all([shop.take(toCsv(GOOD_ROWS)), shop.take(toCsv(GOOD_ROWS))]);
    expect(both.map(({ entriesAdded }) => entriesAdded).sort()).toEqual([0, 3]);
    expect(await shop.listEntries()).toHaveLength(3);
    expect(await listImports()).toHaveLength(1);
  });

  it('keeps texts that a database cannot hold as they are', async () => {
    // A workbook writes the character 0 as _x0000_, which our own writer, rightly, never makes.
    const readSheets: UploadTools['reader']['readSheets'] = async (file) =>
      JSON.parse(JSON.stringify(await shop.tools.reader.readSheets(file)).replaceAll('~', '\\u0000'));
    const file = toCsv(['2026-03-02,12,J-1041,FORM,,1,,,a~b'], { name: 'we\0ek.csv' });
    const imported = await importTimesheet(shop.bookkeeper, file, {}, { reader: { readSheets } });
    expect(imported.entriesAdded).toBe(1);
    const [entry] = await shop.inShop((trx) => trx.selectFrom('timeEntry').select('note').execute());
    expect(entry?.note).toBe('a\uFFFDb');
    expect((await listImports())[0]?.fileName).toBe('we\uFFFDek.csv');
  });

  it('writes who imported and what into the audit trail', async () => {
    const { importId } = await shop.take(toCsv(GOOD_ROWS));
    const events = await shop.inShop((trx) =>
      trx
        .selectFrom('auditEvent')
        .select(['actor', 'action'])
        .where('subjectKind', '=', 'timesheet_import')
        .where('subjectId', '=', importId ?? '')
        .execute(),
    );
    expect(events).toEqual([{ actor: 'Test bookkeeper', action: 'added' }]);
  });

  it('stands when the costs cannot be rolled up afterwards, and says so', async () => {
    const failures: unknown[] = [];
    const nowhere = { ...shop.bookkeeper, shop: { ...shop.bookkeeper.shop } };
    const tools = {
      ...shop.tools,
      onProgress: ({ stage }: { stage: string }) => {
        if (stage === 'rolling-up') nowhere.shop.timeZone = 'Nowhere/Land';
      },
      onRollupFailed: (error: unknown) => failures.push(error),
    };
    expect(await importTimesheet(nowhere, toCsv(GOOD_ROWS), {}, tools)).toMatchObject({ entriesAdded: 3 });
    expect(failures).toHaveLength(1);
    expect(await shop.listEntries()).toHaveLength(3);
    const dirty = await shop.inShop((trx) => trx.selectFrom('dirtyDay').select('workedOn').execute());
    expect(dirty).toHaveLength(2);
  });
});
