import { type Kysely, sql } from 'kysely';

/**
 * Materials, sheet lots, issues to jobs and returns, and the stock ledger made from them: a perpetual moving
 * average, rewritten for a material whenever one of its lots or issues changes, so that a backdated lot recomputes
 * what follows. Issues posted in a closed month keep their amounts.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await createMaterials(db);
  await createMovements(db);
  await createLedger(db);
}

async function createMaterials(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table material (
      shop_id uuid not null references shop,
      material_id uuid not null default uuid_v7(),
      name text not null check (name <> ''),
      grade text not null default '',
      form text not null check (form in ('sheet', 'plate', 'bar', 'tube', 'other')),
      gauge text,
      thickness_mm numeric(12,5) check (thickness_mm > 0),
      density_kg_m3 numeric(10,3) check (density_kg_m3 > 0),
      tensile_strength_mpa numeric(10,3) check (tensile_strength_mpa > 0),
      recovery_price_per_kg numeric(14,6) not null default 0 check (recovery_price_per_kg >= 0),
      primary key (shop_id, material_id),
      unique (shop_id, name)
    )`.execute(db);
  await sql`select secure_table('material', 'material_id')`.execute(db);
}

async function createMovements(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table sheet_lot (
      shop_id uuid not null references shop,
      lot_id uuid not null default uuid_v7(),
      number text not null check (number <> ''),
      material_id uuid not null,
      received_on date not null,
      vendor text not null default '',
      sheets integer check (sheets > 0),
      sheet_length_mm numeric(12,5) check (sheet_length_mm > 0),
      sheet_width_mm numeric(12,5) check (sheet_width_mm > 0),
      weight_kg numeric(20,10) not null check (weight_kg > 0),
      cost numeric(14,2) not null check (cost > 0),
      freight numeric(14,2) not null default 0 check (freight >= 0),
      created_at timestamptz not null default now(),
      voided_at timestamptz,
      voided_by text,
      primary key (shop_id, lot_id),
      foreign key (shop_id, material_id) references material
    )`.execute(db);
  await sql`create unique index sheet_lot_number on sheet_lot (shop_id, number) where voided_at is null`.execute(
    db,
  );
  await sql`create index sheet_lot_material on sheet_lot (shop_id, material_id, received_on) where voided_at is null`.execute(
    db,
  );
  await sql`
    create table material_issue (
      shop_id uuid not null references shop,
      issue_id uuid not null default uuid_v7(),
      job_id uuid not null,
      material_id uuid not null,
      issued_on date not null,
      kind text not null check (kind in ('issue', 'return')),
      sheets integer check (sheets > 0),
      pieces integer check (pieces > 0),
      blank_length_mm numeric(12,5) check (blank_length_mm > 0),
      blank_width_mm numeric(12,5) check (blank_width_mm > 0),
      weight_kg numeric(20,10) not null check (weight_kg > 0),
      note text,
      created_at timestamptz not null default now(),
      voided_at timestamptz,
      voided_by text,
      primary key (shop_id, issue_id),
      foreign key (shop_id, job_id) references job,
      foreign key (shop_id, material_id) references material
    )`.execute(db);
  await sql`create index material_issue_material on material_issue (shop_id, material_id, issued_on) where voided_at is null`.execute(
    db,
  );
  await sql`create index material_issue_job on material_issue (shop_id, job_id, issued_on)`.execute(db);
  await sql`create index material_issue_voided on material_issue (shop_id, issued_on) where voided_at is not null`.execute(
    db,
  );
  await sql`select secure_table('sheet_lot', 'lot_id')`.execute(db);
  await sql`select secure_table('material_issue', 'issue_id')`.execute(db);
}

async function createLedger(db: Kysely<unknown>): Promise<void> {
  // Signed as stock moves: a lot and a return are positive. Rank 0 are lots, which come first on their day.
  await sql`
    create table stock_move (
      shop_id uuid not null,
      material_id uuid not null,
      moved_on date not null,
      rank smallint not null,
      source_id uuid not null,
      weight_kg numeric(20,10) not null,
      amount numeric(14,2) not null,
      average_per_kg numeric(14,6) not null,
      balance_kg numeric(20,10) not null,
      balance_amount numeric(16,2) not null,
      primary key (shop_id, material_id, moved_on, rank, source_id)
    )`.execute(db);
  await sql`create index stock_move_issued on stock_move (shop_id, moved_on, source_id) where rank = 1`.execute(
    db,
  );
  await sql`select secure_table('stock_move', null)`.execute(db);
  await createMovingAverage(db);
  await createRebuild(db);
}

/**
 * State: weight, value and the average of the last moment that had stock. A receipt has its landed cost, a movement
 * whose amount is already in a closed month that amount; every other is `weight × value ÷ weight in stock`, one exact
 * fraction rounded once (half away from zero), so that what empties the stock takes all that is left.
 */
async function createMovingAverage(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function next_stock(state numeric[], weight numeric, landed numeric, posted numeric) returns numeric[]
    language plpgsql immutable as $$
    declare
      amount numeric;
    begin
      if landed is not null then
        amount := landed;
      elsif posted is not null then
        amount := posted;
      elsif state[1] > 0 then
        amount := round((weight * state[2])::numeric(60,30) / state[1], 2);
      else
        amount := round(weight * coalesce(state[3], 0), 2);
      end if;
      return array[
        state[1] + weight,
        state[2] + amount,
        case when state[1] + weight > 0 then (state[2] + amount)::numeric(60,30) / (state[1] + weight) else state[3] end,
        amount
      ];
    end $$`.execute(db);
  await sql`
    create aggregate stock_state(numeric, numeric, numeric) (
      sfunc = next_stock, stype = numeric[], initcond = '{0,0,NULL,0}'
    )`.execute(db);
}

/**
 * Rewrites the ledger of the materials given and marks the days of issues whose amount or average changed. Stock that would
 * fall below nothing is refused (BK001), with what is missing as JSON in the detail; so is a return of more than the
 * job drew (BK002).
 */
async function createRebuild(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function rebuild_stock(materials uuid[]) returns void language plpgsql as $$
    declare
      refused jsonb;
      moves_before stock_move[];
    begin
      select jsonb_build_object('material', m.name, 'on', r.issued_on, 'job', j.number, 'excessKg', r.excess)
        into refused
      from (
        select i.shop_id, i.material_id, i.job_id, i.issued_on,
          sum(case i.kind when 'return' then i.weight_kg else -i.weight_kg end)
            over (partition by i.material_id, i.job_id order by i.issued_on, i.issue_id) as excess
        from material_issue i
        where i.material_id = any (materials) and i.voided_at is null
      ) r
      join material m on m.shop_id = r.shop_id and m.material_id = r.material_id
      join job j on j.shop_id = r.shop_id and j.job_id = r.job_id
      where r.excess > 0
      order by r.issued_on
      limit 1;
      if refused is not null then
        raise exception 'More is returned than the job drew.' using errcode = 'BK002', detail = refused::text;
      end if;

      moves_before := array(select m from stock_move m where m.material_id = any (materials) and m.rank = 1);
      delete from stock_move where material_id = any (materials);

      insert into stock_move (shop_id, material_id, moved_on, rank, source_id, weight_kg, amount, average_per_kg,
        balance_kg, balance_amount)
      select shop_id, material_id, moved_on, rank, source_id, weight, state[4],
        round(coalesce(case when rank = 0 then state[3] else coalesce(average_before, state[3]) end, 0), 6),
        state[1], state[2]
      from (
        select shop_id, material_id, moved_on, rank, source_id, weight, state,
          (lag(state) over (partition by material_id order by moved_on, rank, source_id))[3] as average_before
        from (
          select moves.*, stock_state(weight, landed, posted) over (partition by material_id
            order by moved_on, rank, source_id) as state
          from (
            select shop_id, material_id, received_on as moved_on, 0 as rank, lot_id as source_id,
              weight_kg as weight, cost + freight as landed, null::numeric as posted
            from sheet_lot where material_id = any (materials) and voided_at is null
            union all
            select i.shop_id, i.material_id, i.issued_on, 1, i.issue_id,
              case i.kind when 'return' then i.weight_kg else -i.weight_kg end, null, -p.amount
            from material_issue i
            left join lateral (
              select sum(l.amount) as amount from cost_line l
              where l.shop_id = i.shop_id and l.job_id = i.job_id and l.posted_on <= books_closed_through()
                and l.source_id = i.issue_id and l.posted_on >= i.issued_on
              having sum(l.quantity) <> 0
            ) p on true
            where i.material_id = any (materials) and i.voided_at is null
          ) moves
        ) folded
      ) stated;

      select jsonb_build_object('material', m.name, 'on', s.moved_on, 'missingKg', -s.balance_kg,
          'job', j.number)
        into refused
      from stock_move s
      join material m on m.shop_id = s.shop_id and m.material_id = s.material_id
      left join material_issue i on i.shop_id = s.shop_id and i.issue_id = s.source_id
      left join job j on j.shop_id = i.shop_id and j.job_id = i.job_id
      where s.material_id = any (materials) and s.balance_kg < 0
      order by s.moved_on, s.rank, s.source_id
      limit 1;
      if refused is not null then
        raise exception 'The stock does not cover this.' using errcode = 'BK001', detail = refused::text;
      end if;

      insert into dirty_day (shop_id, worked_on)
      select distinct coalesce(b.shop_id, a.shop_id), coalesce(b.moved_on, a.moved_on)
      from unnest(moves_before) b
      full join (select * from stock_move where material_id = any (materials) and rank = 1) a
        on a.source_id = b.source_id
      where (a.amount, a.average_per_kg, a.moved_on, a.weight_kg)
          is distinct from (b.amount, b.average_per_kg, b.moved_on, b.weight_kg)
      order by 1, 2
      on conflict (shop_id, worked_on) do update set marked_at = now();
    end $$`.execute(db);
  for (const table of ['sheet_lot', 'material_issue'])
    for (const [operation, changed, transition] of [
      ['insert', 'new_rows', 'new table as new_rows'],
      ['delete', 'old_rows', 'old table as old_rows'],
      ['update', null, 'old table as old_rows new table as new_rows'],
    ] as const) {
      const source =
        changed ?? '(select material_id from new_rows union select material_id from old_rows) both_rows';
      await sql
        .raw(
          `create function rebuild_${table}_${operation}() returns trigger language plpgsql as $$
           begin
             perform rebuild_stock(array(select distinct material_id from ${source}));
             return null;
           end $$`,
        )
        .execute(db);
      await sql
        .raw(
          `create trigger rebuild_stock_${operation} after ${operation} on ${table} referencing ${transition}
           for each statement execute function rebuild_${table}_${operation}()`,
        )
        .execute(db);
    }
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop table stock_move, material_issue, sheet_lot, material`.execute(db);
  for (const table of ['sheet_lot', 'material_issue'])
    for (const operation of ['insert', 'delete', 'update'])
      await sql.raw(`drop function rebuild_${table}_${operation}()`).execute(db);
  await sql`drop function rebuild_stock(uuid[])`.execute(db);
  await sql`drop aggregate stock_state(numeric, numeric, numeric)`.execute(db);
  await sql`drop function next_stock(numeric[], numeric, numeric, numeric)`.execute(db);
}
