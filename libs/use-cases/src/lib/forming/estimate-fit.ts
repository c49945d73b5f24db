import { AppError, type FormingReference } from '@brakeven/contract';
import {
  type BendFit,
  checkFitInput,
  computeBendFit,
  findLongestBend,
  findOpeningNeeded,
  findThickestSheet,
  FIT_NOTES,
  type FitInput,
  type FitLimit,
  type FitRow,
  type FitVerdict,
  FORMING_CAUTIONS,
  type OwnedOpening,
  type OwnedPunch,
  toForceUnit,
} from '@brakeven/forming';
import { quoted } from '@brakeven/values';
import { type ShopContext } from '../context';
import { getFormingReference } from '../manage-tooling/reference';
import { toGaugeFinder, toRuleMaterial } from '../manage-tooling/shop-materials';
import { FormingInput, type ResultUnit, round, type ShopFigures } from './forming-input';

/** What a fit is asked for, as typed. */
export interface FitQuestion {
  /** Code of the press. */
  machine: string;
  material: string;
  thickness: string;
  /** Of the bend. */
  length: string;
  /** Inside angle of the finished part; 90 if left out. */
  angle?: string;
  /** Shortest outside flange. */
  flange?: string;
  /** Name of the punch; without it no punch is looked at. */
  punch?: string;
}

/** One opening of the shop, judged. Lengths are in the answer's `unit`, forces in its `forceUnit`. */
export interface FitEstimateRow {
  die: string;
  opening: number;
  openingOverThickness: number;
  forceLow: number | null;
  forceHigh: number | null;
  rating: number | null;
  ratingOf: 'press' | 'die' | 'punch' | null;
  /** Higher force ÷ rating. */
  share: number | null;
  insideRadius: number;
  shortestFlange: number;
  verdict: FitVerdict;
  isBest: boolean;
  objections: { code: string; words: string }[];
  /** The longest bend of this sheet, and the thickest sheet at this length; null where nothing stays under the line. */
  longestBend: number | null;
  thickestSheet: number | null;
}

/** Whether a bend fits a press, opening by opening. */
export interface FitEstimate {
  machine: string;
  unit: ResultUnit;
  forceUnit: 'US ton' | 'kN';
  thickness: number;
  linePercent: number;
  rows: FitEstimateRow[];
  reason: string;
  /** The narrowest opening, owned or not, that stays under the shop's line of the press; null if none does. */
  openingNeeded: number | null;
  notes: string[];
  cautions: readonly string[];
}

/**
 * Judges every opening that the shop owns for a press. Results are in the unit of the first length of the question
 * that has one, in the order of its properties; so are bare numbers.
 * @throws AppError `not_found` (no such press or punch), `invalid_input` naming each field
 */
export async function estimateFit(context: ShopContext, question: FitQuestion): Promise<FitEstimate> {
  const reference = await getFormingReference(context);
  const tools = findTools(reference, question);
  const shop: ShopFigures = {
    materials: reference.materials.map(toRuleMaterial),
    findGauge: toGaugeFinder(reference.gauges),
  };
  const input = new FormingInput([question.thickness, question.length, question.flange], shop);
  const { note, ...fitInput } = readFitInput(input, question, tools);
  input.addChecked(checkFitInput(fitInput));
  input.refuseIssues();
  const fit = computeBendFit(fitInput);
  return {
    machine: tools.machine.name,
    unit: input.unit,
    forceUnit: input.unit === 'in' ? 'US ton' : 'kN',
    thickness: input.out(fitInput.thicknessMm),
    linePercent: round(fitInput.lineShare * 100),
    rows: fit.rows.map((row) => toRow(input, fitInput, fit, row, tools.dieNames.get(row.opening.code) ?? '')),
    reason: fit.reason,
    openingNeeded: toLimit(input, findOpeningNeeded(fitInput)),
    notes: [...(note ? [note] : []), ...Object.values(FIT_NOTES)],
    cautions: FORMING_CAUTIONS,
  };
}

interface FitTools {
  machine: FormingReference['machines'][number];
  punch: OwnedPunch | null;
  openings: OwnedOpening[];
  /** By the opening's code. */
  dieNames: Map<string, string>;
  lineShare: number;
}

function findTools(reference: FormingReference, question: FitQuestion): FitTools {
  const { machines, dies, punches, forceLinePercent } = reference;
  const machine = machines.find(({ code }) => isSame(code, question.machine));
  if (!machine)
    throw notFound(
      'machine',
      question.machine,
      machines.map(({ code }) => code),
    );
  const own = <T extends { machineId: string }>(tools: readonly T[]) =>
    tools.filter(({ machineId }) => machineId === machine.machineId);
  const names = own(punches).map(({ name }) => name);
  const punch = own(punches).find(({ name }) => question.punch !== undefined && isSame(name, question.punch));
  if (question.punch !== undefined && !punch) throw notFound('punch', question.punch, names);
  const openings = own(dies).flatMap((die) =>
    die.openings.map((opening) => ({
      dieName: die.name,
      code: opening.dieOpeningId,
      openingMm: Number(opening.openingMm),
      dieAngle: toNumber(opening.angle),
      lengthMm: toNumber(die.lengthMm),
      ratedKnPerM: toNumber(die.forceLimitKnPerM),
    })),
  );
  return {
    machine,
    punch: punch
      ? {
          noseRadiusMm: Number(punch.noseRadiusMm),
          angle: toNumber(punch.angle),
          ratedKnPerM: toNumber(punch.forceLimitKnPerM),
        }
      : null,
    openings: openings.map(({ dieName: _dieName, ...opening }) => opening),
    dieNames: new Map(openings.map(({ code, dieName }) => [code, dieName])),
    lineShare: Number(forceLinePercent) / 100,
  };
}

function readFitInput(
  input: FormingInput,
  question: FitQuestion,
  { machine, punch, openings, lineShare }: FitTools,
): FitInput & { note: string | null } {
  const material = input.material('material', question.material);
  const sheet = input.thickness('thickness', question.thickness, material);
  const { flange } = question;
  return {
    tensileMpa: material?.tensileUsed.toNumber() ?? NaN,
    radiusPerOpening: material?.radiusPerOpening ?? NaN,
    thicknessMm: sheet?.thickness.toNumber() ?? NaN,
    lengthMm: input.lengthMm('length', question.length),
    insideAngle: input.angle('angle', question.angle ?? '90'),
    flangeMm: flange === undefined ? null : input.lengthMm('flange', flange),
    press: { ratedKn: toNumber(machine.ratedForceKn), bedLengthMm: toNumber(machine.bedLengthMm) },
    punch,
    openings,
    lineShare,
    note: sheet?.note ?? null,
  };
}

function toRow(
  input: FormingInput,
  fitInput: FitInput,
  fit: BendFit,
  row: FitRow,
  die: string,
): FitEstimateRow {
  const { opening, force, rating } = row;
  const toForce = (forceKn: number) => round(toForceUnit(forceKn, input.unit));
  return {
    die,
    opening: input.out(opening.openingMm),
    openingOverThickness: round(row.openingOverThickness),
    forceLow: force && toForce(force.lowKn),
    forceHigh: force && toForce(force.highKn),
    rating: rating && toForce(rating.ratedKn),
    ratingOf: rating && rating.of,
    share: row.share === null ? null : round(row.share),
    insideRadius: input.out(row.insideRadiusMm),
    shortestFlange: input.out(row.shortestFlangeMm),
    verdict: row.verdict,
    isBest: opening.code === fit.best,
    objections: row.objections,
    longestBend: toLimit(input, findLongestBend(fitInput, opening)),
    thickestSheet: toLimit(input, findThickestSheet(fitInput, opening)),
  };
}

function toLimit(input: FormingInput, limit: FitLimit): number | null {
  return limit.found ? input.out(limit.valueMm) : null;
}

function notFound(what: 'machine' | 'punch', text: string, known: readonly string[]): AppError {
  const list = known.length > 0 ? `Known are ${known.join(', ')}.` : 'None has been entered yet.';
  const message = `There is no ${what} ${quoted(text)} here. ${list}`;
  return new AppError('not_found', message, { issues: [{ field: what, code: 'unknown', message }] });
}

function isSame(a: string, b: string): boolean {
  return a.trim().toLowerCase() === b.trim().toLowerCase();
}

function toNumber(text: string | null): number | null {
  return text === null ? null : Number(text);
}
