import { AppError, type Shop } from '@brakeven/contract';
import { type Database, findShopByName, listShopRows } from '@brakeven/database';
import { type ShopContext } from '../context';

/**
 * Opens a shop by its name for the command line, whoever runs it being trusted as an owner.
 * @throws AppError `shop_not_found`
 */
export async function openShop(db: Database, name: string, actorName: string): Promise<ShopContext> {
  const shop = await findShopByName(db, name.trim());
  if (!shop) {
    throw new AppError(
      'shop_not_found',
      `There is no shop named '${name}'. The command shop list names them all.`,
    );
  }
  return { db, shop, actor: { userId: null, name: actorName, role: 'owner', employeeId: null } };
}

/** All shops by name; `ownerDb` is connected as brakeven_owner, which alone sees more than one. */
export function listShops(ownerDb: Database): Promise<Shop[]> {
  return listShopRows(ownerDb);
}
