import { type Kysely, sql } from 'kysely';

/**
 * What bends are computed from: the shop's line below the rating, its own materials and gauges beside those that are
 * shipped, its punches and its dies with their openings, each for one machine.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    alter table shop add column force_line_percent numeric(7,3) not null default 80
      check (force_line_percent > 0 and force_line_percent <= 100)`.execute(db);
  await createReference(db);
  await createTools(db);
}

async function createReference(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table forming_material (
      shop_id uuid not null references shop,
      code text not null check (code <> ''),
      name text not null check (name <> ''),
      gauge_system text not null check (gauge_system in ('steel', 'galvanized', 'stainless', 'aluminium')),
      tensile_min_mpa numeric(12,5) check (tensile_min_mpa > 0),
      tensile_used_mpa numeric(12,5) not null check (tensile_used_mpa > 0),
      tensile_source text not null,
      density_kg_m3 numeric(10,3) not null check (density_kg_m3 > 0),
      density_source text not null,
      radius_per_opening numeric(7,5) not null check (radius_per_opening > 0 and radius_per_opening <= 1),
      radius_source text not null,
      primary key (shop_id, code),
      constraint forming_material_tensile check (tensile_min_mpa <= tensile_used_mpa)
    )`.execute(db);
  await sql`
    create table shop_gauge (
      shop_id uuid not null references shop,
      system text not null check (system in ('steel', 'galvanized', 'stainless', 'aluminium')),
      gauge integer not null check (gauge between 0 and 50),
      thickness_mm numeric(12,5) not null check (thickness_mm > 0),
      source text not null,
      primary key (shop_id, system, gauge)
    )`.execute(db);
  await sql`select secure_table('forming_material', 'code')`.execute(db);
  await sql`select secure_table('shop_gauge', 'gauge')`.execute(db);
}

async function createTools(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table punch (
      shop_id uuid not null references shop,
      punch_id uuid not null default uuid_v7(),
      machine_id uuid not null,
      name text not null check (name <> ''),
      nose_radius_mm numeric(12,5) not null check (nose_radius_mm >= 0),
      angle numeric(7,4) check (angle > 0 and angle < 180),
      length_mm numeric(12,5) check (length_mm > 0),
      force_limit_kn_per_m numeric(12,5) check (force_limit_kn_per_m > 0),
      primary key (shop_id, punch_id),
      unique (shop_id, machine_id, name),
      foreign key (shop_id, machine_id) references machine
    )`.execute(db);
  await sql`
    create table die (
      shop_id uuid not null references shop,
      die_id uuid not null default uuid_v7(),
      machine_id uuid not null,
      name text not null check (name <> ''),
      length_mm numeric(12,5) check (length_mm > 0),
      force_limit_kn_per_m numeric(12,5) check (force_limit_kn_per_m > 0),
      primary key (shop_id, die_id),
      unique (shop_id, machine_id, name),
      foreign key (shop_id, machine_id) references machine
    )`.execute(db);
  await sql`
    create table die_opening (
      shop_id uuid not null references shop,
      die_opening_id uuid not null default uuid_v7(),
      die_id uuid not null,
      opening_mm numeric(12,5) not null check (opening_mm > 0),
      angle numeric(7,4) check (angle > 0 and angle < 180),
      shoulder_radius_mm numeric(12,5) check (shoulder_radius_mm >= 0),
      primary key (shop_id, die_opening_id),
      unique (shop_id, die_id, opening_mm),
      foreign key (shop_id, die_id) references die
    )`.execute(db);
  await sql`select secure_table('punch', 'punch_id')`.execute(db);
  await sql`select secure_table('die', 'die_id')`.execute(db);
  await sql`select secure_table('die_opening', 'die_opening_id')`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop table die_opening, die, punch, shop_gauge, forming_material`.execute(db);
  await sql`alter table shop drop column force_line_percent`.execute(db);
}
