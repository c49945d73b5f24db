import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { sql } from 'kysely';
import { getRollupStatus } from './get-rollup-status';
import { runRollup } from './run-rollup';
import { computeExpectedCosts } from './testing/expected-costs';
import { readStoredCosts, toStoredCosts } from './testing/stored-costs';

const now = () => new Date('2026-03-20T18:00:00Z');

interface Shop extends TestShop {
  employeeId: string;
  jobId: string;
  operationId: string;
  machineId: string;
}

/** One employee at 20.00 + 25 %, a machine at 30 / 95 / 4, overhead 12.345 per hour, no entries yet. */
async function createShop(): Promise<Shop> {
  const shop = await createTestShop();
  const employeeId = await shop.addEmployee({ name: 'Wen Abara' });
  const machineId = await shop.addMachine({ inServiceOn: '2026-03-03', name: 'Press 2' });
  await shop.addPayRate({ employeeId, validFrom: '2026-01-01', wagePerHour: '20', burdenPercent: '25' });
  await shop.addOverheadRate({ validFrom: '2026-01-01', ratePerLabourHour: '12.345' });
  await shop.addMachineRate({
    machineId,
    validFrom: '2026-01-01',
    machineHourRate: '30',
    chargeOutRate: '95',
    runningCostPerHour: '4',
  });
  const operationId = await shop.addOperation({ defaultMachineId: machineId });
  return { ...shop, employeeId, machineId, operationId, jobId: await shop.addJob({ number: '1042' }) };
}

function addHours(shop: Shop, workedOn: string, hours: string): Promise<string[]> {
  const { employeeId, jobId, operationId } = shop;
  return shop.addEntries([{ workedOn, hours, employeeId, jobId, operationId }]);
}

function readLines(shop: Shop) {
  return shop.inShop((trx) =>
    trx
      .selectFrom('costLine')
      .select(['workedOn', 'category', 'quantity', 'rate', 'rateFactor', 'amount', 'runId'])
      .orderBy('workedOn')
      .orderBy('category')
      .execute(),
  );
}

describe('a rollup', () => {
  let shop: Shop;

  beforeEach(async () => {
    shop = await createShop();
  });
  afterEach(() => shop.close());

  const rollUp = (options: Parameters<typeof runRollup>[1] = {}) =>
    runRollup(shop.context('owner', { now }), options);

  it('writes the lines of an entry, each rounded half-up to the cent', async () => {
    await addHours(shop, '2026-03-04', '7.3333');
    expect(await rollUp()).toEqual({ shop: shop.shop.name, days: 1, lines: 5, through: '2026-03-04' });
    const amounts = (await readLines(shop)).map((line) => [line.category, line.rateFactor, line.amount]);
    // By hand: 7.3333 × 95 = 696.6635, × 20 × 1.25 = 183.3325, × 30 = 219.999, × 12.345 = 90.5295885, × 4 = 29.3332.
    expect(amounts).toEqual([
      ['earned', '1.000000', '696.66'],
      ['labour', '1.250000', '183.33'],
      ['machine', '1.000000', '220.00'],
      ['overhead', '1.000000', '90.53'],
      ['running', '1.000000', '29.33'],
    ]);
  });

  it('counts nothing towards payback before the machine is in service', async () => {
    await addHours(shop, '2026-03-02', '8');
    await rollUp();
    const categories = (await readLines(shop)).map((line) => line.category);
    expect(categories).toEqual(['labour', 'machine', 'overhead']);
    expect((await readStoredCosts(shop)).machineDays).toEqual([]);
  });

  it('writes only the days that changed', async () => {
    await addHours(shop, '2026-03-04', '8');
    await addHours(shop, '2026-03-05', '8');
    await rollUp();
    const before = await readLines(shop);
    await addHours(shop, '2026-03-05', '1');
    expect(await rollUp()).toMatchObject({ days: 1, lines: 10 });
    const after = await readLines(shop);
    expect(after.filter((line) => line.workedOn === '2026-03-04')).toEqual(
      before.filter((line) => line.workedOn === '2026-03-04'),
    );
    expect(after).toHaveLength(15);
  });

  it('finds nothing to do when run again', async () => {
    await addHours(shop, '2026-03-04', '8');
    await rollUp();
    const before = await readLines(shop);
    expect(await rollUp()).toMatchObject({ days: 0, lines: 0, through: '2026-03-04' });
    expect(await readLines(shop)).toEqual(before);
  });

  it('takes out the costs of a day whose entries are all voided', async () => {
    const [entryId = ''] = await addHours(shop, '2026-03-04', '8');
    await addHours(shop, '2026-03-03', '2');
    await rollUp();
    await shop.inShop((trx) =>
      trx.updateTable('timeEntry').set({ voidedAt: now() }).where('entryId', '=', entryId).execute(),
    );
    expect(await rollUp()).toMatchObject({ days: 1, lines: 0, through: '2026-03-03' });
    expect((await readLines(shop)).map((line) => line.workedOn)).toEqual(Array(5).fill('2026-03-03'));
  });

  it('stops at the day asked for and keeps the rest waiting', async () => {
    await addHours(shop, '2026-03-04', '8');
    await addHours(shop, '2026-03-09', '8');
    expect(await rollUp({ through: '2026-03-08' })).toMatchObject({ days: 1, through: '2026-03-04' });
    const status = await getRollupStatus(shop.context());
    expect(status).toMatchObject({ through: '2026-03-04', entriesWaiting: 1, daysWaiting: 1 });
    expect(await rollUp()).toMatchObject({ days: 1, through: '2026-03-09' });
  });

  it('refuses a day that does not exist', async () => {
    await expect(rollUp({ through: '2026-02-30' })).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'through' }],
    });
  });

  it('does no harm when two run at once', async () => {
    await addHours(shop, '2026-03-04', '8');
    await addHours(shop, '2026-03-05', '8');
    const results = await Promise.all([rollUp(), rollUp()]);
    expect(results.map((result) => result.days).sort()).toEqual([0, 2]);
    expect(await readStoredCosts(shop)).toEqual(toStoredCosts(await computeExpectedCosts(shop)));
  });

  it('rolls up in the next run what is entered while it runs', async () => {
    await addHours(shop, '2026-03-04', '8');
    await Promise.all([
      rollUp(),
      addHours(shop, '2026-03-04', '1'),
      rollUp(),
      addHours(shop, '2026-03-04', '2'),
    ]);
    await rollUp();
    expect(await readStoredCosts(shop)).toEqual(toStoredCosts(await computeExpectedCosts(shop)));
  });

  it('keeps a day waiting that is marked while it takes the others', async () => {
    await addHours(shop, '2026-03-04', '8');
    const held = await holdRows(shop, 'dirty_day');
    const running = rollUp();
    try {
      await held.untilBlocked();
      await addHours(shop, '2026-03-05', '6');
    } finally {
      await held.release();
    }
    expect(await running).toMatchObject({ days: 1 });
    expect(await getRollupStatus(shop.context())).toMatchObject({ daysWaiting: 1, entriesWaiting: 1 });
    await rollUp();
    expect(await readStoredCosts(shop)).toEqual(toStoredCosts(await computeExpectedCosts(shop)));
  });

  it('leaves everything as it was when it is killed in the middle, and goes through afterwards', async () => {
    await addHours(shop, '2026-03-04', '8');
    await rollUp();
    const before = await readStoredCosts(shop);
    await addHours(shop, '2026-03-04', '1');
    await killWhileWriting(shop, () => rollUp());
    expect(await readStoredCosts(shop)).toEqual(before);
    expect(await getRollupStatus(shop.context())).toMatchObject({ entriesWaiting: 1, isRunning: false });
    expect(await rollUp()).toMatchObject({ days: 1, lines: 10 });
    expect(await readStoredCosts(shop)).toEqual(toStoredCosts(await computeExpectedCosts(shop)));
  });

  it('writes nothing for other shops', async () => {
    const other = await createShop();
    try {
      await addHours(other, '2026-03-04', '8');
      await addHours(shop, '2026-03-04', '8');
      await rollUp({ full: true });
      expect(await readLines(other)).toEqual([]);
      expect(await getRollupStatus(other.context())).toMatchObject({ entriesWaiting: 1, through: null });
    } finally {
      await other.close();
    }
  });

  it('keeps how far the machine had paid itself back', async () => {
    await shop.addMachineCostItem({ machineId: shop.machineId, incurredOn: '2026-03-01', amount: '1000' });
    await addHours(shop, '2026-03-04', '8');
    await addHours(shop, '2026-03-05', '8');
    await rollUp();
    const snapshots = await shop.inShop((trx) =>
      trx.selectFrom('paybackSnapshot').selectAll().where('machineId', '=', shop.machineId).execute(),
    );
    // A day of 8 h: 760 − (200 + 32) = 528; the second day takes it to 1,056.
    expect(snapshots).toMatchObject([
      {
        asOf: '2026-03-05',
        outlay: '1000.00',
        earned: '1520.00',
        operatorLabour: '400.00',
        running: '64.00',
        breakEvenMethod: 'reached',
        breakEvenOn: '2026-03-05',
      },
    ]);
  });

  it('finds the day of break-even even if it lies before the pace window', async () => {
    await shop.addMachineCostItem({ machineId: shop.machineId, incurredOn: '2026-03-01', amount: '1000' });
    for (const day of ['2026-03-04', '2026-03-05', '2026-03-06', '2026-12-30'])
      await addHours(shop, day, '8');
    await runRollup(shop.context('owner', { now: () => new Date('2026-12-31T12:00:00Z') }), {});
    const snapshots = await shop.inShop((trx) =>
      trx.selectFrom('paybackSnapshot').select(['asOf', 'breakEvenOn']).execute(),
    );
    expect(snapshots).toEqual([{ asOf: '2026-12-30', breakEvenOn: '2026-03-05' }]);
  });
});

describe('the rollup status', () => {
  let shop: Shop;

  beforeAll(async () => {
    shop = await createShop();
  });
  afterAll(() => shop.close());

  it('says that nothing has been rolled up yet', async () => {
    expect(await getRollupStatus(shop.context())).toEqual({
      through: null,
      entriesWaiting: 0,
      daysWaiting: 0,
      lastRunAt: null,
      isRunning: false,
      gaps: [],
    });
  });

  it('names who and what lacks a rate, and from when to when', async () => {
    const newcomer = await shop.addEmployee({ name: 'Ode Lindqvist' });
    const { jobId, operationId } = shop;
    await shop.addEntries(
      ['2026-03-09', '2026-03-10'].map((workedOn) => ({
        workedOn,
        hours: '4',
        employeeId: newcomer,
        jobId,
        operationId,
      })),
    );
    await runRollup(shop.context('owner', { now }), {});
    const status = await getRollupStatus(shop.context());
    expect(status.gaps).toEqual([
      {
        category: 'labour',
        subject: 'Ode Lindqvist',
        entries: 2,
        firstDay: '2026-03-09',
        lastDay: '2026-03-10',
      },
    ]);
    expect(status.lastRunAt).toMatch(/^\d{4}-\d\d-\d\dT/);
  });

  it('shows that a rollup is running', async () => {
    await addHours(shop, '2026-03-11', '2');
    await runRollup(shop.context('owner', { now }), {});
    await addHours(shop, '2026-03-11', '1');
    const held = await holdRows(shop, 'job_day');
    const running = runRollup(shop.context('owner', { now }), {});
    try {
      await held.untilBlocked();
      expect(await getRollupStatus(shop.context())).toMatchObject({ isRunning: true, entriesWaiting: 1 });
    } finally {
      await held.release();
    }
    await running;
    expect(await getRollupStatus(shop.context())).toMatchObject({ isRunning: false, entriesWaiting: 0 });
  });
});

/** Locks rows of the shop: the days that wait are taken first, job days are written after the lines. */
async function holdRows(shop: Shop, table: 'dirty_day' | 'job_day') {
  const holder = await shop.db.startTransaction().execute();
  await sql`select set_config('app.shop_id', ${shop.shop.shopId}, true)`.execute(holder);
  await sql`select from ${sql.table(table)} for update`.execute(holder);
  const { rows } = await sql<{ pid: number }>`select pg_backend_pid() as pid`.execute(holder);
  const findBlocked = async () => {
    const blocked = await sql<{ pid: number }>`
      select pid from pg_stat_activity where ${rows[0]?.pid} = any (pg_blocking_pids(pid))`.execute(shop.db);
    return blocked.rows[0]?.pid;
  };
  const untilBlocked = async () => {
    for (let tries = 0; tries < 200; tries += 1) {
      const pid = await findBlocked();
      if (pid !== undefined) return pid;
      await new Promise((resolve) => setTimeout(resolve, 25));
    }
    throw new Error('The rollup never came to its job days.');
  };
  return { untilBlocked, release: () => holder.commit().execute() };
}

async function killWhileWriting(shop: Shop, start: () => Promise<unknown>): Promise<void> {
  const held = await holdRows(shop, 'job_day');
  try {
    const outcome = start().then(
      () => 'went through',
      () => 'failed',
    );
    const pid = await held.untilBlocked();
    await sql`select pg_terminate_backend(${pid})`.execute(shop.db);
    expect(await outcome).toBe('failed');
  } finally {
    await held.release();
  }
}
