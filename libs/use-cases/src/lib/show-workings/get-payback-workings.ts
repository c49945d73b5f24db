import { type FigureRef, type Workings, type WorkingsQuery } from '@brakeven/contract';
import { type PaybackMachine, type ShopTransaction } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { getJobRow } from '../show-jobs/get-job';
import { getPaybackMachine } from '../show-payback/machine-payback';
import { LINE_FIGURES, type SummedFigure } from './figures';
import { readLineWorkings } from './line-workings';
import { readNetCash, readOtherJobs, readPace, readRemaining, toInServiceInput } from './machine-workings';
import { readCostItem, readOutlay } from './outlay-workings';
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
    const wanted = { ...ref, machineId };
    switch (figure) {
      case 'payback.outlay':
        return readOutlay(trx, machine, paging);
      case 'payback.costItem':
        return readCostItem(context, trx, machine, wanted);
      case 'payback.remaining':
        return readRemaining(trx, machine);
      case 'payback.netCash':
        return readNetCash(trx, machine, wanted);
      case 'payback.pacePerWeek':
        return readPace(context, trx, machine);
      case 'payback.otherJobs':
        return readOtherJobs(trx, machine, paging);
      default:
        return readLines(context, trx, { ...wanted, figure }, machine, paging);
    }
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
  return { ...workings, inputs: [toInServiceInput(machine), ...workings.inputs] };
}
