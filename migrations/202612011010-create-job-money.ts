import { type Kysely, sql } from 'kysely';

/** Outside services, invoices and credit notes, and estimates; nothing on a job is dated before the job. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await createDatedRows(db);
  await createEstimates(db);
  await createMachineRateBasis(db);
  await refuseBeforeJob(db);
}

async function createDatedRows(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table outside_service (
      shop_id uuid not null references shop,
      outside_service_id uuid not null default uuid_v7(),
      job_id uuid not null,
      incurred_on date not null,
      vendor text not null default '',
      description text not null default '',
      amount numeric(14,2) not null check (amount > 0),
      created_at timestamptz not null default now(),
      voided_at timestamptz,
      voided_by text,
      primary key (shop_id, outside_service_id),
      foreign key (shop_id, job_id) references job
    )`.execute(db);
  await sql`
    create table invoice (
      shop_id uuid not null references shop,
      invoice_id uuid not null default uuid_v7(),
      job_id uuid not null,
      kind text not null check (kind in ('invoice', 'credit-note')),
      number text not null check (number <> ''),
      invoiced_on date not null,
      description text not null default '',
      amount numeric(14,2) not null check (amount > 0),
      created_at timestamptz not null default now(),
      voided_at timestamptz,
      voided_by text,
      primary key (shop_id, invoice_id),
      foreign key (shop_id, job_id) references job
    )`.execute(db);
  // One invoice may be split over several jobs, so its number is unique on a job only.
  await sql`create unique index invoice_number on invoice (shop_id, job_id, kind, number) where voided_at is null`.execute(
    db,
  );
  for (const [table, day] of [
    ['outside_service', 'incurred_on'],
    ['invoice', 'invoiced_on'],
  ]) {
    await sql.raw(`create index ${table}_day on ${table} (shop_id, ${day})`).execute(db);
    await sql.raw(`create index ${table}_job on ${table} (shop_id, job_id, ${day})`).execute(db);
  }
  await sql`select secure_table('outside_service', 'outside_service_id')`.execute(db);
  await sql`select secure_table('invoice', 'invoice_id')`.execute(db);
}

async function createEstimates(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table estimate (
      shop_id uuid not null references shop,
      job_id uuid not null,
      estimated_on date not null,
      scrap_allowance_percent numeric(9,4) not null default 0 check (scrap_allowance_percent between 0 and 100),
      margin_percent numeric(9,4) not null default 0 check (margin_percent >= 0 and margin_percent < 100),
      primary key (shop_id, job_id),
      foreign key (shop_id, job_id) references job
    )`.execute(db);
  await sql`
    create table estimate_line (
      shop_id uuid not null references shop,
      estimate_line_id uuid not null default uuid_v7(),
      job_id uuid not null,
      position integer not null check (position > 0),
      kind text not null check (kind in ('operation', 'material', 'outside')),
      operation_id uuid,
      machine_id uuid,
      setup_hours numeric(9,4) check (setup_hours >= 0),
      minutes_per_piece numeric(12,4) check (minutes_per_piece >= 0),
      pieces integer check (pieces > 0),
      labour_rate numeric(14,6) check (labour_rate >= 0),
      machine_hour_rate numeric(14,6) check (machine_hour_rate >= 0),
      overhead_rate numeric(14,6) check (overhead_rate >= 0),
      material_id uuid,
      weight_kg numeric(20,10) check (weight_kg > 0),
      price_per_kg numeric(14,6) check (price_per_kg >= 0),
      description text not null default '',
      amount numeric(14,2) check (amount > 0),
      primary key (shop_id, estimate_line_id),
      unique (shop_id, job_id, position) deferrable initially deferred,
      foreign key (shop_id, job_id) references estimate,
      foreign key (shop_id, operation_id) references operation,
      foreign key (shop_id, machine_id) references machine,
      foreign key (shop_id, material_id) references material,
      constraint estimate_line_is_whole check (case kind
        when 'operation' then num_nonnulls(operation_id, setup_hours, minutes_per_piece, pieces, labour_rate,
            overhead_rate) = 6
          and setup_hours + minutes_per_piece > 0 and (machine_id is null) = (machine_hour_rate is null)
          and num_nonnulls(material_id, weight_kg, price_per_kg, amount) = 0
        when 'material' then num_nonnulls(material_id, weight_kg, price_per_kg) = 3
          and num_nonnulls(operation_id, machine_id, setup_hours, minutes_per_piece, pieces, amount) = 0
        else amount is not null
          and num_nonnulls(operation_id, machine_id, setup_hours, minutes_per_piece, pieces, material_id,
            weight_kg) = 0
      end)
    )`.execute(db);
  await sql`select secure_table('estimate', 'job_id')`.execute(db);
  await sql`select secure_table('estimate_line', 'estimate_line_id')`.execute(db);
}

/** What a machine-hour rate was built from. A rate typed in by hand has none. */
async function createMachineRateBasis(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table machine_rate_basis (
      shop_id uuid not null references shop,
      machine_rate_id uuid not null,
      price numeric(14,2) not null check (price > 0),
      salvage numeric(14,2) not null check (salvage >= 0),
      life_years numeric(7,3) not null check (life_years > 0),
      interest_percent numeric(9,4) not null check (interest_percent >= 0),
      floor_area_m2 numeric(12,5) not null check (floor_area_m2 >= 0),
      space_cost_per_m2_year numeric(14,6) not null check (space_cost_per_m2_year >= 0),
      insurance_per_year numeric(14,2) not null check (insurance_per_year >= 0),
      upkeep_per_year numeric(14,2) not null check (upkeep_per_year >= 0),
      productive_hours_per_year numeric(9,2) not null
        check (productive_hours_per_year > 0 and productive_hours_per_year <= 8784),
      power_kw numeric(10,3) not null check (power_kw >= 0),
      load_percent numeric(7,3) not null check (load_percent between 0 and 100),
      tariff_per_kwh numeric(14,6) not null check (tariff_per_kwh >= 0),
      consumables_per_hour numeric(14,6) not null check (consumables_per_hour >= 0),
      primary key (shop_id, machine_rate_id),
      foreign key (shop_id, machine_rate_id) references machine_rate on delete cascade,
      constraint machine_rate_basis_salvage check (salvage <= price)
    )`.execute(db);
  await sql`select secure_table('machine_rate_basis', 'machine_rate_id')`.execute(db);
}

const DATED_ON_JOB = [
  ['material_issue', 'issued_on'],
  ['outside_service', 'incurred_on'],
  ['invoice', 'invoiced_on'],
] as const;

/** BK003, with the row's date and the job's as JSON in the detail; also when a job's opening is moved past its rows. */
async function refuseBeforeJob(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function refuse_before_job() returns trigger language plpgsql as $$
    declare
      job_number text;
      opened date;
      dated date := (to_jsonb(new) ->> tg_argv[0])::date;
    begin
      select number, opened_on into job_number, opened from job
      where shop_id = new.shop_id and job_id = new.job_id;
      if new.voided_at is null and dated < opened then
        raise exception 'Dated before the job was opened.' using errcode = 'BK003',
          detail = jsonb_build_object('job', job_number, 'openedOn', opened, 'on', dated, 'table', tg_table_name)::text;
      end if;
      return null;
    end $$`.execute(db);
  for (const [table, day] of DATED_ON_JOB)
    await sql
      .raw(
        `create trigger refuse_before_job after insert or update on ${table}
         for each row execute function refuse_before_job('${day}')`,
      )
      .execute(db);
  await sql
    .raw(
      `create function refuse_job_after_rows() returns trigger language plpgsql as $$
       declare
         earliest date;
       begin
         select min(dated) into earliest from (${DATED_ON_JOB.map(
           ([table, day]) =>
             `select min(${day}) as dated from ${table}
              where shop_id = new.shop_id and job_id = new.job_id and voided_at is null`,
         ).join(' union all ')}) rows;
         if earliest < new.opened_on then
           raise exception 'The job has rows before that date.' using errcode = 'BK003',
             detail = jsonb_build_object('job', new.number, 'openedOn', new.opened_on, 'on', earliest, 'table', 'job')::text;
         end if;
         return null;
       end $$`,
    )
    .execute(db);
  await sql`
    create trigger refuse_job_after_rows after update of opened_on on job
    for each row when (old.opened_on is distinct from new.opened_on)
    execute function refuse_job_after_rows()`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop trigger refuse_job_after_rows on job`.execute(db);
  await sql`drop trigger refuse_before_job on material_issue`.execute(db);
  await sql`drop table machine_rate_basis, estimate_line, estimate, invoice, outside_service`.execute(db);
  await sql`drop function refuse_before_job(), refuse_job_after_rows()`.execute(db);
}
