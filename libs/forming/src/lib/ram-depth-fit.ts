import { accepted, type Parsed, refused } from '@brakeven/values';
import { punchTravelMm } from './air-bend';
import { type CurveFit, fitCurve } from './least-squares';
import { studentLimit } from './student-t';
import {
  checkTrialBend,
  type DepthTerms,
  finishedTurn,
  toAirBend,
  type TrialBend,
  turnSlopes,
} from './trial-bend';

/** A trial bend as the fit sees it. Angles in degrees, errors as measured − fitted inside angle. */
export interface FittedBend {
  trial: TrialBend;
  error: number;
  /** The error when this bend is left out of the fit; null if the others give no fit. */
  looError: number | null;
  isOutlier: boolean;
}

/** Datum and springback fitted to trial bends. */
export interface RamDepthFit extends DepthTerms {
  radiusPerOpening: number;
  /** Standard errors of the two terms. */
  datumSeMm: number;
  springbackSe: number;
  bends: FittedBend[];
  /** Root of the mean square of the errors. */
  rmsAngle: number;
  /** The same with each bend left out of its own fit; null if one of those fits fails. */
  looAngle: number | null;
  /** Standard deviation of one bend, from what the fit leaves over. */
  sdAngle: number;
  freedom: number;
  inverseNormal: number[][];
  /** Inside angles that were measured. */
  angleMin: number;
  angleMax: number;
  notes: string[];
}

/** The fewest bends from which datum and springback can be had, with one over to judge them by. */
export const TRIALS_MIN = 3;

/** Measured angles must lie at least so far apart in degrees. */
export const SPREAD_MIN = 5;

const TERM_COUNT = 2;
const SPRINGBACK_START = 2;
const OUTLIER_TRIALS_MIN = 5;
const OUTLIER_RISK = 0.05;
/** Degrees; below this no reading is called an outlier, however well the others agree. */
const OUTLIER_ERROR_MIN = 0.1;
const SPRINGBACK_SE_CLEAR = 2;

/**
 * Fits datum and springback to trial bends of one machine. Rules in words: `FORMING_RULES.ramDepth`, `.ramDepthFit`.
 * Codes: `too_few_bends`, `bends_too_alike`, `bends_do_not_fit`, and those of `checkTrialBend`.
 */
export function fitRamDepth(trials: readonly TrialBend[], radiusPerOpening: number): Parsed<RamDepthFit> {
  const refusal = findRefusal(trials, radiusPerOpening);
  if (refusal) return refusal;
  const fit = fitTerms(trials, radiusPerOpening);
  if (!fit) {
    const message =
      'No datum and springback fit these bends. Check that each depth grows as its angle gets sharper, and that readings and units are right.';
    return refused('bends_do_not_fit', message);
  }
  return accepted(toRamDepthFit(fit, trials, radiusPerOpening));
}

function findRefusal(
  trials: readonly TrialBend[],
  radiusPerOpening: number,
): Parsed<RamDepthFit> | undefined {
  for (const [index, trial] of trials.entries()) {
    const [issue] = checkTrialBend(trial, radiusPerOpening);
    if (issue) return refused(issue.code, `Bend ${index + 1}: ${issue.message}`);
  }
  if (trials.length < TRIALS_MIN) {
    const missing = TRIALS_MIN - trials.length;
    const message = `${trials.length} of the ${TRIALS_MIN} trial bends needed are there. Bend ${missing} more, at angles at least ${SPREAD_MIN} degrees apart, such as 80, 90 and 120, and note depth and angle.`;
    return refused('too_few_bends', message);
  }
  const angles = trials.map((trial) => trial.insideAngle);
  if (Math.max(...angles) - Math.min(...angles) >= SPREAD_MIN) return undefined;
  const message = `The measured angles lie less than ${SPREAD_MIN} degrees apart, so they do not show how the angle changes with depth. Add a bend at another angle, such as 120.`;
  return refused('bends_too_alike', message);
}

function fitTerms(trials: readonly TrialBend[], radiusPerOpening: number): CurveFit | undefined {
  const bends = trials.map((trial) => ({ trial, bend: toAirBend(trial, radiusPerOpening) }));
  const datums = bends.map(({ trial, bend }) => {
    const loaded = 180 - trial.insideAngle + SPRINGBACK_START;
    return trial.depthMm - punchTravelMm(bend, loaded) + bend.thicknessMm;
  });
  return fitCurve(
    {
      residuals: (parameters) =>
        bends.map(
          ({ trial, bend }) =>
            finishedTurn(bend, toTerms(parameters), trial.depthMm) - (180 - trial.insideAngle),
        ),
      slopes: (parameters) =>
        bends.map(({ trial, bend }) => turnSlopes(bend, toTerms(parameters), trial.depthMm)),
    },
    [meanOf(datums), SPRINGBACK_START],
  );
}

function toTerms([datumMm = 0, springback = 0]: readonly number[]): DepthTerms {
  return { datumMm, springback };
}

function toRamDepthFit(fit: CurveFit, trials: readonly TrialBend[], radiusPerOpening: number): RamDepthFit {
  const freedom = trials.length - TERM_COUNT;
  const sdAngle = Math.sqrt((meanSquare(fit.residuals) * trials.length) / freedom);
  const [datumSeMm = 0, springbackSe = 0] = [0, 1].map(
    (index) => sdAngle * Math.sqrt(fit.inverseNormal[index]?.[index] ?? 0),
  );
  const bends = trials.map((trial, index) => toFittedBend(fit, trials, index, trial, radiusPerOpening));
  const looErrors = bends.flatMap((bend) => bend.looError ?? []);
  const angles = trials.map((trial) => trial.insideAngle);
  return {
    ...toTerms(fit.parameters),
    radiusPerOpening,
    datumSeMm,
    springbackSe,
    bends,
    rmsAngle: Math.sqrt(meanSquare(fit.residuals)),
    looAngle: looErrors.length === bends.length ? Math.sqrt(meanSquare(looErrors)) : null,
    sdAngle,
    freedom,
    inverseNormal: fit.inverseNormal,
    angleMin: Math.min(...angles),
    angleMax: Math.max(...angles),
    notes: listNotes(trials, springbackSe),
  };
}

function toFittedBend(
  fit: CurveFit,
  trials: readonly TrialBend[],
  index: number,
  trial: TrialBend,
  radiusPerOpening: number,
): FittedBend {
  const others = trials.filter((_, at) => at !== index);
  const without = fitTerms(others, radiusPerOpening);
  const looError = without ? errorOf(trial, without, radiusPerOpening) : null;
  const isOutlier =
    without !== undefined &&
    looError !== null &&
    trials.length >= OUTLIER_TRIALS_MIN &&
    Math.abs(looError) > Math.max(OUTLIER_ERROR_MIN, outlierLimit(trial, without, radiusPerOpening));
  return { trial, error: fit.residuals[index] ?? 0, looError, isOutlier };
}

/** Measured − fitted inside angle, which is fitted − measured turn. */
function errorOf(trial: TrialBend, fit: CurveFit, radiusPerOpening: number): number {
  const bend = toAirBend(trial, radiusPerOpening);
  return finishedTurn(bend, toTerms(fit.parameters), trial.depthMm) - (180 - trial.insideAngle);
}

/** How far off a bend may be by chance, seen from the fit of the others; one honest set in twenty shows an outlier. */
function outlierLimit(trial: TrialBend, others: CurveFit, radiusPerOpening: number): number {
  const count = others.residuals.length;
  const freedom = count - TERM_COUNT;
  const sd = Math.sqrt((meanSquare(others.residuals) * count) / freedom);
  const bend = toAirBend(trial, radiusPerOpening);
  const slopes = turnSlopes(bend, toTerms(others.parameters), trial.depthMm);
  const share = 1 - OUTLIER_RISK / (count + 1);
  return studentLimit(share, freedom) * sd * Math.sqrt(1 + quadraticForm(others.inverseNormal, slopes));
}

function listNotes(trials: readonly TrialBend[], springbackSe: number): string[] {
  const notes: string[] = [];
  if (springbackSe > SPRINGBACK_SE_CLEAR) {
    notes.push(
      'These bends hardly tell springback and datum apart: take the depths from them, not the springback. More bends over a wider range of angles help.',
    );
  }
  if (new Set(trials.map((trial) => trial.openingMm)).size > 1) {
    notes.push(
      'Bends on several openings share one datum here, which holds only if the tops of these dies stand at the same height.',
    );
  }
  return notes;
}

/** gᵀ · M · g. */
export function quadraticForm(matrix: readonly (readonly number[])[], vector: readonly number[]): number {
  return vector.reduce(
    (total, value, row) =>
      total +
      value * vector.reduce((inner, other, column) => inner + other * (matrix[row]?.[column] ?? 0), 0),
    0,
  );
}

function meanOf(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0) / values.length;
}

function meanSquare(values: readonly number[]): number {
  return meanOf(values.map((value) => value ** 2));
}
