import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { type ShopContext } from '@brakeven/use-cases';
import { sql } from 'kysely';
import { type BenchDatabase } from './bench';

/** A shop with people, machines, jobs and effective-dated rates, and as many entries as a bench wants. */
export interface BenchShop extends TestShop {
  owner: ShopContext;
  /** Adds entries by one set-based statement, the days one after the other from `FIRST_DAY` on. */
  addHistory(history: History): Promise<void>;
  /** Adds lots, issues, outside services and invoices over the days that have entries: a tenth as many as entries. */
  addMoney(history: History): Promise<void>;
  /** What autovacuum does sooner or later, now. */
  tidy(): Promise<void>;
}

export interface History {
  entries: number;
  entriesPerDay: number;
}

export const FIRST_DAY = '2017-01-01';
/** After every day of every bench, so that no entry lies in the future. */
const NOW = new Date('2026-11-30T18:00:00Z');

export const EMPLOYEES = 40;
const OPERATIONS = 8;
const MACHINES = 6;

/** Days that a job is worked on, as one of several at a time. */
const DAYS_OF_JOB = 20;

/** @param jobs a shop has some ten to twenty entries a job and operation, so give about a hundredth of its entries */
export async function createBenchShop(database: BenchDatabase, jobs: number): Promise<BenchShop> {
  Object.assign(process.env, database);
  const shop = await createTestShop();
  await addRegister(shop, jobs);
  return {
    ...shop,
    owner: shop.context('owner', { now: () => NOW }),
    addHistory: (history) => addHistory(shop, history),
    addMoney: (history) => addMoney(shop, history),
    tidy: async () => {
      await sql`vacuum analyze`.execute(shop.ownerDb);
    },
  };
}

/** Every third operation has a default machine; every tenth job is not billable; each rate has changed twice. */
async function addRegister({ inShop, shop: { shopId } }: TestShop, jobs: number): Promise<void> {
  await inShop(async (trx) => {
    await sql`insert into employee (shop_id, number, name)
      select ${shopId}::uuid, n::text, 'Worker ' || n from generate_series(1, ${EMPLOYEES}::integer) n`.execute(
      trx,
    );
    await sql`insert into machine (shop_id, code, name, kind, in_service_on)
      select ${shopId}::uuid, 'M' || n, 'Machine ' || n, 'Press brake', ${FIRST_DAY}::date + n * 20
      from generate_series(1, ${MACHINES}::integer) n`.execute(trx);
    await sql`insert into operation (shop_id, code, name, default_machine_id)
      select ${shopId}::uuid, 'OP' || n, 'Operation ' || n, (select machine_id from machine where n % 3 = 0 and code = 'M' || n / 3)
      from generate_series(1, ${OPERATIONS}::integer) n`.execute(trx);
    await sql`insert into job (shop_id, number, title, is_billable, status)
      select ${shopId}::uuid, 'J-' || n, 'Job ' || n, n % 10 <> 0, 'open'
      from generate_series(1, ${jobs}::integer) n`.execute(trx);
    await addRates(trx, shopId);
  });
}

const CHANGES = sql`generate_series(0, 2) step`;
const validFrom = sql`${FIRST_DAY}::date - 30 + step * 400`;

async function addRates(
  trx: Parameters<Parameters<TestShop['inShop']>[0]>[0],
  shopId: string,
): Promise<void> {
  await sql`insert into pay_rate (shop_id, employee_id, valid_from, wage_per_hour, burden_percent)
    select ${shopId}::uuid, employee_id, ${validFrom}, 21.35 + number::integer * 0.4 + step, 28.5
    from employee, ${CHANGES}`.execute(trx);
  await sql`insert into overhead_rate (shop_id, valid_from, rate_per_labour_hour)
    select ${shopId}::uuid, ${validFrom}, 17.25 + step from ${CHANGES}`.execute(trx);
  await sql`insert into machine_rate (shop_id, machine_id, valid_from, machine_hour_rate, charge_out_rate, running_cost_per_hour)
    select ${shopId}::uuid, machine_id, ${validFrom}, 31.75 + step, 95 + step, 6.4 + step
    from machine, ${CHANGES}`.execute(trx);
}

/** A million rows would take minutes with indexes and references in place; both are as before afterwards. */
async function addHistory(shop: TestShop, history: History): Promise<void> {
  const { rows } = await sql<{ drop: string; create: string }>`
    select 'alter table time_entry drop constraint ' || conname as "drop",
      'alter table time_entry add constraint ' || conname || ' ' || pg_get_constraintdef(oid) || ' not valid' as "create"
    from pg_constraint where conrelid = 'time_entry'::regclass and contype = 'f'
    union all
    select 'drop index ' || indexrelid::regclass, pg_get_indexdef(indexrelid)
    from pg_index where indrelid = 'time_entry'::regclass and not indisprimary`.execute(shop.ownerDb);
  for (const { drop } of rows) await sql.raw(drop).execute(shop.ownerDb);
  await insertEntries(shop, history);
  for (const { create } of rows) await sql.raw(create).execute(shop.ownerDb);
}

const MATERIALS = 20;
const ENTRIES_PER_MONEY_ROW = 50;

/** In each set of rows: one lot of a material, ten times what is issued from it, services and invoices. */
async function addMoney(
  { inShop, shop: { shopId } }: TestShop,
  { entries, entriesPerDay }: History,
): Promise<void> {
  const rows = entries / ENTRIES_PER_MONEY_ROW;
  const day = sql`${FIRST_DAY}::date + n * ${ENTRIES_PER_MONEY_ROW}::integer / ${entriesPerDay}::integer`;
  const job = sql`(select array_agg(job_id order by number) from job) as jobs`;
  const jobOf = sql`jobs[1 + n % array_length(jobs, 1)]`;
  const series = sql`generate_series(0, ${rows}::integer - 1) n`;
  await inShop(async (trx) => {
    await sql`insert into material (shop_id, name, form)
      select ${shopId}::uuid, 'Sheet ' || n, 'sheet' from generate_series(1, ${MATERIALS}::integer) n`.execute(
      trx,
    );
    const materials = sql`(select array_agg(material_id order by name) from material) as materials`;
    const materialOf = sql`materials[1 + n % ${MATERIALS}::integer]`;
    await sql`insert into sheet_lot (shop_id, number, material_id, received_on, weight_kg, cost, freight)
      select ${shopId}::uuid, 'L' || n, ${materialOf}, ${day}, 1000, 1500 + n % 700, 40
      from (select ${materials}) ids, ${series}`.execute(trx);
    await sql`insert into material_issue (shop_id, job_id, material_id, issued_on, kind, weight_kg)
      select ${shopId}::uuid, ${jobOf}, ${materialOf}, ${day}, 'issue', 31.5 + (n + part) % 60
      from (select ${job}, ${materials}) ids, ${series}, generate_series(1, 3) part`.execute(trx);
    await sql`insert into outside_service (shop_id, job_id, incurred_on, amount)
      select ${shopId}::uuid, ${jobOf}, ${day}, 20 + n % 900 from (select ${job}) ids, ${series}`.execute(
      trx,
    );
    await sql`insert into invoice (shop_id, job_id, kind, number, invoiced_on, amount)
      select ${shopId}::uuid, ${jobOf}, case when n % 20 = 0 then 'credit-note' else 'invoice' end, n::text, ${day},
        200 + n % 3000 from (select ${job}) ids, ${series}`.execute(trx);
  });
}

/** Most rows name no machine, as people fill timesheets in; some then get their operation's. */
async function insertEntries(
  { inShop, shop: { shopId } }: TestShop,
  { entries, entriesPerDay }: History,
): Promise<void> {
  await inShop((trx) =>
    sql`
      with ids as (
        select (select array_agg(employee_id order by number) from employee) as employees,
          (select array_agg(job_id order by number) from job) as jobs,
          (select array_agg(operation_id order by code) from operation) as operations,
          (select array_agg(machine_id order by code) from machine) as machines,
          (select greatest(1, count(*)::bigint * ${entriesPerDay}::integer * ${DAYS_OF_JOB} / ${entries}::integer)::integer
            from job) as at_a_time
      )
      insert into time_entry (shop_id, worked_on, employee_id, job_id, operation_id, machine_id, hours, good_pieces,
        source_row, source_cell)
      select ${shopId}::uuid, ${FIRST_DAY}::date + n / ${entriesPerDay}::integer,
        employees[1 + n % ${EMPLOYEES}::integer],
        jobs[1 + (n / (${entriesPerDay}::integer * ${DAYS_OF_JOB}) * at_a_time + n * 7 % at_a_time)
          % array_length(jobs, 1)],
        operations[1 + n * 5 % ${OPERATIONS}::integer],
        case when n % 4 = 0 then machines[1 + n % ${MACHINES}::integer] end,
        0.25 + n % 29 * 0.25, n % 50, n % 10000, 'F' || n % 10000
      from ids, generate_series(0, ${entries}::integer - 1) n`.execute(trx),
  );
}
