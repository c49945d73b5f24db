import { sql } from 'kysely';
import { createTimesheetShop, GOOD_ROWS, TODAY, toCsv, type TimesheetShop } from './testing/timesheet-shop';
import { undoImport } from './undo-import';

const FORMING = '2026-03-02,12,J-1041,FORM,,2,,,';

describe('undoImport', () => {
  let shop: TimesheetShop;
  beforeEach(async () => {
    shop = await createTimesheetShop();
  });
  afterEach(() => shop.close());

  const undo = (importId: string | null) => undoImport(shop.bookkeeper, { importId: importId ?? '' });

  const TOTALS = {
    cost_line: ['worked_on', 'source_id', 'category', 'quantity', 'rate', 'amount'],
    job_day: ['job_id', 'posted_on', 'category', 'hours', 'amount', 'lines'],
    machine_day: ['machine_id', 'posted_on', 'hours', 'earned', 'operator_labour', 'running'],
  };
  const listTotals = () =>
    shop.inShop(async (trx) => {
      const totals: Record<string, unknown[]> = {};
      for (const [table, columns] of Object.entries(TOTALS)) {
        const names = sql.join(columns.map((column) => sql.ref(column)));
        totals[table] = (
          await sql`select ${names} from ${sql.table(table)} order by ${names}`.execute(trx)
        ).rows;
      }
      return totals;
    });

  it('voids all entries of the import, says what it took back, and lets the file come again', async () => {
    await shop.take(toCsv([FORMING]));
    const before = await shop.listEntries();
    const { importId } = await shop.take(toCsv(GOOD_ROWS));
    expect(await undo(importId)).toEqual({ entriesVoided: 3, hoursVoided: '16.2500' });
    expect(await shop.listEntries()).toEqual(before);
    const again = await shop.take(toCsv(GOOD_ROWS));
    expect(again).toMatchObject({ entriesAdded: 3, alreadyThere: 0, alreadyImported: null });
  });

  it('gives every total back: cost lines, days of jobs and of machines', async () => {
    await shop.addOverheadRate({ validFrom: '2026-01-01', ratePerLabourHour: '18' });
    const rates = { machineHourRate: '34', chargeOutRate: '95', runningCostPerHour: '6.5' };
    await shop.addMachineRate({ machineId: shop.ids.press, validFrom: '2026-01-01', ...rates });
    await shop.take(toCsv([FORMING, '2026-03-03,14,J-1041,WELD,P2,3.3333,,,']));
    const before = await listTotals();
    for (const rows of Object.values(before)) expect(rows).not.toEqual([]);
    const { importId } = await shop.take(toCsv(GOOD_ROWS));
    expect(await listTotals()).not.toEqual(before);
    await undo(importId);
    expect(await listTotals()).toEqual(before);
  });

  it('leaves alone what was voided before', async () => {
    const { importId } = await shop.take(toCsv(GOOD_ROWS));
    await shop.inShop((trx) =>
      trx
        .updateTable('timeEntry')
        .set({ voidedAt: new Date(`${TODAY}T00:00:00Z`), voidedBy: 'Ivo' })
        .where('hours', '=', '8')
        .execute(),
    );
    expect(await undo(importId)).toEqual({ entriesVoided: 2, hoursVoided: '8.2500' });
    const voided = await shop.inShop((trx) => trx.selectFrom('timeEntry').select('voidedBy').execute());
    expect(voided.map(({ voidedBy }) => voidedBy).sort()).toEqual([
      'Ivo',
      'Test bookkeeper',
      'Test bookkeeper',
    ]);
  });

  it('refuses the second time, and an import that is not there or of another shop', async () => {
    const { importId } = await shop.take(toCsv(GOOD_ROWS));
    await undo(importId);
    await expect(undo(importId)).rejects.toMatchObject({ code: 'already_undone' });
    const other = await createTimesheetShop();
    const theirs = await other.take(toCsv(GOOD_ROWS));
    await expect(undo(theirs.importId)).rejects.toMatchObject({ code: 'import_not_found' });
    expect(await other.listEntries()).toHaveLength(3);
    await other.close();
  });

  it('undoes once of two at once', async () => {
    const { importId } = await shop.take(toCsv(GOOD_ROWS));
    const both = await Promise.allSettled([undo(importId), undo(importId)]);
    expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
  });
});
