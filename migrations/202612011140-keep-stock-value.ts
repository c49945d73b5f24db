import { type Kysely, sql } from 'kysely';

const CHANGES = [
  ['insert', 'new_rows', 'new table as new_rows'],
  ['delete', 'old_rows', 'old table as old_rows'],
  [
    'update',
    '(select material_id from new_rows union select material_id from old_rows) both_rows',
    'old table as old_rows new table as new_rows',
  ],
] as const;

/**
 * What issues cost in a closed month stays, so that a lot voided or corrected under them can leave value in a stock
 * of nothing, or less than nothing in it, which the next lot would bear. Such a change is refused (BK004): the month
 * is reopened first. Reopening itself rewrites the ledger without asking. The triggers run after those that rewrite
 * it, since those come before them by name.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function refuse_stranded_value(materials uuid[]) returns void language plpgsql as $$
    declare
      refused jsonb;
    begin
      select jsonb_build_object('material', m.name, 'on', s.moved_on, 'job', j.number)
        into refused
      from stock_move s
      join material m on m.shop_id = s.shop_id and m.material_id = s.material_id
      join material_issue i on i.shop_id = s.shop_id and i.issue_id = s.source_id
      join job j on j.shop_id = i.shop_id and j.job_id = i.job_id
      where s.material_id = any (materials)
        and (s.balance_amount < 0 or s.balance_kg = 0 and s.balance_amount <> 0)
      order by s.moved_on, s.rank, s.source_id
      limit 1;
      if refused is not null then
        raise exception 'What closed months hold does not fit the stock.' using errcode = 'BK004', detail = refused::text;
      end if;
    end $$`.execute(db);
  for (const table of ['sheet_lot', 'material_issue'])
    for (const [operation, changed, transition] of CHANGES) {
      const name = `refuse_stranded_${table}_${operation}`;
      await sql
        .raw(
          `create function ${name}() returns trigger language plpgsql as $$
           begin
             perform refuse_stranded_value(array(select distinct material_id from ${changed}));
             return null;
           end $$`,
        )
        .execute(db);
      await sql
        .raw(
          `create trigger refuse_stranded_${operation} after ${operation} on ${table} referencing ${transition}
           for each statement execute function ${name}()`,
        )
        .execute(db);
    }
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const table of ['sheet_lot', 'material_issue'])
    for (const [operation] of CHANGES)
      await sql.raw(`drop function refuse_stranded_${table}_${operation}() cascade`).execute(db);
  await sql`drop function refuse_stranded_value(uuid[])`.execute(db);
}
