import { type Kysely, sql } from 'kysely';

/**
 * Closed months, the day in the books of every cost line, and the settings that overtime follows. A line posted in
 * a closed month cannot be changed by anybody; what comes late for it is posted on the first day that is open.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    alter table shop
      add column overtime_threshold_hours numeric(6,2) default 40
        check (overtime_threshold_hours > 0 and overtime_threshold_hours <= 168),
      add column overtime_to text not null default 'overhead' check (overtime_to in ('overhead', 'jobs'))`.execute(
    db,
  );
  await sql`alter table timesheet_import add column refusals_reviewed_at timestamptz, add column refusals_reviewed_by text`.execute(
    db,
  );
  await createMonths(db);
  await postCosts(db);
  await refuseClosed(db);
}

async function createMonths(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table month_close (
      shop_id uuid not null references shop,
      month_close_id uuid not null default uuid_v7(),
      month date not null check (extract(day from month) = 1),
      closed_at timestamptz not null default now(),
      closed_by text not null,
      reopened_at timestamptz,
      reopened_by text,
      reopen_reason text check (reopen_reason <> ''),
      primary key (shop_id, month_close_id),
      constraint month_close_reopened check (num_nonnulls(reopened_at, reopened_by, reopen_reason) in (0, 3))
    )`.execute(db);
  await sql`create unique index month_close_closed on month_close (shop_id, month) where reopened_at is null`.execute(
    db,
  );
  await sql`
    create table payroll_hours (
      shop_id uuid not null references shop,
      employee_id uuid not null,
      month date not null check (extract(day from month) = 1),
      hours numeric(9,4) not null check (hours >= 0 and hours <= 744),
      primary key (shop_id, employee_id, month),
      foreign key (shop_id, employee_id) references employee
    )`.execute(db);
  await sql`
    create table saved_view (
      shop_id uuid not null references shop,
      saved_view_id uuid not null default uuid_v7(),
      user_id uuid not null,
      page text not null check (page <> ''),
      name text not null check (name <> ''),
      state jsonb not null,
      saved_at timestamptz not null default now(),
      primary key (shop_id, saved_view_id),
      unique (shop_id, user_id, page, name),
      foreign key (shop_id, user_id) references user_account
    )`.execute(db);
  await sql`select secure_table('month_close', 'month_close_id')`.execute(db);
  await sql`select secure_table('payroll_hours', 'employee_id')`.execute(db);
  await sql`select secure_table('saved_view', null)`.execute(db);
  // Of the shop that the connection is in: row-level security leaves no other.
  await sql`
    create function books_closed_through() returns date language sql stable as $$
      select coalesce((max(month) + interval '1 month' - interval '1 day')::date, '-infinity'::date)
      from month_close where reopened_at is null
    $$`.execute(db);
}

/**
 * `posted_on` is the day in the books, `worked_on` the day of the row itself. A job is missing on what went to
 * overhead, a rate where the row carries its own amount.
 */
async function postCosts(db: Kysely<unknown>): Promise<void> {
  for (const table of ['cost_line', 'rate_gap']) {
    await sql.raw(`alter table ${table} add column posted_on date`).execute(db);
    await ofAllShops(db, table, `update ${table} set posted_on = worked_on`);
    await sql.raw(`alter table ${table} alter column posted_on set not null`).execute(db);
  }
  await sql`alter table cost_line drop constraint cost_line_pkey,
    add primary key (shop_id, posted_on, source_id, category),
    alter column job_id drop not null, alter column rate_id drop not null`.execute(db);
  await sql`alter table rate_gap drop constraint rate_gap_pkey,
    add primary key (shop_id, posted_on, entry_id, category)`.execute(db);
  await sql`drop index cost_line_job`.execute(db);
  await sql`create index cost_line_job on cost_line (shop_id, job_id, posted_on, source_id, category)`.execute(
    db,
  );
  await sql`create index cost_line_late on cost_line (shop_id, worked_on, source_id) where posted_on <> worked_on`.execute(
    db,
  );
  await sql`create index cost_line_overhead on cost_line (shop_id, posted_on) where job_id is null`.execute(
    db,
  );
  for (const table of ['job_day', 'machine_day', 'machine_job_day'])
    await sql.raw(`alter table ${table} rename column worked_on to posted_on`).execute(db);
}

/** Row-level security holds for the owner too, who is in no shop here. */
async function ofAllShops(db: Kysely<unknown>, table: string, statement: string): Promise<void> {
  await sql.raw(`alter table ${table} no force row level security`).execute(db);
  await sql.raw(statement).execute(db);
  await sql.raw(`alter table ${table} force row level security`).execute(db);
}

const POSTED = ['cost_line', 'rate_gap', 'job_day', 'machine_day', 'machine_job_day'];

/**
 * Whatever is posted in a closed month stays as it is, whoever asks: nothing can be added to it, and no change or
 * deletion finds its rows. Restrictive policies, since a comparison with one date costs a rollup next to nothing.
 */
async function refuseClosed(db: Kysely<unknown>): Promise<void> {
  const isOpen = '(posted_on > (select books_closed_through()))';
  for (const table of POSTED)
    for (const [name, rule] of [
      ['insert', `for insert with check ${isOpen}`],
      ['update', `for update using ${isOpen} with check ${isOpen}`],
      ['delete', `for delete using ${isOpen}`],
    ])
      await sql.raw(`create policy open_months_${name} on ${table} as restrictive ${rule}`).execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const table of POSTED)
    for (const operation of ['insert', 'update', 'delete'])
      await sql.raw(`drop policy open_months_${operation} on ${table}`).execute(db);
  for (const table of ['job_day', 'machine_day', 'machine_job_day'])
    await sql.raw(`alter table ${table} rename column posted_on to worked_on`).execute(db);
  await sql`drop index cost_line_job, cost_line_late, cost_line_overhead`.execute(db);
  await sql`alter table cost_line drop constraint cost_line_pkey`.execute(db);
  // What only this shape can hold goes; a full rollup writes the rest again.
  await ofAllShops(
    db,
    'cost_line',
    'delete from cost_line where job_id is null or rate_id is null or posted_on <> worked_on',
  );
  await ofAllShops(db, 'rate_gap', 'delete from rate_gap where posted_on <> worked_on');
  await sql`alter table cost_line drop column posted_on, alter column job_id set not null,
    alter column rate_id set not null, add primary key (shop_id, worked_on, source_id, category)`.execute(db);
  await sql`alter table rate_gap drop constraint rate_gap_pkey, drop column posted_on,
    add primary key (shop_id, worked_on, entry_id, category)`.execute(db);
  await sql`create index cost_line_job on cost_line (shop_id, job_id, worked_on, source_id, category)`.execute(
    db,
  );
  await sql`drop table saved_view, payroll_hours, month_close`.execute(db);
  await sql`drop function books_closed_through()`.execute(db);
  await sql`alter table timesheet_import drop column refusals_reviewed_at, drop column refusals_reviewed_by`.execute(
    db,
  );
  await sql`alter table shop drop column overtime_threshold_hours, drop column overtime_to`.execute(db);
}
