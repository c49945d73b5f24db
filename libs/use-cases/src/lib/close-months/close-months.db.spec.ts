import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { runRollup } from '../roll-up-costs/run-rollup';
import { closeMonth, reopenMonth } from './close-month';
import { getMonth } from './month-end';
import { listMonths } from './month-states';
import { reviewRefusals, savePayrollHours } from './payroll-hours';

let shop: TestShop;
let ids: { employeeId: string; jobId: string; operationId: string };
beforeEach(async () => {
  shop = await createTestShop();
  ids = {
    employeeId: await shop.addEmployee({ name: 'Ilse Marr' }),
    jobId: await shop.addJob({ number: 'J-1' }),
    operationId: await shop.addOperation(),
  };
  await shop.addPayRate({ employeeId: ids.employeeId, validFrom: '2026-01-01', wagePerHour: '30' });
  await shop.addOverheadRate({ validFrom: '2026-01-01', ratePerLabourHour: '10' });
});
afterEach(() => shop.close());

const now = () => new Date('2026-03-10T18:00:00Z');
const context = (role: 'owner' | 'bookkeeper' = 'bookkeeper') => shop.context(role, { now });
const work = (workedOn: string, hours = '8') => shop.addEntries([{ ...ids, workedOn, hours }]);
const linesOf = (to: string) =>
  shop.inShop((trx) =>
    trx
      .selectFrom('costLine')
      .selectAll()
      .where('postedOn', '<=', to)
      .orderBy('postedOn')
      .orderBy('sourceId')
      .orderBy('category')
      .execute(),
  );

describe('the months of a shop', () => {
  it('begin with the first that has hours and end with the one that is running', async () => {
    expect((await listMonths(context())).months).toMatchObject([{ month: '2026-03', state: 'running' }]);
    await work('2026-01-15');
    expect(await listMonths(context())).toMatchObject({
      closedThrough: null,
      latePostedOn: null,
      months: [
        { month: '2026-03', state: 'running', isNext: false },
        { month: '2026-02', state: 'open', isNext: false },
        { month: '2026-01', state: 'open', isNext: true },
      ],
      closings: [],
    });
  });

  it('are closed in order, once they are over', async () => {
    await work('2026-01-15');
    await expect(closeMonth(context(), { month: '2026-02' })).rejects.toMatchObject({
      code: 'month_refused',
      issues: [
        { code: 'not_next', message: expect.stringContaining('January 2026') },
        { code: 'rollup_behind' },
      ],
    });
    await closeMonth(context(), { month: '2026-01' });
    await closeMonth(context(), { month: '2026-02' });
    await expect(closeMonth(context(), { month: '2026-03' })).rejects.toMatchObject({
      code: 'month_refused',
      issues: [{ code: 'running' }],
    });
    await expect(closeMonth(context(), { month: '2026-02' })).rejects.toMatchObject({
      issues: [{ code: 'closed' }],
    });
    const { closedThrough, latePostedOn, closings } = await listMonths(context());
    expect([closedThrough, latePostedOn]).toEqual(['2026-02-28', '2026-03-01']);
    expect(closings).toMatchObject([
      { month: '2026-02', closedBy: 'Test bookkeeper', reopenedAt: null },
      { month: '2026-01' },
    ]);
  });

  it('are refused by name where there is none', async () => {
    await expect(getMonth(context(), { month: '2026-04' })).rejects.toMatchObject({ code: 'not_found' });
    await expect(getMonth(context(), { month: '2026-13' })).rejects.toMatchObject({ code: 'invalid_input' });
    await expect(getMonth(context(), { month: '2025-12' })).rejects.toMatchObject({ code: 'not_found' });
  });
});

describe('closing a month', () => {
  it('rolls up first, and then keeps its lines whatever comes later', async () => {
    await work('2026-01-15');
    const closed = await closeMonth(context(), { month: '2026-01' });
    expect(closed).toMatchObject({ state: 'closed', closedBy: 'Test bookkeeper', isLatestClosed: true });
    expect(closed.totals).toMatchObject([
      { category: 'labour', amount: '240.00', late: '0.00' },
      { category: 'overhead', amount: '80.00' },
    ]);
    const before = await linesOf('2026-01-31');
    await shop.inShop((trx) => trx.updateTable('payRate').set({ wagePerHour: '99' }).execute());
    await work('2026-01-16', '4');
    await runRollup(context(), { full: true });
    expect(await linesOf('2026-01-31')).toEqual(before);
    const february = await getMonth(context(), { month: '2026-02' });
    expect(february.lateIn).toMatchObject([
      {
        postedOn: '2026-02-01',
        workedOn: '2026-01-16',
        category: 'labour',
        amount: '396.00',
        label: 'Ilse Marr',
      },
      { category: 'overhead', amount: '40.00' },
    ]);
    expect(february.totals).toMatchObject([
      { category: 'labour', amount: '396.00', late: '396.00' },
      { category: 'overhead', amount: '40.00', late: '40.00' },
    ]);
    const january = await getMonth(context(), { month: '2026-01' });
    expect(january.lateOutCount).toBe(2);
    expect(january.totals).toEqual(closed.totals);
  });

  it('is refused while entries lack a rate, and a rate of 0 is a rate', async () => {
    const machineId = await shop.addMachine({ name: 'Press 2' });
    await shop.addEntries([{ ...ids, machineId, workedOn: '2026-01-15', hours: '8' }]);
    await expect(closeMonth(context(), { month: '2026-01' })).rejects.toMatchObject({
      code: 'month_refused',
      issues: [{ code: 'rates_missing', message: expect.stringContaining('Press 2') }],
    });
    expect((await listMonths(context())).closedThrough).toBeNull();
    await shop.addMachineRate({
      machineId,
      validFrom: '2026-01-01',
      machineHourRate: '0',
      chargeOutRate: '0',
      runningCostPerHour: '0',
    });
    expect(await closeMonth(context(), { month: '2026-01' })).toMatchObject({ state: 'closed' });
  });

  it('waits for nobody twice: of two at once one is told that the month is closed', async () => {
    await work('2026-01-15');
    const closings = await Promise.allSettled([
      closeMonth(context(), { month: '2026-01' }),
      closeMonth(context(), { month: '2026-01' }),
    ]);
    expect(closings.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    expect((await listMonths(context())).closings).toHaveLength(1);
  });
});

describe('reopening a month', () => {
  it('takes the latest only, keeps the reason, and puts late lines back on their days', async () => {
    await work('2026-01-15');
    await work('2026-02-05');
    await closeMonth(context(), { month: '2026-01' });
    await closeMonth(context(), { month: '2026-02' });
    await work('2026-02-06', '4');
    await runRollup(context(), {});
    expect((await getMonth(context(), { month: '2026-03' })).lateInCount).toBe(2);
    const reopen = (month: string) =>
      reopenMonth(context('owner'), { month }, { reason: 'A week was missing' });
    await expect(reopen('2026-01')).rejects.toMatchObject({
      code: 'month_refused',
      issues: [{ code: 'not_latest', message: expect.stringContaining('February 2026') }],
    });
    const february = await reopen('2026-02');
    expect(february).toMatchObject({ state: 'open', isNext: true, lateOutCount: 0 });
    expect(february.totals).toMatchObject([{ category: 'labour', amount: '360.00', late: '0.00' }, {}]);
    expect((await getMonth(context(), { month: '2026-03' })).lateInCount).toBe(0);
    expect((await listMonths(context())).closings[0]).toMatchObject({
      month: '2026-02',
      reopenedBy: 'Test owner',
      reopenReason: 'A week was missing',
    });
    expect(await closeMonth(context(), { month: '2026-02' })).toMatchObject({ state: 'closed' });
  });

  it('is refused while none is closed', async () => {
    await work('2026-01-15');
    const reopen = reopenMonth(context('owner'), { month: '2026-01' }, { reason: 'Try' });
    await expect(reopen).rejects.toMatchObject({ code: 'month_refused' });
  });
});

describe('the checklist of a month', () => {
  it('lists weekdays without hours of those who are active and have a wage by then', async () => {
    const late = await shop.addEmployee({ name: 'Pia Strand' });
    await shop.addPayRate({ employeeId: late, validFrom: '2026-01-29', wagePerHour: '20' });
    await shop.addEmployee({ name: 'Without a wage' });
    const gone = await shop.addEmployee({ name: 'Gone', isActive: false });
    await shop.addPayRate({ employeeId: gone, validFrom: '2026-01-01', wagePerHour: '20' });
    const [voided] = await work('2026-01-30');
    await work('2026-01-29');
    await shop.inShop((trx) =>
      trx
        .updateTable('timeEntry')
        .set({ voidedAt: new Date(), voidedBy: 'Test' })
        .where('entryId', '=', voided ?? '')
        .execute(),
    );
    const { missingTimesheets } = (await getMonth(context(), { month: '2026-01' })).checklist;
    expect(missingTimesheets.map(({ employee, days }) => [employee, days.length, days.at(-1)])).toEqual([
      ['Ilse Marr', 21, '2026-01-30'],
      ['Pia Strand', 2, '2026-01-30'],
    ]);
    const running = (await getMonth(context(), { month: '2026-03' })).checklist.missingTimesheets;
    expect(running[0]?.days).toEqual([
      '2026-03-02',
      '2026-03-03',
      '2026-03-04',
      '2026-03-05',
      '2026-03-06',
      '2026-03-09',
    ]);
  });

  it('lists refusals until somebody has looked at them, and who did', async () => {
    await work('2026-01-15');
    const importId = await shop.addImport({
      fileName: 'week-3.xlsx',
      refused: 2,
      firstDay: '2026-01-12',
      lastDay: '2026-01-16',
    });
    const refusals = async () => (await getMonth(context(), { month: '2026-01' })).checklist.refusals;
    expect(await refusals()).toMatchObject([{ importId, refused: 2, reviewedAt: null, reviewedBy: null }]);
    await reviewRefusals(context(), { importId }, { isReviewed: true });
    expect(await refusals()).toMatchObject([{ reviewedBy: 'Test bookkeeper' }]);
    await reviewRefusals(context(), { importId }, { isReviewed: false });
    expect(await refusals()).toMatchObject([{ reviewedAt: null }]);
    await expect(
      reviewRefusals(context(), { importId: shop.shop.shopId }, { isReviewed: true }),
    ).rejects.toMatchObject({ code: 'import_not_found' });
  });

  it('lists finished jobs with cost and without an invoice', async () => {
    await work('2026-01-15');
    await runRollup(context(), {});
    const jobs = async () => (await getMonth(context(), { month: '2026-01' })).checklist.uninvoicedJobs;
    expect(await jobs()).toEqual([]);
    await shop.inShop((trx) => trx.updateTable('job').set({ status: 'finished' }).execute());
    expect(await jobs()).toMatchObject([{ number: 'J-1', cost: '320.00', status: 'finished' }]);
    await shop.addInvoice({ jobId: ids.jobId, number: '1', invoicedOn: '2026-02-01', amount: '500' });
    expect(await jobs()).toEqual([]);
  });
});

describe('the hours of a month', () => {
  it('tie out with the cost lines and with payroll, the overtime of a week counting where its hours are', async () => {
    // Mon 26 Jan to Fri 30 Jan 10 h each, Sun 1 Feb 10 h: a week of 60, 20 above 40, of which 50/60 in January.
    for (const day of ['26', '27', '28', '29', '30']) await work(`2026-01-${day}`, '10');
    await work('2026-02-01', '10');
    await runRollup(context(), {});
    const tieOut = async (month: string) => (await getMonth(context(), { month })).tieOut;
    expect(await tieOut('2026-01')).toEqual([
      {
        employeeId: ids.employeeId,
        employee: 'Ilse Marr',
        hours: '50.0000',
        overtimeHours: '16.6667',
        costedHours: '50.0000',
        payrollHours: null,
        difference: null,
      },
    ]);
    expect(await tieOut('2026-02')).toMatchObject([{ hours: '10.0000', overtimeHours: '3.3333' }]);
    const save = (hours: string | null) =>
      savePayrollHours(context(), { month: '2026-01', employeeId: ids.employeeId }, { hours });
    expect(await save('48.5')).toMatchObject({ payrollHours: '48.5000', difference: '-1.5000' });
    expect(await save('50')).toMatchObject({ payrollHours: '50.0000', difference: '0.0000' });
    expect(await tieOut('2026-01')).toMatchObject([{ payrollHours: '50.0000' }]);
    expect(await tieOut('2026-02')).toMatchObject([{ payrollHours: null }]);
    expect(await save(null)).toMatchObject({ payrollHours: null, difference: null });
  });

  it('count as costed where the wage is missing, and stay as they are once the month is closed', async () => {
    await work('2026-01-15');
    const other = await shop.addEmployee({ name: 'No wage' });
    await shop.addEntries([{ ...ids, employeeId: other, workedOn: '2026-01-15', hours: '6' }]);
    await runRollup(context(), {});
    expect((await getMonth(context(), { month: '2026-01' })).tieOut).toMatchObject([
      { employee: 'Ilse Marr', hours: '8.0000', costedHours: '8.0000' },
      { employee: 'No wage', hours: '6.0000', costedHours: '6.0000' },
    ]);
    await shop.addPayRate({ employeeId: other, validFrom: '2026-01-01', wagePerHour: '0' });
    await closeMonth(context(), { month: '2026-01' });
    const save = savePayrollHours(context(), { month: '2026-01', employeeId: other }, { hours: '6' });
    await expect(save).rejects.toMatchObject({ code: 'month_refused', issues: [{ code: 'closed' }] });
  });

  it('are those of employees of the shop', async () => {
    const save = savePayrollHours(
      context(),
      { month: '2026-03', employeeId: shop.shop.shopId },
      { hours: '6' },
    );
    await expect(save).rejects.toMatchObject({ code: 'not_found' });
  });
});
