import { setupResultSchema } from '@brakeven/contract';
import { toLocalDate } from '@brakeven/values';
import { importSetup } from './import-setup';
import {
  COUNTS,
  createSetupShop,
  DATA,
  FEBRUARY,
  GUARDS,
  JANUARY,
  NONE,
  NOTHING,
  type SetupShop,
} from './testing/setup-shop';

describe('importSetup', () => {
  let shop: SetupShop;
  beforeEach(async () => {
    shop = await createSetupShop();
  });
  afterEach(() => shop.close());

  it('writes a whole shop from one workbook', async () => {
    const result = await shop.take();
    expect(setupResultSchema.parse(result)).toEqual(result);
    expect(result).toEqual({ added: COUNTS, changed: NONE, alreadyThere: NONE, problems: [] });
    const rates = await shop.inShop((trx) =>
      trx
        .selectFrom('payRate as r')
        .innerJoin('employee as e', 'e.employeeId', 'r.employeeId')
        .select(['e.number', 'e.name', 'r.validFrom', 'r.wagePerHour', 'r.burdenPercent'])
        .orderBy('e.number')
        .orderBy('r.validFrom')
        .execute(),
    );
    expect(rates.map((rate) => Object.values(rate).join(' '))).toEqual([
      '12 Dana Quill 2026-01-01 28.500000 28.0000',
      '12 Dana Quill 2026-02-01 29.250000 28.0000',
      '14 Ivo Marsh 2026-01-01 24.000000 0.0000',
    ]);
    const [machine] = await shop.inShop((trx) => trx.selectFrom('machine').selectAll().execute());
    expect(machine).toMatchObject({ code: 'P2', inServiceOn: '2026-02-01', ratedForceKn: '533.78659' });
    const [job] = await shop.inShop((trx) =>
      trx
        .selectFrom('job as j')
        .innerJoin('customer as c', 'c.customerId', 'j.customerId')
        .select(['j.number', 'c.name', 'j.quotedPrice', 'j.dueOn', 'j.isBillable', 'j.status'])
        .execute(),
    );
    expect(job).toEqual({
      number: 'J-1041',
      name: 'Harbor Lane Conveyors',
      quotedPrice: '5400.00',
      dueOn: null,
      isBillable: true,
      status: 'open',
    });
    const operations = await shop.inShop((trx) =>
      trx
        .selectFrom('operation as o')
        .leftJoin('machine as m', 'm.machineId', 'o.defaultMachineId')
        .select(['o.code', 'm.code as machine'])
        .orderBy('o.code')
        .execute(),
    );
    expect(operations).toEqual([
      { code: 'FORM', machine: 'P2' },
      { code: 'WELD', machine: null },
    ]);
  });

  it('finds all there the second time and writes nothing', async () => {
    await shop.take();
    const before = await shop.countEvents();
    expect(await shop.take()).toEqual({ added: NONE, changed: NONE, alreadyThere: COUNTS, problems: [] });
    expect(await shop.countEvents()).toBe(before);
  });

  it('says in a check what an import would do, and writes nothing', async () => {
    const before = await shop.countEvents();
    expect(await shop.check()).toEqual({ added: COUNTS, changed: NONE, alreadyThere: NONE, problems: [] });
    expect(await shop.countEvents()).toBe(before);
  });

  it('adds what is new and changes what differs, with both in the audit trail', async () => {
    await shop.take();
    const before = await shop.countEvents();
    const result = await shop.take({
      people: [
        { number: '12', name: 'Dana Quill', rateFrom: JANUARY, wagePerHour: '28.50', burdenPercent: '28.00' },
        {
          number: '12',
          name: 'Dana Quill',
          rateFrom: FEBRUARY,
          wagePerHour: '29.75',
          burdenPercent: '28.00',
        },
        {
          number: '14',
          name: 'Ivo Marsh-Lund',
          rateFrom: JANUARY,
          wagePerHour: '24.00',
          burdenPercent: '0.00',
        },
        {
          number: '14',
          name: 'Ivo Marsh-Lund',
          rateFrom: FEBRUARY,
          wagePerHour: '25.00',
          burdenPercent: '0.00',
        },
        { number: '15', name: 'Mara Oake', rateFrom: JANUARY, wagePerHour: '22.00', burdenPercent: '10.00' },
      ],
      machineCosts: [
        { machine: 'P2', date: JANUARY, kind: 'rigging', description: 'Crane', amount: '1100.00' },
        { machine: 'P2', date: JANUARY, kind: 'rigging', description: 'Crane', amount: '950.00' },
        { machine: 'P2', date: JANUARY, kind: 'rigging', description: 'Crane', amount: '80.00' },
      ],
      overhead: [{ validFrom: JANUARY, ratePerLabourHour: '18.50' }],
    });
    expect(result.added).toMatchObject({ people: 2, machineCosts: 1, overhead: 0 });
    expect(result.changed).toMatchObject({ people: 2, machineCosts: 1, overhead: 1, jobs: 0 });
    expect(result.alreadyThere).toMatchObject({ people: 1, machineCosts: 1, jobs: 1 });
    const costs = await shop.inShop((trx) =>
      trx.selectFrom('machineCostItem').select('amount').orderBy('amount').execute(),
    );
    expect(costs.map(({ amount }) => amount)).toEqual(['80.00', '950.00', '1100.00', '41500.00']);
    const events = await shop.inShop((trx) =>
      trx
        .selectFrom('auditEvent')
        .select(['actor', 'action', 'subjectKind', 'before', 'after'])
        .orderBy('eventId')
        .execute(),
    );
    expect(events.length - before).toBe(8);
    const wage = events.find(({ action, subjectKind }) => action === 'changed' && subjectKind === 'pay_rate');
    expect(wage).toMatchObject({
      actor: 'Test owner',
      before: { wage_per_hour: 29.25 },
      after: { wage_per_hour: 29.75 },
    });
  });

  it('leaves what a blank cell says nothing about', async () => {
    await shop.take();
    await shop.inShop((trx) => trx.updateTable('job').set({ status: 'finished' }).execute());
    const result = await shop.take({
      machines: [
        { code: 'p2', name: 'Press 2', kind: null, inServiceOn: null, ratedForceKn: null, bedLengthMm: null },
      ],
      operations: [{ code: 'FORM', name: 'Forming', machine: null }],
      jobs: [
        {
          number: 'j-1041',
          customer: null,
          title: null,
          quantity: null,
          openedOn: null,
          dueOn: toLocalDate('2026-03-01'),
          quotedPrice: null,
          isBillable: true,
          status: null as never,
        },
      ],
    });
    expect(result.changed).toEqual({ ...NONE, jobs: 1 });
    const [job] = await shop.inShop((trx) => trx.selectFrom('job').selectAll().execute());
    expect(job).toMatchObject({
      number: 'J-1041',
      status: 'finished',
      dueOn: '2026-03-01',
      quotedPrice: '5400.00',
    });
    const [machine] = await shop.inShop((trx) => trx.selectFrom('machine').selectAll().execute());
    expect(machine).toMatchObject({ code: 'P2', kind: 'Press brake', ratedForceKn: '533.78659' });
  });

  it('refers to what is in the shop already', async () => {
    await shop.take();
    const result = await shop.take({
      ...NOTHING,
      machineRates: [
        {
          machine: 'press 2',
          validFrom: toLocalDate('2026-03-01'),
          machineHourRate: '35.00',
          chargeOutRate: '98.00',
          runningCostPerHour: '6.50',
        },
      ],
      jobs: [{ ...GUARDS, number: 'J-1042', customer: 'harbor lane conveyors' }],
    });
    expect(result.added).toEqual({ ...NONE, machineRates: 1, jobs: 1 });
    const customers = await shop.inShop((trx) => trx.selectFrom('customer').select('name').execute());
    expect(customers).toEqual([{ name: 'Harbor Lane Conveyors' }]);
  });

  it('marks the days whose costs a changed rate changes', async () => {
    await shop.take();
    const [employeeId, jobId, operationId] = await shop.inShop((trx) =>
      Promise.all([
        trx
          .selectFrom('employee')
          .select('employeeId as id')
          .where('number', '=', '12')
          .executeTakeFirstOrThrow(),
        trx.selectFrom('job').select('jobId as id').executeTakeFirstOrThrow(),
        trx
          .selectFrom('operation')
          .select('operationId as id')
          .where('code', '=', 'WELD')
          .executeTakeFirstOrThrow(),
      ]).then((rows) => rows.map(({ id }) => id) as [string, string, string]),
    );
    const entry = { employeeId, jobId, operationId, hours: '1' };
    await shop.addEntries([
      { ...entry, workedOn: '2026-01-10' },
      { ...entry, workedOn: '2026-02-10' },
    ]);
    await shop.inShop((trx) => trx.deleteFrom('dirtyDay').execute());
    const people = DATA.people.map((row) =>
      row.rateFrom === FEBRUARY ? { ...row, wagePerHour: '31.00' } : row,
    );
    // On the first of February the rollup that follows leaves the tenth alone.
    const context = { ...shop.context(), now: () => new Date('2026-02-01T18:00:00Z') };
    await importSetup(context, await shop.toFile({ people }), {}, shop.tools);
    const dirty = await shop.inShop((trx) => trx.selectFrom('dirtyDay').select('workedOn').execute());
    expect(dirty).toEqual([{ workedOn: '2026-02-10' }]);
  });
});
