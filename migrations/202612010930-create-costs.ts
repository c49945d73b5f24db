import { type Kysely, sql } from 'kysely';

/**
 * What the rollup writes. Lines, gaps and days carry no foreign keys: only the rollup writes them, from rows that
 * have them, and a million checks would cost more than the lines. Every read joins on shop_id and id.
 * The hours of a job day are those of all entries that owe the category, whether or not a rate was found.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table rollup_run (
      shop_id uuid not null references shop,
      run_id uuid not null default uuid_v7(),
      started_at timestamptz not null default now(),
      finished_at timestamptz,
      is_full boolean not null,
      started_by text not null,
      days integer not null default 0,
      lines integer not null default 0,
      through date,
      primary key (shop_id, run_id)
    )`.execute(db);
  await sql`
    create table cost_line (
      shop_id uuid not null,
      worked_on date not null,
      source_id uuid not null,
      category text not null,
      source_kind text not null,
      job_id uuid not null,
      operation_id uuid,
      employee_id uuid,
      machine_id uuid,
      quantity numeric(12,4) not null,
      rate numeric(14,6) not null,
      rate_factor numeric(9,6) not null,
      rate_id uuid not null,
      amount numeric(14,2) not null,
      run_id uuid not null,
      primary key (shop_id, worked_on, source_id, category)
    )`.execute(db);
  await sql`create index cost_line_job on cost_line (shop_id, job_id, worked_on, source_id, category)`.execute(
    db,
  );
  await sql`
    create table job_day (
      shop_id uuid not null,
      job_id uuid not null,
      worked_on date not null,
      category text not null,
      hours numeric(12,4) not null,
      amount numeric(16,2) not null,
      lines integer not null,
      primary key (shop_id, job_id, worked_on, category)
    )`.execute(db);
  await sql`create index job_day_day on job_day (shop_id, worked_on)`.execute(db);
  await sql`
    create table machine_day (
      shop_id uuid not null,
      machine_id uuid not null,
      worked_on date not null,
      hours numeric(12,4) not null,
      billable_hours numeric(12,4) not null,
      earned numeric(16,2) not null,
      operator_labour numeric(16,2) not null,
      running numeric(16,2) not null,
      primary key (shop_id, machine_id, worked_on)
    )`.execute(db);
  await sql`create index machine_day_day on machine_day (shop_id, worked_on)`.execute(db);
  await sql`
    create table machine_job_day (
      shop_id uuid not null,
      worked_on date not null,
      machine_id uuid not null,
      job_id uuid not null,
      hours numeric(12,4) not null,
      billable_hours numeric(12,4) not null,
      earned numeric(16,2) not null,
      operator_labour numeric(16,2) not null,
      running numeric(16,2) not null,
      primary key (shop_id, worked_on, machine_id, job_id)
    )`.execute(db);
  await sql`
    create table rate_gap (
      shop_id uuid not null,
      worked_on date not null,
      category text not null,
      entry_id uuid not null,
      job_id uuid not null,
      operation_id uuid not null,
      employee_id uuid not null,
      machine_id uuid,
      hours numeric(9,4) not null,
      primary key (shop_id, worked_on, entry_id, category)
    )`.execute(db);
  await sql`create index rate_gap_job on rate_gap (shop_id, job_id, entry_id)`.execute(db);
  await sql`
    create table payback_snapshot (
      shop_id uuid not null references shop,
      machine_id uuid not null,
      as_of date not null,
      basis text not null,
      outlay numeric(16,2) not null,
      earned numeric(16,2) not null,
      operator_labour numeric(16,2) not null,
      running numeric(16,2) not null,
      break_even_on date,
      break_even_method text not null,
      run_id uuid not null,
      primary key (shop_id, machine_id, as_of),
      foreign key (shop_id, machine_id) references machine,
      foreign key (shop_id, run_id) references rollup_run
    )`.execute(db);
  for (const table of [
    'rollup_run',
    'cost_line',
    'job_day',
    'machine_day',
    'machine_job_day',
    'rate_gap',
    'payback_snapshot',
  ])
    await sql`select secure_table(${table}, null)`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop table payback_snapshot, rate_gap, machine_job_day, machine_day, job_day, cost_line, rollup_run`.execute(
    db,
  );
}
