import { sql, type Transaction } from 'kysely';
import { type Database } from './connect';
import { type Tables } from './tables';

export type ShopTransaction = Transaction<Tables>;

/** Who acts, for the audit trail. */
export interface Actor {
  userId: string | null;
  name: string;
}

/**
 * Runs `work` in one transaction that sees and writes the rows of one shop only: row-level security compares
 * every row with the setting made here, and the setting ends with the transaction.
 */
export function inShop<T>(
  db: Database,
  shopId: string,
  actor: Actor,
  work: (trx: ShopTransaction) => Promise<T>,
): Promise<T> {
  return db.transaction().execute(async (trx) => {
    await sql`select set_config('app.shop_id', ${shopId}, true), set_config('app.actor', ${actor.name}, true),
      set_config('app.actor_id', ${actor.userId ?? ''}, true)`.execute(trx);
    return work(trx);
  });
}

/**
 * Waits for the shop's books: imports, undos and rollups of one shop go one after the other, so that two equal
 * files at once, or a file in the middle of a rollup, do no harm. Held until the transaction ends.
 */
export async function lockBooks(trx: ShopTransaction, shopId: string): Promise<void> {
  await sql`select pg_advisory_xact_lock(hashtextextended('books:' || ${shopId}, 0))`.execute(trx);
}
