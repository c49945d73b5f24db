import { type ShopTransaction } from '@brakeven/database';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { addDays, toLocalDate } from '@brakeven/values';
import fc from 'fast-check';
import { v7 as newId } from 'uuid';

/** Work and rates fall into these days. */
const FIRST_DAY = toLocalDate('2026-02-20');
const DAYS = 14;

const aDay = fc.integer({ min: 0, max: DAYS - 1 }).map((n) => addDays(FIRST_DAY, n) as string);
const aRate = fc.integer({ min: 0, max: 250_000_000 }).map((millionths) => (millionths / 1e6).toFixed(6));
const aBurden = fc.integer({ min: 0, max: 600_000 }).map((parts) => (parts / 1e4).toFixed(4));
const someHours = fc.integer({ min: 1, max: 240_000 }).map((parts) => (parts / 1e4).toFixed(4));
/** Which of a list, whatever its length. */
const pick = fc.nat({ max: 999 });

/** A number for each reference; each is taken modulo what there is when it is applied. */
const anEntry = fc.record({
  day: aDay,
  employee: pick,
  job: pick,
  operation: pick,
  machine: fc.option(pick),
  hours: someHours,
});
const aChange = fc.oneof(
  fc.record({
    kind: fc.constant('addEntries' as const),
    entries: fc.array(anEntry, { minLength: 1, maxLength: 4 }),
  }),
  fc.record({ kind: fc.constant('voidEntry' as const), entry: pick }),
  fc.record({ kind: fc.constant('restoreEntry' as const), entry: pick }),
  fc.record({ kind: fc.constant('setWage' as const), rate: pick, wage: aRate, burden: aBurden }),
  fc.record({
    kind: fc.constant('moveRate' as const),
    table: fc.constantFrom('payRate', 'machineRate', 'overheadRate'),
    rate: pick,
    day: aDay,
  }),
  fc.record({
    kind: fc.constant('deleteRate' as const),
    table: fc.constantFrom('payRate', 'machineRate', 'overheadRate'),
    rate: pick,
  }),
  fc.record({
    kind: fc.constant('addPayRate' as const),
    employee: pick,
    day: aDay,
    wage: aRate,
    burden: aBurden,
  }),
  fc.record({
    kind: fc.constant('addMachineRate' as const),
    machine: pick,
    day: aDay,
    rates: fc.tuple(aRate, aRate, aRate),
  }),
  fc.record({ kind: fc.constant('addOverheadRate' as const), day: aDay, rate: aRate }),
  fc.record({ kind: fc.constant('setInService' as const), machine: pick, day: fc.option(aDay) }),
  fc.record({ kind: fc.constant('setDefaultMachine' as const), operation: pick, machine: fc.option(pick) }),
  fc.record({ kind: fc.constant('flipBillable' as const), job: pick }),
  fc.record({ kind: fc.constant('rollUp' as const) }),
);

/** A change to a shop, or a rollup in between. */
export type Change = typeof aChange extends fc.Arbitrary<infer T> ? T : never;

/** Changes that build a shop's entries and rates from nothing and then turn them over. */
export const someChanges: fc.Arbitrary<Change[]> = fc.array(aChange, { minLength: 8, maxLength: 40 });

interface Register {
  employees: string[];
  machines: string[];
  operations: string[];
  jobs: string[];
}

/** A shop with people, machines, operations and jobs, but neither rates nor entries. */
export async function createBareShop(): Promise<{ shop: TestShop; register: Register }> {
  const shop = await createTestShop();
  const machines = [await shop.addMachine({ inServiceOn: addDays(FIRST_DAY, 3) }), await shop.addMachine()];
  return {
    shop,
    register: {
      machines,
      employees: [await shop.addEmployee(), await shop.addEmployee()],
      operations: [
        await shop.addOperation({ defaultMachineId: machines[0] }),
        await shop.addOperation(),
        await shop.addOperation({ defaultMachineId: machines[1] }),
      ],
      jobs: [await shop.addJob(), await shop.addJob({ isBillable: false }), await shop.addJob()],
    },
  };
}

/** Applies one change in a transaction of its own; one that has nothing to change does nothing. */
export function applyChange(shop: TestShop, register: Register, change: Change): Promise<void> {
  return shop.inShop((trx) => applyInShop(trx, shop.shop.shopId, register, change));
}

function at<T>(items: readonly T[], index: number): T | undefined {
  return items[index % Math.max(items.length, 1)];
}

async function applyInShop(
  trx: ShopTransaction,
  shopId: string,
  register: Register,
  change: Change,
): Promise<void> {
  switch (change.kind) {
    case 'addEntries':
      return insertEntries(trx, shopId, register, change.entries);
    case 'voidEntry':
    case 'restoreEntry':
      return setVoided(trx, change.entry, change.kind === 'voidEntry');
    case 'setWage':
    case 'moveRate':
    case 'deleteRate':
      return changeRate(trx, change);
    case 'addPayRate':
    case 'addMachineRate':
    case 'addOverheadRate':
      return addRate(trx, shopId, register, change);
    case 'setInService':
    case 'setDefaultMachine':
    case 'flipBillable':
      return changeSetting(trx, register, change);
    case 'rollUp':
      return;
  }
}

async function insertEntries(
  trx: ShopTransaction,
  shopId: string,
  register: Register,
  entries: Extract<Change, { kind: 'addEntries' }>['entries'],
): Promise<void> {
  const rows = entries.map((entry) => ({
    shopId,
    entryId: newId(),
    workedOn: entry.day,
    employeeId: at(register.employees, entry.employee) ?? '',
    jobId: at(register.jobs, entry.job) ?? '',
    operationId: at(register.operations, entry.operation) ?? '',
    machineId: entry.machine === null ? null : (at(register.machines, entry.machine) ?? null),
    hours: entry.hours,
  }));
  await trx.insertInto('timeEntry').values(rows).execute();
}

async function setVoided(trx: ShopTransaction, entry: number, isVoided: boolean): Promise<void> {
  const entries = await trx.selectFrom('timeEntry').select('entryId').orderBy('entryId').execute();
  const entryId = at(entries, entry)?.entryId;
  if (!entryId) return;
  await trx
    .updateTable('timeEntry')
    .set({ voidedAt: isVoided ? new Date() : null })
    .where('entryId', '=', entryId)
    .execute();
}

const ID_OF = { payRate: 'payRateId', machineRate: 'machineRateId', overheadRate: 'overheadRateId' } as const;

async function changeRate(
  trx: ShopTransaction,
  change: Extract<Change, { kind: 'setWage' | 'moveRate' | 'deleteRate' }>,
): Promise<void> {
  const table = change.kind === 'setWage' ? 'payRate' : change.table;
  const idColumn = ID_OF[table as keyof typeof ID_OF];
  const rates = await trx
    .selectFrom(table as 'payRate')
    .selectAll()
    .orderBy(idColumn as 'payRateId')
    .execute();
  const rate = at(rates, change.rate);
  if (!rate) return;
  const id = (rate as unknown as Record<string, string>)[idColumn] ?? '';
  if (change.kind === 'deleteRate') {
    await trx
      .deleteFrom(table as 'payRate')
      .where(idColumn as 'payRateId', '=', id)
      .execute();
    return;
  }
  if (change.kind === 'moveRate' && rates.some((other) => other.validFrom === change.day)) return;
  const values =
    change.kind === 'setWage'
      ? { wagePerHour: change.wage, burdenPercent: change.burden }
      : { validFrom: change.day };
  await trx
    .updateTable(table as 'payRate')
    .set(values)
    .where(idColumn as 'payRateId', '=', id)
    .execute();
}

async function addRate(
  trx: ShopTransaction,
  shopId: string,
  register: Register,
  change: Extract<Change, { kind: 'addPayRate' | 'addMachineRate' | 'addOverheadRate' }>,
): Promise<void> {
  const key = { shopId, validFrom: change.day };
  if (change.kind === 'addPayRate') {
    const employeeId = at(register.employees, change.employee) ?? '';
    const values = { ...key, employeeId, wagePerHour: change.wage, burdenPercent: change.burden };
    await trx
      .insertInto('payRate')
      .values(values)
      .onConflict((oc) => oc.doNothing())
      .execute();
  } else if (change.kind === 'addOverheadRate') {
    const values = { ...key, ratePerLabourHour: change.rate };
    await trx
      .insertInto('overheadRate')
      .values(values)
      .onConflict((oc) => oc.doNothing())
      .execute();
  } else {
    const [machineHourRate, chargeOutRate, runningCostPerHour] = change.rates;
    const machineId = at(register.machines, change.machine) ?? '';
    const values = { ...key, machineId, machineHourRate, chargeOutRate, runningCostPerHour };
    await trx
      .insertInto('machineRate')
      .values(values)
      .onConflict((oc) => oc.doNothing())
      .execute();
  }
}

async function changeSetting(
  trx: ShopTransaction,
  register: Register,
  change: Extract<Change, { kind: 'setInService' | 'setDefaultMachine' | 'flipBillable' }>,
): Promise<void> {
  if (change.kind === 'setInService') {
    const machineId = at(register.machines, change.machine) ?? '';
    await trx
      .updateTable('machine')
      .set({ inServiceOn: change.day })
      .where('machineId', '=', machineId)
      .execute();
  } else if (change.kind === 'setDefaultMachine') {
    const defaultMachineId = change.machine === null ? null : (at(register.machines, change.machine) ?? null);
    const operationId = at(register.operations, change.operation) ?? '';
    await trx
      .updateTable('operation')
      .set({ defaultMachineId })
      .where('operationId', '=', operationId)
      .execute();
  } else {
    const jobId = at(register.jobs, change.job) ?? '';
    await trx
      .updateTable('job')
      .set((eb) => ({ isBillable: eb.not('isBillable') }))
      .where('jobId', '=', jobId)
      .execute();
  }
}
