import { type FormingMaterialDto, type PressRun } from '@brakeven/contract';
import { type PressRunRow } from '@brakeven/database';
import { toPlainText } from '../quantity-text';

/** A press run as the screens see it. */
export function toPressRun(row: PressRunRow, materials: readonly FormingMaterialDto[]): PressRun {
  const { pressRunId, runOn, jobId, jobNumber, jobTitle, machineId, machine, punchId, punch } = row;
  const { dieOpeningId, die, materialCode, strokes, pieces, ratingOf, isAboveLine, isGood, note } = row;
  return {
    pressRunId,
    runOn,
    jobId,
    jobNumber,
    jobTitle,
    machineId,
    machine,
    punchId,
    punch,
    dieOpeningId,
    die,
    openingMm: toPlainText(row.openingMm),
    materialCode,
    material: materials.find(({ code }) => code === materialCode)?.name ?? materialCode,
    thicknessMm: toPlainText(row.thicknessMm),
    bendLengthMm: toPlainText(row.bendLengthMm),
    strokes,
    pieces,
    forceLowKn: toPlainText(row.forceLowKn),
    forceHighKn: toPlainText(row.forceHighKn),
    highestForceKn: toPlainText(row.highestForceKn),
    forceUsedKn: toPlainText(row.forceUsedKn),
    ratedKn: toPlainText(row.ratedKn),
    ratingOf,
    share: row.share === null ? null : Number(row.share),
    isAboveLine,
    isGood,
    note,
    entryId: row.entryId,
    loggedBy: row.loggedBy,
    voidedAt: row.voidedAt?.toISOString() ?? null,
    voidedBy: row.voidedBy,
  };
}
