import { type Machine, type MachineCostItemInput, type MachineRateInput } from '@brakeven/contract';
import {
  deleteMachineCostItemRow,
  deleteMachineRateBasis,
  deleteMachineRateRow,
  insertMachineCostItem,
  insertMachineRate,
  listMachineRateRows,
  updateMachineCostItemRow,
  updateMachineRateRow,
} from '@brakeven/database';
import { D } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { type ShopContext } from '../context';
import { changeMachine, type MachineRef } from './change-machine';

/**
 * Adds to a machine's landed cost.
 * @throws AppError `not_found` (machine)
 */
export function createMachineCostItem(
  context: ShopContext,
  { machineId }: MachineRef,
  body: MachineCostItemInput,
): Promise<Machine> {
  return changeMachine(context, machineId, async (trx) => {
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
  return changeMachine(context, machineId, (trx) =>
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
  return changeMachine(context, machineId, (trx) =>
    deleteMachineCostItemRow(trx, machineId, machineCostItemId),
  );
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
  return changeMachine(context, machineId, async (trx) => {
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
 * Corrects a machine's rates; the days that they price are costed anew by the next rollup. A machine-hour rate that
 * was built and is now another one counts as typed in.
 * @throws AppError `not_found`, `conflict`
 */
export function updateMachineRate(
  context: ShopContext,
  { machineId, machineRateId }: MachineRef & { machineRateId: string },
  body: MachineRateInput,
): Promise<Machine> {
  return changeMachine(context, machineId, async (trx) => {
    const before = (await listMachineRateRows(trx, machineId)).find(
      (rate) => rate.machineRateId === machineRateId,
    );
    if (before && !D(before.machineHourRate).eq(D(body.machineHourRate)))
      await deleteMachineRateBasis(trx, machineRateId);
    return updateMachineRateRow(trx, machineId, machineRateId, body);
  });
}

/**
 * Takes a machine's rates out; entries that then have none are counted as gaps, not as 0.
 * @throws AppError `not_found`
 */
export function deleteMachineRate(
  context: ShopContext,
  { machineId, machineRateId }: MachineRef & { machineRateId: string },
): Promise<Machine> {
  return changeMachine(context, machineId, (trx) => deleteMachineRateRow(trx, machineId, machineRateId));
}
