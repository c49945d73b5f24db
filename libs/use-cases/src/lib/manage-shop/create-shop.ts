import { type Shop } from '@brakeven/contract';
import { type Database, inShop, insertShop, insertUser } from '@brakeven/database';
import { v7 as newId } from 'uuid';
import { refusingConflicts } from '../refuse-conflict';
import { hashPassword, newTemporaryPassword } from '../sign-in/password';
import { checkPlace, SHOP_CONFLICTS } from './shop-settings';

export interface NewShop {
  name: string;
  timeZone: string;
  currency: string;
  units: Shop['units'];
  weekStart?: number;
  owner: { email: string; name: string };
}

export interface CreatedShop {
  shop: Shop;
  ownerUserId: string;
  /** Told once; it has to be changed at the first sign-in. */
  temporaryPassword: string;
}

/** A week of 40 hours, and the premium in overhead: what most shops in the United States begin with. */
const OVERTIME_AT_FIRST = { overtimeThresholdHours: '40.00', overtimeTo: 'overhead' } as const;

/**
 * Makes a shop and its first owner's account.
 *
 * @param ownerDb connected as brakeven_owner, which alone may add shops
 * @param actorName who does it, for the audit trail
 * @throws AppError `conflict` (name taken), `invalid_input` (unknown time zone or currency)
 */
export async function createShop(ownerDb: Database, input: NewShop, actorName: string): Promise<CreatedShop> {
  checkPlace(input);
  const { owner, ...settings } = input;
  const shop: Shop = { shopId: newId(), weekStart: 1, ...OVERTIME_AT_FIRST, ...settings };
  const ownerUserId = newId();
  const temporaryPassword = newTemporaryPassword();
  const passwordHash = await hashPassword(temporaryPassword);
  await refusingConflicts(SHOP_CONFLICTS, () =>
    inShop(ownerDb, shop.shopId, { userId: null, name: actorName }, async (trx) => {
      await insertShop(trx, shop);
      await insertUser(trx, {
        shopId: shop.shopId,
        userId: ownerUserId,
        name: owner.name,
        email: owner.email,
        role: 'owner',
        employeeId: null,
        passwordHash,
        mustChangePassword: true,
      });
    }),
  );
  return { shop, ownerUserId, temporaryPassword };
}
