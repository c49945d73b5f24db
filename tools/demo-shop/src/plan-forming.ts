import { computeBendForce, findMaterial, punchTravelMm } from '@brakeven/forming';
import {
  addDays,
  D,
  forcePerLengthText,
  type LocalDate,
  lengthText,
  toForce,
  toForcePerLength,
  toLength,
} from '@brakeven/values';
import { type SetupData } from '@brakeven/workbook';
import { DEPTH_STORY, DIES, KIND_BENDS, PUNCHES, SHOULDER_PER_OPENING, TRIAL_SERIES } from './forming-story';
import { type PlannedEntry } from './plan-weeks';
import { createRandom, type Random } from './random';
import { MACHINES, PRESS_WEEK } from './story';

const SEED = 20260412;

/** A press run as it is to be logged; tools by name. */
export interface PlannedRun {
  runOn: LocalDate;
  job: string;
  machine: string;
  punch: string;
  openingMm: string;
  materialCode: string;
  thicknessMm: string;
  bendLengthMm: string;
  strokes: number;
  pieces: number;
  highestForceKn: string | null;
  isGood: boolean;
  note: string | null;
  loggedBy: string;
}

export interface PlannedTrial {
  bentOn: LocalDate;
  bentBy: string;
  openingMm: string;
  materialCode: string;
  thicknessMm: string;
  stripWidthMm: string | null;
  depthMm: string;
  measuredAngle: string;
  isFullLength: boolean;
}

/** Punches and dies, as the set-up workbook states them. */
export function buildTools(): Pick<SetupData, 'punches' | 'dies'> {
  return {
    punches: PUNCHES.map(({ machine, punch, noseIn, angle, lengthIn: inches, tonsPerFoot }) => ({
      ...{ machine, punch, angle, noseRadiusMm: toMm(noseIn), lengthMm: toMm(inches) },
      forceLimitKnPerM: toLimit(tonsPerFoot),
    })),
    dies: DIES.flatMap(({ machine, die, openingsIn, angle, lengthIn: inches, tonsPerFoot }) =>
      openingsIn.map((openingIn) => ({
        ...{ machine, die, angle, openingMm: toMm(openingIn), lengthMm: toMm(inches) },
        shoulderRadiusMm: toMm(D(openingIn).times(SHOULDER_PER_OPENING).toFixed()),
        forceLimitKnPerM: toLimit(tonsPerFoot),
      })),
    ),
  };
}

/** One run for each job and press, on the last day on which that press formed it; what it cannot bend was not run. */
export function planRuns(firstMonday: LocalDate, weeks: readonly (readonly PlannedEntry[])[]): PlannedRun[] {
  const random = createRandom(SEED);
  const formed = new Map<string, { entry: PlannedEntry; runOn: LocalDate; pieces: number }>();
  for (const [week, entries] of weeks.entries()) {
    for (const entry of entries.filter(({ operation }) => operation === 'FORM')) {
      const key = `${entry.job.number}|${entry.machine ?? 'P2'}`;
      const pieces = (formed.get(key)?.pieces ?? 0) + (entry.good ?? 0);
      formed.set(key, { entry, runOn: addDays(firstMonday, 7 * week + entry.day), pieces });
    }
  }
  return [...formed.values()]
    .sort((a, b) => a.runOn.localeCompare(b.runOn))
    .flatMap((last) => toRun(last, random) ?? []);
}

function toRun(
  { entry, runOn, pieces }: { entry: PlannedEntry; runOn: LocalDate; pieces: number },
  random: Random,
): PlannedRun | null {
  const bends = KIND_BENDS[entry.job.title];
  const machine = entry.machine ?? 'P2';
  const ratedTons = MACHINES.find(({ code }) => code === machine)?.ratedForceTons ?? 0;
  const ratingKn = toForce(ratedTons, 'US ton').toNumber();
  if (!bends || pieces === 0) return null;
  const run = {
    materialCode: bends.materialCode,
    thicknessMm: toMm(bends.thicknessIn),
    bendLengthMm: toMm(bends.bendIn),
    openingMm: toMm(bends.openingIn),
  };
  const highKn = computeBendForce({
    tensileMpa: findMaterial(run.materialCode)?.tensileUsed.toNumber() ?? NaN,
    thicknessMm: Number(run.thicknessMm),
    lengthMm: Number(run.bendLengthMm),
    openingMm: Number(run.openingMm),
  }).highKn;
  const shown = random.chance(0.6) ? highKn * random.between(0.84, 1.01) : null;
  // Only plate needs the wide opening, which the old press does not have.
  if (machine === 'P1' && (bends.punch === 'Heavy straight' || highKn > ratingKn)) return null;
  const isGood = !entry.job.isBadLot;
  return {
    ...run,
    runOn,
    job: entry.job.number,
    machine,
    punch: machine === 'P1' ? 'Old straight' : bends.punch,
    strokes: pieces * bends.bendsPerPiece,
    pieces,
    highestForceKn: shown === null ? null : shown.toFixed(1),
    isGood,
    note: isGood ? null : 'Cracks on the bend, new sheet lot',
    loggedBy: entry.employee.name,
  };
}

/** Trial bends made in the weeks after the press came. */
export function planTrials(firstMonday: LocalDate): PlannedTrial[] {
  const random = createRandom(SEED + 1);
  return TRIAL_SERIES.flatMap((series, index) => {
    const { materialCode, thicknessIn, openingIn, angles, stripIn, fullLengthAngle } = series;
    const shared = {
      ...{ materialCode, thicknessMm: toMm(thicknessIn), openingMm: toMm(openingIn) },
      ...{ bentOn: addDays(firstMonday, 7 * (PRESS_WEEK + 1 + index) + 2), bentBy: 'Tobias Renn' },
    };
    const toTrial = (angle: number, extraMm: number) => ({
      depthMm: (depthMm(series, angle) + extraMm).toFixed(2),
      measuredAngle: (angle + random.between(-0.25, 0.25)).toFixed(1),
    });
    const strips = angles.map((angle) => ({
      ...{ ...shared, ...toTrial(angle, 0) },
      ...{ stripWidthMm: toMm(stripIn), isFullLength: false },
    }));
    if (fullLengthAngle === null) return strips;
    // The bed gives way a little over the full length, so that the reading is deeper.
    const long = { ...shared, ...toTrial(fullLengthAngle, 0.28), stripWidthMm: null, isFullLength: true };
    return [...strips, long];
  });
}

function depthMm(
  { materialCode, thicknessIn, openingIn }: (typeof TRIAL_SERIES)[number],
  angle: number,
): number {
  const openingMm = Number(toMm(openingIn));
  const thicknessMm = Number(toMm(thicknessIn));
  const bend = {
    ...{ openingMm, thicknessMm, shoulderRadiusMm: openingMm * SHOULDER_PER_OPENING },
    insideRadiusMm: openingMm * (findMaterial(materialCode)?.radiusPerOpening ?? NaN),
  };
  const { datumMm, springback } = DEPTH_STORY;
  return datumMm + punchTravelMm(bend, 180 - angle + springback) - thicknessMm;
}

const toMm = (inches: string): string => D(lengthText(toLength(inches, 'in'))).toFixed();
const toLimit = (tonsPerFoot: string): string =>
  D(forcePerLengthText(toForcePerLength(tonsPerFoot, 'US ton/ft'))).toFixed();
