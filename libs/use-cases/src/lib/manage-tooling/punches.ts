import { AppError, type Punch, type punchInputSchema } from '@brakeven/contract';
import {
  countBendsOfPunch,
  deletePunchRow,
  insertPunch,
  listPunchRows,
  type PunchRow,
  type ShopTransaction,
  updatePunchRow,
} from '@brakeven/database';
import { v7 as newId } from 'uuid';
import { type z } from 'zod';
import { inShopOf, type ShopContext } from '../context';
import { toPlainText } from '../quantity-text';
import { refusingConflicts } from '../refuse-conflict';
import { refuseUsed } from './tool-use';

type PunchValues = z.output<typeof punchInputSchema>;

const CONFLICTS = {
  punch_shop_id_machine_id_name_key: {
    field: 'name',
    message: 'Another punch of this machine has this name.',
  },
  punch_shop_id_machine_id_fkey: { field: 'machineId', message: 'There is no such machine.' },
};

/** All punches by machine and name. */
export async function readPunches(trx: ShopTransaction): Promise<Punch[]> {
  return (await listPunchRows(trx)).map(toPunch);
}

/**
 * Adds a punch of a machine.
 * @throws AppError `conflict` (name taken), `invalid_input` (no such machine)
 */
export function createPunch(
  context: ShopContext,
  { machineId }: { machineId: string },
  body: PunchValues,
): Promise<Punch> {
  const punchId = newId();
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await insertPunch(trx, { shopId: context.shop.shopId, machineId, punchId, ...body });
      return getPunch(trx, punchId);
    }),
  );
}

/**
 * Changes a punch; depths fitted to trial bends made with it follow.
 * @throws AppError `not_found`, `conflict` (name taken)
 */
export function updatePunch(
  context: ShopContext,
  { punchId }: { punchId: string },
  body: PunchValues,
): Promise<Punch> {
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await updatePunchRow(trx, punchId, body);
      return getPunch(trx, punchId);
    }),
  );
}

/**
 * Takes a punch out with which nothing was bent.
 * @throws AppError `not_found`, `conflict` (bends were made with it)
 */
export function deletePunch(context: ShopContext, { punchId }: { punchId: string }): Promise<void> {
  return inShopOf(context, async (trx) => {
    const { name } = await getPunch(trx, punchId);
    refuseUsed(`Punch ${name}`, await countBendsOfPunch(trx, punchId));
    await deletePunchRow(trx, punchId);
  });
}

async function getPunch(trx: ShopTransaction, punchId: string): Promise<Punch> {
  const [row] = await listPunchRows(trx, punchId);
  if (!row) throw new AppError('not_found', 'There is no such punch. Load the page again.');
  return toPunch(row);
}

function toPunch(row: PunchRow): Punch {
  return {
    ...row,
    noseRadiusMm: toPlainText(row.noseRadiusMm),
    angle: toPlainText(row.angle),
    lengthMm: toPlainText(row.lengthMm),
    forceLimitKnPerM: toPlainText(row.forceLimitKnPerM),
  };
}
