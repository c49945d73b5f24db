import { randomUUID } from 'node:crypto';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import {
  createMachineCostItem,
  createMachineRate,
  deleteMachineCostItem,
  deleteMachineRate,
  updateMachineCostItem,
  updateMachineRate,
} from './machine-costs';
import { runRollup } from '../roll-up-costs/run-rollup';
import { createMachine, getMachine, listMachines, updateMachine } from './machines';

let shop: TestShop;
beforeEach(async () => {
  shop = await createTestShop();
});
afterEach(() => shop.close());

const press = {
  code: 'PB2',
  name: 'Press 2',
  kind: 'Press brake',
  inServiceOn: '2026-03-02',
  ratedForceKn: '533.7865',
  bedLengthMm: '1828.8',
};
const price = { incurredOn: '2026-02-01', kind: 'price' as const, description: '', amount: '48000' };
const rates = {
  validFrom: '2026-03-01',
  machineHourRate: '18',
  chargeOutRate: '95.5',
  runningCostPerHour: '4.125',
};

describe('machines', () => {
  it('are kept as given, with the sum of their landed cost', async () => {
    const { machineId } = await createMachine(shop.context(), press);
    await createMachineCostItem(shop.context(), { machineId }, price);
    await createMachineCostItem(
      shop.context(),
      { machineId },
      { ...price, kind: 'freight', amount: '1250.50' },
    );
    const machine = await createMachineRate(shop.context(), { machineId }, rates);
    expect(machine).toMatchObject({ ...press, outlay: '49250.50' });
    expect(machine.costItems).toMatchObject([{ amount: '48000.00' }, { kind: 'freight', amount: '1250.50' }]);
    expect(machine.rates).toMatchObject([
      { machineHourRate: '18.00', chargeOutRate: '95.50', runningCostPerHour: '4.125' },
    ]);
    expect(await getMachine(shop.context(), { machineId })).toEqual(machine);
    expect(await listMachines(shop.context())).toEqual([machine]);
  });

  it('keep their day in service where a closed month holds work on either side of it', async () => {
    const { machineId } = await createMachine(shop.context(), press);
    await createMachineRate(shop.context(), { machineId }, rates);
    const employeeId = await shop.addEmployee();
    await shop.addPayRate({ employeeId, validFrom: '2026-01-01', wagePerHour: '30' });
    await shop.addOverheadRate({ validFrom: '2026-01-01', ratePerLabourHour: '10' });
    const work = {
      employeeId,
      machineId,
      jobId: await shop.addJob(),
      operationId: await shop.addOperation(),
    };
    await shop.addEntries([{ ...work, workedOn: '2026-03-10', hours: '8' }]);
    const owner = shop.context('owner', { now: () => new Date('2026-04-20T18:00:00Z') });
    await runRollup(owner, {});
    await shop.addMonthClose('2026-03-01');
    const move = (inServiceOn: string | null) =>
      updateMachine(owner, { machineId }, { ...press, inServiceOn });
    for (const day of ['2026-03-11', '2026-04-01', null])
      await expect(move(day)).rejects.toMatchObject({
        code: 'conflict',
        issues: [{ field: 'inServiceOn', code: 'month_closed' }],
        message: expect.stringContaining('Press 2 worked on Mar 10, 2026, in a month that is closed'),
      });
    expect(await move('2026-03-10')).toMatchObject({ inServiceOn: '2026-03-10' });
    expect(await move('2026-02-02')).toMatchObject({ inServiceOn: '2026-02-02' });
  });

  it('are shown without any money to those who may not see it', async () => {
    const { machineId } = await createMachine(shop.context(), press);
    await createMachineCostItem(shop.context(), { machineId }, price);
    await createMachineRate(shop.context(), { machineId }, rates);
    const plain = { machineId, ...press };
    expect(await listMachines(shop.context('lead'))).toEqual([plain]);
    expect(await getMachine(shop.context('lead'), { machineId })).toEqual(plain);
  });

  it('change, but not to a code that is taken or a force of nothing', async () => {
    const { machineId } = await createMachine(shop.context(), press);
    await createMachine(shop.context(), { ...press, code: 'PB1' });
    const update = (change: object) => updateMachine(shop.context(), { machineId }, { ...press, ...change });
    expect(await update({ name: 'Press two', inServiceOn: null })).toMatchObject({ inServiceOn: null });
    await expect(update({ code: 'PB1' })).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field: 'code' }],
    });
    await expect(update({ ratedForceKn: '0' })).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'ratedForceKn', message: 'Must be more than 0.' }],
    });
    const nobody = { machineId: randomUUID() };
    await expect(updateMachine(shop.context(), nobody, press)).rejects.toMatchObject({ code: 'not_found' });
    await expect(getMachine(shop.context(), nobody)).rejects.toMatchObject({ code: 'not_found' });
  });

  it('have their costs and rates corrected and taken out', async () => {
    const { machineId } = await createMachine(shop.context(), press);
    const { costItems } = await createMachineCostItem(shop.context(), { machineId }, price);
    const item = { machineId, machineCostItemId: costItems?.[0]?.machineCostItemId ?? '' };
    const dearer = await updateMachineCostItem(shop.context(), item, { ...price, amount: '48500' });
    expect(dearer.outlay).toBe('48500.00');
    expect((await deleteMachineCostItem(shop.context(), item)).outlay).toBe('0.00');
    await expect(deleteMachineCostItem(shop.context(), item)).rejects.toMatchObject({ code: 'not_found' });

    const created = await createMachineRate(shop.context(), { machineId }, rates);
    const rate = { machineId, machineRateId: created.rates?.[0]?.machineRateId ?? '' };
    await expect(createMachineRate(shop.context(), { machineId }, rates)).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field: 'validFrom' }],
    });
    const later = await updateMachineRate(shop.context(), rate, { ...rates, validFrom: '2026-05-01' });
    expect(later.rates).toMatchObject([{ validFrom: '2026-05-01' }]);
    expect((await deleteMachineRate(shop.context(), rate)).rates).toEqual([]);
    await expect(updateMachineRate(shop.context(), rate, rates)).rejects.toMatchObject({ code: 'not_found' });
  });

  it('belong to one shop: another finds neither the machine nor its costs', async () => {
    const { machineId } = await createMachine(shop.context(), press);
    const { costItems } = await createMachineCostItem(shop.context(), { machineId }, price);
    const other = await createTestShop();
    try {
      const item = { machineId, machineCostItemId: costItems?.[0]?.machineCostItemId ?? '' };
      const stranger = other.context();
      await expect(updateMachine(stranger, { machineId }, press)).rejects.toMatchObject({
        code: 'not_found',
      });
      await expect(createMachineRate(stranger, { machineId }, rates)).rejects.toMatchObject({
        code: 'not_found',
      });
      await expect(deleteMachineCostItem(stranger, item)).rejects.toMatchObject({ code: 'not_found' });
      expect((await getMachine(shop.context(), { machineId })).outlay).toBe('48000.00');
    } finally {
      await other.close();
    }
  });
});
