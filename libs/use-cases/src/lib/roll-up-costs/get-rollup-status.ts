import { type RollupStatus } from '@brakeven/contract';
import { getRollupState, listRateGapRows } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';

/** Through which day costs are rolled up, what waits, and which entries lack a rate. */
export function getRollupStatus(context: ShopContext): Promise<RollupStatus> {
  return inShopOf(context, async (trx) => {
    const state = await getRollupState(trx, context.shop.shopId);
    const gaps = await listRateGapRows(trx);
    return { ...state, lastRunAt: state.lastRunAt?.toISOString() ?? null, gaps };
  });
}
