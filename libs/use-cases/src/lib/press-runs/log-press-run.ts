import {
  AppError,
  type FormingMaterialDto,
  hasPermission,
  type Issue,
  type PressRun,
  type pressRunInputSchema,
} from '@brakeven/contract';
import { findRunEntry, findRunJob, insertPressRun, type ShopTransaction } from '@brakeven/database';
import { type BendForce, checkForceInput, computeBendForce, type ForceInput } from '@brakeven/forming';
import { formatLocalDate, toLocalDate } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { type z } from 'zod';
import { inShopOf, type ShopContext, todayOf } from '../context';
import { readSetupTools, type SetupTools } from '../manage-tooling/setup-tools';
import { getFormingMaterial, readFormingMaterials, toRuleMaterial } from '../manage-tooling/shop-materials';
import { readPressRun } from './press-runs';

type RunValues = z.output<typeof pressRunInputSchema>;

/**
 * Logs a press run with the force that both rules compute for it now.
 * @throws AppError `invalid_input` (no such job, tool, material or time entry, a sheet as thick as the opening, a bend
 *   longer than bed or die, dated after today or before the job)
 */
export function createPressRun(context: ShopContext, body: RunValues): Promise<PressRun> {
  return inShopOf(context, async (trx) => {
    const tools = await readSetupTools(trx, body);
    const material = getFormingMaterial(await readFormingMaterials(trx), body.materialCode);
    const forceInput = toForceInput(body, tools, material);
    const runOn = body.runOn ?? todayOf(context);
    refuse([
      ...(await checkJob(context, trx, body.jobId, runOn)),
      ...checkForceInput(forceInput).map(({ field, ...issue }) => ({
        field: FIELDS[field] ?? field,
        ...issue,
      })),
      ...checkRoom(body, tools),
      ...(await checkEntry(context, trx, body)),
    ]);
    const pressRunId = newId();
    await insertPressRun(trx, {
      ...body,
      ...toStoredForce(computeBendForce(forceInput)),
      shopId: context.shop.shopId,
      pressRunId,
      runOn,
      note: body.note === '' ? null : body.note,
      loggedBy: context.actor.name,
      loggedByUserId: context.actor.userId,
    });
    return readPressRun(trx, pressRunId);
  });
}

function refuse(issues: readonly Issue[]): void {
  if (issues.length === 0) return;
  throw new AppError('invalid_input', issues.map(({ message }) => message).join(' '), { issues });
}

const FIELDS: Readonly<Record<string, string>> = {
  opening: 'dieOpeningId',
  thickness: 'thicknessMm',
  length: 'bendLengthMm',
  tensile: 'materialCode',
};

function toForceInput(body: RunValues, { opening }: SetupTools, material: FormingMaterialDto): ForceInput {
  return {
    tensileMpa: toRuleMaterial(material).tensileUsed.toNumber(),
    thicknessMm: Number(body.thicknessMm),
    lengthMm: Number(body.bendLengthMm),
    openingMm: Number(opening.openingMm),
  };
}

function toStoredForce({ lowKn, highKn }: BendForce) {
  return { forceLowKn: lowKn.toFixed(5), forceHighKn: highKn.toFixed(5) };
}

async function checkJob(
  context: ShopContext,
  trx: ShopTransaction,
  jobId: string,
  runOn: string,
): Promise<Issue[]> {
  const job = await findRunJob(trx, jobId);
  if (!job) return [{ field: 'jobId', code: 'unknown', message: 'There is no such job.' }];
  const day = (date: string) => formatLocalDate(toLocalDate(date));
  if (runOn > todayOf(context)) {
    const message = `A press run cannot be dated after today, ${day(todayOf(context))}.`;
    return [{ field: 'runOn', code: 'in_the_future', message }];
  }
  if (job.openedOn === null || runOn >= job.openedOn) return [];
  const message = `Job ${job.number} was opened on ${day(job.openedOn)}, so a press run cannot be dated ${day(runOn)}. Date it on ${day(job.openedOn)} or after.`;
  return [{ field: 'runOn', code: 'before_job', message }];
}

/** A bend longer than bed or die was not made there; one of the lengths is wrong. */
function checkRoom({ bendLengthMm }: RunValues, { machine, die }: SetupTools): Issue[] {
  const rooms = [
    { of: `the bed of ${machine.name}`, lengthMm: machine.bedLengthMm },
    { of: `die ${die.name}`, lengthMm: die.lengthMm },
  ];
  return rooms.flatMap(({ of, lengthMm }) => {
    if (lengthMm === null || Number(bendLengthMm) <= Number(lengthMm)) return [];
    const message = `The bend is longer than ${of}, which is ${lengthMm} mm long. Correct the length, or the length of that.`;
    return [{ field: 'bendLengthMm', code: 'too_long', message }];
  });
}

async function checkEntry(
  { actor }: ShopContext,
  trx: ShopTransaction,
  { entryId, jobId }: RunValues,
): Promise<Issue[]> {
  if (entryId === null) return [];
  const entry = await findRunEntry(trx, entryId);
  const isOwn = hasPermission(actor.role, 'hours.all') || entry?.employeeId === actor.employeeId;
  if (entry?.jobId === jobId && isOwn) return [];
  const message = 'There is no such time entry on this job. Choose one of the list, or leave it out.';
  return [{ field: 'entryId', code: 'unknown', message }];
}
