import { sql, type Insertable, type Updateable } from 'kysely';
import { type Database } from './connect';
import { type ShopTable } from './tables';
import { type ShopTransaction } from './tenancy';

const SHOP_COLUMNS = [
  'shopId',
  'name',
  'timeZone',
  'currency',
  'units',
  'weekStart',
  'overtimeThresholdHours',
  'overtimeTo',
] as const;

/** The shop that the transaction is in. */
export function getShopRow(trx: ShopTransaction) {
  return trx.selectFrom('shop').select(SHOP_COLUMNS).executeTakeFirstOrThrow();
}

/** The shop with exactly this name, before any shop is known. */
export function findShopByName(db: Database, name: string) {
  return db.transaction().execute(async (trx) => {
    await sql`select set_config('app.shop_name', ${name}, true)`.execute(trx);
    return trx.selectFrom('shop').select(SHOP_COLUMNS).where('name', '=', name).executeTakeFirst();
  });
}

/** All shops by name; brakeven_owner alone may read them. */
export function listShopRows(owner: Database) {
  return owner.selectFrom('shop').select(SHOP_COLUMNS).orderBy('name').execute();
}

/** Adds a shop; the transaction has to be in it already. */
export async function insertShop(trx: ShopTransaction, row: Insertable<ShopTable>): Promise<void> {
  await trx.insertInto('shop').values(row).execute();
}

/** Changes the settings of the shop that the transaction is in. */
export async function updateShopRow(
  trx: ShopTransaction,
  shopId: string,
  change: Updateable<ShopTable>,
): Promise<void> {
  await trx.updateTable('shop').set(change).where('shopId', '=', shopId).execute();
}
