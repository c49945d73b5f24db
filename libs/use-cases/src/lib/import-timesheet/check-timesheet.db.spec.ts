import { AppError, type TimesheetCheck, timesheetCheckSchema } from '@brakeven/contract';
import { checkTimesheet } from './check-timesheet';
import { createTimesheetShop, GOOD_ROWS, toCsv, type TimesheetShop } from './testing/timesheet-shop';
import { undoImport } from './undo-import';

const codes = ({ problems }: TimesheetCheck) =>
  problems.map(({ code, cell, severity }) => `${code} ${cell}${severity === 'warning' ? ' (warning)' : ''}`);

describe('checkTimesheet', () => {
  let shop: TimesheetShop;
  beforeEach(async () => {
    shop = await createTimesheetShop();
  });
  afterEach(() => shop.close());

  it('reads a timesheet, says what would go in, and writes nothing', async () => {
    const check = await shop.check(toCsv(GOOD_ROWS));
    expect(timesheetCheckSchema.parse(check)).toEqual(check);
    expect(check).toMatchObject({
      mappingFrom: 'recognised',
      missingFields: [],
      rowsRead: 3,
      entriesReady: 3,
      alreadyThere: 0,
      refused: 0,
      hoursRead: '16.2500',
      hoursReady: '16.2500',
      hoursRefused: '0.0000',
      refusedWithoutHours: 0,
      unusedColumns: [],
      unreadDates: null,
      firstDay: '2026-03-02',
      lastDay: '2026-03-03',
      byEmployee: [
        { employee: '12 · Dana Quill', entries: 2, hours: '8.2500' },
        { employee: '14 · Ivo Marsh', entries: 1, hours: '8.0000' },
      ],
      byDay: [
        { workedOn: '2026-03-02', entries: 2, hours: '15.5000' },
        { workedOn: '2026-03-03', entries: 1, hours: '0.7500' },
      ],
      problems: [],
      rowsNotShown: 0,
      alreadyImported: null,
    });
    expect(check.file.sha256).toMatch(/^[0-9a-f]{64}$/);
    expect(check.rows[0]?.cells.hours).toEqual({ address: 'F2', text: '7.5' });
    expect(await shop.listEntries()).toEqual([]);
    expect(await shop.inShop((trx) => trx.selectFrom('timesheetImport').selectAll().execute())).toEqual([]);
  });

  it('refuses each broken row by its cell, with all that is wrong with it, and keeps its hours in the sums', async () => {
    const check = await shop.check(
      toCsv([
        ...GOOD_ROWS,
        '2026-03-04,99,J-9,BEND,P9,2,,,',
        '2026-03-04,12,J-1041,FORM,,25,,,',
        '2026-03-04,12,J-1041,FORM,,-1,,,',
        '2026-03-09,12,J-1041,FORM,,1,,,',
        '2026-03-01,14,J-1041,WELD,,1,,,',
        '2026-03-04,12,J-1041,FORM,,eight,,,',
        '2026-03-04,12,J-1041,FORM,,1,-2,,',
        '2026-03-04,12,J-1041,FORM,,1,3000000000,,',
        ',12,J-1041,FORM,,1,,,',
      ]),
    );
    expect(codes(check)).toEqual([
      'employee_unknown B5',
      'job_unknown C5',
      'operation_unknown D5',
      'machine_unknown E5',
      'hours_over_24 F6',
      'hours_not_positive F7',
      'future_date A8',
      'before_first_rate A9',
      'hours_unreadable F10',
      'pieces_negative G11',
      'pieces_unreadable G12',
      'date_missing A13',
    ]);
    expect(check).toMatchObject({
      rowsRead: 12,
      entriesReady: 3,
      refused: 9,
      hoursRead: '47.2500',
      hoursReady: '16.2500',
      hoursRefused: '31.0000',
      refusedWithoutHours: 1,
    });
    expect(check.rows.filter(({ state }) => state === 'refused')).toHaveLength(9);
  });

  it('warns of a job that is not open, and lets the row in', async () => {
    const check = await shop.check(toCsv(['2026-03-02,12,J-1042,FORM,,1,,,']));
    expect(codes(check)).toEqual(['job_not_open C2 (warning)']);
    expect(check).toMatchObject({ entriesReady: 1, refused: 0 });
  });

  it('offers known names that nearly match, and takes the one chosen', async () => {
    const file = toCsv(['2026-03-02,D. Quil,J-1041,FORM,,1,,,']);
    const [problem] = (await shop.check(file)).problems;
    expect(problem?.alias).toEqual({
      kind: 'employee',
      spelling: 'D. Quil',
      offers: [{ targetId: shop.ids.dana, label: '12 · Dana Quill' }],
    });
    const aliases = [{ kind: 'employee', spelling: 'd.  quil', targetId: shop.ids.dana } as const];
    expect(await shop.check(file, { aliases })).toMatchObject({ entriesReady: 1, problems: [] });
    expect(await shop.check(file)).toMatchObject({ entriesReady: 0, refused: 1 });
  });

  it('refuses a chosen name that is not of this shop', async () => {
    const other = await createTimesheetShop();
    const aliases = [{ kind: 'employee', spelling: 'D. Quil', targetId: other.ids.dana } as const];
    const answer = shop.check(toCsv(GOOD_ROWS), { aliases });
    await expect(answer).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'aliases.0', code: 'alias_target_unknown' }],
    });
    await other.close();
  });

  it('refuses all rows of a day with more than 24 hours, those stored counted in', async () => {
    await shop.take(toCsv(['2026-03-02,12,J-1041,FORM,,10,,,']));
    const check = await shop.check(
      toCsv(['2026-03-02,12,J-1041,WELD,,8,,,', '2026-03-02,12,J-1041,WELD,P2,7,,,', GOOD_ROWS[1] ?? '']),
    );
    expect(codes(check)).toEqual(['day_over_24 F2', 'day_over_24 F3']);
    expect(check.problems[0]?.message).toContain('25.00 hours');
    expect(check).toMatchObject({ entriesReady: 1, refused: 2 });
  });

  it('counts a row that is already there only once towards its day', async () => {
    const rows = ['2026-03-02,12,J-1041,FORM,,10,,,', '2026-03-02,12,J-1041,WELD,,10,,,'];
    await shop.take(toCsv(rows));
    const check = await shop.check(toCsv([...rows, '2026-03-02,12,J-1041,FORM,P2,4,,,']));
    expect(check).toMatchObject({ alreadyThere: 2, entriesReady: 1, refused: 0, problems: [] });
  });

  it('warns when stored hours of the same work are not in the file, since both would count', async () => {
    await shop.take(toCsv(['2026-03-02,12,J-1041,FORM,,8,,,']));
    const check = await shop.check(toCsv(['2026-03-02,12,J-1041,FORM,,7.5,,,']));
    expect(codes(check)).toEqual(['may_correct_stored F2 (warning)']);
    const both = ['2026-03-02,12,J-1041,FORM,,8,,,', '2026-03-02,12,J-1041,FORM,,7.5,,,'];
    expect(await shop.check(toCsv(both))).toMatchObject({ alreadyThere: 1, entriesReady: 1, problems: [] });
  });

  it('warns when a row would bring back an entry that was voided by hand, not one whose import was undone', async () => {
    const rows = ['2026-03-02,12,J-1041,FORM,,2,,,', '2026-03-02,12,J-1041,FORM,,2,,,'];
    const { importId } = await shop.take(toCsv(rows));
    const [first] = await shop.inShop((trx) => trx.selectFrom('timeEntry').select('entryId').execute());
    await shop.inShop((trx) =>
      trx
        .updateTable('timeEntry')
        .set({ voidedAt: new Date(), voidedBy: 'Mara' })
        .where('entryId', '=', first?.entryId ?? '')
        .execute(),
    );
    const check = await shop.check(toCsv([...rows, ...GOOD_ROWS]));
    expect(codes(check)).toEqual(['was_voided F3 (warning)']);
    expect(check).toMatchObject({ alreadyThere: 1, entriesReady: 4 });
    await undoImport(shop.bookkeeper, { importId: importId ?? '' });
    expect(codes(await shop.check(toCsv(rows)))).toEqual([]);
  });

  it('ties the total at the foot out against all hours read', async () => {
    const agreeing = await shop.check(toCsv([...GOOD_ROWS, 'Total,,,,,16.25,,,']));
    expect(agreeing.controlTotal).toEqual({
      cell: 'F5',
      hours: '16.2500',
      agrees: true,
      difference: '0.0000',
    });
    const differing = await shop.check(toCsv([...GOOD_ROWS, 'Total,,,,,17.5,,,']));
    expect(differing.controlTotal).toMatchObject({ agrees: false, difference: '1.2500' });
    expect(codes(differing)).toEqual(['control_total_differs F5 (warning)']);
    expect(differing.rowsRead).toBe(3);
  });

  it('answers a header it cannot place with what it found, for mapping by hand', async () => {
    const file = toCsv(['2026-03-02,12,J-1041,FORM,7.5'], { header: 'Tag,Wer,Auftrag,Was,Zeit' });
    const check = await shop.check(file);
    expect(check).toMatchObject({ rowsRead: 0, entriesReady: 0, hoursRead: '0.0000' });
    expect(check.missingFields).toContain('hours');
    expect(codes(check)).toEqual(['mapping_incomplete A1']);
    expect(check.headerCells.map(({ column, text, sample }) => `${column} ${text} ${sample}`)).toEqual([
      'A Tag 2026-03-02',
      'B Wer 12',
      'C Auftrag J-1041',
      'D Was FORM',
      'E Zeit 7.5',
    ]);
    const columns = { date: 'A', employee: 'B', job: 'C', operation: 'D', hours: 'E' };
    const mapping = { sheet: 'CSV', headerRow: 1, columns, dateFormat: 'YYYY-MM-DD' } as const;
    expect(await shop.check(file, { mapping })).toMatchObject({ mappingFrom: 'chosen', entriesReady: 1 });
  });

  it('tells of a column that no field is read from, and no more once it is said what it is', async () => {
    const file = toCsv(['2026-03-02,12,J-1041,FORM,P2,7.5'], {
      header: 'Date,Employee,Job,Operation,Cell,Hours',
    });
    const check = await shop.check(file);
    expect(check).toMatchObject({ entriesReady: 1, problems: [] });
    expect(check.unusedColumns).toEqual([
      { column: 'E', text: 'Cell', samples: ['P2'], message: "Column E 'Cell' (P2) is not used." },
    ]);
    expect(check.mapping?.columns).not.toHaveProperty('machine');
    const mapping = check.mapping && {
      ...check.mapping,
      columns: { ...check.mapping.columns, machine: 'E' },
    };
    await shop.take(file, { mapping: mapping ?? undefined });
    expect(await shop.listEntries()).toEqual([expect.stringContaining(' FORM P2 7.5')]);
    expect(await shop.check(file)).toMatchObject({ mappingFrom: 'remembered', unusedColumns: [] });
  });

  it('offers the orders that read every text date, which then go in as declared', async () => {
    const file = toCsv(['02/03/2026,12,J-1041,FORM,,1,,,', '02/27/2026,12,J-1041,FORM,,2,,,']);
    const check = await shop.check(file);
    expect(codes(check)).toEqual(['date_unreadable A2', 'date_unreadable A3']);
    expect(check.unreadDates).toEqual({
      cells: ['A2', 'A3'],
      offers: [{ dateFormat: 'MM/DD/YYYY', text: '02/03/2026', date: '2026-02-03' }],
    });
    const mapping = check.mapping && { ...check.mapping, dateFormat: 'MM/DD/YYYY' as const };
    const settled = await shop.check(file, { mapping: mapping ?? undefined });
    expect(settled).toMatchObject({ unreadDates: null, problems: [], firstDay: '2026-02-03' });
  });

  it('answers a file without any header in words', async () => {
    const check = await shop.check({ name: 'a.csv', bytes: new TextEncoder().encode('1,2\n3,4\n') });
    expect(check).toMatchObject({ mapping: null, mappingFrom: null, headerCells: [], rowsRead: 0 });
    expect(codes(check)).toEqual(['header_not_found A1']);
    expect(check.missingFields).toEqual(['date', 'employee', 'job', 'operation', 'hours']);
  });

  it('says when there is nothing below the header', async () => {
    const check = await shop.check(toCsv([]));
    expect(codes(check)).toEqual(['no_entries A1 (warning)']);
  });

  it.each([
    ['a sheet that is not there', { sheet: 'Week 10', headerRow: 1, columns: {} }, 'mapping.sheet'],
    ['a header row that is blank', { sheet: 'CSV', headerRow: 90, columns: {} }, 'mapping.headerRow'],
    [
      'one column for two fields',
      { sheet: 'CSV', headerRow: 1, columns: { date: 'A', hours: 'A' } },
      'mapping.columns.hours',
    ],
  ])('refuses a chosen mapping with %s', async (_what, mapping, field) => {
    await expect(shop.check(toCsv(GOOD_ROWS), { mapping })).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field }],
    });
  });

  it('refuses a file that is no workbook in the words of the reader', async () => {
    const file = { name: 'week.xlsx', bytes: new Uint8Array([0x89, 0x50, 0x4e, 0x47, 0, 1, 2, 3]) };
    const answer = shop.check(file);
    await expect(answer).rejects.toBeInstanceOf(AppError);
    await expect(answer).rejects.toMatchObject({ code: 'file_refused', issues: [{ field: 'file' }] });
  });

  it('lists so many problems and then says how many more there are', async () => {
    const rows = Array.from({ length: 5_200 }, (_, n) => `2026-03-02,X${n},J-1041,FORM,,1,,,`);
    const check = await shop.check(toCsv(rows));
    expect(check).toMatchObject({ rowsRead: 5_200, refused: 5_200, hoursRefused: '5200.0000' });
    expect(check.problems).toHaveLength(5_001);
    expect(check.problems.at(-1)).toMatchObject({ code: 'more_problems', row: null });
    expect(check.rows).toHaveLength(5_000);
    expect(check.rowsNotShown).toBe(200);
  });

  it('shows rows with problems first and others up to the limit', async () => {
    const rows = Array.from(
      { length: 1_200 },
      (_, n) => `2026-02-0${(n % 9) + 1},12,J-1041,FORM,,0.0${n % 9}1,,,`,
    );
    const check = await shop.check(toCsv([...rows, '2026-03-02,X,J-1041,FORM,,1,,,']));
    expect(check.rows).toHaveLength(1_000);
    expect(check.rows[0]).toMatchObject({ row: 1_202, state: 'refused' });
    expect(check.rowsNotShown).toBe(201);
  });

  it('tells how far it is and lets other work through meanwhile', async () => {
    const stages: string[] = [];
    let turns = 0;
    const rows = Array.from({ length: 4_000 }, (_, n) => `2026-02-0${(n % 9) + 1},12,J-1041,FORM,,0.001,,,`);
    const counting = setInterval(() => (turns += 1), 0);
    const tools = { ...shop.tools, onProgress: ({ stage }: { stage: string }) => stages.push(stage) };
    await checkTimesheet(shop.bookkeeper, toCsv(rows), {}, tools);
    clearInterval(counting);
    expect([...new Set(stages)]).toEqual(['reading', 'checking', 'done']);
    expect(turns).toBeGreaterThan(6);
  });
});
