import { type ShopTransaction } from '@brakeven/database';
import { type TestShop } from '@brakeven/test-shop';
import { v7 as newId } from 'uuid';
import {
  addAmount,
  addMove,
  at,
  closeMonth,
  flipVoided,
  reopenMonth,
  setOvertime,
} from './apply-money-change';
import { type Change } from './random-changes';
import { type Register } from './random-shop';

/**
 * What the database refuses by itself: stock below nothing, more returned than drawn, what is at odds with the issues
 * or the machine days of a closed month.
 */
const REFUSED = ['BK001', 'BK002', 'BK004', 'BK005'];

/** Applies one change in a transaction of its own; one that has nothing to change, or is refused, does nothing. */
export async function applyChange(shop: TestShop, register: Register, change: Change): Promise<void> {
  try {
    await shop.inShop((trx) => applyInShop(trx, shop.shop.shopId, register, change));
  } catch (error) {
    if (!REFUSED.includes((error as { code?: string }).code ?? '')) throw error;
  }
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
    case 'addLot':
    case 'addIssue':
      return addMove(trx, shopId, register, change);
    case 'addOutsideService':
    case 'addInvoice':
    case 'addCreditNote':
      return addAmount(trx, shopId, register, change);
    case 'flipVoided':
      return flipVoided(trx, change);
    case 'setOvertime':
      return setOvertime(trx, shopId, change);
    case 'closeMonth':
      return closeMonth(trx, shopId);
    case 'reopenMonth':
      return reopenMonth(trx);
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
