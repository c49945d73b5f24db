import { type Kysely, sql } from 'kysely';

/**
 * Tenancy comes first: `secure_table` gives a table row-level security that nobody who connects as
 * brakeven_app or brakeven_owner gets round, the application's grants, and, if wanted, its audit trail.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function uuid_v7() returns uuid language sql volatile parallel safe as $$
      select encode(
        set_bit(set_bit(
          overlay(uuid_send(gen_random_uuid())
            placing substring(int8send(floor(extract(epoch from clock_timestamp()) * 1000)::bigint) from 3)
            from 1 for 6), 52, 1), 53, 1), 'hex')::uuid
    $$`.execute(db);

  await sql`
    create table shop (
      shop_id uuid primary key default uuid_v7(),
      name text not null unique check (name <> ''),
      time_zone text not null,
      currency char(3) not null check (currency ~ '^[A-Z]{3}$'),
      units text not null check (units in ('us', 'metric')),
      week_start smallint not null default 1 check (week_start between 0 and 6),
      created_at timestamptz not null default now()
    )`.execute(db);
  await sql`
    create table audit_event (
      shop_id uuid not null references shop,
      event_id uuid not null default uuid_v7(),
      at timestamptz not null default now(),
      actor_id uuid,
      actor text not null,
      action text not null,
      subject_kind text not null,
      subject_id text not null,
      before jsonb,
      after jsonb,
      primary key (shop_id, event_id)
    )`.execute(db);
  await createAuditTrigger(db);
  await createSecureTable(db);

  await sql`
    create table user_account (
      shop_id uuid not null references shop,
      user_id uuid not null default uuid_v7(),
      name text not null check (name <> ''),
      email text not null check (email = lower(email) and email like '%_@_%'),
      role text not null check (role in ('owner', 'bookkeeper', 'lead', 'operator')),
      employee_id uuid,
      is_active boolean not null default true,
      password_hash text not null,
      password_changed_at timestamptz not null default now(),
      must_change_password boolean not null default false,
      last_sign_in_at timestamptz,
      created_at timestamptz not null default now(),
      primary key (shop_id, user_id),
      unique (shop_id, email)
    )`.execute(db);
  await sql`create index user_account_email on user_account (email)`.execute(db);
  await sql`
    create table session (
      sid varchar primary key,
      sess json not null,
      expire timestamp(6) not null
    )`.execute(db);
  await sql`create index session_expire on session (expire)`.execute(db);
  await sql`grant select, insert, update, delete on session to brakeven_app`.execute(db);

  await sql`select secure_table('shop', 'shop_id')`.execute(db);
  await sql`select secure_table('user_account', 'user_id')`.execute(db);
  await sql`select secure_table('audit_event', null)`.execute(db);
  await sql`revoke update, delete on audit_event from brakeven_app`.execute(db);

  // Before the shop is known, exactly what was asked for by name or by e-mail can be read, and nothing written.
  await sql`create policy by_name on shop for select
    using (name = nullif(current_setting('app.shop_name', true), ''))`.execute(db);
  await sql`create policy directory on shop to brakeven_owner using (true) with check (true)`.execute(db);
  await sql`create policy by_email on user_account for select
    using (email = nullif(current_setting('app.sign_in_email', true), ''))`.execute(db);
}

async function createAuditTrigger(db: Kysely<unknown>): Promise<void> {
  // The argument names the id column. What only sign-in changes is left out, and a change of nothing else is no event.
  await sql`
    create function audit_visible(row_data jsonb) returns jsonb language sql immutable as $$
      select row_data - '{password_hash,last_sign_in_at,created_at}'::text[]
    $$`.execute(db);
  await sql`
    create function write_audit_events() returns trigger language plpgsql as $$
    declare
      who text := coalesce(nullif(current_setting('app.actor', true), ''), 'system');
      who_id uuid := nullif(current_setting('app.actor_id', true), '')::uuid;
    begin
      if tg_op = 'INSERT' then
        insert into audit_event (shop_id, actor_id, actor, action, subject_kind, subject_id, after)
        select (n.r ->> 'shop_id')::uuid, who_id, who, 'added', tg_table_name, n.r ->> tg_argv[0], audit_visible(n.r)
        from (select to_jsonb(new_rows) as r from new_rows) n;
      elsif tg_op = 'DELETE' then
        insert into audit_event (shop_id, actor_id, actor, action, subject_kind, subject_id, before)
        select (o.r ->> 'shop_id')::uuid, who_id, who, 'deleted', tg_table_name, o.r ->> tg_argv[0], audit_visible(o.r)
        from (select to_jsonb(old_rows) as r from old_rows) o;
      else
        insert into audit_event (shop_id, actor_id, actor, action, subject_kind, subject_id, before, after)
        select (n.r ->> 'shop_id')::uuid, who_id, who, 'changed', tg_table_name, n.r ->> tg_argv[0],
               audit_visible(o.r), audit_visible(n.r)
        from (select to_jsonb(new_rows) as r from new_rows) n
        join (select to_jsonb(old_rows) as r from old_rows) o on o.r ->> tg_argv[0] = n.r ->> tg_argv[0]
        where audit_visible(o.r) <> audit_visible(n.r);
      end if;
      return null;
    end $$`.execute(db);
}

async function createSecureTable(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function secure_table(table_name text, audited_id text) returns void language plpgsql as $$
    begin
      execute format('alter table %I enable row level security', table_name);
      execute format('alter table %I force row level security', table_name);
      execute format($sql$create policy own_shop on %I
        using (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid)
        with check (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid)$sql$, table_name);
      execute format('grant select, insert, update, delete on %I to brakeven_app', table_name);
      if audited_id is not null then
        execute format('create trigger audit_insert after insert on %I referencing new table as new_rows
          for each statement execute function write_audit_events(%L)', table_name, audited_id);
        execute format('create trigger audit_update after update on %I referencing old table as old_rows new table as new_rows
          for each statement execute function write_audit_events(%L)', table_name, audited_id);
        execute format('create trigger audit_delete after delete on %I referencing old table as old_rows
          for each statement execute function write_audit_events(%L)', table_name, audited_id);
      end if;
    end $$`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop table session, user_account, audit_event, shop`.execute(db);
  await sql`drop function secure_table(text, text), write_audit_events(), audit_visible(jsonb), uuid_v7()`.execute(
    db,
  );
}
