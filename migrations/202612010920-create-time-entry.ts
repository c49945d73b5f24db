import { type Kysely, sql } from 'kysely';

/** Timesheet imports with the file itself, remembered mappings and spellings, and the time entries. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table timesheet_import (
      shop_id uuid not null references shop,
      import_id uuid not null default uuid_v7(),
      file_name text not null,
      file_sha256 text not null,
      sheet text not null,
      mapping jsonb not null,
      status text not null default 'committed' check (status in ('committed', 'undone')),
      imported_by text not null,
      imported_at timestamptz not null default now(),
      undone_by text,
      undone_at timestamptz,
      rows_read integer not null,
      entries_added integer not null,
      already_there integer not null,
      refused integer not null,
      hours_read numeric(16,4) not null,
      hours_added numeric(16,4) not null,
      first_day date,
      last_day date,
      problems jsonb not null default '[]',
      primary key (shop_id, import_id)
    )`.execute(db);
  await sql`create index timesheet_import_file on timesheet_import (shop_id, file_sha256)`.execute(db);
  await sql`
    create table timesheet_file (
      shop_id uuid not null references shop,
      import_id uuid not null,
      content bytea not null,
      primary key (shop_id, import_id),
      foreign key (shop_id, import_id) references timesheet_import
    )`.execute(db);
  await sql`alter table timesheet_file alter column content set storage external`.execute(db);
  await sql`
    create table saved_mapping (
      shop_id uuid not null references shop,
      saved_mapping_id uuid not null default uuid_v7(),
      header_signature text not null,
      mapping jsonb not null,
      saved_at timestamptz not null default now(),
      primary key (shop_id, saved_mapping_id),
      unique (shop_id, header_signature)
    )`.execute(db);
  await sql`
    create table name_alias (
      shop_id uuid not null references shop,
      alias_id uuid not null default uuid_v7(),
      kind text not null check (kind in ('employee', 'job', 'operation', 'machine')),
      spelling text not null check (spelling <> ''),
      employee_id uuid,
      job_id uuid,
      operation_id uuid,
      machine_id uuid,
      primary key (shop_id, alias_id),
      unique (shop_id, kind, spelling),
      check (num_nonnulls(employee_id, job_id, operation_id, machine_id) = 1),
      foreign key (shop_id, employee_id) references employee,
      foreign key (shop_id, job_id) references job,
      foreign key (shop_id, operation_id) references operation,
      foreign key (shop_id, machine_id) references machine
    )`.execute(db);
  // Changed by voiding and adding, never overwritten. The machine is the row's own: the operation's default is resolved when costs are rolled up.
  await sql`
    create table time_entry (
      shop_id uuid not null references shop,
      entry_id uuid not null default uuid_v7(),
      worked_on date not null,
      employee_id uuid not null,
      job_id uuid not null,
      operation_id uuid not null,
      machine_id uuid,
      hours numeric(9,4) not null check (hours > 0 and hours <= 24),
      good_pieces integer check (good_pieces >= 0),
      scrap_pieces integer check (scrap_pieces >= 0),
      note text,
      import_id uuid,
      source_row integer,
      source_cell text,
      created_at timestamptz not null default now(),
      voided_at timestamptz,
      voided_by text,
      primary key (shop_id, entry_id),
      foreign key (shop_id, employee_id) references employee,
      foreign key (shop_id, job_id) references job,
      foreign key (shop_id, operation_id) references operation,
      foreign key (shop_id, machine_id) references machine,
      foreign key (shop_id, import_id) references timesheet_import
    )`.execute(db);
  await sql`create index time_entry_day on time_entry (shop_id, worked_on, entry_id) where voided_at is null`.execute(
    db,
  );
  await sql`create index time_entry_employee on time_entry (shop_id, employee_id, worked_on, entry_id) where voided_at is null`.execute(
    db,
  );
  await sql`create index time_entry_job on time_entry (shop_id, job_id, worked_on, entry_id) where voided_at is null`.execute(
    db,
  );
  await sql`create index time_entry_voided on time_entry (shop_id, worked_on) where voided_at is not null`.execute(
    db,
  );
  await sql`create index time_entry_import on time_entry (shop_id, import_id)`.execute(db);
  await sql`select secure_table('timesheet_import', 'import_id')`.execute(db);
  await sql`select secure_table('timesheet_file', null)`.execute(db);
  await sql`select secure_table('saved_mapping', 'saved_mapping_id')`.execute(db);
  await sql`select secure_table('name_alias', 'alias_id')`.execute(db);
  await sql`select secure_table('time_entry', null)`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop table time_entry, name_alias, saved_mapping, timesheet_file, timesheet_import`.execute(db);
}
