import { type DepthFit, type depthFitQuerySchema } from '@brakeven/contract';
import { listTrialBendRows, type ShopTransaction, type TrialBendRow } from '@brakeven/database';
import {
  type BendSetup,
  correctDatum,
  findAngle,
  findDepth,
  fitRamDepth,
  type RamDepthFit,
  type TrialBend,
  TRIALS_MIN,
} from '@brakeven/forming';
import { type Parsed, refused } from '@brakeven/values';
import { type z } from 'zod';
import { inShopOf, type ShopContext } from '../context';
import { readSetupTools, type SetupTools } from '../manage-tooling/setup-tools';
import { getFormingMaterial, readFormingMaterials } from '../manage-tooling/shop-materials';

type DepthFitValues = z.output<typeof depthFitQuerySchema>;

/** Trial bends as fitted: those of narrow strips, with a long bend that moves their datum; else the long ones. */
export interface FittedTrials {
  from: DepthFit['from'];
  rows: TrialBendRow[];
  fit: Parsed<RamDepthFit>;
  correction: DepthFit['correction'];
}

/**
 * Fits the ram depth of a set-up to its trial bends and answers depth for an angle, angle at a depth, or both.
 * What cannot be answered is told in the answer, with what to bend next.
 * @throws AppError `invalid_input` (no such tool or material)
 */
export function getDepthFit(context: ShopContext, query: DepthFitValues): Promise<DepthFit> {
  return inShopOf(context, async (trx) => {
    const tools = await readSetupTools(trx, query);
    const material = getFormingMaterial(await readFormingMaterials(trx), query.materialCode);
    const fitted = await fitTrials(trx, query, Number(material.radiusPerOpening));
    const thickness = query.thicknessMm ?? fitted.rows[0]?.thicknessMm;
    const setup = thickness === undefined ? null : toSetup(tools, Number(thickness));
    return {
      from: fitted.from,
      refusal: fitted.fit.ok ? null : toRefusal(fitted.fit),
      fit: fitted.fit.ok ? toFitFigures(fitted.fit.value) : null,
      bends: toFittedBends(fitted),
      correction: fitted.correction,
      thicknessMm: thickness === undefined ? null : Number(thickness),
      depth: query.angle === undefined ? null : answerDepth(fitted.fit, setup, Number(query.angle)),
      angle: query.depthMm === undefined ? null : answerAngle(fitted.fit, setup, Number(query.depthMm)),
    };
  });
}

/** Which trial bends a fit may be made from. */
export interface TrialKeys {
  machineId: string;
  punchId: string;
  dieOpeningId: string;
  materialCode: string;
}

const BENDS_FITTED_MAX = 1000;

/**
 * Fits the bends made on this opening; where they are too few, those on all openings with the same punch and material.
 * A datum belongs to one punch, as punches differ in height.
 */
export async function fitTrials(
  trx: ShopTransaction,
  keys: TrialKeys,
  radiusPerOpening: number,
): Promise<FittedTrials> {
  const { dieOpeningId, ...widerKeys } = keys;
  const paging = { after: null, limit: BENDS_FITTED_MAX };
  const all = await listTrialBendRows(trx, { ...widerKeys, show: 'live' }, paging);
  const usable = all.filter(({ shoulderRadiusMm }) => shoulderRadiusMm !== null);
  const own = usable.filter((row) => row.dieOpeningId === dieOpeningId);
  const ofOpening = fitRows(own, radiusPerOpening);
  if (ofOpening.fit.ok) return { from: 'opening', ...ofOpening };
  const ofMachine = fitRows(usable, radiusPerOpening);
  if (ofMachine.fit.ok) return { from: 'machine', ...ofMachine };
  if (usable.length < all.length) {
    const message =
      'The shoulder radius of an opening with trial bends is not known, and without it no depth can be fitted. Enter it with the die.';
    return { from: 'opening', ...ofOpening, fit: refused('shoulder_radius_missing', message) };
  }
  return { from: 'opening', ...ofOpening };
}

function fitRows(rows: readonly TrialBendRow[], radiusPerOpening: number): Omit<FittedTrials, 'from'> {
  const strips = rows.filter(({ isFullLength }) => !isFullLength);
  const long = rows.filter(({ isFullLength }) => isFullLength);
  const fittedRows = strips.length < TRIALS_MIN && long.length > strips.length ? long : strips;
  const fit = fitRamDepth(fittedRows.map(toTrial), radiusPerOpening);
  const [latestLong] = long;
  if (!fit.ok || fittedRows === long || !latestLong) return { rows: [...fittedRows], fit, correction: null };
  const corrected = correctDatum(fit.value, toTrial(latestLong));
  const shiftMm = corrected.datumMm - fit.value.datumMm;
  return {
    rows: strips,
    fit: { ok: true, value: corrected },
    correction: { trialBendId: latestLong.trialBendId, shiftMm },
  };
}

function toTrial(row: TrialBendRow): TrialBend {
  return {
    openingMm: Number(row.openingMm),
    thicknessMm: Number(row.thicknessMm),
    punchRadiusMm: Number(row.noseRadiusMm),
    shoulderRadiusMm: Number(row.shoulderRadiusMm),
    depthMm: Number(row.depthMm),
    insideAngle: Number(row.measuredAngle),
  };
}

/** The set-up of tools with a sheet; null while the opening's shoulder radius is not known. */
export function toSetup({ punch, opening }: SetupTools, thicknessMm: number): BendSetup | null {
  if (opening.shoulderRadiusMm === null) return null;
  return {
    openingMm: Number(opening.openingMm),
    thicknessMm,
    punchRadiusMm: Number(punch?.noseRadiusMm ?? 0),
    shoulderRadiusMm: Number(opening.shoulderRadiusMm),
  };
}

/** The depth for an angle, or why there is none. */
export function answerDepth(
  fit: Parsed<RamDepthFit>,
  setup: BendSetup | null,
  angle: number,
): NonNullable<DepthFit['depth']> {
  const answer = answerWith(fit, setup, (curve, bend) => findDepth(curve, bend, angle));
  return answer.ok ? answer.value : toRefusal(answer);
}

function answerAngle(
  fit: Parsed<RamDepthFit>,
  setup: BendSetup | null,
  depthMm: number,
): NonNullable<DepthFit['angle']> {
  const answer = answerWith(fit, setup, (curve, bend) => findAngle(curve, bend, depthMm));
  return answer.ok ? answer.value : toRefusal(answer);
}

function answerWith<T>(
  fit: Parsed<RamDepthFit>,
  setup: BendSetup | null,
  answer: (fit: RamDepthFit, setup: BendSetup) => Parsed<T>,
): Parsed<T> {
  if (!fit.ok) return fit;
  if (setup) return answer(fit.value, setup);
  const message = 'The shoulder radius of this opening is not known. Enter it with the die.';
  return refused('shoulder_radius_missing', message);
}

function toRefusal({ code, message }: { code: string; message: string }) {
  return { code, message };
}

function toFitFigures(fit: RamDepthFit): NonNullable<DepthFit['fit']> {
  return {
    datumMm: fit.datumMm,
    datumErrorMm: fit.datumSeMm,
    springback: fit.springback,
    springbackError: fit.springbackSe,
    rmsAngle: fit.rmsAngle,
    looAngle: fit.looAngle,
    angleMin: fit.angleMin,
    angleMax: fit.angleMax,
    notes: fit.notes,
  };
}

function toFittedBends({ rows, fit }: FittedTrials): DepthFit['bends'] {
  if (!fit.ok) return [];
  return fit.value.bends.flatMap(({ error, looError, isOutlier }, index) => {
    const row = rows[index];
    return row ? [{ trialBendId: row.trialBendId, error, looError, isOutlier }] : [];
  });
}
