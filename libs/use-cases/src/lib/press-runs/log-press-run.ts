import {
  AppError,
  type FormingMaterialDto,
  hasPermission,
  type Issue,
  type PressRun,
  type pressRunInputSchema,
} from '@brakeven/contract';
import {
  findRunEntry,
  findRunJob,
  insertDatedRow,
  replaceDatedRow,
  type ShopTransaction,
} from '@brakeven/database';
import { type BendForce, checkForceInput, computeBendForce, type ForceInput } from '@brakeven/forming';
import { formatLocalDate, toLocalDate } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { type z } from 'zod';
import { inShopOf, type ShopContext, todayOf } from '../context';
import { readSetupTools, type SetupTools } from '../manage-tooling/setup-tools';
import { getFormingMaterial, readFormingMaterials, toRuleMaterial } from '../manage-tooling/shop-materials';
import { lockPressRun, readPressRun } from './press-runs';

type RunInput = z.output<typeof pressRunInputSchema>;

/**
 * Logs a press run with the force that both rules compute for it now.
 * @throws AppError `invalid_input` (no such job, tool, material or time entry, a sheet as thick as the opening, a bend
 *   longer than bed or die, dated after today or before the job)
 */
export function createPressRun(context: ShopContext, body: RunInput): Promise<PressRun> {
  return inShopOf(context, async (trx) => {
    const { actor, shop } = context;
    const id = newId();
    const values = await toRunValues(context, trx, body);
    const logger = { loggedBy: actor.name, loggedByUserId: actor.userId };
    await insertDatedRow(trx, 'pressRun', { shopId: shop.shopId, id }, { ...values, ...logger });
    return readPressRun(trx, id);
  });
}

/**
 * Corrects a press run: it is voided and another, logged by the same person, takes its place; who may not see all, only
 * one that the own account has logged.
 * @throws AppError `not_found`; `conflict` if it was voided meanwhile; as `createPressRun`
 */
export function correctPressRun(
  context: ShopContext,
  { pressRunId }: { pressRunId: string },
  body: RunInput,
): Promise<PressRun> {
  return inShopOf(context, async (trx) => {
    const run = await lockPressRun(context, trx, pressRunId);
    if (run.isVoided) {
      throw new AppError('conflict', 'This press run was voided meanwhile. Load the page again.');
    }
    const values = await toRunValues(context, trx, { runOn: run.runOn, ...body });
    const { loggedBy, loggedByUserId } = run;
    const replacement = { id: pressRunId, newId: newId(), voidedBy: context.actor.name };
    await replaceDatedRow(trx, 'pressRun', replacement, { ...values, loggedBy, loggedByUserId });
    return readPressRun(trx, replacement.newId);
  });
}

/** What is kept of a run besides who logged it. */
async function toRunValues(context: ShopContext, trx: ShopTransaction, body: RunInput) {
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
  const note = body.note === '' ? null : body.note;
  return { ...body, ...toStoredForce(computeBendForce(forceInput)), runOn, note };
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

function toForceInput(body: RunInput, { opening }: SetupTools, material: FormingMaterialDto): ForceInput {
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
function checkRoom({ bendLengthMm }: RunInput, { machine, die }: SetupTools): Issue[] {
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
  { entryId, jobId }: RunInput,
): Promise<Issue[]> {
  if (entryId === null) return [];
  const entry = await findRunEntry(trx, entryId);
  const isOwn = hasPermission(actor.role, 'hours.all') || entry?.employeeId === actor.employeeId;
  if (entry?.jobId === jobId && isOwn) return [];
  const message = 'There is no such time entry on this job. Choose one of the list, or leave it out.';
  return [{ field: 'entryId', code: 'unknown', message }];
}
