import { type Kysely, sql } from 'kysely';

/**
 * The day a machine goes into service decides which of its lines count towards its payback. It is not moved across
 * work that a closed month holds (BK005): those machine days stay as they are, and what takes them back later has to
 * count as they did.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function refuse_in_service_change() returns trigger language plpgsql as $$
    declare
      first_day date := least(coalesce(old.in_service_on, 'infinity'), coalesce(new.in_service_on, 'infinity'));
      last_day date := greatest(coalesce(old.in_service_on, 'infinity'), coalesce(new.in_service_on, 'infinity'));
      worked date;
    begin
      select min(l.worked_on) into worked from cost_line l
      where l.shop_id = new.shop_id and l.machine_id = new.machine_id
        and l.posted_on between first_day and books_closed_through()
        and l.worked_on >= first_day and l.worked_on < last_day;
      if worked is not null then
        raise exception 'Work of a closed month lies between the two days.' using errcode = 'BK005',
          detail = jsonb_build_object('machine', new.name, 'on', worked, 'closedThrough', books_closed_through())::text;
      end if;
      return null;
    end $$`.execute(db);
  await sql`
    create trigger refuse_in_service_change after update of in_service_on on machine
    for each row when (old.in_service_on is distinct from new.in_service_on)
    execute function refuse_in_service_change()`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop trigger refuse_in_service_change on machine`.execute(db);
  await sql`drop function refuse_in_service_change()`.execute(db);
}
