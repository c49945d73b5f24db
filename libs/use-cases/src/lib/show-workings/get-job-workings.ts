import { type FigureRef, type Workings, type WorkingsQuery } from '@brakeven/contract';
import { RULES } from '@brakeven/costing';
import {
  type JobRow,
  type JobSelection,
  listQuoteRows,
  listWorkInProgressRows,
  type ShopTransaction,
  sumQuotes,
  sumWorkInProgress,
} from '@brakeven/database';
import { D, type Money, moneyText, toMoney } from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { getJobRow } from '../show-jobs/get-job';
import { LINE_FIGURES } from './figures';
import { readItemWorkings } from './item-workings';
import { readLineWorkings } from './line-workings';
import {
  describeNarrowing,
  type LinePaging,
  readJobFilter,
  refused,
  splitRequest,
  type WorkingsHead,
} from './workings-request';

type JobFigure = Extract<FigureRef['figure'], `job.${string}`>;

/**
 * How a figure of a job, or of all jobs of a filter, was made; its lines add up to it.
 * @throws AppError `not_found` (job), `invalid_input` (another figure, status or cursor)
 */
export async function getJobWorkings(context: ShopContext, query: WorkingsQuery): Promise<Workings> {
  const { ref, paging } = splitRequest(query);
  const { figure } = ref;
  if (!isJobFigure(figure)) throw refused('figure', 'This is a figure of a machine’s payback, not of jobs.');
  return readWorkings(context, { ...ref, figure }, paging);
}

/**
 * The entries behind hours of jobs; no rates and no money.
 * @throws AppError `not_found` (job), `invalid_input` (another figure, status or cursor)
 */
export async function getJobHoursWorkings(context: ShopContext, query: WorkingsQuery): Promise<Workings> {
  const { ref, paging } = splitRequest(query);
  const { figure } = ref;
  if (figure !== 'job.hours' && figure !== 'job.machineHours') {
    throw refused('figure', 'Only hours and machine hours of jobs can be opened here.');
  }
  return readWorkings(context, { ...ref, figure }, paging);
}

function isJobFigure(figure: FigureRef['figure']): figure is JobFigure {
  return figure.startsWith('job.');
}

function readWorkings(
  context: ShopContext,
  ref: FigureRef & { figure: JobFigure },
  paging: LinePaging,
): Promise<Workings> {
  const { figure, jobId, operationId, from, to } = ref;
  return inShopOf(context, async (trx) => {
    const { jobs, whose } = await readJobs(trx, ref);
    if (figure === 'job.quotedPrice') return readQuotes(trx, ref, jobs, whose, paging);
    if (figure === 'job.workInProgress') return readWorkInProgress(trx, ref, jobs, whose, paging);
    const lineFigure = LINE_FIGURES[figure];
    const title = `${lineFigure.title} of ${whose}${await describeNarrowing(trx, ref)}`;
    const head = { figure: ref, title };
    const selection = { jobId, operationId, from, to, jobs: jobId === undefined ? jobs : undefined };
    return readLineWorkings(trx, head, lineFigure, selection, paging, context.shop.currency);
  });
}

/** One job is meant whatever filter it was found by. */
async function readJobs(
  trx: ShopTransaction,
  ref: FigureRef,
): Promise<{ jobs: JobSelection; whose: string }> {
  const { jobId } = ref;
  if (jobId === undefined) return readJobFilter(trx, ref);
  const job = await getJobRow(trx, { jobId });
  return { jobs: { jobId }, whose: `job ${job.number}, ${job.title}` };
}

function readQuotes(
  trx: ShopTransaction,
  ref: FigureRef,
  jobs: JobSelection,
  whose: string,
  paging: LinePaging,
): Promise<Workings> {
  const rule = 'The price quoted to the customer, as written on the job. Jobs without one are left out.';
  return readItemWorkings(
    { figure: toWhole(ref), title: `Quoted price of ${whose}`, rule },
    {
      sum: () => sumQuotes(trx, jobs),
      list: (after, limit) => listQuoteRows(trx, jobs, after, limit),
    },
    paging,
  );
}

/** Of a job as a whole, whatever operation or days are named. */
function toWhole({ operationId: _operationId, from: _from, to: _to, ...whole }: FigureRef): FigureRef {
  return whole;
}

async function readWorkInProgress(
  trx: ShopTransaction,
  ref: FigureRef,
  jobs: JobSelection,
  whose: string,
  paging: LinePaging,
): Promise<Workings> {
  const title = `Work in progress of ${whose}`;
  const head = { figure: toWhole(ref), title, rule: RULES.workInProgress };
  if (jobs.jobId !== undefined) return toJobInProgress(head, await getJobRow(trx, jobs));
  return readItemWorkings(
    head,
    {
      sum: () => sumWorkInProgress(trx, jobs),
      list: (after, limit) => listWorkInProgressRows(trx, jobs, after, limit),
      toFigure: ({ id }) => ({ figure: 'job.workInProgress', jobId: id }),
    },
    paging,
  );
}

/** Made of two figures that open themselves, and of what does not count for where the job stands. */
function toJobInProgress(head: WorkingsHead & { rule: string }, job: JobRow): Workings {
  const [total, invoiced] = [toMoney(job.total), toMoney(job.invoiced)];
  const rest = toMoney(D(job.workInProgress).minus(total).plus(invoiced));
  const isCounted = job.status === 'open' || job.status === 'finished';
  const part = (label: string, money: Money, figure: FigureRef['figure'] | null) => ({
    label,
    amount: moneyText(money),
    figure: figure && { figure, jobId: job.jobId },
  });
  return {
    ...head,
    unit: 'money',
    amount: job.workInProgress,
    inputs: [{ label: 'Status of the job', value: job.status, validFrom: null, figure: null }],
    parts: [
      part('Cost', total, 'job.total'),
      part('Invoiced', toMoney(invoiced.negated()), 'job.invoiced'),
      ...(rest.isZero() ? [] : [part(isCounted ? 'Invoiced beyond the cost' : NOT_IN_PROGRESS, rest, null)]),
    ],
    lineCount: 0,
    lines: [],
    nextCursor: null,
  };
}

const NOT_IN_PROGRESS = 'Not in progress: neither open nor finished';
