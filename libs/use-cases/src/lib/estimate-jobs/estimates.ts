import { AppError, type Estimate, type EstimateInput, type Issue } from '@brakeven/contract';
import {
  deleteEstimateRows,
  lockEstimate,
  replaceEstimate,
  type ShopTransaction,
  updateQuotedPrice,
} from '@brakeven/database';
import { createHash } from 'node:crypto';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';
import { getJobRow } from '../show-jobs/get-job';
import { readChoices } from './estimate-choices';
import { readEstimate } from './estimate-cost';
import { toEstimate } from './estimate-dto';
import { NO_LINE_COLUMNS } from './no-line-columns';

/**
 * The estimate of a job; null if it has none.
 * @throws AppError `not_found` (job)
 */
export function getEstimate(
  context: ShopContext,
  { jobId }: { jobId: string },
): Promise<{ estimate: Estimate | null }> {
  return inShopOf(context, async (trx) => {
    await getJobRow(trx, { jobId });
    const stored = await readEstimate(trx, jobId);
    return { estimate: stored && toEstimate(stored) };
  });
}

/** Names the state of an estimate, or that there is none; any change of it gives another version. */
export function toEstimateVersion(estimate: Estimate | null): string {
  return createHash('sha256').update(JSON.stringify(estimate)).digest('base64url').slice(0, 22);
}

/** The estimate of a job as it was when the version was read; without one, whatever it is now. */
interface EstimateRef {
  jobId: string;
  version?: string;
}

/**
 * Saves the estimate of a job whole, in place of the one that it had.
 * @throws AppError `not_found` (job), `changed_meanwhile`, `invalid_input` naming each line that refers to nothing
 */
export function saveEstimate(
  context: ShopContext,
  { jobId, version }: EstimateRef,
  body: EstimateInput,
): Promise<Estimate> {
  return inShopOf(context, async (trx) => {
    await getJobRow(trx, { jobId });
    await refuseChanged(trx, { jobId, version });
    await checkReferences(trx, body);
    const { lines, ...head } = body;
    const of = { shopId: context.shop.shopId, jobId };
    await replaceEstimate(
      trx,
      { ...of, ...head },
      lines.map((line, at) => ({
        ...of,
        ...NO_LINE_COLUMNS,
        ...line,
        estimateLineId: newId(),
        position: at + 1,
      })),
    );
    const stored = await readEstimate(trx, jobId);
    if (!stored) throw new Error('An estimate is saved and yet not there.');
    return toEstimate(stored);
  });
}

async function refuseChanged(trx: ShopTransaction, { jobId, version }: EstimateRef): Promise<void> {
  await lockEstimate(trx, jobId);
  if (version === undefined) return;
  const stored = await readEstimate(trx, jobId);
  if (version === toEstimateVersion(stored && toEstimate(stored))) return;
  throw new AppError(
    'changed_meanwhile',
    'Somebody else changed this estimate after it was loaded here. Nothing was saved. Load it again to see what it is now, or save over it.',
  );
}

/**
 * Removes the estimate of a job.
 * @throws AppError `not_found` if there is none, `changed_meanwhile`
 */
export async function deleteEstimate(context: ShopContext, ref: EstimateRef): Promise<void> {
  const wasThere = await inShopOf(context, async (trx) => {
    await refuseChanged(trx, ref);
    return deleteEstimateRows(trx, ref.jobId);
  });
  if (!wasThere) throw new AppError('not_found', 'This job has no estimate. Load the job again.');
}

/**
 * Makes a price the quoted price of a job.
 * @throws AppError `not_found` (job)
 */
export async function quotePrice(
  context: ShopContext,
  { jobId }: { jobId: string },
  { quotedPrice }: { quotedPrice: string },
): Promise<void> {
  const isThere = await inShopOf(context, (trx) => updateQuotedPrice(trx, jobId, quotedPrice));
  if (!isThere) throw new AppError('not_found', 'There is no such job. Load the jobs again.');
}

const UNKNOWN = {
  operationId: 'There is no such operation in the shop. Choose another one.',
  machineId: 'There is no such machine in the shop. Choose another one.',
  materialId: 'There is no such material in the shop. Choose another one.',
};

async function checkReferences(trx: ShopTransaction, { estimatedOn, lines }: EstimateInput): Promise<void> {
  const choices = await readChoices(trx, estimatedOn);
  const known = {
    operationId: new Set(choices.operations.map(({ id }) => id)),
    machineId: new Set(choices.machines.map(({ id }) => id)),
    materialId: new Set(choices.materials.map(({ id }) => id)),
  };
  const issues = lines.flatMap((line, at) =>
    (Object.keys(UNKNOWN) as (keyof typeof UNKNOWN)[]).flatMap((key): Issue[] => {
      const id = (line as Partial<Record<typeof key, string | null>>)[key];
      if (!id || known[key].has(id)) return [];
      return [{ field: `lines.${at}.${key}`, code: 'unknown', message: UNKNOWN[key] }];
    }),
  );
  if (issues.length > 0) {
    throw new AppError('invalid_input', 'Some lines of the estimate refer to what is not there.', { issues });
  }
}
