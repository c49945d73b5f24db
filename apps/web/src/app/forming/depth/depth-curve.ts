import { type TrialBendDto, type DepthFit } from '@brakeven/contract';
import {
  type AngleAnswer,
  type BendSetup,
  correctDatum,
  type DepthAnswer,
  findAngle,
  findDepth,
  fitRamDepth,
  type RamDepthFit,
  type TrialBend,
} from '@brakeven/forming';
import { type Parsed } from '@brakeven/values';

/** The fit of the server's bends, made again here so that answers follow each keystroke; null without a fit. */
export function refit(
  fit: DepthFit,
  trials: readonly TrialBendDto[],
  radiusPerOpening: number,
): RamDepthFit | null {
  if (!fit.fit) return null;
  const find = (id: string) => trials.filter(({ trialBendId }) => trialBendId === id);
  const fitted = fit.bends.flatMap(({ trialBendId }) => find(trialBendId));
  const made = fitRamDepth(
    fitted.map((trial) => toTrial(trial)),
    radiusPerOpening,
  );
  if (!made.ok || fitted.length !== fit.bends.length) return null;
  const [full] = fit.correction ? find(fit.correction.trialBendId) : [];
  return full ? correctDatum(made.value, toTrial(full)) : made.value;
}

/** Only bends on openings with a shoulder radius are fitted. */
function toTrial(trial: TrialBendDto): TrialBend {
  return {
    openingMm: Number(trial.openingMm),
    thicknessMm: Number(trial.thicknessMm),
    punchRadiusMm: Number(trial.noseRadiusMm),
    shoulderRadiusMm: Number(trial.shoulderRadiusMm),
    depthMm: Number(trial.depthMm),
    insideAngle: Number(trial.measuredAngle),
  };
}

/** A point of the curve with its band, for one set-up. */
export interface CurvePoint {
  depthMm: number;
  insideAngle: number;
  low: number;
  high: number;
}

const STEP_COUNT = 60;

/** The angles of a set-up over the depths that the fit answers for. */
export function traceCurve(fit: RamDepthFit, setup: BendSetup): CurvePoint[] {
  const depths = listAngles(fit).flatMap((angle) => {
    const answer = findDepth(fit, setup, angle);
    return answer.ok ? [answer.value.depthMm] : [];
  });
  return depths.flatMap((depthMm) => {
    const answer: Parsed<AngleAnswer> = findAngle(fit, setup, depthMm);
    return answer.ok ? [{ depthMm, ...answer.value }] : [];
  });
}

/** From just inside the flattest angle answered for to the sharpest. */
function listAngles({ angleMin, angleMax }: RamDepthFit): number[] {
  const [from, to] = [Math.min(174, angleMax + 9.9), Math.max(21, angleMin - 9.9)];
  return Array.from({ length: STEP_COUNT + 1 }, (_, step) => from + ((to - from) * step) / STEP_COUNT);
}

/** Whether an answer is geometry alone. */
export function isGuess(answer: Parsed<DepthAnswer | AngleAnswer> | null): boolean {
  return answer?.ok === true && answer.value.isGuess;
}
