import { getClosedThrough, markReopenedDays, type ShopTransaction } from '@brakeven/database';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { addDays, toLocalDate } from '@brakeven/values';
import fc from 'fast-check';
import { sql } from 'kysely';
import { v7 as newId } from 'uuid';

/** Work and rates fall into these days. */
const FIRST_DAY = toLocalDate('2026-02-20');
const DAYS = 14;

const aDay = fc.integer({ min: 0, max: DAYS - 1 }).map((n) => addDays(FIRST_DAY, n) as string);
const aRate = fc.integer({ min: 0, max: 250_000_000 }).map((millionths) => (millionths / 1e6).toFixed(6));
const aBurden = fc.integer({ min: 0, max: 600_000 }).map((parts) => (parts / 1e4).toFixed(4));
const someHours = fc.integer({ min: 1, max: 240_000 }).map((parts) => (parts / 1e4).toFixed(4));
const aWeight = fc.integer({ min: 1, max: 9_000_000 }).map((parts) => (parts / 1e4).toFixed(4));
const anAmount = fc.integer({ min: 1, max: 500_000 }).map((cents) => (cents / 100).toFixed(2));
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
const someEntries = fc.record({
  kind: fc.constant('addEntries' as const),
  entries: fc.array(anEntry, { minLength: 1, maxLength: 5 }),
});
const anIssue = fc.record({
  kind: fc.constant('addIssue' as const),
  material: pick,
  job: pick,
  day: aDay,
  weight: fc.integer({ min: 1, max: 900_000 }).map((parts) => (parts / 1e4).toFixed(4)),
  isReturn: fc.nat({ max: 3 }).map((n) => n === 0),
});
const aChange = fc.oneof(
  { arbitrary: someEntries, weight: 4 },
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
  fc.record({
    kind: fc.constant('addLot' as const),
    material: pick,
    day: aDay,
    weight: aWeight,
    cost: anAmount,
    freight: anAmount,
  }),
  { arbitrary: anIssue, weight: 4 },
  fc.record({
    kind: fc.constantFrom('addOutsideService' as const, 'addInvoice' as const, 'addCreditNote' as const),
    job: pick,
    day: aDay,
    amount: anAmount,
  }),
  fc.record({
    kind: fc.constant('flipVoided' as const),
    table: fc.constantFrom('sheetLot', 'materialIssue', 'outsideService', 'invoice'),
    row: pick,
  }),
  fc.record({
    kind: fc.constant('setOvertime' as const),
    threshold: fc.option(fc.integer({ min: 1, max: 160 })),
    to: fc.constantFrom('overhead' as const, 'jobs' as const),
    weekStart: fc.integer({ min: 0, max: 6 }),
  }),
  { arbitrary: fc.record({ kind: fc.constant('closeMonth' as const) }), weight: 2 },
  fc.record({ kind: fc.constant('reopenMonth' as const) }),
  fc.record({ kind: fc.constant('rollUp' as const) }),
);

/** A change to a shop, or a rollup in between. */
export type Change = typeof aChange extends fc.Arbitrary<infer T> ? T : never;

/** Changes that build a shop's entries and rates from nothing and then turn them over. */
export const someChanges: fc.Arbitrary<Change[]> = fc.array(aChange, { minLength: 12, maxLength: 60 });

interface Register {
  employees: string[];
  machines: string[];
  operations: string[];
  jobs: string[];
  materials: string[];
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
      materials: [await shop.addMaterial(), await shop.addMaterial()],
    },
  };
}

/** The same with every rate and some stock from before the first day, so that months can be closed. */
export async function createRatedShop(): Promise<{ shop: TestShop; register: Register }> {
  const { shop, register } = await createBareShop();
  const validFrom = '2026-01-01';
  for (const employeeId of register.employees)
    await shop.addPayRate({ employeeId, validFrom, wagePerHour: '23.415', burdenPercent: '28.5' });
  for (const machineId of register.machines)
    await shop.addMachineRate({
      machineId,
      validFrom,
      machineHourRate: '31.2',
      chargeOutRate: '95',
      runningCostPerHour: '4.37',
    });
  await shop.addOverheadRate({ validFrom, ratePerLabourHour: '12.345' });
  for (const materialId of register.materials)
    await shop.addLot({
      materialId,
      receivedOn: validFrom,
      weightKg: '2000',
      cost: '3177.77',
      freight: '95',
    });
  return { shop, register };
}

/** What the database refuses by itself: stock below nothing, more returned than drawn. */
const REFUSED = ['BK001', 'BK002'];

/** Applies one change in a transaction of its own; one that has nothing to change, or is refused, does nothing. */
export async function applyChange(shop: TestShop, register: Register, change: Change): Promise<void> {
  try {
    await shop.inShop((trx) => applyInShop(trx, shop.shop.shopId, register, change));
  } catch (error) {
    if (!REFUSED.includes((error as { code?: string }).code ?? '')) throw error;
  }
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

async function addMove(
  trx: ShopTransaction,
  shopId: string,
  register: Register,
  change: Extract<Change, { kind: 'addLot' | 'addIssue' }>,
): Promise<void> {
  const materialId = at(register.materials, change.material) ?? '';
  const row = { shopId, materialId, weightKg: change.weight };
  if (change.kind === 'addLot') {
    const { day: receivedOn, cost, freight } = change;
    const lotId = newId();
    await trx
      .insertInto('sheetLot')
      .values({ ...row, lotId, number: lotId, receivedOn, cost, freight })
      .execute();
  } else {
    const jobId = at(register.jobs, change.job) ?? '';
    const kind = change.isReturn ? 'return' : 'issue';
    await trx
      .insertInto('materialIssue')
      .values({ ...row, issueId: newId(), jobId, kind, issuedOn: change.day })
      .execute();
  }
}

async function addAmount(
  trx: ShopTransaction,
  shopId: string,
  register: Register,
  { kind, job, day, amount }: Extract<Change, { kind: 'addOutsideService' | 'addInvoice' | 'addCreditNote' }>,
): Promise<void> {
  const row = { shopId, jobId: at(register.jobs, job) ?? '', amount };
  if (kind === 'addOutsideService') {
    await trx
      .insertInto('outsideService')
      .values({ ...row, incurredOn: day })
      .execute();
  } else {
    const invoice = {
      invoicedOn: day,
      number: newId(),
      kind: kind === 'addInvoice' ? 'invoice' : 'credit-note',
    };
    await trx
      .insertInto('invoice')
      .values({ ...row, ...(invoice as { invoicedOn: string; number: string; kind: 'invoice' }) })
      .execute();
  }
}

const KEY_OF = {
  sheetLot: 'lotId',
  materialIssue: 'issueId',
  outsideService: 'outsideServiceId',
  invoice: 'invoiceId',
} as const;

async function flipVoided(
  trx: ShopTransaction,
  { table: name, row }: Extract<Change, { kind: 'flipVoided' }>,
): Promise<void> {
  const table = name as 'sheetLot';
  const key = KEY_OF[name as keyof typeof KEY_OF] as 'lotId';
  const rows = await trx.selectFrom(table).select([key, 'voidedAt']).orderBy(key).execute();
  const found = at(rows, row);
  if (!found) return;
  await trx
    .updateTable(table)
    .set({ voidedAt: found.voidedAt === null ? new Date() : null })
    .where(key, '=', found[key])
    .execute();
}

async function setOvertime(
  trx: ShopTransaction,
  shopId: string,
  { threshold, to, weekStart }: Extract<Change, { kind: 'setOvertime' }>,
): Promise<void> {
  await trx
    .updateTable('shop')
    .set({ overtimeThresholdHours: threshold?.toFixed(2) ?? null, overtimeTo: to, weekStart })
    .where('shopId', '=', shopId)
    .execute();
}

/** Closes the month after the latest closed one, as the shop may: nothing waits for it, and no rate is missing. */
async function closeMonth(trx: ShopTransaction, shopId: string): Promise<void> {
  const closedThrough = (await getClosedThrough(trx)) ?? '2026-01-31';
  const { rows } = await sql<{ month: string; isReady: boolean }>`
    select m.month,
      not exists (select from dirty_day where worked_on < m.month + interval '1 month')
        and not exists (select from rate_gap where posted_on < m.month + interval '1 month') as is_ready
    from (select ${closedThrough}::date + 1 as month) m`.execute(trx);
  const [next] = rows;
  if (!next?.isReady || next.month > '2026-05-01') return;
  await trx.insertInto('monthClose').values({ shopId, month: next.month, closedBy: 'Test' }).execute();
}

async function reopenMonth(trx: ShopTransaction): Promise<void> {
  const latest = await trx
    .selectFrom('monthClose')
    .select('monthCloseId')
    .where('reopenedAt', 'is', null)
    .orderBy('month', 'desc')
    .executeTakeFirst();
  if (!latest) return;
  await trx
    .updateTable('monthClose')
    .set({ reopenedAt: new Date(), reopenedBy: 'Test', reopenReason: 'Test' })
    .where('monthCloseId', '=', latest.monthCloseId)
    .execute();
  await markReopenedDays(trx);
}
