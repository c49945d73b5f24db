import { AppError, type Machine, type MachineCostItemInput, type MachineRateInput } from '@brakeven/contract';
import {
  deleteMachineCostItemRow,
  deleteMachineRateRow,
  insertMachineCostItem,
  insertMachineRate,
  type ShopTransaction,
  updateMachineCostItemRow,
  updateMachineRateRow,
} from '@brakeven/database';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';
import { refusingConflicts } from '../refuse-conflict';
import { readMachine } from './machines';

const CONFLICTS = {
  machine_rate_shop_id_machine_id_valid_from_key: {
    field: 'validFrom',
    message: 'There are already rates from this day on. Correct those.',
  },
};

interface MachineRef {
  machineId: string;
}

/**
 * Adds to a machine's landed cost.
 * @throws AppError `not_found` (machine)
 */
export function createMachineCostItem(
  context: ShopContext,
  { machineId }: MachineRef,
  body: MachineCostItemInput,
): Promise<Machine> {
  return change(context, machineId, async (trx) => {
    const { shopId } = context.shop;
    await insertMachineCostItem(trx, { shopId, machineCostItemId: newId(), machineId, ...body });
    return true;
  });
}

/**
 * Corrects a part of a machine's landed cost.
 * @throws AppError `not_found`
 */
export function updateMachineCostItem(
  context: ShopContext,
  { machineId, machineCostItemId }: MachineRef & { machineCostItemId: string },
  body: MachineCostItemInput,
): Promise<Machine> {
  return change(context, machineId, (trx) =>
    updateMachineCostItemRow(trx, machineId, machineCostItemId, body),
  );
}

/**
 * Takes a part of a machine's landed cost out.
 * @throws AppError `not_found`
 */
export function deleteMachineCostItem(
  context: ShopContext,
  { machineId, machineCostItemId }: MachineRef & { machineCostItemId: string },
): Promise<Machine> {
  return change(context, machineId, (trx) => deleteMachineCostItemRow(trx, machineId, machineCostItemId));
}

/**
 * Adds a machine's rates from a day on.
 * @throws AppError `not_found` (machine), `conflict` (rates from that day are there)
 */
export function createMachineRate(
  context: ShopContext,
  { machineId }: MachineRef,
  body: MachineRateInput,
): Promise<Machine> {
  return change(context, machineId, async (trx) => {
    await insertMachineRate(trx, {
      shopId: context.shop.shopId,
      machineRateId: newId(),
      machineId,
      ...body,
    });
    return true;
  });
}

/**
 * Corrects a machine's rates; the days that they price are costed anew by the next rollup.
 * @throws AppError `not_found`, `conflict`
 */
export function updateMachineRate(
  context: ShopContext,
  { machineId, machineRateId }: MachineRef & { machineRateId: string },
  body: MachineRateInput,
): Promise<Machine> {
  return change(context, machineId, (trx) => updateMachineRateRow(trx, machineId, machineRateId, body));
}

/**
 * Takes a machine's rates out; entries that then have none are counted as gaps, not as 0.
 * @throws AppError `not_found`
 */
export function deleteMachineRate(
  context: ShopContext,
  { machineId, machineRateId }: MachineRef & { machineRateId: string },
): Promise<Machine> {
  return change(context, machineId, (trx) => deleteMachineRateRow(trx, machineId, machineRateId));
}

function change(
  context: ShopContext,
  machineId: string,
  work: (trx: ShopTransaction) => Promise<boolean>,
): Promise<Machine> {
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await readMachine(context, trx, machineId);
      if (!(await work(trx))) throw new AppError('not_found', 'This is not on the machine, or no longer.');
      return readMachine(context, trx, machineId);
    }),
  );
}
