import { type Role, type Shop } from '@brakeven/contract';
import { connect, type Database, inShop, type ShopTransaction, type Tables } from '@brakeven/database';
import { type ShopContext } from '@brakeven/use-cases';
import { type Insertable } from 'kysely';
import { v7 as newId } from 'uuid';

/** A row to insert: the shop is known, and what has a sensible default may be left out. */
type Row<T extends keyof Tables, Optional extends keyof Insertable<Tables[T]> = never> = Omit<
  Insertable<Tables[T]>,
  'shopId' | Optional
> &
  Partial<Pick<Insertable<Tables[T]>, Optional>>;

/** A shop of its own in the test database, and builders of its rows; each builder answers the new row's id. */
export interface TestShop {
  /** Connected as the application. */
  db: Database;
  /** Connected as the owner of the schema. */
  ownerDb: Database;
  shop: Shop;
  context(role?: Role, options?: { employeeId?: string | null; now?: () => Date }): ShopContext;
  /** Runs in a transaction of the shop, as the application. */
  inShop<T>(work: (trx: ShopTransaction) => Promise<T>): Promise<T>;
  addEmployee(row?: Partial<Row<'employee'>>): Promise<string>;
  addPayRate(row: Row<'payRate', 'burdenPercent'>): Promise<string>;
  addOverheadRate(row: Row<'overheadRate'>): Promise<string>;
  addMachine(row?: Partial<Row<'machine'>>): Promise<string>;
  addMachineCostItem(row: Row<'machineCostItem', 'kind'>): Promise<string>;
  addMachineRate(row: Row<'machineRate'>): Promise<string>;
  addOperation(row?: Partial<Row<'operation'>>): Promise<string>;
  addCustomer(name: string): Promise<string>;
  addJob(row?: Partial<Row<'job'>>): Promise<string>;
  addImport(row?: Partial<Row<'timesheetImport'>>): Promise<string>;
  addEntries(rows: readonly Row<'timeEntry'>[]): Promise<string[]>;
  addMaterial(row?: Partial<Row<'material'>>): Promise<string>;
  addLot(row: Row<'sheetLot', 'number'>): Promise<string>;
  addIssue(row: Row<'materialIssue', 'kind'>): Promise<string>;
  addOutsideService(row: Row<'outsideService'>): Promise<string>;
  addInvoice(row: Row<'invoice', 'kind' | 'number'>): Promise<string>;
  addPunch(row: Row<'punch', 'name' | 'noseRadiusMm'>): Promise<string>;
  /** @returns the ids of the die and its one opening */
  addDie(
    row: Row<'die', 'name'>,
    opening: Row<'dieOpening', 'dieId' | 'shoulderRadiusMm'>,
  ): Promise<{ dieId: string; dieOpeningId: string }>;
  /** @param month its first day; roll up before */
  addMonthClose(month: string): Promise<string>;
  /** Ends both connections; the rows stay, other tests do not see them. */
  close(): Promise<void>;
}

/** Makes a shop with a random name; `DATABASE_URL` and `DATABASE_OWNER_URL` say where. */
export async function createTestShop(settings: Partial<Omit<Shop, 'shopId'>> = {}): Promise<TestShop> {
  const ownerDb = connect(readUrl('DATABASE_OWNER_URL'), { connectionsMax: 2 });
  const db = connect(readUrl('DATABASE_URL'), { connectionsMax: 6 });
  const shop: Shop = {
    shopId: newId(),
    name: `Test shop ${newId()}`,
    timeZone: 'America/Chicago',
    currency: 'USD',
    units: 'us',
    weekStart: 1,
    overtimeThresholdHours: '40.00',
    overtimeTo: 'overhead',
    ...settings,
  };
  await inShop(ownerDb, shop.shopId, { userId: null, name: 'Test' }, (trx) =>
    trx.insertInto('shop').values(shop).execute(),
  );
  const run = <T>(work: (trx: ShopTransaction) => Promise<T>) =>
    inShop(db, shop.shopId, { userId: null, name: 'Test' }, work);
  return {
    db,
    ownerDb,
    shop,
    inShop: run,
    context: (role = 'owner', options = {}) => ({
      db,
      shop,
      actor: { userId: null, name: `Test ${role}`, role, employeeId: options.employeeId ?? null },
      now: options.now,
    }),
    ...createBuilders(shop.shopId, run),
    close: async () => {
      await Promise.all([db.destroy(), ownerDb.destroy()]);
    },
  };
}

type Builders = Pick<TestShop, Extract<keyof TestShop, `add${string}`>>;

function createBuilders(shopId: string, run: TestShop['inShop']): Builders {
  let count = 0;
  const nth = (prefix: string) => `${prefix}${(count += 1)}`;
  const add = async <T extends keyof Tables>(table: T, idColumn: string, row: object): Promise<string> => {
    const id = newId();
    const values = { shopId, [idColumn]: id, ...row } as unknown as Insertable<Tables[T]>;
    await run((trx) => trx.insertInto(table).values(values).execute());
    return ((row as Record<string, string>)[idColumn] ?? id) as string;
  };
  return {
    addEmployee: (row) => add('employee', 'employeeId', { number: nth('E'), name: nth('Employee '), ...row }),
    addPayRate: (row) => add('payRate', 'payRateId', { burdenPercent: '0', ...row }),
    addOverheadRate: (row) => add('overheadRate', 'overheadRateId', row),
    addMachine: (row) =>
      add('machine', 'machineId', { code: nth('M'), name: nth('Machine '), kind: 'Press brake', ...row }),
    addMachineCostItem: (row) => add('machineCostItem', 'machineCostItemId', { kind: 'price', ...row }),
    addMachineRate: (row) => add('machineRate', 'machineRateId', row),
    addOperation: (row) =>
      add('operation', 'operationId', { code: nth('OP'), name: nth('Operation '), ...row }),
    addCustomer: (name) => add('customer', 'customerId', { name }),
    addJob: (row) => add('job', 'jobId', { number: nth('J'), title: nth('Job '), status: 'open', ...row }),
    addImport: (row) => add('timesheetImport', 'importId', { ...emptyImport(), ...row }),
    addMaterial: (row) => add('material', 'materialId', { name: nth('Sheet '), form: 'sheet', ...row }),
    addLot: (row) => add('sheetLot', 'lotId', { number: nth('L'), ...row }),
    addIssue: (row) => add('materialIssue', 'issueId', { kind: 'issue', ...row }),
    addOutsideService: (row) => add('outsideService', 'outsideServiceId', row),
    addInvoice: (row) => add('invoice', 'invoiceId', { kind: 'invoice', number: nth('I'), ...row }),
    addPunch: (row) => add('punch', 'punchId', { name: nth('P'), noseRadiusMm: '1', ...row }),
    addDie: async (row, opening) => {
      const dieId = await add('die', 'dieId', { name: nth('D'), ...row });
      const values = { dieId, shoulderRadiusMm: '2', ...opening };
      return { dieId, dieOpeningId: await add('dieOpening', 'dieOpeningId', values) };
    },
    addMonthClose: (month) => add('monthClose', 'monthCloseId', { month, closedBy: 'Test' }),
    addEntries: (rows) => run((trx) => insertEntries(trx, shopId, rows)),
  };
}

const ROWS_PER_INSERT = 2_000;

async function insertEntries(
  trx: ShopTransaction,
  shopId: string,
  rows: readonly Row<'timeEntry'>[],
): Promise<string[]> {
  const entries = rows.map((row) => ({ shopId, ...row, entryId: row.entryId ?? newId() }));
  for (let from = 0; from < entries.length; from += ROWS_PER_INSERT) {
    await trx
      .insertInto('timeEntry')
      .values(entries.slice(from, from + ROWS_PER_INSERT))
      .execute();
  }
  return entries.map((entry) => entry.entryId);
}

function emptyImport(): Omit<Insertable<Tables['timesheetImport']>, 'shopId' | 'importId'> {
  return {
    fileName: 'week.xlsx',
    fileSha256: '0'.repeat(64),
    sheet: 'Hours',
    mapping: '{}',
    importedBy: 'Test',
    rowsRead: 0,
    entriesAdded: 0,
    alreadyThere: 0,
    refused: 0,
    hoursRead: '0',
    hoursAdded: '0',
    problems: '[]',
  };
}

function readUrl(name: 'DATABASE_URL' | 'DATABASE_OWNER_URL'): string {
  const url = process.env[name];
  if (!url) throw new Error(`Set ${name} to the test database; npm test does.`);
  return url;
}
