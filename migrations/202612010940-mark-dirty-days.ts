import { type Kysely, sql } from 'kysely';

/**
 * Every change to a source row marks the days whose costs it may change, whoever writes it: statement triggers
 * on the entries themselves, and on each rate or setting that a cost line is made from.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table dirty_day (
      shop_id uuid not null references shop,
      worked_on date not null,
      entry_changes integer not null default 0,
      marked_at timestamptz not null default now(),
      primary key (shop_id, worked_on)
    )`.execute(db);
  await sql`select secure_table('dirty_day', null)`.execute(db);
  await markByEntries(db);
  await markByRates(db);
  await markBySettings(db);
}

async function markByEntries(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function mark_entry_days() returns trigger language plpgsql as $$
    begin
      if tg_op = 'INSERT' then
        insert into dirty_day (shop_id, worked_on, entry_changes)
        select shop_id, worked_on, count(*) from new_rows group by 1, 2 order by 1, 2
        on conflict (shop_id, worked_on) do update
          set entry_changes = dirty_day.entry_changes + excluded.entry_changes, marked_at = now();
      elsif tg_op = 'DELETE' then
        insert into dirty_day (shop_id, worked_on, entry_changes)
        select shop_id, worked_on, count(*) from old_rows group by 1, 2 order by 1, 2
        on conflict (shop_id, worked_on) do update
          set entry_changes = dirty_day.entry_changes + excluded.entry_changes, marked_at = now();
      else
        insert into dirty_day (shop_id, worked_on, entry_changes)
        select shop_id, worked_on, count(distinct entry_id)
        from (select shop_id, worked_on, entry_id from new_rows union select shop_id, worked_on, entry_id from old_rows) changed
        group by 1, 2 order by 1, 2
        on conflict (shop_id, worked_on) do update
          set entry_changes = dirty_day.entry_changes + excluded.entry_changes, marked_at = now();
      end if;
      return null;
    end $$`.execute(db);
  await onEveryChange(db, 'time_entry', 'mark_entry_days');
}

/** Changed rows of either side of a statement, as one set. */
const CHANGED = {
  insert: 'select * from new_rows',
  delete: 'select * from old_rows',
  update: 'select * from new_rows union all select * from old_rows',
} as const;

/** One function an operation, since a transition table has a name only where the operation has it. */
async function markDays(db: Kysely<unknown>, name: string, table: string, days: string): Promise<void> {
  for (const [operation, changed] of Object.entries(CHANGED)) {
    const transition = {
      insert: 'new table as new_rows',
      delete: 'old table as old_rows',
      update: 'old table as old_rows new table as new_rows',
    }[operation];
    await sql
      .raw(
        `create function ${name}_${operation}() returns trigger language plpgsql as $$
         begin
           insert into dirty_day (shop_id, worked_on)
           select distinct shop_id, worked_on from (with changed as (${changed}) ${days}) marked order by 1, 2
           on conflict (shop_id, worked_on) do update set marked_at = now();
           return null;
         end $$`,
      )
      .execute(db);
    await sql
      .raw(
        `create trigger ${name}_${operation} after ${operation} on ${table} referencing ${transition}
         for each statement execute function ${name}_${operation}()`,
      )
      .execute(db);
  }
}

async function onEveryChange(db: Kysely<unknown>, table: string, fn: string): Promise<void> {
  for (const [operation, transition] of [
    ['insert', 'new table as new_rows'],
    ['update', 'old table as old_rows new table as new_rows'],
    ['delete', 'old table as old_rows'],
  ])
    await sql
      .raw(
        `create trigger ${fn}_${operation} after ${operation} on ${table} referencing ${transition}
         for each statement execute function ${fn}()`,
      )
      .execute(db);
}

/** A rate counts from its day on: all later days with entries that it may price. */
async function markByRates(db: Kysely<unknown>): Promise<void> {
  await markDays(
    db,
    'mark_pay_rate_days',
    'pay_rate',
    `select e.shop_id, e.worked_on from time_entry e
     join (select shop_id, employee_id, min(valid_from) as valid_from from changed group by 1, 2) c
       on c.shop_id = e.shop_id and c.employee_id = e.employee_id and e.worked_on >= c.valid_from
     where e.voided_at is null`,
  );
  await markDays(
    db,
    'mark_overhead_rate_days',
    'overhead_rate',
    `select e.shop_id, e.worked_on from time_entry e
     join (select shop_id, min(valid_from) as valid_from from changed group by 1) c
       on c.shop_id = e.shop_id and e.worked_on >= c.valid_from
     where e.voided_at is null`,
  );
  await markDays(
    db,
    'mark_machine_rate_days',
    'machine_rate',
    `select e.shop_id, e.worked_on from time_entry e
     join operation o on o.shop_id = e.shop_id and o.operation_id = e.operation_id
     join (select shop_id, machine_id, min(valid_from) as valid_from from changed group by 1, 2) c
       on c.shop_id = e.shop_id and c.machine_id = coalesce(e.machine_id, o.default_machine_id) and e.worked_on >= c.valid_from
     where e.voided_at is null`,
  );
}

/** A machine put in service, a job made billable, an operation given another default machine. */
async function markBySettings(db: Kysely<unknown>): Promise<void> {
  const settings = [
    ['machine', 'machine_id', 'in_service_on', 'c.machine_id = coalesce(e.machine_id, o.default_machine_id)'],
    ['job', 'job_id', 'is_billable', 'c.job_id = e.job_id'],
    [
      'operation',
      'operation_id',
      'default_machine_id',
      'c.operation_id = e.operation_id and e.machine_id is null',
    ],
  ] as const;
  for (const [table, id, column, match] of settings) {
    await sql
      .raw(
        `create function mark_${table}_days() returns trigger language plpgsql as $$
         begin
           insert into dirty_day (shop_id, worked_on)
           select distinct e.shop_id, e.worked_on
           from (select n.shop_id, n.${id} from new_rows n
                 join old_rows b on b.shop_id = n.shop_id and b.${id} = n.${id}
                 where b.${column} is distinct from n.${column}) c
           join time_entry e on e.shop_id = c.shop_id and e.voided_at is null
           join operation o on o.shop_id = e.shop_id and o.operation_id = e.operation_id
           where ${match}
           order by 1, 2
           on conflict (shop_id, worked_on) do update set marked_at = now();
           return null;
         end $$`,
      )
      .execute(db);
    await sql
      .raw(
        `create trigger mark_${table}_days after update on ${table} referencing old table as old_rows new table as new_rows
         for each statement execute function mark_${table}_days()`,
      )
      .execute(db);
  }
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop function mark_entry_days(), mark_machine_days(), mark_job_days(), mark_operation_days() cascade`.execute(
    db,
  );
  for (const rate of ['pay_rate', 'overhead_rate', 'machine_rate'])
    for (const operation of Object.keys(CHANGED))
      await sql.raw(`drop function mark_${rate}_days_${operation}() cascade`).execute(db);
  await sql`drop table dirty_day`.execute(db);
}
