import { type Kysely, sql } from 'kysely';

/** People, customers, operations, machines, jobs and their effective-dated rates. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await createPeople(db);
  await createMachines(db);
  await createJobs(db);
}

async function createPeople(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table employee (
      shop_id uuid not null references shop,
      employee_id uuid not null default uuid_v7(),
      number text not null check (number <> ''),
      name text not null check (name <> ''),
      is_active boolean not null default true,
      primary key (shop_id, employee_id),
      unique (shop_id, number)
    )`.execute(db);
  await sql`
    create table pay_rate (
      shop_id uuid not null references shop,
      pay_rate_id uuid not null default uuid_v7(),
      employee_id uuid not null,
      valid_from date not null,
      wage_per_hour numeric(14,6) not null check (wage_per_hour >= 0),
      burden_percent numeric(9,4) not null check (burden_percent between 0 and 1000),
      primary key (shop_id, pay_rate_id),
      unique (shop_id, employee_id, valid_from),
      foreign key (shop_id, employee_id) references employee
    )`.execute(db);
  await sql`
    create table overhead_rate (
      shop_id uuid not null references shop,
      overhead_rate_id uuid not null default uuid_v7(),
      valid_from date not null,
      rate_per_labour_hour numeric(14,6) not null check (rate_per_labour_hour >= 0),
      primary key (shop_id, overhead_rate_id),
      unique (shop_id, valid_from)
    )`.execute(db);
  await sql`alter table user_account add foreign key (shop_id, employee_id) references employee`.execute(db);
  await sql`select secure_table('employee', 'employee_id')`.execute(db);
  await sql`select secure_table('pay_rate', 'pay_rate_id')`.execute(db);
  await sql`select secure_table('overhead_rate', 'overhead_rate_id')`.execute(db);
}

async function createMachines(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table machine (
      shop_id uuid not null references shop,
      machine_id uuid not null default uuid_v7(),
      code text not null check (code <> ''),
      name text not null check (name <> ''),
      kind text not null,
      in_service_on date,
      rated_force_kn numeric(12,5) check (rated_force_kn > 0),
      bed_length_mm numeric(12,5) check (bed_length_mm > 0),
      primary key (shop_id, machine_id),
      unique (shop_id, code)
    )`.execute(db);
  await sql`
    create table machine_cost_item (
      shop_id uuid not null references shop,
      machine_cost_item_id uuid not null default uuid_v7(),
      machine_id uuid not null,
      incurred_on date not null,
      kind text not null check (kind in
        ('price', 'freight', 'rigging', 'electrical', 'tooling', 'installation', 'training', 'other')),
      description text not null default '',
      amount numeric(14,2) not null check (amount >= 0),
      primary key (shop_id, machine_cost_item_id),
      foreign key (shop_id, machine_id) references machine
    )`.execute(db);
  await sql`create index machine_cost_item_machine on machine_cost_item (shop_id, machine_id, incurred_on)`.execute(
    db,
  );
  await sql`
    create table machine_rate (
      shop_id uuid not null references shop,
      machine_rate_id uuid not null default uuid_v7(),
      machine_id uuid not null,
      valid_from date not null,
      machine_hour_rate numeric(14,6) not null check (machine_hour_rate >= 0),
      charge_out_rate numeric(14,6) not null check (charge_out_rate >= 0),
      running_cost_per_hour numeric(14,6) not null check (running_cost_per_hour >= 0),
      primary key (shop_id, machine_rate_id),
      unique (shop_id, machine_id, valid_from),
      foreign key (shop_id, machine_id) references machine
    )`.execute(db);
  await sql`
    create table operation (
      shop_id uuid not null references shop,
      operation_id uuid not null default uuid_v7(),
      code text not null check (code <> ''),
      name text not null check (name <> ''),
      default_machine_id uuid,
      primary key (shop_id, operation_id),
      unique (shop_id, code),
      foreign key (shop_id, default_machine_id) references machine
    )`.execute(db);
  await sql`select secure_table('machine', 'machine_id')`.execute(db);
  await sql`select secure_table('machine_cost_item', 'machine_cost_item_id')`.execute(db);
  await sql`select secure_table('machine_rate', 'machine_rate_id')`.execute(db);
  await sql`select secure_table('operation', 'operation_id')`.execute(db);
}

async function createJobs(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table customer (
      shop_id uuid not null references shop,
      customer_id uuid not null default uuid_v7(),
      name text not null check (name <> ''),
      primary key (shop_id, customer_id),
      unique (shop_id, name)
    )`.execute(db);
  await sql`
    create table job (
      shop_id uuid not null references shop,
      job_id uuid not null default uuid_v7(),
      number text not null check (number <> ''),
      customer_id uuid,
      title text not null check (title <> ''),
      quantity integer check (quantity > 0),
      opened_on date,
      due_on date,
      quoted_price numeric(14,2) check (quoted_price >= 0),
      is_billable boolean not null default true,
      status text not null check (status in ('quoted', 'open', 'finished', 'invoiced', 'lost', 'cancelled')),
      primary key (shop_id, job_id),
      unique (shop_id, number),
      foreign key (shop_id, customer_id) references customer
    )`.execute(db);
  await sql`select secure_table('customer', 'customer_id')`.execute(db);
  await sql`select secure_table('job', 'job_id')`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`alter table user_account drop constraint user_account_shop_id_employee_id_fkey`.execute(db);
  await sql`drop table job, customer, operation, machine_rate, machine_cost_item, machine, overhead_rate, pay_rate, employee`.execute(
    db,
  );
}
