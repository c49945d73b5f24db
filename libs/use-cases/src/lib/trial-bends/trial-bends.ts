import {
  AppError,
  type FormingMaterialDto,
  type Issue,
  type TrialBendDto,
  type trialBendInputSchema,
  type TrialBendPage,
  type TrialBendQuery,
} from '@brakeven/contract';
import {
  insertTrialBends,
  listTrialBendRows,
  setTrialBendVoided,
  type ShopTransaction,
  type TrialBendRow,
} from '@brakeven/database';
import { checkBendSetup, checkFigure, checkTrialBend, type FormingIssue } from '@brakeven/forming';
import { formatLocalDate, toLocalDate } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { type z } from 'zod';
import { inShopOf, type ShopContext, todayOf } from '../context';
import { readSetupTools, type SetupTools } from '../manage-tooling/setup-tools';
import { getFormingMaterial, readFormingMaterials } from '../manage-tooling/shop-materials';
import { cutPage, positionSchema, readCursor, writeCursor } from '../page-cursor';
import { toPlainText } from '../quantity-text';

export type TrialBendValues = z.output<typeof trialBendInputSchema>;

/**
 * A page of trial bends, latest first.
 * @throws AppError `invalid_input` for a cursor of another list
 */
export function listTrialBends(
  context: ShopContext,
  { cursor, limit, ...selection }: TrialBendQuery,
): Promise<TrialBendPage> {
  const list = 'trial-bends';
  const after = readCursor(cursor, list, positionSchema('date'));
  return inShopOf(context, async (trx) => {
    const materials = await readFormingMaterials(trx);
    const found = await listTrialBendRows(trx, selection, { after, limit: limit + 1 });
    const { rows, nextCursor } = cutPage(found, limit, (last) =>
      writeCursor(list, { value: last.bentOn, id: last.trialBendId }),
    );
    return { items: rows.map((row) => toTrialBend(row, materials)), nextCursor };
  });
}

/**
 * Notes a trial bend.
 * @throws AppError `invalid_input` (no such tool or material, a figure out of range, dated after today)
 */
export function createTrialBend(context: ShopContext, body: TrialBendValues): Promise<TrialBendDto> {
  return inShopOf(context, async (trx) => {
    const tools = await readSetupTools(trx, body);
    const materials = await readFormingMaterials(trx);
    const material = getFormingMaterial(materials, body.materialCode);
    refuseIssues(checkBend(context, { tools, material }, body));
    const [bend] = await addTrialBends(context, trx, [body], materials);
    if (!bend) throw new Error('A trial bend was added and is not there.');
    return bend;
  });
}

/** Voids a trial bend; the fit goes without it. @throws AppError `not_found` */
export function voidTrialBend(context: ShopContext, { trialBendId }: { trialBendId: string }): Promise<void> {
  return setVoided(context, trialBendId, context.actor.name);
}

/** Takes back the voiding of a trial bend. @throws AppError `not_found` */
export function restoreTrialBend(
  context: ShopContext,
  { trialBendId }: { trialBendId: string },
): Promise<void> {
  return setVoided(context, trialBendId, null);
}

async function setVoided(context: ShopContext, trialBendId: string, voidedBy: string | null): Promise<void> {
  const isThere = await inShopOf(context, (trx) => setTrialBendVoided(trx, trialBendId, voidedBy));
  if (!isThere) throw new AppError('not_found', 'There is no such trial bend. Load the page again.');
}

/** Adds bends that were checked, and answers them in their order. */
export async function addTrialBends(
  context: ShopContext,
  trx: ShopTransaction,
  bends: readonly TrialBendValues[],
  materials: readonly FormingMaterialDto[],
): Promise<TrialBendDto[]> {
  const rows = bends.map((bend) => ({
    ...bend,
    shopId: context.shop.shopId,
    trialBendId: newId(),
    bentBy: bend.bentBy ?? context.actor.name,
    bentOn: bend.bentOn ?? todayOf(context),
  }));
  await insertTrialBends(trx, rows);
  const trialBendIds = rows.map(({ trialBendId }) => trialBendId);
  const added = await listTrialBendRows(
    trx,
    { trialBendIds, show: 'all' },
    { after: null, limit: rows.length },
  );
  const byId = new Map(added.map((row) => [row.trialBendId, toTrialBend(row, materials)]));
  return trialBendIds.flatMap((id) => byId.get(id) ?? []);
}

/** What is wrong with a trial bend; an opening whose shoulder radius is not known yet is no reason to refuse it. */
export function checkBend(
  context: ShopContext,
  { tools, material }: { tools: SetupTools; material: FormingMaterialDto },
  bend: TrialBendValues,
): Issue[] {
  const { punch, opening } = tools;
  const trial = {
    openingMm: Number(opening.openingMm),
    thicknessMm: Number(bend.thicknessMm),
    punchRadiusMm: Number(punch?.noseRadiusMm ?? 0),
    shoulderRadiusMm: Number(opening.shoulderRadiusMm ?? 0),
    depthMm: Number(bend.depthMm),
    insideAngle: Number(bend.measuredAngle),
  };
  const found =
    opening.shoulderRadiusMm === null
      ? [...checkBendSetup(trial), ...checkFigure('angle', trial.insideAngle, 'insideAngle')]
      : checkTrialBend(trial, Number(material.radiusPerOpening));
  return [...found.map(toFieldIssue), ...checkDay(context, bend)];
}

/** @throws AppError `invalid_input` if there are any */
export function refuseIssues(issues: readonly Issue[]): void {
  if (issues.length === 0) return;
  throw new AppError('invalid_input', issues.map(({ message }) => message).join(' '), { issues });
}

const FIELDS: Readonly<Record<string, string>> = {
  opening: 'dieOpeningId',
  thickness: 'thicknessMm',
  punchRadius: 'punchId',
  shoulderRadius: 'dieOpeningId',
  depth: 'depthMm',
  angle: 'measuredAngle',
};

function toFieldIssue({ field, ...issue }: FormingIssue): Issue {
  return { field: FIELDS[field] ?? field, ...issue };
}

function checkDay(context: ShopContext, { bentOn }: TrialBendValues): Issue[] {
  const today = todayOf(context);
  if (bentOn === undefined || bentOn <= today) return [];
  const message = `A trial bend cannot be dated after today, ${formatLocalDate(toLocalDate(today))}.`;
  return [{ field: 'bentOn', code: 'in_the_future', message }];
}

function toTrialBend(row: TrialBendRow, materials: readonly FormingMaterialDto[]): TrialBendDto {
  return {
    ...row,
    noseRadiusMm: toPlainText(row.noseRadiusMm),
    openingMm: toPlainText(row.openingMm),
    shoulderRadiusMm: toPlainText(row.shoulderRadiusMm),
    material: materials.find(({ code }) => code === row.materialCode)?.name ?? row.materialCode,
    thicknessMm: toPlainText(row.thicknessMm),
    stripWidthMm: toPlainText(row.stripWidthMm),
    depthMm: toPlainText(row.depthMm),
    measuredAngle: toPlainText(row.measuredAngle),
    voidedAt: row.voidedAt?.toISOString() ?? null,
  };
}
