import { type AirBend, travelPerDegreeMm, turnedAtTravel, turnedMax } from './air-bend';
import { insideRadiusMm } from './die-choice';
import { checkFigure, checkThicknessOverOpening, type FormingIssue } from './forming-issue';

/** A sheet on a die under a punch. Lengths in mm. */
export interface BendSetup {
  openingMm: number;
  thicknessMm: number;
  punchRadiusMm: number;
  shoulderRadiusMm: number;
}

/** One bend that was made and measured. */
export interface TrialBend extends BendSetup {
  /** The reading of the ram; it grows as the ram goes down, its zero is anybody's. */
  depthMm: number;
  /** Inside angle of the finished part in degrees. */
  insideAngle: number;
}

/** The geometry of a set-up; the inside radius is the material's share of the opening, at least the punch's. */
export function toAirBend(setup: BendSetup, radiusPerOpening: number): AirBend {
  const { openingMm, thicknessMm, shoulderRadiusMm, punchRadiusMm } = setup;
  return {
    openingMm,
    thicknessMm,
    shoulderRadiusMm,
    insideRadiusMm: insideRadiusMm(radiusPerOpening, openingMm, punchRadiusMm),
  };
}

/** Checks a set-up; fields are named as in a table of trial bends. */
export function checkBendSetup(setup: BendSetup): FormingIssue[] {
  return [
    ...checkFigure('opening', setup.openingMm, 'openingMm'),
    ...checkFigure('thickness', setup.thicknessMm, 'thicknessMm'),
    ...checkFigure('punchRadius', setup.punchRadiusMm, 'radiusMm'),
    ...checkFigure('shoulderRadius', setup.shoulderRadiusMm, 'radiusMm'),
    ...checkThicknessOverOpening(setup.thicknessMm, setup.openingMm),
  ];
}

/** Checks a trial bend: figures in range, and an angle that the sheet can be turned to on that die. */
export function checkTrialBend(trial: TrialBend, radiusPerOpening: number): FormingIssue[] {
  const figures = [
    ...checkBendSetup(trial),
    ...checkFigure('depth', trial.depthMm, 'depthMm'),
    ...checkFigure('angle', trial.insideAngle, 'insideAngle'),
  ];
  return figures.length > 0 ? figures : checkReach(toAirBend(trial, radiusPerOpening), trial.insideAngle);
}

/** Checks that an angle can be reached before the leg leaves the shoulder. */
export function checkReach(bend: AirBend, insideAngle: number): FormingIssue[] {
  const sharpest = 180 - turnedMax(bend);
  if (insideAngle > sharpest) return [];
  const message = `On this die the leg leaves the shoulder at ${sharpest.toFixed(0)} degrees, so a sharper angle cannot be air bent. Give an angle above that, such as ${Math.ceil(sharpest) + 5}, or a wider opening.`;
  return [{ field: 'angle', code: 'angle_out_of_reach', message }];
}

/** The two fitted terms of a machine and its bends. */
export interface DepthTerms {
  /** The ram's reading with the punch tip level with the die's top plane. */
  datumMm: number;
  /** Degrees that the part opens when the punch leaves it. */
  springback: number;
}

/** Degrees turned, finished, at a reading of the ram. */
export function finishedTurn(bend: AirBend, { datumMm, springback }: DepthTerms, depthMm: number): number {
  return turnedAtTravel(bend, depthMm - datumMm + bend.thicknessMm) - springback;
}

/** How finished turn changes with each term: degrees per mm of datum, and degrees per degree of springback. */
export function turnSlopes(bend: AirBend, { datumMm }: DepthTerms, depthMm: number): [number, number] {
  const loaded = turnedAtTravel(bend, depthMm - datumMm + bend.thicknessMm);
  return [-1 / travelPerDegreeMm(bend, loaded), -1];
}
