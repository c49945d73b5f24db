import { AppError, type RollupResult } from '@brakeven/contract';
import {
  beginRollup,
  finishRollupRun,
  findThrough,
  insertRollupRun,
  lockBooks,
  rewriteCosts,
  type ShopTransaction,
  takeDirtyDays,
} from '@brakeven/database';
import { parseLocalDate } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext, todayOf } from '../context';
import { writeSnapshots } from './write-snapshots';

/** What to roll up. */
export interface RollupOptions {
  /** All days instead of those that changed; gives the same lines. */
  full?: boolean;
  /** The last day to roll up; today in the shop's zone if absent. */
  through?: string;
}

/**
 * Brings the shop's costs up to date in one transaction: whoever stops it, at whatever moment, leaves the costs as
 * they were. A second rollup waits for the first and then finds nothing to do.
 */
export async function runRollup(context: ShopContext, options: RollupOptions): Promise<RollupResult> {
  const { shop, actor } = context;
  const limit = options.through === undefined ? todayOf(context) : readThrough(options.through);
  const isFull = options.full ?? false;
  return inShopOf(context, async (trx) => {
    await lockBooks(trx, shop.shopId);
    await beginRollup(trx, shop.shopId);
    const runId = newId();
    await insertRollupRun(trx, { shopId: shop.shopId, runId, isFull, startedBy: actor.name, through: null });
    const { days, lines } = await rewriteDays(trx, runId, isFull, limit);
    const through = await findThrough(trx, limit);
    if (through !== null) await writeSnapshots(trx, { shopId: shop.shopId, runId, through });
    await finishRollupRun(trx, runId, { days, lines, through });
    return { shop: shop.name, days, lines, through };
  });
}

async function rewriteDays(trx: ShopTransaction, runId: string, isFull: boolean, through: string) {
  const dirtyDays = await takeDirtyDays(trx, through);
  if (isFull) return rewriteCosts(trx, runId, { days: 'all', through });
  if (dirtyDays.length === 0) return { days: 0, lines: 0 };
  return rewriteCosts(trx, runId, { days: dirtyDays, through });
}

function readThrough(text: string): string {
  const parsed = parseLocalDate(text);
  if (parsed.ok) return parsed.value;
  throw new AppError('invalid_input', parsed.message, {
    issues: [{ field: 'through', code: parsed.code, message: parsed.message }],
  });
}
