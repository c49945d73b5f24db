import { AppError, type PaybackFigures } from '@brakeven/contract';
import { computePayback, type Payback as ComputedPayback } from '@brakeven/costing';
import {
  findPaybackMachine,
  findThrough,
  listMachineDays,
  type MachineDayFigures,
  type PaybackMachine,
  type ShopTransaction,
} from '@brakeven/database';
import { type LocalDate, moneyText, toLocalDate, toMoney } from '@brakeven/values';
import { toPaybackDay } from '../roll-up-costs/write-snapshots';

/** How many jobs a payback lists by name. */
export const TOP_JOBS = 5;

/** A machine's payback as computed, and what it was computed from. */
export interface MachinePayback {
  machine: PaybackMachine;
  asOf: LocalDate | null;
  inServiceOn: LocalDate | null;
  days: MachineDayFigures[];
  payback: ComputedPayback;
}

/** Reads a machine's days and computes its payback through the last day rolled up. */
export async function readMachinePayback(
  trx: ShopTransaction,
  wanted: { machineId: string } | { codeOrName: string },
): Promise<MachinePayback> {
  const machine = await getPaybackMachine(trx, wanted);
  const through = await findThrough(trx);
  const asOf = through === null ? null : toLocalDate(through);
  const inServiceOn = machine.inServiceOn === null ? null : toLocalDate(machine.inServiceOn);
  const days = await listMachineDays(trx, machine);
  const payback = computePayback({
    outlay: toMoney(machine.outlay),
    days: days.map(toPaybackDay),
    asOf,
    inServiceOn,
  });
  return { machine, asOf, inServiceOn, days, payback };
}

/**
 * Finds the machine that is meant.
 * @throws AppError `not_found`
 */
export async function getPaybackMachine(
  trx: ShopTransaction,
  wanted: { machineId: string } | { codeOrName: string },
): Promise<PaybackMachine> {
  const machine = await findPaybackMachine(trx, wanted);
  if (machine) return machine;
  const words = 'codeOrName' in wanted ? ` ${wanted.codeOrName}` : '';
  throw new AppError('not_found', `There is no machine${words}. Check its code on the Machines page.`);
}

/** The figures of a payback as text. */
export function toPaybackFigures({ payback, asOf }: MachinePayback): PaybackFigures {
  return {
    outlay: moneyText(payback.outlay),
    earned: moneyText(payback.earned),
    operatorLabour: moneyText(payback.operatorLabour),
    running: moneyText(payback.running),
    runningCost: moneyText(payback.runningCost),
    earnedBack: moneyText(payback.earnedBack),
    remaining: moneyText(payback.remaining),
    asOf,
    breakEven: payback.breakEven,
  };
}
