import { AppError, type Die, type dieInputSchema } from '@brakeven/contract';
import {
  countBendsOnOpenings,
  deleteDieOpeningRows,
  deleteDieRow,
  type DieOpeningRow,
  type DieRow,
  insertDie,
  insertDieOpenings,
  listDieOpeningRows,
  listDieRows,
  type ShopTransaction,
  updateDieOpeningRow,
  updateDieRow,
} from '@brakeven/database';
import { v7 as newId } from 'uuid';
import { type z } from 'zod';
import { inShopOf, type ShopContext } from '../context';
import { groupBy } from '../group-by';
import { toPlainText } from '../quantity-text';
import { refusingConflicts } from '../refuse-conflict';
import { refuseUsed } from './tool-use';

type DieValues = z.output<typeof dieInputSchema>;

const CONFLICTS = {
  die_shop_id_machine_id_name_key: { field: 'name', message: 'Another die of this machine has this name.' },
  die_shop_id_machine_id_fkey: { field: 'machineId', message: 'There is no such machine.' },
  die_opening_shop_id_die_id_opening_mm_key: {
    field: 'openings',
    message: 'This die has an opening of that width already. Take one of them out first.',
  },
};

/** All dies by machine and name, each with its openings. */
export async function readDies(trx: ShopTransaction, dieId?: string): Promise<Die[]> {
  const openings = groupBy(await listDieOpeningRows(trx, dieId), (opening) => opening.dieId);
  return (await listDieRows(trx, dieId)).map((row) => toDie(row, openings.get(row.dieId) ?? []));
}

/**
 * Adds a die of a machine with its openings.
 * @throws AppError `conflict` (name taken), `invalid_input` (no such machine)
 */
export function createDie(
  context: ShopContext,
  { machineId }: { machineId: string },
  { openings, ...body }: DieValues,
): Promise<Die> {
  const { shopId } = context.shop;
  const dieId = newId();
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await insertDie(trx, { shopId, machineId, dieId, ...body });
      const rows = openings.map((opening) => ({ ...opening, shopId, dieId, dieOpeningId: newId() }));
      await insertDieOpenings(trx, rows);
      return getDie(trx, dieId);
    }),
  );
}

/**
 * Changes a die. Openings that are left out are taken away; depths fitted to trial bends on the others follow.
 * @throws AppError `not_found` (die or opening), `conflict` (name taken, bends were made on an opening left out)
 */
export function updateDie(
  context: ShopContext,
  { dieId }: { dieId: string },
  { openings, ...body }: DieValues,
): Promise<Die> {
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      const die = await getDie(trx, dieId);
      await updateDieRow(trx, dieId, body);
      await changeOpenings(trx, { shopId: context.shop.shopId, die }, openings);
      return getDie(trx, dieId);
    }),
  );
}

async function changeOpenings(
  trx: ShopTransaction,
  { shopId, die }: { shopId: string; die: Die },
  openings: DieValues['openings'],
): Promise<void> {
  const kept = new Set(openings.flatMap(({ dieOpeningId }) => dieOpeningId ?? []));
  const leaving = die.openings.filter(({ dieOpeningId }) => !kept.has(dieOpeningId));
  await removeOpenings(trx, die.name, leaving);
  for (const { dieOpeningId, ...change } of openings) {
    if (dieOpeningId === undefined) continue;
    if (!die.openings.some((opening) => opening.dieOpeningId === dieOpeningId)) {
      throw new AppError('not_found', 'This die has no such opening. Load the page again.');
    }
    await updateDieOpeningRow(trx, dieOpeningId, change);
  }
  const added = openings.filter(({ dieOpeningId }) => dieOpeningId === undefined);
  await insertDieOpenings(
    trx,
    added.map((opening) => ({ ...opening, shopId, dieId: die.dieId, dieOpeningId: newId() })),
  );
}

async function removeOpenings(
  trx: ShopTransaction,
  dieName: string,
  openings: Die['openings'],
): Promise<void> {
  for (const { dieOpeningId, openingMm } of openings) {
    refuseUsed(
      `The opening of ${openingMm} mm of die ${dieName}`,
      await countBendsOnOpenings(trx, [dieOpeningId]),
    );
  }
  await deleteDieOpeningRows(
    trx,
    openings.map(({ dieOpeningId }) => dieOpeningId),
  );
}

/**
 * Takes a die out on which nothing was bent.
 * @throws AppError `not_found`, `conflict` (bends were made on it)
 */
export function deleteDie(context: ShopContext, { dieId }: { dieId: string }): Promise<void> {
  return inShopOf(context, async (trx) => {
    const { name, openings } = await getDie(trx, dieId);
    await removeOpenings(trx, name, openings);
    await deleteDieRow(trx, dieId);
  });
}

async function getDie(trx: ShopTransaction, dieId: string): Promise<Die> {
  const [die] = await readDies(trx, dieId);
  if (!die) throw new AppError('not_found', 'There is no such die. Load the page again.');
  return die;
}

function toDie(row: DieRow, openings: readonly DieOpeningRow[]): Die {
  return {
    ...row,
    lengthMm: toPlainText(row.lengthMm),
    forceLimitKnPerM: toPlainText(row.forceLimitKnPerM),
    openings: openings.map(({ dieOpeningId, openingMm, angle, shoulderRadiusMm }) => ({
      dieOpeningId,
      openingMm: toPlainText(openingMm),
      angle: toPlainText(angle),
      shoulderRadiusMm: toPlainText(shoulderRadiusMm),
    })),
  };
}
