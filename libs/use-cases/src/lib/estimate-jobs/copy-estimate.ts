import {
  AppError,
  type EstimateChoices,
  type EstimateDraft,
  type EstimateLineInput,
  type LikeJob,
  type RATES_OF_COPY,
} from '@brakeven/contract';
import { scaleEstimateLine } from '@brakeven/costing';
import { type EstimateLineRow, listLikeJobRows } from '@brakeven/database';
import { percentText, toPercent } from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { getJobRow } from '../show-jobs/get-job';
import { readChoices } from './estimate-choices';
import { readEstimate, toCostingLine } from './estimate-cost';
import { toLineInput } from './estimate-dto';

const LIKE_JOBS_MAX = 20;

/**
 * Other jobs that have an estimate, the likest first: same words in the title, same customer.
 * @throws AppError `not_found` (job)
 */
export function listLikeJobs(
  context: ShopContext,
  { jobId, search = '' }: { jobId: string; search?: string },
): Promise<LikeJob[]> {
  return inShopOf(context, async (trx) => {
    await getJobRow(trx, { jobId });
    return listLikeJobRows(trx, jobId, search.replaceAll('\0', ''), LIKE_JOBS_MAX);
  });
}

/**
 * The estimate of another job as a draft for this one: scaled by their pieces, with its own rates or those of a day.
 * Nothing is saved.
 * @throws AppError `not_found` (either job, or the other one's estimate)
 */
export function draftEstimate(
  context: ShopContext,
  query: { jobId: string; fromJobId: string; rates: (typeof RATES_OF_COPY)[number]; on: string },
): Promise<EstimateDraft> {
  const { jobId, fromJobId, rates, on } = query;
  return inShopOf(context, async (trx) => {
    const job = await getJobRow(trx, { jobId });
    const other = await getJobRow(trx, { jobId: fromJobId });
    const stored = await readEstimate(trx, fromJobId);
    if (!stored) throw new AppError('not_found', `Job ${other.number} has no estimate to copy.`);
    const scaled =
      job.quantity !== null && other.quantity !== null ? { from: other.quantity, to: job.quantity } : null;
    const lines = stored.lines.map((line) => toLineInput(scaled ? scaleRow(line, scaled) : line));
    const { head } = stored;
    const priced =
      rates === 'today' ? priceAnew(lines, await readChoices(trx, on)) : { lines, ratesKept: [] };
    return {
      estimatedOn: on,
      scrapAllowancePercent: percentText(toPercent(head.scrapAllowancePercent)),
      marginPercent: percentText(toPercent(head.marginPercent)),
      ...priced,
      scaled,
    };
  });
}

function scaleRow(row: EstimateLineRow, { from, to }: { from: number; to: number }): EstimateLineRow {
  const line = scaleEstimateLine(toCostingLine(row), from, to);
  switch (line.kind) {
    case 'operation':
      return { ...row, pieces: line.pieces.toNumber() };
    case 'material':
      return { ...row, weightKg: line.weight.toFixed() };
    case 'outside':
      return { ...row, amount: line.amount.toFixed(2) };
  }
}

/** Lines with the rates of a day; where none holds, the old one stays and is named. */
function priceAnew(
  lines: readonly EstimateLineInput[],
  choices: EstimateChoices,
): Pick<EstimateDraft, 'lines' | 'ratesKept'> {
  const kept = new Set<string>();
  const now = (rate: string | null | undefined, old: string, name: string) => {
    if (!rate) kept.add(name);
    return rate ?? old;
  };
  const price = (line: EstimateLineInput): EstimateLineInput => {
    if (line.kind === 'outside') return line;
    if (line.kind === 'material') {
      const material = choices.materials.find(({ id }) => id === line.materialId);
      const name = `price of ${material?.name ?? 'a material'}`;
      return { ...line, pricePerKg: now(material?.averagePerKg, line.pricePerKg, name) };
    }
    const machine = choices.machines.find(({ id }) => id === line.machineId);
    return {
      ...line,
      labourRate: now(choices.labourRate, line.labourRate, 'labour rate'),
      overheadRate: now(choices.overheadRate, line.overheadRate, 'overhead rate'),
      machineHourRate:
        line.machineHourRate === null
          ? null
          : now(machine?.machineHourRate, line.machineHourRate, `rate of ${machine?.name ?? 'a machine'}`),
    };
  };
  return { lines: lines.map(price), ratesKept: [...kept] };
}
