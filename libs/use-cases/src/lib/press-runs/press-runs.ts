import {
  AppError,
  hasPermission,
  type PressRun,
  type PressRunChoices,
  type PressRunPage,
  type PressRunQuery,
  type SetupCard,
} from '@brakeven/contract';
import {
  findDatedRow,
  findRunJob,
  hasLiveCorrection,
  listLastGoodRuns,
  listPressRunRows,
  listRunEntries,
  listRunnableJobs,
  type PressRunRow,
  type PressRunSelection,
  pressRunSortType,
  setDatedRowVoided,
  type ShopTransaction,
} from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { readFormingMaterials } from '../manage-tooling/shop-materials';
import { cutPage, positionSchema, readCursor, writeCursor } from '../page-cursor';
import { toPlainText } from '../quantity-text';
import { toPressRun } from './press-run-dto';

/**
 * A page of press runs; who may not see all gets those that the own account has logged.
 * @throws AppError `invalid_input` for a cursor of another list
 */
export async function listPressRuns(context: ShopContext, query: PressRunQuery): Promise<PressRunPage> {
  const { cursor, limit, sort, direction, ...filter } = query;
  const list = `press-runs.${sort}.${direction}`;
  const after = readCursor(cursor, list, positionSchema(pressRunSortType(sort)));
  const selection = toSelection(context, filter);
  if (selection === null) return { items: [], nextCursor: null };
  return inShopOf(context, async (trx) => {
    const found = await listPressRunRows(trx, selection, { sort, direction, after, limit: limit + 1 });
    const { rows, nextCursor } = cutPage(found, limit, (last) =>
      writeCursor(list, { value: last.sortValue, id: last.pressRunId }),
    );
    const materials = await readFormingMaterials(trx);
    return { items: rows.map((row) => toPressRun(row, materials)), nextCursor };
  });
}

/** Jobs, and time entries of one, that a run can be logged on; to who sees only the own hours, those. */
export function getPressRunChoices(
  context: ShopContext,
  { jobId }: { jobId?: string },
): Promise<PressRunChoices> {
  return inShopOf(context, async (trx) => {
    const { role, employeeId } = context.actor;
    const seesAll = hasPermission(role, 'hours.all');
    const isAsked = jobId !== undefined && (seesAll || employeeId !== null);
    const entries = isAsked
      ? await listRunEntries(trx, jobId, seesAll ? undefined : (employeeId ?? undefined))
      : [];
    return { jobs: await listRunnableJobs(trx), entries };
  });
}

/**
 * What the last good runs of a job used: one for each machine, material, thickness and bend length, latest first.
 * @throws AppError `not_found`
 */
export function getSetupCard(context: ShopContext, { jobId }: { jobId: string }): Promise<SetupCard> {
  return inShopOf(context, async (trx) => {
    const job = await findRunJob(trx, jobId);
    if (!job) throw new AppError('not_found', 'There is no such job.');
    const materials = await readFormingMaterials(trx);
    const runs = (await listLastGoodRuns(trx, jobId)).map((row) => ({
      ...toPressRun(row, materials),
      noseRadiusMm: toPlainText(row.noseRadiusMm),
      dieAngle: toPlainText(row.dieAngle),
    }));
    return { jobId, jobNumber: job.number, jobTitle: job.title, runs };
  });
}

/**
 * Voids a press run; who may not see all, only one that the own account has logged.
 * @throws AppError `not_found`
 */
export function voidPressRun(context: ShopContext, { pressRunId }: { pressRunId: string }): Promise<void> {
  return inShopOf(context, async (trx) => {
    const { isVoided } = await lockPressRun(context, trx, pressRunId);
    if (!isVoided) await setDatedRowVoided(trx, 'pressRun', pressRunId, context.actor.name);
  });
}

/**
 * Takes back the voiding of a press run.
 * @throws AppError `not_found`; `conflict` while a correction of it counts
 */
export function restorePressRun(context: ShopContext, { pressRunId }: { pressRunId: string }): Promise<void> {
  return inShopOf(context, async (trx) => {
    const { isVoided } = await lockPressRun(context, trx, pressRunId);
    if (!isVoided) return;
    if (await hasLiveCorrection(trx, 'pressRun', pressRunId)) {
      const message =
        'This press run was corrected, and what took its place counts. Correct or void that one.';
      throw new AppError('conflict', message);
    }
    await setDatedRowVoided(trx, 'pressRun', pressRunId, null);
  });
}

/**
 * A press run that may be changed by who asks, kept from others until the transaction ends.
 * @throws AppError `not_found`
 */
export async function lockPressRun(
  context: ShopContext,
  trx: ShopTransaction,
  pressRunId: string,
): Promise<PressRunRow & { isVoided: boolean }> {
  const locked = await findDatedRow(trx, 'pressRun', pressRunId);
  const selection = toSelection(context, { pressRunId, show: 'all' });
  if (!locked || !selection) throw notFound();
  return { ...(await getPressRunRow(trx, selection)), ...locked };
}

/**
 * One press run as the screens see it.
 * @throws AppError `not_found`
 */
export async function readPressRun(trx: ShopTransaction, pressRunId: string): Promise<PressRun> {
  const row = await getPressRunRow(trx, { pressRunId, show: 'all' });
  return toPressRun(row, await readFormingMaterials(trx));
}

async function getPressRunRow(trx: ShopTransaction, selection: PressRunSelection): Promise<PressRunRow> {
  const [row] = await listPressRunRows(trx, selection, {
    sort: 'runOn',
    direction: 'desc',
    after: null,
    limit: 1,
  });
  if (!row) throw notFound();
  return row;
}

function notFound(): AppError {
  return new AppError('not_found', 'There is no such press run. Load the page again.');
}

type RunFilter = Omit<PressRunSelection, 'isAboveLine' | 'loggedByUserId'> & { aboveLine?: 'true' };

/** Null if nothing can be seen: somebody who sees only the own runs, without an account. */
function toSelection(
  context: ShopContext,
  { aboveLine, search, ...filter }: RunFilter,
): PressRunSelection | null {
  const selection = { ...filter, isAboveLine: aboveLine === 'true', search: search?.replaceAll('\0', '') };
  if (hasPermission(context.actor.role, 'press-runs.view')) return selection;
  const { userId } = context.actor;
  return userId === null ? null : { ...selection, loggedByUserId: userId };
}
