import { type Kysely, sql } from 'kysely';

/**
 * Bends that were made: trial bends that a ram depth is fitted to, what goes on a press's depth card, and press runs
 * with the force that was computed for them and the force that the gauge showed.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await createTrialBends(db);
  await createDepthCards(db);
  await createPressRuns(db);
}

async function createTrialBends(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table trial_bend (
      shop_id uuid not null references shop,
      trial_bend_id uuid not null default uuid_v7(),
      machine_id uuid not null,
      punch_id uuid not null,
      die_opening_id uuid not null,
      material_code text not null check (material_code <> ''),
      thickness_mm numeric(12,5) not null check (thickness_mm > 0),
      strip_width_mm numeric(12,5) check (strip_width_mm > 0),
      depth_mm numeric(12,5) not null,
      measured_angle numeric(7,4) not null check (measured_angle > 0 and measured_angle < 180),
      is_full_length boolean not null default false,
      bent_by text not null,
      bent_on date not null,
      created_at timestamptz not null default now(),
      voided_at timestamptz,
      voided_by text,
      primary key (shop_id, trial_bend_id),
      foreign key (shop_id, machine_id) references machine,
      foreign key (shop_id, punch_id) references punch,
      foreign key (shop_id, die_opening_id) references die_opening
    )`.execute(db);
  await sql`create index trial_bend_setup on trial_bend (shop_id, machine_id, punch_id, die_opening_id)`.execute(
    db,
  );
  await sql`select secure_table('trial_bend', 'trial_bend_id')`.execute(db);
}

async function createDepthCards(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table depth_card (
      shop_id uuid not null references shop,
      machine_id uuid not null,
      angles jsonb not null default '[90]' check (jsonb_typeof(angles) = 'array'),
      primary key (shop_id, machine_id),
      foreign key (shop_id, machine_id) references machine
    )`.execute(db);
  await sql`
    create table depth_card_sheet (
      shop_id uuid not null references shop,
      machine_id uuid not null,
      position integer not null check (position > 0),
      material_code text not null check (material_code <> ''),
      thickness_mm numeric(12,5) not null check (thickness_mm > 0),
      punch_id uuid not null,
      die_opening_id uuid not null,
      primary key (shop_id, machine_id, position),
      foreign key (shop_id, machine_id) references depth_card on delete cascade,
      foreign key (shop_id, punch_id) references punch on delete cascade,
      foreign key (shop_id, die_opening_id) references die_opening on delete cascade
    )`.execute(db);
  await sql`select secure_table('depth_card', 'machine_id')`.execute(db);
  await sql`select secure_table('depth_card_sheet', null)`.execute(db);
}

async function createPressRuns(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table press_run (
      shop_id uuid not null references shop,
      press_run_id uuid not null default uuid_v7(),
      job_id uuid not null,
      machine_id uuid not null,
      punch_id uuid,
      die_opening_id uuid not null,
      material_code text not null check (material_code <> ''),
      thickness_mm numeric(12,5) not null check (thickness_mm > 0),
      bend_length_mm numeric(12,5) not null check (bend_length_mm > 0),
      strokes integer not null check (strokes > 0),
      pieces integer not null check (pieces >= 0),
      force_low_kn numeric(12,5) not null check (force_low_kn > 0),
      force_high_kn numeric(12,5) not null,
      highest_force_kn numeric(12,5) check (highest_force_kn > 0),
      run_on date not null,
      is_good boolean not null default true,
      note text,
      entry_id uuid,
      logged_by text not null,
      logged_by_user_id uuid,
      created_at timestamptz not null default now(),
      voided_at timestamptz,
      voided_by text,
      primary key (shop_id, press_run_id),
      foreign key (shop_id, job_id) references job,
      foreign key (shop_id, machine_id) references machine,
      foreign key (shop_id, punch_id) references punch,
      foreign key (shop_id, die_opening_id) references die_opening,
      foreign key (shop_id, entry_id) references time_entry,
      constraint press_run_force_band check (force_high_kn >= force_low_kn)
    )`.execute(db);
  await sql`create index press_run_day on press_run (shop_id, run_on, press_run_id) where voided_at is null`.execute(
    db,
  );
  await sql`create index press_run_job on press_run (shop_id, job_id, run_on)`.execute(db);
  await sql`select secure_table('press_run', 'press_run_id')`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop table press_run, depth_card_sheet, depth_card, trial_bend`.execute(db);
}
