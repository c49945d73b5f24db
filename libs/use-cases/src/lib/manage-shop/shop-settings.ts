import { AppError, type Issue, type Shop, type ShopPatch } from '@brakeven/contract';
import { getShopRow, updateShopRow } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { refusingConflicts } from '../refuse-conflict';

export const SHOP_CONFLICTS = {
  shop_name_key: { field: 'name', message: 'There is already a shop of this name.' },
};

/** The shop's settings as they are now. */
export function getShop(context: ShopContext): Promise<Shop> {
  return inShopOf(context, getShopRow);
}

/**
 * Changes the shop's settings.
 * @throws AppError `invalid_input` (unknown time zone or currency), `conflict` (name taken)
 */
export function updateShop(context: ShopContext, body: ShopPatch): Promise<Shop> {
  checkPlace(body);
  return refusingConflicts(SHOP_CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      if (Object.values(body).some((value) => value !== undefined)) {
        await updateShopRow(trx, context.shop.shopId, body);
      }
      return getShopRow(trx);
    }),
  );
}

/**
 * Refuses time zones and currencies that nobody could compute or print with.
 * @throws AppError `invalid_input`
 */
export function checkPlace({ timeZone, currency }: { timeZone?: string; currency?: string }): void {
  const issues: Issue[] = [];
  if (timeZone !== undefined && !isTimeZone(timeZone)) {
    const message = `There is no time zone '${timeZone}'. Write its name such as America/Chicago or Europe/Berlin.`;
    issues.push({ field: 'timeZone', code: 'unknown_time_zone', message });
  }
  if (currency !== undefined && !Intl.supportedValuesOf('currency').includes(currency)) {
    const message = `There is no currency '${currency}'. Write its code of three letters, for example USD.`;
    issues.push({ field: 'currency', code: 'unknown_currency', message });
  }
  if (issues[0])
    throw new AppError('invalid_input', issues.map((issue) => issue.message).join(' '), { issues });
}

function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name });
    return /^[A-Z]/.test(name);
  } catch {
    // RangeError is how Intl says that it does not know the zone.
    return false;
  }
}
