import { ENTRY_SORTS, type EntryListQuery, entryPageSchema, type TimeEntry } from '@brakeven/contract';
import { D, sum } from '@brakeven/values';
import { type ShopContext } from '../context';
import { getRollupStatus } from '../roll-up-costs/get-rollup-status';
import { runRollup } from '../roll-up-costs/run-rollup';
import { getJobCost } from '../show-jobs/job-costs';
import { createWorkedShop, WORKED_NOW, type WorkedShop } from '../testing/worked-shop';
import { getEntryChoices, getEntryTotals, listEntries } from './entries';
import { restoreEntry, voidEntry } from './void-entry';

jest.setTimeout(30_000);

/** The sort value of an entry as the page shows it. */
const SHOWN: Record<(typeof ENTRY_SORTS)[number], (entry: TimeEntry) => string | number | null> = {
  workedOn: (entry) => entry.workedOn,
  employee: (entry) => entry.employee,
  job: (entry) => entry.jobNumber,
  operation: (entry) => entry.operation,
  machine: (entry) => entry.machine,
  hours: (entry) => Number(entry.hours),
  goodPieces: (entry) => entry.goodPieces,
  scrapPieces: (entry) => entry.scrapPieces,
};

describe('the hours', () => {
  let shop: WorkedShop;
  let owner: ShopContext;

  beforeAll(async () => {
    shop = await createWorkedShop();
    owner = shop.context('owner', { now: WORKED_NOW });
  });
  afterAll(() => shop.close());

  async function listAll(query: Partial<EntryListQuery>, context = owner): Promise<TimeEntry[]> {
    const items: TimeEntry[] = [];
    let cursor: string | undefined;
    do {
      const page = entryPageSchema.parse(
        await listEntries(context, { sort: 'workedOn', direction: 'desc', limit: 13, ...query, cursor }),
      );
      items.push(...page.items);
      cursor = page.nextCursor ?? undefined;
    } while (cursor);
    return items;
  }

  it.each(ENTRY_SORTS)(
    'come page by page in the order of %s, each entry once, empty ones last',
    async (sort) => {
      const collator = new Intl.Collator('en');
      for (const direction of ['asc', 'desc'] as const) {
        const entries = await listAll({ sort, direction });
        expect(entries.map((entry) => entry.entryId).sort()).toEqual([...shop.entryIds].sort());
        const values = entries.map(SHOWN[sort]);
        const expected = [...values].sort((a, b) => {
          if (a === null || b === null) return Number(a === null) - Number(b === null);
          const order = typeof a === 'number' ? a - Number(b) : collator.compare(a, String(b));
          return direction === 'asc' ? order : -order;
        });
        expect(values).toEqual(expected);
      }
    },
  );

  it.each([
    ['a stretch of days', () => ({ from: '2026-03-09', to: '2026-03-31' })],
    ['an employee', () => ({ employeeId: shop.employees.ode })],
    ['a job', () => ({ jobId: shop.jobs.covers })],
    ['an operation', () => ({ operationId: shop.operations.weld })],
    ['a machine, given or by default', () => ({ machineId: shop.machines.press })],
    ['an import', () => ({ importId: shop.importId })],
    ['a search', () => ({ search: 'saw' })],
    ['a note', () => ({ search: 'the CRANE' })],
  ])('of %s add up to their totals', async (_words, makeFilter) => {
    const filter = makeFilter();
    const entries = await listAll(filter);
    expect(entries.length).toBeGreaterThan(0);
    expect(entries.length).toBeLessThan(90);
    expect(await getEntryTotals(owner, filter)).toEqual({
      entries: entries.length,
      hours: sum(entries.map((entry) => D(entry.hours))).toFixed(4),
      goodPieces: entries.reduce((pieces, entry) => pieces + (entry.goodPieces ?? 0), 0),
      scrapPieces: entries.reduce((pieces, entry) => pieces + (entry.scrapPieces ?? 0), 0),
    });
  });

  it('are filtered by what was asked for', async () => {
    const onPress = await listAll({ machineId: shop.machines.press });
    expect(new Set(onPress.map((entry) => entry.machine))).toEqual(new Set(['Press 2']));
    expect(new Set(onPress.map((entry) => entry.operation)).size).toBeGreaterThan(1);
    const found = await listAll({ search: 'trench' });
    expect(new Set(found.map((entry) => entry.jobNumber))).toEqual(new Set(['1043']));
    expect(await listAll({ search: '_' })).toEqual(await listAll({ jobId: shop.jobs.internal }));
  });

  it('name the cell that each imported row came from', async () => {
    const imported = await listAll({ importId: shop.importId });
    expect(imported).toHaveLength(45);
    for (const { source } of imported) {
      expect(source).toEqual({
        importId: shop.importId,
        fileName: 'march week 1.xlsx',
        sheet: 'Week 10',
        row: source?.row,
        cell: `F${source?.row}`,
      });
    }
  });

  it.each(['', 'x', 'eyJsaXN0IjoiZW50cmllcyJ9', Buffer.from('[1]').toString('base64url')])(
    'refuse the cursor %p',
    async (cursor) => {
      await expect(
        listEntries(owner, { sort: 'workedOn', direction: 'desc', limit: 5, cursor }),
      ).rejects.toMatchObject({ code: 'invalid_input', issues: [{ field: 'cursor' }] });
    },
  );

  it('refuse a cursor of another order', async () => {
    const { nextCursor } = await listEntries(owner, { sort: 'hours', direction: 'asc', limit: 5 });
    const other = { sort: 'employee', direction: 'asc', limit: 5, cursor: nextCursor ?? '' } as const;
    await expect(listEntries(owner, other)).rejects.toMatchObject({ issues: [{ field: 'cursor' }] });
  });

  it('of an operator are the own ones, whoever is asked for', async () => {
    const mara = shop.context('operator', { employeeId: shop.employees.mara });
    const own = await listAll({}, mara);
    expect(own).toHaveLength(30);
    expect(new Set(own.map((entry) => entry.employee))).toEqual(new Set(['Mara Lind']));
    expect(await listAll({ employeeId: shop.employees.wen }, mara)).toEqual([]);
    expect(await getEntryTotals(mara, {})).toMatchObject({ entries: 30 });
    expect(await getEntryTotals(mara, { employeeId: shop.employees.wen })).toMatchObject({ entries: 0 });
    expect((await getEntryChoices(mara)).employees).toEqual([
      { id: shop.employees.mara, label: 'Mara Lind' },
    ]);
  });

  it('of an operator without an employee are none', async () => {
    const nobody = shop.context('operator');
    expect(await listAll({}, nobody)).toEqual([]);
    expect(await getEntryTotals(nobody, {})).toEqual({
      entries: 0,
      hours: '0.0000',
      goodPieces: 0,
      scrapPieces: 0,
    });
    expect((await getEntryChoices(nobody)).employees).toEqual([]);
  });

  it('offer people, operations and machines in reading order', async () => {
    const choices = await getEntryChoices(shop.context('lead'));
    expect(choices.employees.map((choice) => choice.label)).toEqual(['Mara Lind', 'Ode Sorrel', 'wen Abara']);
    expect(choices.operations.map((choice) => choice.label)).toEqual(['Cut', 'Form', 'Weld']);
    expect(choices.machines.map((choice) => choice.label)).toEqual(['Cold saw', 'Press 2']);
  });
});

describe('voiding an entry', () => {
  let shop: WorkedShop;
  let bookkeeper: ShopContext;
  let entryId: string;

  beforeEach(async () => {
    shop = await createWorkedShop();
    bookkeeper = shop.context('bookkeeper', { now: WORKED_NOW });
    entryId = shop.entryIds[40] ?? '';
  });
  afterEach(() => shop.close());

  const readTrail = () =>
    shop.inShop((trx) =>
      trx
        .selectFrom('auditEvent')
        .select(['actor', 'action', 'subjectKind', 'after'])
        .where('subjectId', '=', entryId)
        .orderBy('eventId')
        .execute(),
    );

  it('takes it out of hours and costs; restoring it brings every figure back', async () => {
    const before = [await getEntryTotals(bookkeeper, {}), await getJobCost(bookkeeper, '1043')];
    await voidEntry(bookkeeper, { entryId });
    expect(await getRollupStatus(bookkeeper)).toMatchObject({ entriesWaiting: 1, daysWaiting: 1 });
    await runRollup(bookkeeper, {});
    expect(await getEntryTotals(bookkeeper, {})).toMatchObject({ entries: 89 });
    await restoreEntry(bookkeeper, { entryId });
    await runRollup(bookkeeper, {});
    expect([await getEntryTotals(bookkeeper, {}), await getJobCost(bookkeeper, '1043')]).toEqual(before);
  });

  it('is written down with who did it, once however often it is asked for', async () => {
    await voidEntry(bookkeeper, { entryId });
    await voidEntry(bookkeeper, { entryId });
    await restoreEntry(bookkeeper, { entryId });
    await restoreEntry(bookkeeper, { entryId });
    expect(await readTrail()).toMatchObject([
      { actor: 'Test bookkeeper', action: 'voided', subjectKind: 'time_entry', after: { isVoided: true } },
      { actor: 'Test bookkeeper', action: 'restored', after: { isVoided: false } },
    ]);
  });

  it('cannot be taken back once the whole import was undone', async () => {
    await voidEntry(bookkeeper, { entryId });
    await shop.inShop((trx) => trx.updateTable('timesheetImport').set({ status: 'undone' }).execute());
    await expect(restoreEntry(bookkeeper, { entryId })).rejects.toMatchObject({ code: 'conflict' });
    expect(await getEntryTotals(bookkeeper, {})).toMatchObject({ entries: 89 });
  });

  it('cannot be taken back when the day has no room for it', async () => {
    const { workedOn, employeeId, jobId, operationId, hours } = await shop.inShop((trx) =>
      trx.selectFrom('timeEntry').selectAll().where('entryId', '=', entryId).executeTakeFirstOrThrow(),
    );
    await voidEntry(bookkeeper, { entryId });
    const tooMuch = D(24.0001).minus(hours).toFixed(4);
    await shop.addEntries([{ workedOn, employeeId, jobId, operationId, hours: tooMuch }]);
    await expect(restoreEntry(bookkeeper, { entryId })).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('24.0001'),
    });
  });

  it('cannot be taken back once the same entry was added again, and can once that is voided', async () => {
    const same = await shop.inShop((trx) =>
      trx
        .selectFrom('timeEntry')
        .select(['workedOn', 'employeeId', 'jobId', 'operationId', 'machineId', 'hours'])
        .where('entryId', '=', entryId)
        .executeTakeFirstOrThrow(),
    );
    // Equal rows that are there all along replace nothing.
    const [twin] = await shop.addEntries([same]);
    await voidEntry(bookkeeper, { entryId });
    await restoreEntry(bookkeeper, { entryId });
    await voidEntry(bookkeeper, { entryId: twin ?? '' });
    await voidEntry(bookkeeper, { entryId });
    const importId = await shop.addImport({ fileName: 'again.xlsx', sheet: 'Week 11' });
    const [again] = await shop.addEntries([{ ...same, importId, sourceRow: 9, sourceCell: 'F9' }]);
    const entries = await getEntryTotals(bookkeeper, {});
    await expect(restoreEntry(bookkeeper, { entryId })).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining("from 'again.xlsx', sheet Week 11, cell F9"),
    });
    expect(await getEntryTotals(bookkeeper, {})).toEqual(entries);
    await voidEntry(bookkeeper, { entryId: again ?? '' });
    await restoreEntry(bookkeeper, { entryId });
    expect(await getEntryTotals(bookkeeper, {})).toMatchObject({
      entries: entries.entries,
      hours: entries.hours,
    });
  });

  it('does not find an entry that is not there', async () => {
    const nowhere = { entryId: '0198aaaa-0000-7000-8000-000000000abc' };
    await expect(voidEntry(bookkeeper, nowhere)).rejects.toMatchObject({ code: 'not_found' });
    await expect(restoreEntry(bookkeeper, nowhere)).rejects.toMatchObject({ code: 'not_found' });
  });
});
