import { type Role, type Shop } from '@brakeven/contract';
import { type Database, inShop, type ShopTransaction } from '@brakeven/database';
import { type LocalDate, todayIn } from '@brakeven/values';

/** Who asks, in which shop: what every use case needs first. */
export interface ShopContext {
  db: Database;
  shop: Shop;
  actor: {
    userId: string | null;
    name: string;
    role: Role;
    /** The employee whose hours an operator sees; null if the account has none. */
    employeeId: string | null;
  };
  /** The clock, for tests; the machine's own if absent. */
  now?: () => Date;
}

/** Runs `work` in one transaction that sees and writes this shop only, as this actor. */
export function inShopOf<T>(context: ShopContext, work: (trx: ShopTransaction) => Promise<T>): Promise<T> {
  return inShop(context.db, context.shop.shopId, context.actor, work);
}

/** Today's date where the shop is. */
export function todayOf(context: ShopContext): LocalDate {
  return todayIn(context.shop.timeZone, context.now?.());
}
