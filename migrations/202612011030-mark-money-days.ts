import { type Kysely, sql } from 'kysely';

/**
 * Days whose costs an outside service, an invoice or a setting of overtime may change. Issues of material mark
 * theirs when the stock ledger is rewritten.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  for (const [table, day] of [
    ['outside_service', 'incurred_on'],
    ['invoice', 'invoiced_on'],
  ] as const)
    for (const [operation, changed, transition] of [
      ['insert', `select shop_id, ${day} from new_rows`, 'new table as new_rows'],
      ['delete', `select shop_id, ${day} from old_rows`, 'old table as old_rows'],
      [
        'update',
        `select shop_id, ${day} from new_rows union select shop_id, ${day} from old_rows`,
        'old table as old_rows new table as new_rows',
      ],
    ] as const)
      await markChanged(db, { table, day, operation, changed, transition });
  await markByOvertimeSettings(db);
}

interface Mark {
  table: string;
  day: string;
  operation: 'insert' | 'update' | 'delete';
  changed: string;
  transition: string;
}

async function markChanged(db: Kysely<unknown>, { table, operation, changed, transition, day }: Mark) {
  await sql
    .raw(
      `create function mark_${table}_${operation}() returns trigger language plpgsql as $$
       begin
         insert into dirty_day (shop_id, worked_on)
         select distinct shop_id, ${day} from (${changed}) changed order by 1, 2
         on conflict (shop_id, worked_on) do update set marked_at = now();
         return null;
       end $$`,
    )
    .execute(db);
  await sql
    .raw(
      `create trigger mark_days_${operation} after ${operation} on ${table} referencing ${transition}
       for each statement execute function mark_${table}_${operation}()`,
    )
    .execute(db);
}

async function markByOvertimeSettings(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function mark_overtime_days() returns trigger language plpgsql as $$
    begin
      insert into dirty_day (shop_id, worked_on)
      select distinct e.shop_id, e.worked_on from time_entry e
      where e.shop_id = new.shop_id and e.voided_at is null and e.worked_on > books_closed_through()
      order by 1, 2
      on conflict (shop_id, worked_on) do update set marked_at = now();
      return null;
    end $$`.execute(db);
  await sql`
    create trigger mark_overtime_days after update on shop for each row
    when ((old.overtime_threshold_hours, old.overtime_to, old.week_start)
      is distinct from (new.overtime_threshold_hours, new.overtime_to, new.week_start))
    execute function mark_overtime_days()`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop trigger mark_overtime_days on shop`.execute(db);
  await sql`drop function mark_overtime_days()`.execute(db);
  for (const table of ['outside_service', 'invoice'])
    for (const operation of ['insert', 'update', 'delete'])
      await sql.raw(`drop function mark_${table}_${operation}() cascade`).execute(db);
}
