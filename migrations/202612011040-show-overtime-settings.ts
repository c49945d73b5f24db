import { type Kysely, sql } from 'kysely';

/** Who is signed in is told the shop with all its settings, those that overtime follows too. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`drop function find_session_user(uuid, uuid)`.execute(db);
  await sql`
    create function find_session_user(of_shop uuid, of_user uuid)
    returns table (
      user_id uuid, user_name text, email text, role text, employee_id uuid, must_change_password boolean,
      shop_id uuid, shop_name text, time_zone text, currency text, units text, week_start integer,
      overtime_threshold_hours numeric, overtime_to text
    ) language plpgsql volatile as $$
    begin
      perform set_config('app.shop_id', of_shop::text, true);
      return query
        select u.user_id, u.name, u.email, u.role, u.employee_id, u.must_change_password,
               s.shop_id, s.name, s.time_zone, s.currency::text, s.units, s.week_start::integer,
               s.overtime_threshold_hours, s.overtime_to
        from user_account u join shop s on s.shop_id = u.shop_id
        where u.shop_id = of_shop and u.user_id = of_user and u.is_active;
    end $$`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop function find_session_user(uuid, uuid)`.execute(db);
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
