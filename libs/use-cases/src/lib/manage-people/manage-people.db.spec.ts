import { randomUUID } from 'node:crypto';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { createEmployee, deleteAlias, listEmployees, updateEmployee } from './employees';
import { createOperation, listOperations, updateOperation } from './operations';
import {
  createOverheadRate,
  deleteOverheadRate,
  listOverheadRates,
  updateOverheadRate,
} from './overhead-rates';
import { createPayRate, deletePayRate, updatePayRate } from './pay-rates';

let shop: TestShop;
beforeEach(async () => {
  shop = await createTestShop();
});
afterEach(() => shop.close());

const rate = (validFrom: string, wagePerHour = '28.5') => ({ validFrom, wagePerHour, burdenPercent: '22' });
const add = (number = '101') =>
  createEmployee(shop.context(), { number, name: 'Pia Strand', rate: rate('2026-01-01') });
const nobody = { employeeId: randomUUID() };

describe('employees', () => {
  it('come with their rates, latest first, and their other spellings', async () => {
    const { employeeId } = await add();
    await createPayRate(shop.context(), { employeeId }, rate('2026-03-01', '30.125'));
    await shop.inShop((trx) =>
      trx
        .insertInto('nameAlias')
        .values({
          shopId: shop.shop.shopId,
          kind: 'employee',
          spelling: 'Pia S',
          employeeId,
          jobId: null,
          operationId: null,
          machineId: null,
        })
        .execute(),
    );
    const [employee] = await listEmployees(shop.context());
    expect(employee).toMatchObject({ number: '101', name: 'Pia Strand', isActive: true });
    expect(employee?.rates).toMatchObject([
      { validFrom: '2026-03-01', wagePerHour: '30.125', burdenPercent: '22.00' },
      { validFrom: '2026-01-01', wagePerHour: '28.50', burdenPercent: '22.00' },
    ]);
    expect(employee?.aliases).toMatchObject([{ spelling: 'Pia S' }]);
    const aliasId = employee?.aliases[0]?.aliasId ?? '';
    await deleteAlias(shop.context(), { aliasId });
    expect((await listEmployees(shop.context()))[0]?.aliases).toEqual([]);
    await expect(deleteAlias(shop.context(), { aliasId })).rejects.toMatchObject({ code: 'not_found' });
  });

  it('keep the numbers apart', async () => {
    await add('101');
    const { employeeId } = await add('102');
    const taken = { code: 'conflict', issues: [{ field: 'number', code: 'taken' }] };
    await expect(add('101')).rejects.toMatchObject(taken);
    await expect(updateEmployee(shop.context(), { employeeId }, { number: '101' })).rejects.toMatchObject(
      taken,
    );
    expect(await listEmployees(shop.context())).toHaveLength(2);
  });

  it('change what is given and keep the rest; those who have left come last', async () => {
    const { employeeId } = await add('101');
    await add('102');
    const changed = await updateEmployee(shop.context(), { employeeId }, { isActive: false });
    expect(changed).toMatchObject({ number: '101', name: 'Pia Strand', isActive: false });
    expect((await listEmployees(shop.context())).map(({ number }) => number)).toEqual(['102', '101']);
    await expect(updateEmployee(shop.context(), nobody, {})).rejects.toMatchObject({ code: 'not_found' });
  });
});

describe('pay rates', () => {
  async function addWorked(...days: string[]) {
    const { employeeId, rates } = await add();
    const entry = {
      employeeId,
      jobId: await shop.addJob(),
      operationId: await shop.addOperation(),
      machineId: null,
      hours: '8',
      goodPieces: null,
      scrapPieces: null,
      note: null,
      importId: null,
      sourceRow: null,
      sourceCell: null,
      voidedBy: null,
    };
    await shop.addEntries(days.map((workedOn) => ({ ...entry, workedOn })));
    return { employeeId, payRateId: rates[0]?.payRateId ?? '' };
  }

  it('cannot be taken out while entries need them', async () => {
    const ids = await addWorked('2026-01-05', '2026-01-06');
    await expect(deletePayRate(shop.context(), ids)).rejects.toMatchObject({
      code: 'rate_needed',
      message:
        '2 time entries from 2026-01-05 to 2026-01-06 would be left without a wage. Add an earlier rate first.',
    });
    expect((await listEmployees(shop.context()))[0]?.rates).toHaveLength(1);
  });

  it('cannot be moved past entries that need them, but up to the first of them', async () => {
    const ids = await addWorked('2026-01-05');
    await expect(updatePayRate(shop.context(), ids, rate('2026-01-06'))).rejects.toMatchObject({
      code: 'rate_needed',
      issues: [{ field: 'validFrom' }],
    });
    const moved = await updatePayRate(shop.context(), ids, rate('2026-01-05', '29'));
    expect(moved.rates).toMatchObject([{ validFrom: '2026-01-05', wagePerHour: '29.00' }]);
  });

  it('can be taken out when an earlier one takes over, or only voided entries are left', async () => {
    const ids = await addWorked('2026-02-05');
    await createPayRate(shop.context(), ids, rate('2025-06-01'));
    expect((await deletePayRate(shop.context(), ids)).rates).toMatchObject([{ validFrom: '2025-06-01' }]);
    await shop.inShop((trx) =>
      trx.updateTable('timeEntry').set({ voidedAt: new Date(), voidedBy: 'Test' }).execute(),
    );
    const [employee] = await listEmployees(shop.context());
    const left = { ...ids, payRateId: employee?.rates[0]?.payRateId ?? '' };
    expect((await deletePayRate(shop.context(), left)).rates).toEqual([]);
  });

  it('begin on different days, for employees that exist', async () => {
    const { employeeId, rates } = await add();
    const taken = { code: 'conflict', issues: [{ field: 'validFrom', code: 'taken' }] };
    const again = createPayRate(shop.context(), { employeeId }, rate('2026-01-01'));
    await expect(again).rejects.toMatchObject(taken);
    await expect(createPayRate(shop.context(), nobody, rate('2026-01-01'))).rejects.toMatchObject({
      code: 'not_found',
    });
    const other = await add('102');
    const mixed = { employeeId: other.employeeId, payRateId: rates[0]?.payRateId ?? '' };
    await expect(deletePayRate(shop.context(), mixed)).rejects.toMatchObject({ code: 'not_found' });
  });
});

describe('overhead rates', () => {
  it('are added, corrected, listed latest first and taken out', async () => {
    const first = await createOverheadRate(shop.context(), {
      validFrom: '2026-01-01',
      ratePerLabourHour: '12',
    });
    await createOverheadRate(shop.context(), { validFrom: '2026-04-01', ratePerLabourHour: '13.5' });
    const corrected = { validFrom: '2026-01-01', ratePerLabourHour: '12.25' };
    await updateOverheadRate(shop.context(), first, corrected);
    expect(await listOverheadRates(shop.context())).toMatchObject([
      { validFrom: '2026-04-01', ratePerLabourHour: '13.50' },
      { validFrom: '2026-01-01', ratePerLabourHour: '12.25' },
    ]);
    await expect(
      updateOverheadRate(shop.context(), first, { ...corrected, validFrom: '2026-04-01' }),
    ).rejects.toMatchObject({ code: 'conflict', issues: [{ field: 'validFrom' }] });
    await deleteOverheadRate(shop.context(), first);
    await expect(deleteOverheadRate(shop.context(), first)).rejects.toMatchObject({ code: 'not_found' });
    expect(await listOverheadRates(shop.context())).toHaveLength(1);
  });
});

describe('operations', () => {
  it('name their default machine, which has to be there', async () => {
    const defaultMachineId = await shop.addMachine({ code: 'PB2' });
    const body = { code: 'FORM', name: 'Form', defaultMachineId };
    const operation = await createOperation(shop.context(), body);
    expect(await listOperations(shop.context())).toEqual([{ ...operation, ...body, defaultMachine: 'PB2' }]);
    await expect(
      updateOperation(shop.context(), operation, { ...body, defaultMachineId: randomUUID() }),
    ).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'defaultMachineId', code: 'unknown' }],
    });
    const without = await updateOperation(shop.context(), operation, { ...body, defaultMachineId: null });
    expect(without).toMatchObject({ defaultMachineId: null, defaultMachine: null });
    await expect(createOperation(shop.context(), body)).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field: 'code' }],
    });
    await expect(updateOperation(shop.context(), { operationId: randomUUID() }, body)).rejects.toMatchObject({
      code: 'not_found',
    });
  });
});
