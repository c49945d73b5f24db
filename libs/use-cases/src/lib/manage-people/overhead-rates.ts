import { AppError, type OverheadRate, type OverheadRateInput } from '@brakeven/contract';
import {
  deleteOverheadRateRow,
  insertOverheadRate,
  listOverheadRateRows,
  updateOverheadRateRow,
} from '@brakeven/database';
import { rateText, toRate } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';
import { refusingConflicts } from '../refuse-conflict';

const CONFLICTS = {
  overhead_rate_shop_id_valid_from_key: {
    field: 'validFrom',
    message: 'There is already an overhead rate from this day on. Correct that one.',
  },
};

/** Overhead rates per labour hour, latest first. */
export async function listOverheadRates(context: ShopContext): Promise<OverheadRate[]> {
  const rows = await inShopOf(context, listOverheadRateRows);
  return rows.map(toOverheadRate);
}

/**
 * Adds an overhead rate from a day on.
 * @throws AppError `conflict` (one from that day is there)
 */
export async function createOverheadRate(
  context: ShopContext,
  body: OverheadRateInput,
): Promise<OverheadRate> {
  const row = { overheadRateId: newId(), ...body };
  await refusingConflicts(CONFLICTS, () =>
    inShopOf(context, (trx) => insertOverheadRate(trx, { shopId: context.shop.shopId, ...row })),
  );
  return toOverheadRate(row);
}

/**
 * Corrects an overhead rate; the days that it prices are costed anew by the next rollup.
 * @throws AppError `not_found`, `conflict`
 */
export async function updateOverheadRate(
  context: ShopContext,
  { overheadRateId }: { overheadRateId: string },
  body: OverheadRateInput,
): Promise<OverheadRate> {
  const wasThere = await refusingConflicts(CONFLICTS, () =>
    inShopOf(context, (trx) => updateOverheadRateRow(trx, overheadRateId, body)),
  );
  if (!wasThere) throw notFound();
  return toOverheadRate({ overheadRateId, ...body });
}

/**
 * Takes an overhead rate out; days before every rate then have no overhead and are counted as gaps.
 * @throws AppError `not_found`
 */
export async function deleteOverheadRate(
  context: ShopContext,
  { overheadRateId }: { overheadRateId: string },
): Promise<void> {
  const wasThere = await inShopOf(context, (trx) => deleteOverheadRateRow(trx, overheadRateId));
  if (!wasThere) throw notFound();
}

function toOverheadRate(row: OverheadRate): OverheadRate {
  return { ...row, ratePerLabourHour: rateText(toRate(row.ratePerLabourHour)) };
}

function notFound(): AppError {
  return new AppError('not_found', 'There is no such overhead rate.');
}
