import { accepted, type Parsed, refused } from '@brakeven/values';
import { type AirBend, punchTravelMm, turnedMax } from './air-bend';
import { checkFigure, type FormingIssue } from './forming-issue';
import { quadraticForm, type RamDepthFit } from './ram-depth-fit';
import { studentLimit } from './student-t';
import {
  type BendSetup,
  checkBendSetup,
  checkReach,
  finishedTurn,
  toAirBend,
  type TrialBend,
  turnSlopes,
} from './trial-bend';

/** A depth for an angle, with the depths between which 9 of 10 single bends would need it. */
export interface DepthAnswer {
  depthMm: number;
  lowMm: number;
  highMm: number;
  /** The same band in degrees to either side. */
  bandAngle: number;
  /** Whether no trial was bent with this sheet on this opening. */
  isGuess: boolean;
}

/** An angle at a depth, with the inside angles between which 9 of 10 single bends would come out. */
export interface AngleAnswer {
  insideAngle: number;
  low: number;
  high: number;
  isGuess: boolean;
}

/** Degrees that an answer may lie beyond the angles that were measured. */
export const EXTRAPOLATION_MAX = 10;

/** Degrees to either side beyond which an answer would only pretend to know. */
export const BAND_MAX = 20;

/** Another sheet or opening counts as a neighbour up to this factor. */
export const NEIGHBOUR_FACTOR_MAX = 1.6;

const BAND_SHARE = 0.9;
const GUESS_FACTOR = 2;
const GUESS_RADIUS_OFF = 0.2;
/** Lengths closer than this are the same sheet, opening or radius. */
const SAME_MM = 0.005;

/**
 * The ram's reading for an inside angle. Rules in words: `FORMING_RULES.ramDepth`, `.ramDepthFit`, `.transfer`.
 * Codes: `out_of_range`, `angle_out_of_reach`, `beyond_trials`, `too_far_from_trials`, `thickness_over_opening`, `too_uncertain`.
 */
export function findDepth(fit: RamDepthFit, setup: BendSetup, insideAngle: number): Parsed<DepthAnswer> {
  const bend = toAirBend(setup, fit.radiusPerOpening);
  const [issue] = [
    ...checkFigure('angle', insideAngle, 'insideAngle'),
    ...checkSetup(fit, setup),
    ...checkMeasured(fit, insideAngle),
    ...checkReach(bend, insideAngle - fit.springback),
  ];
  if (issue) return refused(issue.code, issue.message);
  const depthAt = (turned: number) => depthOf(fit, bend, turned);
  const turned = 180 - insideAngle;
  const depthMm = depthAt(turned);
  const isGuess = !isTried(fit, setup);
  const bandAngle = bandOf(fit, setup, depthMm, isGuess);
  if (!(bandAngle <= BAND_MAX)) return tooUncertain(bandAngle);
  const [lowMm, highMm] = [depthAt(turned - bandAngle), depthAt(turned + bandAngle)];
  return accepted({ depthMm, lowMm, highMm, bandAngle, isGuess });
}

/** The inside angle that a reading of the ram gives; rules and codes as in `findDepth`. */
export function findAngle(fit: RamDepthFit, setup: BendSetup, depthMm: number): Parsed<AngleAnswer> {
  const [issue] = [...checkFigure('depth', depthMm, 'depthMm'), ...checkSetup(fit, setup)];
  if (issue) return refused(issue.code, issue.message);
  const insideAngle = 180 - finishedTurn(toAirBend(setup, fit.radiusPerOpening), fit, depthMm);
  const [beyond] = checkMeasured(fit, insideAngle);
  if (beyond) return refused(beyond.code, beyond.message);
  const isGuess = !isTried(fit, setup);
  const band = bandOf(fit, setup, depthMm, isGuess);
  if (!(band <= BAND_MAX)) return tooUncertain(band);
  return accepted({ insideAngle, low: insideAngle - band, high: insideAngle + band, isGuess });
}

/**
 * Moves the datum so that the curve passes through one bend over the full length: narrow strips and long bends read
 * differently, as the press gives way under the higher force. Springback and band stay those of the trials.
 */
export function correctDatum(fit: RamDepthFit, fullBend: TrialBend): RamDepthFit {
  const bend = toAirBend(fullBend, fit.radiusPerOpening);
  const shiftMm = fullBend.depthMm - depthOf(fit, bend, 180 - fullBend.insideAngle);
  return { ...fit, datumMm: fit.datumMm + shiftMm };
}

/** A cell of a card for the press; a refused one says why. */
export interface DepthCardCell {
  setup: BendSetup;
  insideAngle: number;
  answer: Parsed<DepthAnswer>;
}

/** The shop's usual sheets × angles, row by row. */
export function computeDepthCard(
  fit: RamDepthFit,
  setups: readonly BendSetup[],
  insideAngles: readonly number[],
): DepthCardCell[] {
  return setups.flatMap((setup) =>
    insideAngles.map((insideAngle) => ({ setup, insideAngle, answer: findDepth(fit, setup, insideAngle) })),
  );
}

function tooUncertain<T>(bandAngle: number): Parsed<T> {
  const width = Number.isFinite(bandAngle) ? `by ${Math.round(bandAngle)} degrees` : 'by any angle';
  return refused(
    'too_uncertain',
    `The next bend could be off ${width}: the trial bends do not agree with each other or with the tools. Check their readings, the opening and the thickness, or bend more.`,
  );
}

function depthOf(fit: RamDepthFit, bend: AirBend, turned: number): number {
  const loaded = Math.min(turned + fit.springback, turnedMax(bend));
  return fit.datumMm + punchTravelMm(bend, loaded) - bend.thicknessMm;
}

/** Degrees to either side: one new bend beside what the fit itself may be off. */
function bandOf(fit: RamDepthFit, setup: BendSetup, depthMm: number, isGuess: boolean): number {
  const bend = toAirBend(setup, fit.radiusPerOpening);
  const spread = Math.sqrt(1 + quadraticForm(fit.inverseNormal, turnSlopes(bend, fit, depthMm)));
  const band = studentLimit(BAND_SHARE, fit.freedom) * fit.sdAngle * spread;
  if (!isGuess) return band;
  const turned = finishedTurn(bend, fit, depthMm);
  const effects = [1 - GUESS_RADIUS_OFF, 1 + GUESS_RADIUS_OFF].map((factor) => {
    const other = { ...bend, insideRadiusMm: bend.insideRadiusMm * factor };
    return Math.abs(finishedTurn(other, fit, depthMm) - turned);
  });
  return Math.hypot(GUESS_FACTOR * band, Math.max(...effects));
}

function checkSetup(fit: RamDepthFit, setup: BendSetup): FormingIssue[] {
  const issues = checkBendSetup(setup);
  const isNear = fit.bends.some(
    ({ trial }) =>
      isNeighbour(trial.thicknessMm, setup.thicknessMm) && isNeighbour(trial.openingMm, setup.openingMm),
  );
  if (issues.length > 0 || isNear) return issues;
  const message = `No trial bend is near enough: sheet and opening must each be within a factor of ${NEIGHBOUR_FACTOR_MAX} of one that was bent. Make trial bends with this sheet on this die.`;
  return [{ field: 'thickness', code: 'too_far_from_trials', message }];
}

function checkMeasured(fit: RamDepthFit, insideAngle: number): FormingIssue[] {
  const [low, high] = [fit.angleMin - EXTRAPOLATION_MAX, fit.angleMax + EXTRAPOLATION_MAX];
  if (insideAngle >= low && insideAngle <= high) return [];
  const message = `The trial bends measured ${degrees(fit.angleMin)} to ${degrees(fit.angleMax)} degrees, so answers are given from ${degrees(low)} to ${degrees(high)} and not for ${degrees(insideAngle)}. Make a trial bend nearer to that angle.`;
  return [{ field: 'angle', code: 'beyond_trials', message }];
}

function degrees(angle: number): string {
  return String(Math.round(angle * 10) / 10);
}

function isNeighbour(a: number, b: number): boolean {
  return Math.max(a, b) <= NEIGHBOUR_FACTOR_MAX * Math.min(a, b);
}

function isTried(fit: RamDepthFit, setup: BendSetup): boolean {
  const fields = ['openingMm', 'thicknessMm', 'punchRadiusMm', 'shoulderRadiusMm'] as const;
  return fit.bends.some(({ trial }) =>
    fields.every((field) => Math.abs(trial[field] - setup[field]) < SAME_MM),
  );
}
