import { type Kysely, sql } from 'kysely';

/**
 * Attempts are counted by e-mail address, whether an account has it or not, so that a lock tells nobody which
 * addresses have accounts. The address itself is not kept, only its SHA-256.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table sign_in_attempt (
      email_sha256 text primary key,
      failures integer not null,
      failed_at timestamptz not null
    )`.execute(db);
  await sql`create index sign_in_attempt_failed on sign_in_attempt (failed_at)`.execute(db);
  await sql`grant select, insert, update, delete on sign_in_attempt to brakeven_app`.execute(db);

  // Every request of somebody signed in asks this: as a function it takes one round trip instead of four. It runs
  // with the caller's rights, under the same row-level security.
  await sql`
    create function find_session_user(of_shop uuid, of_user uuid)
    returns table (
      user_id uuid, user_name text, email text, role text, employee_id uuid, must_change_password boolean,
      shop_id uuid, shop_name text, time_zone text, currency text, units text, week_start integer
    ) language plpgsql volatile as $$
    begin
      perform set_config('app.shop_id', of_shop::text, true);
      return query
        select u.user_id, u.name, u.email, u.role, u.employee_id, u.must_change_password,
               s.shop_id, s.name, s.time_zone, s.currency::text, s.units, s.week_start::integer
        from user_account u join shop s on s.shop_id = u.shop_id
        where u.shop_id = of_shop and u.user_id = of_user and u.is_active;
    end $$`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop function find_session_user(uuid, uuid)`.execute(db);
  await sql`drop table sign_in_attempt`.execute(db);
}
