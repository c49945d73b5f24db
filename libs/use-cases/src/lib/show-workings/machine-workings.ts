import { type FigureRef, type Workings } from '@brakeven/contract';
import { RULES } from '@brakeven/costing';
import {
  listOtherJobRows,
  type PaybackMachine,
  type ShopTransaction,
  sumOtherJobs,
} from '@brakeven/database';
import { formatLocalDate, formatMoney, type Money, moneyText, toLocalDate, toMoney } from '@brakeven/values';
import { type ShopContext } from '../context';
import { readMachinePayback, TOP_JOBS } from '../show-payback/machine-payback';
import { readItemWorkings } from './item-workings';
import { type LinePaging, toInput } from './workings-request';

/** From which day on a machine counts. */
export function toInServiceInput({ inServiceOn }: PaybackMachine): Workings['inputs'][number] {
  return toInput(
    'In service from',
    inServiceOn === null ? 'not yet' : formatLocalDate(toLocalDate(inServiceOn)),
  );
}

/** Made of two figures that open themselves; once more is earned back than was laid out, of the surplus too. */
export async function readRemaining(trx: ShopTransaction, machine: PaybackMachine): Promise<Workings> {
  const { machineId } = machine;
  const { payback } = await readMachinePayback(trx, { machineId });
  const { outlay, earnedBack, remaining } = payback;
  const surplus = toMoney(remaining.minus(outlay).plus(earnedBack));
  return toWorkings(machine, {
    figure: { figure: 'payback.remaining', machineId },
    title: `Still to be earned by ${machine.name}`,
    amount: remaining,
    rule: RULES.remaining,
    parts: [
      toPart('Outlay', outlay, { figure: 'payback.outlay', machineId }),
      toPart('Earned back', toMoney(earnedBack.negated()), { figure: 'payback.earnedBack', machineId }),
      ...(surplus.gt(0) ? [toPart('Earned beyond the outlay', surplus, null)] : []),
    ],
  });
}

/** A point of the curve: what was earned back through a day, less the outlay. */
export async function readNetCash(
  trx: ShopTransaction,
  machine: PaybackMachine,
  { to }: FigureRef,
): Promise<Workings> {
  const { machineId } = machine;
  const { payback } = await readMachinePayback(trx, { machineId });
  const points = payback.curve.filter((point) => to === undefined || point.date <= to);
  const earnedBack = points.at(-1)?.net ?? toMoney(0);
  const words = to === undefined ? '' : `, through ${formatLocalDate(toLocalDate(to))}`;
  const days = to === undefined ? {} : { to };
  return toWorkings(machine, {
    figure: { figure: 'payback.netCash', machineId, ...days },
    title: `Net cash of ${machine.name}${words}`,
    amount: toMoney(earnedBack.minus(payback.outlay)),
    rule: 'What was earned back through the day, less the outlay, which counts from the in-service date.',
    parts: [
      toPart('Earned back', earnedBack, { figure: 'payback.earnedBack', machineId, ...days }),
      toPart('Outlay', toMoney(payback.outlay.negated()), { figure: 'payback.outlay', machineId }),
    ],
  });
}

/** A quotient, not a sum: its inputs open instead of parts. */
export async function readPace(
  { shop }: ShopContext,
  trx: ShopTransaction,
  machine: PaybackMachine,
): Promise<Workings> {
  const { machineId } = machine;
  const { payback } = await readMachinePayback(trx, { machineId });
  const { pacePerWeek, paceWindow } = payback;
  const workings = toWorkings(machine, {
    figure: { figure: 'payback.pacePerWeek', machineId },
    title: `Pace of ${machine.name}, net a week`,
    amount: pacePerWeek ?? toMoney(0),
    rule: RULES.pace,
    parts: [],
  });
  if (paceWindow === null) return workings;
  const { from, to, days, net } = paceWindow;
  const label = `Earned back from ${formatLocalDate(from)} through ${formatLocalDate(to)}`;
  const earnedBack = { figure: 'payback.earnedBack' as const, machineId, from, to };
  return {
    ...workings,
    inputs: [
      ...workings.inputs,
      { ...toInput(label, formatMoney(net, shop.currency)), figure: earnedBack },
      toInput('Over', `${days} ${days === 1 ? 'day' : 'days'}`),
      toInput('A week', 'earned back × 7 ÷ days, to the cent'),
    ],
  };
}

/** The jobs that the page does not list by name, each with what it brought. */
export function readOtherJobs(
  trx: ShopTransaction,
  machine: PaybackMachine,
  paging: LinePaging,
): Promise<Workings> {
  const { machineId, name } = machine;
  return readItemWorkings(
    {
      figure: { figure: 'payback.otherJobs', machineId },
      title: `Earned back by ${name} on all jobs but the ${TOP_JOBS} that paid most`,
      rule: `${RULES.earnedBack} Here by job; each job opens into its own lines.`,
    },
    {
      sum: () => sumOtherJobs(trx, machine, TOP_JOBS),
      list: (after, limit) => listOtherJobRows(trx, machine, TOP_JOBS, after, limit),
      toFigure: ({ id }) => ({ figure: 'payback.earnedBack', machineId, jobId: id }),
    },
    paging,
  );
}

interface MachineFigure extends Pick<Workings, 'figure' | 'title' | 'rule' | 'parts'> {
  amount: Money;
}

function toWorkings(machine: PaybackMachine, { amount, ...head }: MachineFigure): Workings {
  return {
    ...head,
    unit: 'money',
    amount: moneyText(amount),
    inputs: [toInServiceInput(machine)],
    lineCount: 0,
    lines: [],
    nextCursor: null,
  };
}

function toPart(label: string, amount: Money, figure: FigureRef | null): Workings['parts'][number] {
  return { label, amount: moneyText(amount), figure };
}
