import { AppError, hasPermission, type Machine, type MachineInput } from '@brakeven/contract';
import {
  insertMachine,
  listMachineCostItemRows,
  listMachineRateBasisRows,
  listMachineRateRows,
  listMachineRows,
  lockBooks,
  type ShopTransaction,
  updateMachineRow,
} from '@brakeven/database';
import { D, moneyText, rateText, toMoney, toRate } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';
import { refusingConflicts } from '../refuse-conflict';
import { refusingRows } from '../refuse-rows';
import { toMachineRateBasis } from './rate-basis';

const CONFLICTS = {
  machine_shop_id_code_key: { field: 'code', message: 'Another machine has this code.' },
  machine_rated_force_kn_check: { field: 'ratedForceKn', message: 'Must be more than 0.' },
  machine_bed_length_mm_check: { field: 'bedLengthMm', message: 'Must be more than 0.' },
};

/** All machines by code; landed cost and rates only for those who may see money. */
export function listMachines(context: ShopContext): Promise<Machine[]> {
  return inShopOf(context, (trx) => readMachines(context, trx));
}

/**
 * One machine with landed cost and rates, for those who may see money.
 * @throws AppError `not_found`
 */
export function getMachine(context: ShopContext, { machineId }: { machineId: string }): Promise<Machine> {
  return inShopOf(context, (trx) => readMachine(context, trx, machineId));
}

/**
 * Adds a machine.
 * @throws AppError `conflict` (code taken), `invalid_input`
 */
export function createMachine(context: ShopContext, body: MachineInput): Promise<Machine> {
  const machineId = newId();
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await insertMachine(trx, { shopId: context.shop.shopId, machineId, ...body });
      return readMachine(context, trx, machineId);
    }),
  );
}

/**
 * Changes a machine; another in-service date moves what counts towards its payback, and is not moved across work that
 * a closed month holds.
 * @throws AppError `not_found`, `conflict` (code taken, closed month), `invalid_input`
 */
export function updateMachine(
  context: ShopContext,
  { machineId }: { machineId: string },
  body: MachineInput,
): Promise<Machine> {
  return refusingRows(context.shop.units, { 'in-service': 'inServiceOn' }, () =>
    refusingConflicts(CONFLICTS, () =>
      inShopOf(context, async (trx) => {
        await lockBooks(trx, context.shop.shopId);
        await updateMachineRow(trx, machineId, body);
        return readMachine(context, trx, machineId);
      }),
    ),
  );
}

/**
 * One machine as the screens see it.
 * @throws AppError `not_found`
 */
export async function readMachine(
  context: ShopContext,
  trx: ShopTransaction,
  machineId: string,
): Promise<Machine> {
  const [machine] = await readMachines(context, trx, machineId);
  if (!machine) throw new AppError('not_found', 'There is no such machine.');
  return machine;
}

async function readMachines(
  context: ShopContext,
  trx: ShopTransaction,
  machineId?: string,
): Promise<Machine[]> {
  const machines = (await listMachineRows(trx, machineId)).map((row) => ({
    ...row,
    ratedForceKn: toQuantityText(row.ratedForceKn),
    bedLengthMm: toQuantityText(row.bedLengthMm),
  }));
  if (!hasPermission(context.actor.role, 'machines.money')) return machines;
  const items = await listMachineCostItemRows(trx, machineId);
  const rates = await listMachineRateRows(trx, machineId);
  const bases = new Map(
    (await listMachineRateBasisRows(trx, machineId)).map(({ machineRateId, ...basis }) => [
      machineRateId,
      toMachineRateBasis(basis),
    ]),
  );
  return machines.map((machine) => ({
    ...machine,
    ...toCosts(items.filter((item) => item.machineId === machine.machineId)),
    rates: rates
      .filter((rate) => rate.machineId === machine.machineId)
      .map((rate) => ({ ...toMachineRate(rate), basis: bases.get(rate.machineRateId) ?? null })),
  }));
}

function toCosts(
  rows: Awaited<ReturnType<typeof listMachineCostItemRows>>,
): Pick<Machine, 'outlay' | 'costItems'> {
  const outlay = rows.reduce((sum, { amount }) => sum.plus(D(amount)), D('0'));
  return {
    outlay: moneyText(toMoney(outlay)),
    costItems: rows.map(({ machineCostItemId, incurredOn, kind, description, amount }) => ({
      machineCostItemId,
      incurredOn,
      kind,
      description,
      amount: moneyText(toMoney(amount)),
    })),
  };
}

function toMachineRate(row: Awaited<ReturnType<typeof listMachineRateRows>>[number]) {
  return {
    machineRateId: row.machineRateId,
    validFrom: row.validFrom,
    machineHourRate: rateText(toRate(row.machineHourRate)),
    chargeOutRate: rateText(toRate(row.chargeOutRate)),
    runningCostPerHour: rateText(toRate(row.runningCostPerHour)),
  };
}

/** Without the noughts that fill up the column's scale: '533.78650' is '533.7865'. */
function toQuantityText(stored: string | null): string | null {
  return stored === null ? null : D(stored).toFixed();
}
