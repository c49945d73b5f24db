import { sql } from 'kysely';
import { type ShopTransaction } from './tenancy';

/** The last day of the latest closed month; null while none is closed. */
export async function getClosedThrough(trx: ShopTransaction): Promise<string | null> {
  const { rows } = await sql<{ closedThrough: string | null }>`
    select nullif(books_closed_through(), '-infinity')::text as closed_through`.execute(trx);
  return rows[0]?.closedThrough ?? null;
}

/**
 * After a month was reopened: takes out the late lines that stood after it, marks its days and theirs to be rolled up
 * again, and rewrites the stock ledger, whose issues in that month are no longer fixed. Run the rollup next.
 */
export async function markReopenedDays(trx: ShopTransaction): Promise<void> {
  await sql`
    with open_line as (
      select shop_id, posted_on, worked_on from cost_line where posted_on > books_closed_through()
    ),
    late as (
      delete from cost_line where posted_on > books_closed_through() and posted_on <> worked_on
      returning shop_id, posted_on, worked_on
    ),
    late_gap as (
      delete from rate_gap where posted_on > books_closed_through() and posted_on <> worked_on
      returning shop_id, posted_on, worked_on
    )
    insert into dirty_day (shop_id, worked_on)
    select shop_id, posted_on from open_line
    union select shop_id, unnest(array[posted_on, worked_on]) from late
    union select shop_id, unnest(array[posted_on, worked_on]) from late_gap
    order by 1, 2
    on conflict (shop_id, worked_on) do update set marked_at = now()`.execute(trx);
  await sql`select rebuild_stock(array(select material_id from material))`.execute(trx);
}
