import { createTestShop, type TestShop } from './test-shop';
import { type ShopTransaction } from '@brakeven/database';
import { sql } from 'kysely';

/** Tables that belong to no shop: sessions hold ids only, attempts a hash of an address, the rest is Kysely's own. */
const OUTSIDE_SHOPS = ['kysely_migration', 'kysely_migration_lock', 'session', 'sign_in_attempt'];

interface Column {
  tableName: string;
  columnName: string;
  dataType: string;
  isRequired: boolean;
}

let mine: TestShop;
let other: TestShop;
let tables: string[];
let columns: Column[];
beforeAll(async () => {
  mine = await createTestShop();
  other = await createTestShop();
  tables = await listTables();
  columns = await listColumns();
  for (const shop of [mine, other]) await fillEveryTable(shop);
}, 60_000);
afterAll(() => Promise.all([mine.close(), other.close()]));

async function listTables(): Promise<string[]> {
  const { rows } = await sql<{ tableName: string }>`
    select table_name from information_schema.tables
    where table_schema = 'public' and table_type = 'BASE TABLE' order by 1`.execute(mine.ownerDb);
  return rows.map(({ tableName }) => tableName).filter((name) => !OUTSIDE_SHOPS.includes(name));
}

async function listColumns(): Promise<Column[]> {
  const { rows } = await sql<Column>`
    select table_name, column_name, data_type, is_nullable = 'NO' and column_default is null as is_required
    from information_schema.columns where table_schema = 'public' order by ordinal_position`.execute(
    mine.ownerDb,
  );
  return rows;
}

/** One row of everything, so that no table passes because it is empty. */
async function fillEveryTable(shop: TestShop): Promise<void> {
  const ids = {
    employeeId: await shop.addEmployee(),
    operationId: await shop.addOperation(),
    machineId: await shop.addMachine(),
    customerId: await shop.addCustomer('Customer'),
    jobId: await shop.addJob(),
    importId: await shop.addImport(),
  };
  await shop.addPayRate({ employeeId: ids.employeeId, validFrom: '2026-01-01', wagePerHour: '20' });
  await shop.addOverheadRate({ validFrom: '2026-01-01', ratePerLabourHour: '10' });
  const { machineId } = ids;
  await shop.addMachineCostItem({ machineId, incurredOn: '2026-01-01', amount: '100', description: '' });
  const rates = { machineHourRate: '1', chargeOutRate: '2', runningCostPerHour: '1' };
  const machineRateId = await shop.addMachineRate({ machineId, validFrom: '2026-01-01', ...rates });
  const values: Record<string, string> = {
    ...toSnakeCase({ ...ids, ...(await addStockAndTools(shop, ids)), machineRateId }),
    shop_id: shop.shop.shopId,
  };
  await shop.inShop(async (trx) => {
    // The order lets whatever a row refers to come first.
    for (const table of ['rollup_run', 'user_account', ...tables]) {
      const { rows } = await sql`select 1 from ${sql.table(table)} limit 1`.execute(trx);
      if (rows.length === 0) await insertAnything(trx, table, values);
    }
  });
}

async function addStockAndTools(
  shop: TestShop,
  { jobId, machineId, operationId }: { jobId: string; machineId: string; operationId: string },
): Promise<Record<string, string>> {
  const materialId = await shop.addMaterial();
  await shop.addLot({ materialId, receivedOn: '2026-01-02', weightKg: '10', cost: '10' });
  await shop.addIssue({ materialId, jobId, issuedOn: '2026-01-02', weightKg: '1' });
  await shop.addOutsideService({ jobId, incurredOn: '2026-01-02', amount: '1' });
  await shop.addInvoice({ jobId, invoicedOn: '2026-01-02', amount: '1' });
  const punchId = await shop.addPunch({ machineId });
  const { dieId, dieOpeningId } = await shop.addDie({ machineId }, { openingMm: '16' });
  await shop.inShop(async (trx) => {
    const { shopId } = shop.shop;
    await trx.insertInto('estimate').values({ shopId, jobId, estimatedOn: '2026-01-02' }).execute();
    await addEstimateLines(trx, { shopId, jobId, materialId, machineId, operationId });
    // A card's sheets refer to the card, which its name would bring second.
    await trx.insertInto('depthCard').values({ shopId, machineId, angles: '[90]' }).execute();
  });
  return { materialId, punchId, dieId, dieOpeningId };
}

/** One of each kind, so that each column that refers to something does so somewhere. */
async function addEstimateLines(
  trx: ShopTransaction,
  { shopId, jobId, materialId, machineId, operationId }: Record<string, string>,
): Promise<void> {
  await sql`
    insert into estimate_line (shop_id, job_id, position, kind, operation_id, machine_id, setup_hours,
      minutes_per_piece, pieces, labour_rate, overhead_rate, machine_hour_rate)
    values (${shopId}, ${jobId}, 1, 'operation', ${operationId}, ${machineId}, 1, 1, 1, 1, 1, 1)`.execute(
    trx,
  );
  await sql`
    insert into estimate_line (shop_id, job_id, position, kind, material_id, weight_kg, price_per_kg)
    values (${shopId}, ${jobId}, 2, 'material', ${materialId}, 1, 1)`.execute(trx);
}

function toSnakeCase(record: Record<string, string>): Record<string, string> {
  return Object.fromEntries(
    Object.entries(record).map(([key, value]) => [
      key.replace(/[A-Z]/g, (c) => `_${c.toLowerCase()}`),
      value,
    ]),
  );
}

/** Values of the right type for the columns that must have one; `choices` satisfies what a check constraint asks. */
async function insertAnything(
  trx: ShopTransaction,
  table: string,
  known: Record<string, string>,
): Promise<void> {
  const choices: Record<string, string> = {
    email: 'somebody@ternhollow.example',
    role: 'lead',
    kind: 'employee',
    action: 'added',
    category: 'labour',
    gauge_system: 'steel',
    system: 'steel',
    month: '2020-01-01',
  };
  const aliasTarget = table === 'name_alias' ? ['employee_id'] : [];
  const wanted = columns.filter(
    ({ tableName, columnName, isRequired }) =>
      tableName === table && (isRequired || aliasTarget.includes(columnName)),
  );
  const runs = await sql<{ runId: string }>`select run_id from rollup_run limit 1`.execute(trx);
  const users = await sql<{ userId: string }>`select user_id from user_account limit 1`.execute(trx);
  const values = wanted.map(({ columnName, dataType }) => {
    const value =
      known[columnName] ??
      (columnName === 'run_id' ? runs.rows[0]?.runId : undefined) ??
      (columnName === 'user_id' ? users.rows[0]?.userId : undefined) ??
      choices[columnName] ??
      SAMPLES[dataType];
    return sql`${value}::text::${sql.raw(dataType)}`;
  });
  const names = wanted.map(({ columnName }) => sql.ref(columnName));
  await sql`insert into ${sql.table(table)} (${sql.join(names)}) values (${sql.join(values)})`.execute(trx);
}

const SAMPLES: Record<string, string> = {
  text: 'x',
  uuid: '0198f000-0000-7000-8000-000000000001',
  date: '2026-01-02',
  integer: '1',
  numeric: '1',
  boolean: 'true',
  jsonb: '{}',
  bytea: 'x',
  'timestamp with time zone': '2026-01-02T00:00:00Z',
};

const countRows = async (shop: TestShop, table: string, ofShop: TestShop) => {
  const { rows } = await shop.inShop((trx) =>
    sql<{
      n: number;
    }>`select count(*) as n from ${sql.table(table)} where shop_id = ${ofShop.shop.shopId}`.execute(trx),
  );
  return rows[0]?.n ?? 0;
};

const messageOf = (work: Promise<unknown>) =>
  work.then(
    () => 'was let through',
    (error: Error) => error.message,
  );

describe('the application’s role', () => {
  it('cannot get round row-level security, by itself or by another role', async () => {
    const { rows } = await sql<{ rolsuper: boolean; rolbypassrls: boolean; memberships: number }>`
      select rolsuper, rolbypassrls,
        (select count(*) from pg_auth_members m where m.member = r.oid) as memberships
      from pg_roles r where rolname = current_user`.execute(mine.db);
    expect(rows).toEqual([{ rolsuper: false, rolbypassrls: false, memberships: 0 }]);
  });

  it('owns nothing and cannot make tables', async () => {
    const { rows } = await sql`select 1 from pg_class where relowner = current_user::regrole`.execute(
      mine.db,
    );
    expect(rows).toEqual([]);
    expect(await messageOf(sql`create table stray (n int)`.execute(mine.db))).toMatch(/permission denied/);
  });
});

describe('every table', () => {
  it('carries shop_id, first in its primary key, its unique keys and its foreign keys', async () => {
    const { rows } = await sql<{ tableName: string; name: string; kind: string; first: string }>`
      select c.relname as table_name, k.conname as name, k.contype as kind, a.attname as first
      from pg_constraint k join pg_class c on c.oid = k.conrelid
      join pg_attribute a on a.attrelid = c.oid and a.attnum = k.conkey[1]
      where k.connamespace = 'public'::regnamespace and k.contype in ('p', 'u', 'f')`.execute(mine.ownerDb);
    const business = rows.filter(({ tableName }) => tables.includes(tableName));
    expect(new Set(business.filter(({ kind }) => kind === 'p').map(({ tableName }) => tableName))).toEqual(
      new Set(tables),
    );
    // A shop is opened by its name alone, so that names are unique over all shops.
    const others = business.filter(({ first }) => first !== 'shop_id').map(({ name }) => name);
    expect(others).toEqual(['shop_name_key']);
  });

  it('forces row-level security on its owner too', async () => {
    const { rows } = await sql<{ relname: string }>`
      select relname from pg_class
      where relnamespace = 'public'::regnamespace and relkind = 'r' and relrowsecurity and relforcerowsecurity
      order by 1`.execute(mine.ownerDb);
    expect(rows.map(({ relname }) => relname)).toEqual(tables);
  });

  it('holds rows of both shops in this test', async () => {
    for (const table of tables) {
      expect([table, await countRows(mine, table, mine)]).not.toEqual([table, 0]);
      expect([table, await countRows(other, table, other)]).not.toEqual([table, 0]);
    }
  });

  it('shows no row of another shop, and none at all while no shop is open', async () => {
    for (const table of tables) {
      expect([table, await countRows(mine, table, other)]).toEqual([table, 0]);
      const { rows } = await sql`select 1 from ${sql.table(table)} limit 1`.execute(mine.db);
      expect([table, rows]).toEqual([table, []]);
      const { rows: ofOwner } = await sql`select 1 from ${sql.table(table)} limit 1`.execute(mine.ownerDb);
      if (table !== 'shop') expect([table, ofOwner]).toEqual([table, []]);
    }
  });

  it('lets no row of another shop be changed or deleted', async () => {
    for (const table of tables) {
      const before = await countRows(other, table, other);
      const theirs = sql`shop_id = ${other.shop.shopId}`;
      for (const statement of [
        sql`update ${sql.table(table)} set shop_id = shop_id where ${theirs}`,
        sql`delete from ${sql.table(table)} where ${theirs}`,
      ]) {
        const changed = await mine
          .inShop((trx) => statement.execute(trx))
          .then(
            ({ numAffectedRows }) => Number(numAffectedRows),
            (error: Error) => error.message,
          );
        const isRefused = changed === 0 || /permission denied/.test(String(changed));
        expect([table, isRefused ? 'refused' : changed]).toEqual([table, 'refused']);
      }
      expect([table, await countRows(other, table, other)]).toEqual([table, before]);
    }
  });

  it('lets no row be put into another shop, nor moved there', async () => {
    for (const table of tables) {
      const insert = mine.inShop((trx) =>
        sql`insert into ${sql.table(table)}
          select (jsonb_populate_record(r, jsonb_build_object('shop_id', ${other.shop.shopId}::uuid))).*
          from ${sql.table(table)} r`.execute(trx),
      );
      expect([table, await messageOf(insert)]).toEqual([
        table,
        expect.stringMatching(/violates row-level security policy/),
      ]);
      const move = mine.inShop((trx) =>
        sql`update ${sql.table(table)} set shop_id = ${other.shop.shopId}`.execute(trx),
      );
      expect([table, await messageOf(move)]).toEqual([
        table,
        expect.stringMatching(/row-level security policy|permission denied|foreign key/),
      ]);
    }
  });
});

describe('every reference', () => {
  it('cannot point at a row of another shop', async () => {
    const { rows: references } = await sql<{ tableName: string; column: string; target: string }>`
      select c.relname as table_name, a.attname as column, t.relname as target
      from pg_constraint k join pg_class c on c.oid = k.conrelid join pg_class t on t.oid = k.confrelid
      join pg_attribute a on a.attrelid = c.oid and a.attnum = k.conkey[2]
      where k.contype = 'f' and k.connamespace = 'public'::regnamespace and cardinality(k.conkey) = 2`.execute(
      mine.ownerDb,
    );
    expect(references.length).toBeGreaterThan(15);
    for (const { tableName, column, target } of references) {
      const { rows } = await other.inShop((trx) => findAnyId(trx, target));
      const stranger = rows[0]?.id ?? '';
      // A spelling stands for one thing alone, so that what it stood for has to make way.
      const others = ['employee_id', 'job_id', 'operation_id', 'machine_id'].filter((one) => one !== column);
      const makeWay = others.map((one) => sql`, ${sql.ref(one)} = null`);
      const point = mine.inShop((trx) =>
        sql`update ${sql.table(tableName)} set ${sql.ref(column)} = ${stranger}
          ${tableName === 'name_alias' ? sql.join(makeWay, sql``) : sql``}
          ${tableName === 'estimate_line' ? sql`where ${sql.ref(column)} is not null` : sql``}`.execute(trx),
      );
      expect([tableName, column, await messageOf(point)]).toEqual([
        tableName,
        column,
        expect.stringMatching(/violates foreign key constraint/),
      ]);
    }
  });
});

/** An id of some row: the first column of that kind, since not all are called after their table. */
async function findAnyId(trx: ShopTransaction, target: string) {
  const column = columns.find(
    ({ tableName, columnName }) =>
      tableName === target && columnName !== 'shop_id' && columnName.endsWith('_id'),
  );
  return sql<{
    id: string;
  }>`select ${sql.ref(column?.columnName ?? '')} as id from ${sql.table(target)} limit 1`.execute(trx);
}

describe('what a shop is asked before it is open', () => {
  it('shows one shop by its exact name, to be read and not to be written', async () => {
    const read = mine.db.transaction().execute(async (trx) => {
      await sql`select set_config('app.shop_name', ${other.shop.name}, true)`.execute(trx);
      const shops = await trx.selectFrom('shop').select('name').execute();
      const written = await trx.updateTable('shop').set({ units: 'metric' }).executeTakeFirst();
      return { shops, written: Number(written.numUpdatedRows) };
    });
    expect(await read).toEqual({ shops: [{ name: other.shop.name }], written: 0 });
  });
});

describe('the audit trail', () => {
  it.each(['update audit_event set actor = ', 'delete from audit_event where actor <> '])(
    'cannot be rewritten: %s…',
    async (statement) => {
      const work = mine.inShop((trx) => sql`${sql.raw(statement)}'x'`.execute(trx));
      expect(await messageOf(work)).toMatch(/permission denied/);
    },
  );
});
