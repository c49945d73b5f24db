import { fitLinear } from './least-squares';
import { punchTravelMm } from './air-bend';
import { computeDepthCard, correctDatum, findAngle, findDepth } from './ram-depth-answer';
import { fitRamDepth, type RamDepthFit } from './ram-depth-fit';
import { type BendSetup, finishedTurn, toAirBend, type TrialBend } from './trial-bend';

const MILD = 0.16;
const SETUP: BendSetup = { openingMm: 16, thicknessMm: 2, punchRadiusMm: 1, shoulderRadiusMm: 2 };

/** The reading of a press with this datum and springback, from the closed form alone. */
function readingOf(setup: BendSetup, insideAngle: number, datumMm: number, springback: number): number {
  const alpha = ((180 - insideAngle + springback) * Math.PI) / 360;
  const radius = Math.max(MILD * setup.openingMm, setup.punchRadiusMm);
  const radii = radius + setup.thicknessMm + setup.shoulderRadiusMm;
  return (
    datumMm + (setup.openingMm / 2) * Math.tan(alpha) - radii * (1 / Math.cos(alpha) - 1) - setup.thicknessMm
  );
}

function trialOf(insideAngle: number, setup = SETUP, datumMm = 137.42, springback = 2): TrialBend {
  return { ...setup, insideAngle, depthMm: readingOf(setup, insideAngle, datumMm, springback) };
}

function fitOf(trials: readonly TrialBend[]): RamDepthFit {
  const fit = fitRamDepth(trials, MILD);
  if (!fit.ok) throw new Error(fit.message);
  return fit.value;
}

/** Noise of 0.3° as a list of normal deviates, drawn once. */
const NOISE = [0.21, -0.35, 0.08, 0.41, -0.12, -0.28, 0.33, -0.05, 0.17, -0.44, 0.26, -0.19];
const noisy = (trials: readonly TrialBend[]) =>
  trials.map((trial, index) => ({ ...trial, insideAngle: trial.insideAngle + (NOISE[index] ?? 0) }));

describe('bends without noise', () => {
  it('give datum and springback back, and every angle to 0.01°', () => {
    const fit = fitOf([75, 90, 105, 135].map((angle) => trialOf(angle)));
    expect(fit.datumMm).toBeCloseTo(137.42, 5);
    expect(fit.springback).toBeCloseTo(2, 4);
    for (const angle of [70, 80, 88, 92, 100, 120, 140]) {
      const depth = findDepth(fit, SETUP, angle);
      const reading = readingOf(SETUP, angle, 137.42, 2);
      expect(depth.ok && depth.value.depthMm).toBeCloseTo(reading, 5);
      const back = findAngle(fit, SETUP, reading);
      expect(Math.abs((back.ok ? back.value.insideAngle : NaN) - angle)).toBeLessThan(0.01);
    }
  });

  it('that do not agree with each other give no answer, instead of one with a band of everything', () => {
    const jumbled = [75, 90, 105, 135].map((angle) => trialOf(angle));
    const fit = fitOf(
      jumbled.map((trial, index) => ({
        ...trial,
        insideAngle: trial.insideAngle + ([14, -12, 15, -9][index] ?? 0),
      })),
    );
    expect(findDepth(fit, SETUP, 90)).toMatchObject({ ok: false, code: 'too_uncertain' });
    expect(findAngle(fit, SETUP, jumbled[1]?.depthMm ?? 0)).toMatchObject({
      ok: false,
      code: 'too_uncertain',
    });
  });

  it('of a perfectly plastic sheet give no springback', () => {
    const trials = [80, 95, 110, 130].map((angle) => trialOf(angle, SETUP, -3.1, 0));
    const fit = fitOf(trials);
    expect(Math.abs(fit.springback)).toBeLessThan(0.01);
    expect(fit.rmsAngle).toBeLessThan(1e-6);
    expect(fit.looAngle).toBeLessThan(1e-4);
  });

  it('are the check value: 5.400752 mm of travel to 92° loaded', () => {
    const fit = fitOf([70, 85, 100, 120].map((angle) => trialOf(angle, SETUP, 0, 2)));
    const depth = findDepth(fit, SETUP, 90);
    expect(depth.ok && depth.value.depthMm + SETUP.thicknessMm).toBeCloseTo(5.400752, 4);
  });
});

describe('four bends with 0.3° of noise', () => {
  const trials = noisy([78, 90, 104, 125].map((angle) => trialOf(angle)));
  const fit = fitOf(trials);

  it('are matched within 0.2° by a search over datum and springback that shares no code with the fit', () => {
    const best = searchTerms(trials);
    const depth = findDepth(fit, SETUP, 90);
    const slope = punchTravelMm(toAirBend(SETUP, MILD), 93) - punchTravelMm(toAirBend(SETUP, MILD), 92);
    const searched = readingOf(SETUP, 90, best.datumMm, best.springback);
    expect(Math.abs((depth.ok ? depth.value.depthMm : NaN) - searched) / slope).toBeLessThan(0.02);
    expect(fit.rmsAngle).toBeCloseTo(best.rms, 5);
  });

  it('have a band that holds the depth', () => {
    const depth = findDepth(fit, SETUP, 90);
    if (!depth.ok) throw new Error(depth.message);
    expect(depth.value.lowMm).toBeLessThan(readingOf(SETUP, 90, 137.42, 2));
    expect(depth.value.highMm).toBeGreaterThan(readingOf(SETUP, 90, 137.42, 2));
    expect(depth.value.isGuess).toBe(false);
  });
});

/** Inside angle at a reading by bisection on the closed form. */
function angleBySearch(trial: TrialBend, datumMm: number, springback: number): number {
  let [sharp, flat] = [1, 200];
  for (let step = 0; step < 60; step += 1) {
    const middle = (sharp + flat) / 2;
    if (readingOf(trial, middle, datumMm, springback) > trial.depthMm) sharp = middle;
    else flat = middle;
  }
  return (sharp + flat) / 2;
}

/** Least squares of the angle errors by a grid on springback that closes in, and a golden section on the datum. */
function searchTerms(trials: readonly TrialBend[]): { datumMm: number; springback: number; rms: number } {
  const rmsOf = (datumMm: number, springback: number) =>
    Math.sqrt(
      trials.reduce(
        (sum, trial) => sum + (trial.insideAngle - angleBySearch(trial, datumMm, springback)) ** 2,
        0,
      ) / trials.length,
    );
  const bestDatum = (springback: number) => {
    let [low, high] = [135, 140];
    for (let step = 0; step < 60; step += 1) {
      const [left, right] = [high - (high - low) * 0.618034, low + (high - low) * 0.618034];
      if (rmsOf(left, springback) < rmsOf(right, springback)) high = right;
      else low = left;
    }
    return (low + high) / 2;
  };
  let [centre, width] = [2, 16];
  for (let round = 0; round < 12; round += 1) {
    const candidates = [-1, -0.5, 0, 0.5, 1].map((share) => centre + share * width);
    const scored = candidates.map((springback) => ({
      springback,
      rms: rmsOf(bestDatum(springback), springback),
    }));
    centre = scored.reduce((best, one) => (one.rms < best.rms ? one : best)).springback;
    width *= 0.6;
  }
  const datumMm = bestDatum(centre);
  return { datumMm, springback: centre, rms: rmsOf(datumMm, centre) };
}

describe('twelve noisy bends on three thicknesses', () => {
  const setups = [1.5, 2, 2.5].map((thicknessMm) => ({ ...SETUP, thicknessMm }));
  const trials = noisy(setups.flatMap((setup) => [75, 90, 110, 130].map((angle) => trialOf(angle, setup))));
  const fit = fitOf(trials);

  it('have the leave-one-out error of refits by Gauss-Newton with slopes from small differences', () => {
    const errors = trials.map((trial, index) => {
      const terms = gaussNewton(trials.filter((_, at) => at !== index));
      return trial.insideAngle - (180 - turnOf(trial, terms));
    });
    const loo = Math.sqrt(errors.reduce((sum, error) => sum + error ** 2, 0) / errors.length);
    expect(fit.looAngle).toBeCloseTo(loo, 6);
    expect(fit.looAngle).toBeGreaterThan(fit.rmsAngle);
  });

  it('find a bend that was measured wrong, and only that one', () => {
    const wrong = trials.map((trial, index) =>
      index === 5 ? { ...trial, insideAngle: trial.insideAngle + 4 } : trial,
    );
    expect(fitOf(wrong).bends.map(({ isOutlier }) => isOutlier)).toEqual(
      trials.map((_, index) => index === 5),
    );
    expect(fit.bends.some(({ isOutlier }) => isOutlier)).toBe(false);
  });

  it('answer a sheet between them as a guess with a wider band', () => {
    const tried = findDepth(fit, SETUP, 90);
    const between = findDepth(fit, { ...SETUP, thicknessMm: 1.8 }, 90);
    if (!tried.ok || !between.ok) throw new Error('both are near');
    expect([tried.value.isGuess, between.value.isGuess]).toEqual([false, true]);
    expect(between.value.bandAngle).toBeGreaterThan(2 * tried.value.bandAngle);
    const truth = readingOf({ ...SETUP, thicknessMm: 1.8 }, 90, 137.42, 2);
    expect(between.value.lowMm).toBeLessThan(truth);
    expect(between.value.highMm).toBeGreaterThan(truth);
  });

  it('refuse a sheet or an opening far from them', () => {
    expect(findDepth(fit, { ...SETUP, thicknessMm: 5 }, 90)).toMatchObject({ code: 'too_far_from_trials' });
    expect(findDepth(fit, { ...SETUP, openingMm: 40 }, 90)).toMatchObject({ code: 'too_far_from_trials' });
  });
});

function turnOf(trial: TrialBend, [datumMm = 0, springback = 0]: readonly number[]): number {
  return finishedTurn(toAirBend(trial, MILD), { datumMm, springback }, trial.depthMm);
}

function gaussNewton(trials: readonly TrialBend[]): number[] {
  let terms = [137, 1];
  for (let step = 0; step < 60; step += 1) {
    const rows = trials.map((trial) =>
      terms.map((_, at) => {
        const moved = (by: number) => terms.map((value, index) => (index === at ? value + by : value));
        return (turnOf(trial, moved(1e-5)) - turnOf(trial, moved(-1e-5))) / 2e-5;
      }),
    );
    const left = trials.map((trial) => 180 - trial.insideAngle - turnOf(trial, terms));
    const move = fitLinear(rows, left)?.coefficients ?? [];
    terms = terms.map((value, index) => value + (move[index] ?? NaN));
  }
  return terms;
}

describe('what cannot be answered', () => {
  const fit = fitOf([80, 90, 110, 120].map((angle) => trialOf(angle)));

  it('is a fit of fewer than three bends, and it says how many are missing', () => {
    expect(fitRamDepth([trialOf(80), trialOf(90)], MILD)).toMatchObject({
      code: 'too_few_bends',
      message: expect.stringMatching(/2 of the 3 .* Bend 1 more/),
    });
    expect(fitRamDepth([], MILD)).toMatchObject({ message: expect.stringContaining('Bend 3 more') });
  });

  it('is a fit of bends at nearly one angle', () => {
    expect(
      fitRamDepth(
        [90, 91, 92].map((angle) => trialOf(angle)),
        MILD,
      ),
    ).toMatchObject({ code: 'bends_too_alike' });
  });

  it.each([69, 131])('is %d°, more than 10° beyond what was measured', (angle) => {
    expect(findDepth(fit, SETUP, angle)).toMatchObject({
      code: 'beyond_trials',
      message: expect.stringContaining('given from 70 to 130 and not'),
    });
  });

  it('is a reading whose angle lies beyond', () => {
    expect(findAngle(fit, SETUP, readingOf(SETUP, 140, 137.42, 2))).toMatchObject({ code: 'beyond_trials' });
    expect(findAngle(fit, SETUP, NaN)).toMatchObject({ code: 'out_of_range' });
  });

  it.each([
    [{ thicknessMm: 16 }, /Bend 2: .*as thick as the die opening/],
    [{ insideAngle: NaN }, /Bend 2: angle is outside .* such as 90/],
    [{ depthMm: Infinity }, /Bend 2: depth is outside/],
    [{ thicknessMm: 6, insideAngle: 40 }, /Bend 2: .*leaves the shoulder at/],
  ])('is a fit with %j in one bend', (wrong, message) => {
    const trials = [trialOf(80), { ...trialOf(90), ...wrong }, trialOf(120)];
    expect(fitRamDepth(trials, MILD)).toMatchObject({ ok: false, message: expect.stringMatching(message) });
  });

  it('is an angle that the springback takes beyond the reach of the die', () => {
    const wide: BendSetup = { ...SETUP, thicknessMm: 3.2, punchRadiusMm: 4 };
    const reachable = fitOf([65, 80, 100].map((angle) => trialOf(angle, wide)));
    expect(findDepth(reachable, wide, 58)).toMatchObject({ code: 'angle_out_of_reach' });
  });
});

it('three bends already give a curve with a band', () => {
  const fit = fitOf(noisy([80, 100, 120].map((angle) => trialOf(angle))));
  const depth = findDepth(fit, SETUP, 100);
  expect(depth).toMatchObject({ ok: true });
  expect(depth.ok && depth.value.bandAngle).toBeGreaterThan(fit.sdAngle);
});

it('says when bends hardly tell springback and datum apart, and when openings share one datum', () => {
  const near = fitOf(noisy([85, 90, 95, 100].map((angle) => trialOf(angle))));
  expect(near.notes).toEqual([expect.stringContaining('hardly tell springback and datum apart')]);
  const openings = fitOf(
    [16, 20].flatMap((openingMm) => [80, 130].map((angle) => trialOf(angle, { ...SETUP, openingMm }))),
  );
  expect(openings.notes).toEqual([expect.stringContaining('share one datum')]);
});

it('one bend over the full length moves the datum, and nothing else', () => {
  const fit = fitOf([75, 90, 105, 135].map((angle) => trialOf(angle)));
  const full = { ...trialOf(92), depthMm: trialOf(92).depthMm + 0.35 };
  const corrected = correctDatum(fit, full);
  expect(corrected.datumMm - fit.datumMm).toBeCloseTo(0.35, 5);
  expect(corrected.springback).toBe(fit.springback);
  const back = findAngle(corrected, SETUP, full.depthMm);
  expect(back.ok && back.value.insideAngle).toBeCloseTo(92, 6);
});

it('a card holds every sheet and angle, refusals among them', () => {
  const fit = fitOf([75, 90, 105, 135].map((angle) => trialOf(angle)));
  const card = computeDepthCard(fit, [SETUP, { ...SETUP, thicknessMm: 2.5 }], [90, 120, 160]);
  expect(card.map(({ answer }) => answer.ok)).toEqual([true, true, false, true, true, false]);
});
