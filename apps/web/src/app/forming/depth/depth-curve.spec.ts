import { type DepthFit, type TrialBendDto } from '@brakeven/contract';
import { type BendSetup, punchTravelMm, toAirBend } from '@brakeven/forming';
import { refit, traceCurve } from './depth-curve';

const setup: BendSetup = { openingMm: 24, thicknessMm: 3, punchRadiusMm: 1, shoulderRadiusMm: 2 };
const RADIUS_SHARE = 0.16;
const DATUM_MM = 100;
const SPRINGBACK = 2;

/** The reading that bends this set-up to an angle, by the travel of the punch. */
const depthFor = (angle: number) =>
  DATUM_MM + punchTravelMm(toAirBend(setup, RADIUS_SHARE), 180 - angle + SPRINGBACK) - setup.thicknessMm;

const trial = (trialBendId: string, angle: number, change: Partial<TrialBendDto> = {}): TrialBendDto => ({
  trialBendId,
  machineId: 'm2',
  machine: 'Press 2',
  punchId: 'p',
  punch: 'Punch',
  noseRadiusMm: '1',
  dieOpeningId: 'o',
  die: 'Die',
  openingMm: '24',
  shoulderRadiusMm: '2',
  materialCode: 'mild-steel',
  material: 'Mild steel',
  thicknessMm: '3',
  stripWidthMm: null,
  depthMm: depthFor(angle).toFixed(6),
  measuredAngle: String(angle),
  isFullLength: false,
  bentBy: 'Jory Vance',
  bentOn: '2026-11-20',
  voidedAt: null,
  voidedBy: null,
  ...change,
});

const served = (ids: readonly string[], change: Partial<DepthFit> = {}): DepthFit => ({
  from: 'opening',
  refusal: null,
  fit: {
    datumMm: DATUM_MM,
    datumErrorMm: 0,
    springback: SPRINGBACK,
    springbackError: 0,
    rmsAngle: 0,
    looAngle: 0,
    angleMin: 80,
    angleMax: 130,
    notes: [],
  },
  bends: ids.map((trialBendId) => ({ trialBendId, error: 0, looError: 0, isOutlier: false })),
  correction: null,
  thicknessMm: 3,
  depth: null,
  angle: null,
  ...change,
});

const trials = [trial('a', 80), trial('b', 95), trial('c', 110), trial('d', 130)];

describe('refit', () => {
  it('finds datum and springback of the bends that the server fitted', () => {
    const fit = refit(served(['a', 'b', 'c', 'd']), trials, RADIUS_SHARE);
    expect(fit?.datumMm).toBeCloseTo(DATUM_MM, 3);
    expect(fit?.springback).toBeCloseTo(SPRINGBACK, 2);
  });

  it('moves the datum by the full-length bend', () => {
    const full = trial('full', 90, { isFullLength: true, depthMm: (depthFor(90) + 0.25).toFixed(6) });
    const correction = { trialBendId: 'full', shiftMm: 0.25 };
    const fit = refit(served(['a', 'b', 'c', 'd'], { correction }), [...trials, full], RADIUS_SHARE);
    expect(fit?.datumMm).toBeCloseTo(DATUM_MM + 0.25, 3);
  });

  it('gives nothing where the server has no fit or a bend is not at hand', () => {
    expect(refit(served(['a', 'b', 'c'], { fit: null }), trials, RADIUS_SHARE)).toBeNull();
    expect(refit(served(['a', 'b', 'elsewhere']), trials, RADIUS_SHARE)).toBeNull();
  });
});

describe('traceCurve', () => {
  it('goes deeper and sharper from one end to the other, through the bends', () => {
    const fit = refit(served(['a', 'b', 'c', 'd']), trials, RADIUS_SHARE);
    const curve = fit ? traceCurve(fit, setup) : [];
    expect(curve.length).toBeGreaterThan(50);
    for (const [index, point] of curve.entries()) {
      const before = curve[index - 1];
      if (before) expect(point.depthMm > before.depthMm && point.insideAngle < before.insideAngle).toBe(true);
      expect(point.depthMm).toBeCloseTo(depthFor(point.insideAngle), 2);
    }
  });

  it('stays within ten degrees of what was measured', () => {
    const fit = refit(served(['a', 'b', 'c', 'd']), trials, RADIUS_SHARE);
    const angles = (fit ? traceCurve(fit, setup) : []).map(({ insideAngle }) => insideAngle);
    expect(Math.max(...angles)).toBeLessThanOrEqual(140);
    expect(Math.min(...angles)).toBeGreaterThanOrEqual(70);
  });
});
