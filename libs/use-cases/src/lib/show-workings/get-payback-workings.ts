import { type FigureRef, type Workings, type WorkingsQuery } from '@brakeven/contract';
import { RULES } from '@brakeven/costing';
import {
  listOutlayItemRows,
  type PaybackMachine,
  type ShopTransaction,
  sumOutlayItems,
} from '@brakeven/database';
import { formatLocalDate, type Money, moneyText, toLocalDate, toMoney } from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { getJobRow } from '../show-jobs/get-job';
import { getPaybackMachine, readMachinePayback } from '../show-payback/machine-payback';
import { LINE_FIGURES, type SummedFigure } from './figures';
import { readItemWorkings } from './item-workings';
import { readLineWorkings } from './line-workings';
import { describeNarrowing, type LinePaging, refused, splitRequest } from './workings-request';

type PaybackFigure = Extract<FigureRef['figure'], `payback.${string}`>;
type MachineRef = FigureRef & { figure: PaybackFigure; machineId: string };

/**
 * How a figure of a machine's payback was made; its lines, or its parts, add up to it. Outlay and what remains are
 * of the whole machine, whatever job or days are named.
 * @throws AppError `not_found` (machine, job), `invalid_input` (another figure, no machine, cursor)
 */
export async function getPaybackWorkings(context: ShopContext, query: WorkingsQuery): Promise<Workings> {
  const { ref, paging } = splitRequest(query);
  const { figure, machineId } = ref;
  if (!isPaybackFigure(figure))
    throw refused('figure', 'This is a figure of jobs, not of a machine’s payback.');
  if (machineId === undefined) throw refused('machineId', 'Say which machine is meant.');
  return inShopOf(context, async (trx) => {
    const machine = await getPaybackMachine(trx, { machineId });
    if (figure === 'payback.outlay') return readOutlay(trx, machine, paging);
    if (figure === 'payback.remaining') return readRemaining(trx, machine);
    return readLines(context, trx, { ...ref, figure, machineId }, machine, paging);
  });
}

function isPaybackFigure(figure: FigureRef['figure']): figure is PaybackFigure {
  return figure.startsWith('payback.');
}

async function readLines(
  context: ShopContext,
  trx: ShopTransaction,
  ref: MachineRef & { figure: SummedFigure },
  machine: PaybackMachine,
  paging: LinePaging,
): Promise<Workings> {
  const { figure, machineId, jobId, operationId, from, to } = ref;
  const lineFigure = LINE_FIGURES[figure];
  const job = jobId === undefined ? null : await getJobRow(trx, { jobId });
  const title = [
    `${lineFigure.title} of ${machine.name}`,
    ...(job === null ? [] : [` on job ${job.number}`]),
    await describeNarrowing(trx, ref),
  ].join('');
  const selection = {
    jobId,
    operationId,
    from,
    to,
    machine: { machineId, inServiceOn: machine.inServiceOn },
  };
  const workings = await readLineWorkings(
    trx,
    { figure: ref, title },
    lineFigure,
    selection,
    paging,
    context.shop.currency,
  );
  return { ...workings, inputs: [inServiceInput(machine), ...workings.inputs] };
}

function inServiceInput({ inServiceOn }: PaybackMachine): Workings['inputs'][number] {
  const value = inServiceOn === null ? 'not yet' : formatLocalDate(toLocalDate(inServiceOn));
  return { label: 'In service from', value, validFrom: null };
}

function readOutlay(trx: ShopTransaction, machine: PaybackMachine, paging: LinePaging): Promise<Workings> {
  const { machineId, name } = machine;
  return readItemWorkings(
    { figure: { figure: 'payback.outlay', machineId }, title: `Outlay for ${name}`, rule: RULES.outlay },
    {
      sum: () => sumOutlayItems(trx, machineId),
      list: (after, limit) => listOutlayItemRows(trx, machineId, after, limit),
    },
    paging,
  );
}

/** Made of two figures that open themselves; once more is earned back than was laid out, of the surplus too. */
async function readRemaining(trx: ShopTransaction, machine: PaybackMachine): Promise<Workings> {
  const { machineId } = machine;
  const { payback } = await readMachinePayback(trx, { machineId });
  const { outlay, earnedBack, remaining } = payback;
  const surplus = remaining.minus(outlay).plus(earnedBack) as Money;
  const part = (label: string, amount: Money, figure: PaybackFigure | null) => ({
    label,
    amount: moneyText(amount),
    figure: figure && { figure, machineId },
  });
  return {
    figure: { figure: 'payback.remaining', machineId },
    title: `Still to be earned by ${machine.name}`,
    unit: 'money',
    amount: moneyText(remaining),
    rule: RULES.remaining,
    inputs: [inServiceInput(machine)],
    parts: [
      part('Outlay', outlay, 'payback.outlay'),
      part('Earned back', toMoney(earnedBack.negated()), 'payback.earnedBack'),
      ...(surplus.gt(0) ? [part('Earned beyond the outlay', surplus, null)] : []),
    ],
    lineCount: 0,
    lines: [],
    nextCursor: null,
  };
}
