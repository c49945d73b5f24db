import {
  AppError,
  type Machine,
  type MachineBuiltRateInput,
  type MachineRateInput,
} from '@brakeven/contract';
import { computeMachineHourRate, findValidOn, type RatePart } from '@brakeven/costing';
import {
  insertMachineRate,
  listMachineRateRows,
  saveMachineRateBasis,
  type ShopTransaction,
  updateMachineRateRow,
} from '@brakeven/database';
import { D, rateText, toLocalDate, toRate } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { type ShopContext, todayOf } from '../context';
import { changeMachine, type MachineRef } from './change-machine';
import { listMachines } from './machines';
import { toCostedBasis } from './rate-basis';

/**
 * Builds a machine-hour rate and adds it from a day on, with what it was built from, in one transaction. Charge-out
 * rate and running cost that are left out stay as they were before that day.
 * @throws AppError `not_found` (machine), `conflict` (rates from that day are there), `invalid_input` (nothing to keep)
 */
export function createMachineBuiltRate(
  context: ShopContext,
  { machineId }: MachineRef,
  body: MachineBuiltRateInput,
): Promise<Machine> {
  const { shopId } = context.shop;
  return changeMachine(context, machineId, async (trx) => {
    const machineRateId = newId();
    const rate = toRateInput(body, await listMachineRateRows(trx, machineId));
    await insertMachineRate(trx, { shopId, machineRateId, machineId, ...rate });
    await saveMachineRateBasis(trx, { shopId, machineRateId, ...body.basis });
    return true;
  });
}

/**
 * Builds a machine-hour rate anew; the days that it prices are costed anew by the next rollup.
 * @throws AppError `not_found`, `conflict`
 */
export function updateMachineBuiltRate(
  context: ShopContext,
  { machineId, machineRateId }: MachineRef & { machineRateId: string },
  body: MachineBuiltRateInput,
): Promise<Machine> {
  return changeMachine(context, machineId, async (trx) => {
    const rates = await listMachineRateRows(trx, machineId);
    const own = rates.find((rate) => rate.machineRateId === machineRateId);
    if (!own) return false;
    const rate = toRateInput(
      { chargeOutRate: own.chargeOutRate, runningCostPerHour: own.runningCostPerHour, ...body },
      [],
    );
    return (
      (await updateMachineRateRow(trx, machineId, machineRateId, rate)) &&
      saveBasis(trx, { ...body.basis, shopId: context.shop.shopId, machineRateId })
    );
  });
}

async function saveBasis(
  trx: ShopTransaction,
  row: Parameters<typeof saveMachineRateBasis>[1],
): Promise<true> {
  await saveMachineRateBasis(trx, row);
  return true;
}

/** A machine's rates that hold today, for programs; the parts are missing of a rate that was typed in. */
export interface MachineRateSummary {
  machine: string;
  validFrom: string;
  machineHourRate: string;
  chargeOutRate: string;
  runningCostPerHour: string;
  parts: Record<RatePart, string> | null;
}

/**
 * The rates of a machine that hold today, with the parts that its machine-hour rate was built of.
 * @throws AppError `not_found` (no such machine, or no rate that holds today)
 */
export async function getMachineRate(context: ShopContext, code: string): Promise<MachineRateSummary> {
  const machine = (await listMachines(context)).find((one) => one.code === code);
  if (!machine) throw new AppError('not_found', `There is no machine with the code ${code}.`);
  const dated = (machine.rates ?? []).map((rate) => ({ ...rate, validFrom: toLocalDate(rate.validFrom) }));
  const rate = findValidOn(dated, todayOf(context));
  if (!rate) throw new AppError('not_found', `${machine.name} has no rates that hold today.`);
  const { validFrom, machineHourRate, chargeOutRate, runningCostPerHour, basis } = rate;
  return {
    machine: machine.code,
    validFrom,
    machineHourRate,
    chargeOutRate,
    runningCostPerHour,
    parts: basis && toPartTexts(computeMachineHourRate(toCostedBasis(basis)).parts),
  };
}

function toPartTexts(parts: ReturnType<typeof computeMachineHourRate>['parts']): Record<RatePart, string> {
  const texts = Object.entries(parts).map(([part, rate]) => [part, rateText(rate)]);
  return Object.fromEntries(texts) as Record<RatePart, string>;
}

interface KeptRates {
  validFrom: string;
  chargeOutRate: string;
  runningCostPerHour: string;
}

function toRateInput(body: MachineBuiltRateInput, rates: readonly KeptRates[]): MachineRateInput {
  const dated = rates.map((rate) => ({ ...rate, validFrom: toLocalDate(rate.validFrom) }));
  const before = findValidOn(dated, toLocalDate(body.validFrom));
  const chargeOutRate = body.chargeOutRate ?? before?.chargeOutRate;
  const runningCostPerHour = body.runningCostPerHour ?? before?.runningCostPerHour;
  if (chargeOutRate === undefined || runningCostPerHour === undefined) {
    throw toNothingToKeep({ chargeOutRate, runningCostPerHour });
  }
  return {
    validFrom: body.validFrom,
    machineHourRate: rateText(computeMachineHourRate(toCostedBasis(body.basis)).ratePerHour),
    chargeOutRate: rateText(toRate(D(chargeOutRate))),
    runningCostPerHour: rateText(toRate(D(runningCostPerHour))),
  };
}

function toNothingToKeep(rates: Record<string, string | undefined>): AppError {
  const message = 'No rates hold before that day, so enter this one.';
  const issues = Object.entries(rates)
    .filter(([, rate]) => rate === undefined)
    .map(([field]) => ({ field, code: 'needed', message }));
  return new AppError(
    'invalid_input',
    'Enter charge-out rate and running cost: no rates hold before that day.',
    { issues },
  );
}
