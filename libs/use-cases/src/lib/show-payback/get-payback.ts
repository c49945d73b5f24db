import { type Payback, type PaybackFigures } from '@brakeven/contract';
import { findValidOn } from '@brakeven/costing';
import {
  listMachineJobNets,
  listMachineRateRows,
  listRateGapRows,
  type MachineDayFigures,
  type MachineJobNet,
  type PaybackMachine,
  type ShopTransaction,
} from '@brakeven/database';
import {
  D,
  hoursText,
  laterOf,
  type LocalDate,
  type Money,
  moneyText,
  monthOf,
  rateText,
  startOfMonth,
  sum,
  toHours,
  toLocalDate,
  toMoney,
  toRate,
} from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { type MachinePayback, readMachinePayback, TOP_JOBS, toPaybackFigures } from './machine-payback';

/**
 * Whether a machine has paid for itself, and when it will: its figures, its curve, the month of the last day rolled
 * up, and the jobs that brought most.
 * @throws AppError `not_found`
 */
export function getPayback(context: ShopContext, { machineId }: { machineId: string }): Promise<Payback> {
  return inShopOf(context, async (trx) => {
    const found = await readMachinePayback(trx, { machineId });
    const { machine, days, payback } = found;
    const { outlay: _outlay, ...shown } = machine;
    return {
      ...toPaybackFigures(found),
      machine: shown,
      basis: 'charge-out',
      hours: sumHours(days, 'hours'),
      pacePerWeek: payback.pacePerWeek && moneyText(payback.pacePerWeek),
      paceDays: payback.paceWindow?.days ?? 0,
      curve: toCurve(found),
      month: await readMonth(trx, found),
      ...(await readJobs(trx, machine)),
      gaps: await listRateGapRows(trx, { machineId }),
    };
  });
}

/** What a machine has paid back, for the command line. */
export interface MachinePaybackSummary extends PaybackFigures {
  /** Its code. */
  machine: string;
}

/**
 * What a machine has paid back, by its code or name.
 * @throws AppError `not_found`
 */
export function getMachinePayback(context: ShopContext, codeOrName: string): Promise<MachinePaybackSummary> {
  return inShopOf(context, async (trx) => {
    const found = await readMachinePayback(trx, { codeOrName: codeOrName.trim() });
    return { machine: found.machine.code, ...toPaybackFigures(found) };
  });
}

/** Net cash: what was earned back less the outlay, which is spent on the in-service date. */
function toCurve({ payback, inServiceOn }: MachinePayback): Payback['curve'] {
  if (inServiceOn === null) return [];
  const netCash = (earnedBack: Money) => moneyText(earnedBack.minus(payback.outlay) as Money);
  return [
    { on: inServiceOn, netCash: netCash(toMoney(0)) },
    ...payback.curve.map((point) => ({ on: point.date, netCash: netCash(point.net) })),
  ];
}

async function readMonth(trx: ShopTransaction, found: MachinePayback): Promise<Payback['month']> {
  const { machine, asOf, inServiceOn, days } = found;
  if (asOf === null || inServiceOn === null || inServiceOn > asOf) return null;
  const from = laterOf(startOfMonth(asOf), inServiceOn);
  const ofMonth = days.filter((day) => day.postedOn >= from);
  const sumOf = (key: 'earned' | 'operatorLabour' | 'running') =>
    sum(ofMonth.map((day) => toMoney(day[key])));
  const [earned, operatorLabour, running] = [sumOf('earned'), sumOf('operatorLabour'), sumOf('running')];
  return {
    month: monthOf(asOf),
    hours: sumHours(ofMonth, 'hours'),
    billableHours: sumHours(ofMonth, 'billableHours'),
    chargeOutRate: await findOnlyRate(trx, machine, from, asOf),
    earned: moneyText(earned),
    operatorLabour: moneyText(operatorLabour),
    running: moneyText(running),
    net: moneyText(earned.minus(operatorLabour).minus(running) as Money),
  };
}

/** The charge-out rate of a stretch of days if there was but one. */
async function findOnlyRate(
  trx: ShopTransaction,
  { machineId }: PaybackMachine,
  from: LocalDate,
  to: LocalDate,
): Promise<string | null> {
  const rates = (await listMachineRateRows(trx, machineId)).map((rate) => ({
    validFrom: toLocalDate(rate.validFrom),
    chargeOut: rateText(toRate(rate.chargeOutRate)),
  }));
  const before = findValidOn(rates, from);
  const since = rates.filter((rate) => rate.validFrom > from && rate.validFrom <= to);
  const valid = new Set([before, ...since].map((rate) => rate?.chargeOut));
  const [only] = valid;
  return valid.size === 1 ? (only ?? null) : null;
}

async function readJobs(
  trx: ShopTransaction,
  machine: PaybackMachine,
): Promise<Pick<Payback, 'topJobs' | 'otherJobs'>> {
  const jobs = await listMachineJobNets(trx, machine, TOP_JOBS);
  const [first] = jobs;
  const topNet = sum(jobs.map((job) => D(job.net)));
  return {
    topJobs: jobs.map((job) => ({
      jobId: job.jobId,
      number: job.number,
      title: job.title,
      net: job.net,
      loss: toLoss(job),
    })),
    otherJobs: {
      jobs: first ? first.jobs - jobs.length : 0,
      net: moneyText(D(first?.allNet ?? '0').minus(topNet) as Money),
    },
  };
}

/** What a billable job that is done has lost as a whole, however much its machine hours earned. */
function toLoss({ isBillable, margin, marginIsProvisional, isToInvoice }: MachineJobNet): string | null {
  const isLost = isBillable && !marginIsProvisional && !isToInvoice && D(margin).lt(0);
  return isLost ? moneyText(toMoney(D(margin).negated())) : null;
}

function sumHours(days: readonly MachineDayFigures[], key: 'hours' | 'billableHours'): string {
  return hoursText(sum(days.map((day) => toHours(day[key]))));
}
