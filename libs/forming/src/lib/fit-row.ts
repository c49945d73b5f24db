import { type BendForce, checkForceInput, computeBendForce } from './bend-force';
import { insideRadiusMm, preferredOpeningRatios, shortestFlangeMm } from './die-choice';
import { checkFigure, type FormingIssue } from './forming-issue';

/** One opening of a die that the shop owns; null where it is not known. */
export interface OwnedOpening {
  code: string;
  openingMm: number;
  dieAngle: number | null;
  lengthMm: number | null;
  ratedKnPerM: number | null;
}

/** A punch that the shop owns. */
export interface OwnedPunch {
  noseRadiusMm: number;
  angle: number | null;
  ratedKnPerM: number | null;
}

/** A press; null where it is not known. */
export interface Press {
  ratedKn: number | null;
  bedLengthMm: number | null;
}

/** What is to be bent, and on what. */
export interface FitInput {
  tensileMpa: number;
  radiusPerOpening: number;
  thicknessMm: number;
  lengthMm: number;
  insideAngle: number;
  /** Shortest outside flange of the part; null to leave it out. */
  flangeMm: number | null;
  press: Press;
  punch: OwnedPunch | null;
  openings: readonly OwnedOpening[];
  /** Share of the rating that the shop keeps below, such as 0.8. */
  lineShare: number;
}

/** Why an opening will not do, from the gravest to the mildest. */
export const OBJECTIONS = [
  'thickness_over_opening',
  'over_rating',
  'too_long',
  'angle_too_sharp',
  'flange_too_short',
  'over_line',
  'no_rating',
  'opening_narrow',
  'opening_wide',
] as const;

/** A reason against an opening. */
export type Objection = (typeof OBJECTIONS)[number];

/** How an opening does: `fits`, `with-care` (usual ratio left, or no rating known), or `no`. */
export type FitVerdict = 'fits' | 'with-care' | 'no';

/** One opening, judged. */
export interface FitRow {
  opening: OwnedOpening;
  openingOverThickness: number;
  /** Null where the sheet is as thick as the opening. */
  force: BendForce | null;
  /** The lowest rating that is known over this length, and whose it is. */
  rating: { ratedKn: number; of: 'press' | 'punch' | 'die' } | null;
  /** Higher force ÷ rating. */
  share: number | null;
  insideRadiusMm: number;
  shortestFlangeMm: number;
  verdict: FitVerdict;
  objections: { code: Objection; words: string }[];
}

const CARE: readonly Objection[] = ['no_rating', 'opening_narrow', 'opening_wide'];
const RATIO_NARROW = 6;
const RATIO_WIDE = 12;

/** Checks what a fit is asked for; the openings are judged row by row, not refused. */
export function checkFitInput(input: FitInput): FormingIssue[] {
  return [
    ...checkFigure('tensile', input.tensileMpa, 'tensileMpa'),
    ...checkFigure('thickness', input.thicknessMm, 'thicknessMm'),
    ...checkFigure('length', input.lengthMm, 'lengthMm'),
    ...checkFigure('angle', input.insideAngle, 'insideAngle'),
    ...checkFigure('line', input.lineShare, 'share'),
    ...(input.flangeMm === null ? [] : checkFigure('flange', input.flangeMm, 'flangeMm')),
    ...(input.press.ratedKn === null ? [] : checkFigure('rating', input.press.ratedKn, 'ratingKn')),
    ...input.openings.flatMap((opening) => checkFigure('opening', opening.openingMm, 'openingMm')),
  ];
}

/** Judges one opening. Rules in words: `FORMING_RULES.forceBand`, `.insideRadius`, `.shortestFlange`. */
export function toFitRow(input: FitInput, opening: OwnedOpening): FitRow {
  const forceInput = { ...input, openingMm: opening.openingMm };
  const force = checkForceInput(forceInput).length === 0 ? computeBendForce(forceInput) : null;
  const rating = findLowestRating(input, opening);
  const plain = {
    opening,
    openingOverThickness: opening.openingMm / input.thicknessMm,
    force,
    rating,
    share: force && rating && force.highKn / rating.ratedKn,
    insideRadiusMm: insideRadiusMm(input.radiusPerOpening, opening.openingMm, input.punch?.noseRadiusMm),
    shortestFlangeMm: shortestFlangeMm(opening.openingMm, input.insideAngle),
  };
  const objections = listObjections(input, plain);
  return { ...plain, objections, verdict: toVerdict(objections.map(({ code }) => code)) };
}

/** The lowest of the ratings that are known, over the length of the bend. */
export function findLowestRating(input: FitInput, opening: OwnedOpening): FitRow['rating'] {
  const lengthM = input.lengthMm / 1000;
  const perLength = (knPerM: number | null | undefined) => (knPerM ? knPerM * lengthM : null);
  const ratings = [
    { of: 'press' as const, ratedKn: input.press.ratedKn },
    { of: 'die' as const, ratedKn: perLength(opening.ratedKnPerM) },
    { of: 'punch' as const, ratedKn: perLength(input.punch?.ratedKnPerM) },
  ].flatMap(({ of, ratedKn }) => (ratedKn === null ? [] : [{ of, ratedKn }]));
  return ratings.sort((a, b) => a.ratedKn - b.ratedKn)[0] ?? null;
}

function toVerdict(codes: readonly Objection[]): FitVerdict {
  if (codes.length === 0) return 'fits';
  return codes.every((code) => CARE.includes(code)) ? 'with-care' : 'no';
}

type PlainRow = Omit<FitRow, 'objections' | 'verdict'>;

function listObjections(input: FitInput, row: PlainRow): FitRow['objections'] {
  const words = new Map<Objection, string | null>([
    ...forceObjections(input, row),
    ...toolObjections(input, row),
    ...ratioObjections(input, row),
  ]);
  return OBJECTIONS.flatMap((code) => {
    const text = words.get(code);
    return text ? [{ code, words: text }] : [];
  });
}

function forceObjections(
  { lineShare }: FitInput,
  { force, rating, share }: PlainRow,
): [Objection, string | null][] {
  const line = percent(lineShare);
  const used = share === null ? '' : `Takes ${percent(share)} of the rating of the ${rating?.of}`;
  return [
    ['thickness_over_opening', force ? null : 'The sheet is as thick as the opening, or thicker.'],
    ['over_rating', share !== null && share > 1 ? `${used}.` : null],
    [
      'over_line',
      share !== null && share > lineShare && share <= 1 ? `${used}, above the shop's ${line}.` : null,
    ],
    [
      'no_rating',
      rating ? null : 'No rating of press, punch or die is known, so the force is compared with nothing.',
    ],
  ];
}

function toolObjections(input: FitInput, row: PlainRow): [Objection, string | null][] {
  const room = Math.min(input.press.bedLengthMm ?? Infinity, row.opening.lengthMm ?? Infinity);
  const sharpest = Math.max(row.opening.dieAngle ?? 0, input.punch?.angle ?? 0);
  const isShort = input.flangeMm !== null && input.flangeMm < row.shortestFlangeMm;
  return [
    ['too_long', input.lengthMm > room ? 'The bend is longer than the bed or the die.' : null],
    [
      'angle_too_sharp',
      input.insideAngle <= sharpest ? `Die and punch only air bend to angles above ${sharpest}°.` : null,
    ],
    ['flange_too_short', isShort ? 'The shortest flange would slip into the opening.' : null],
  ];
}

function ratioObjections(
  { thicknessMm }: FitInput,
  { openingOverThickness }: PlainRow,
): [Objection, string | null][] {
  const { from, to } = preferredOpeningRatios(thicknessMm);
  const usual = `usual here is ${from} to ${to}`;
  const ratio = openingOverThickness.toFixed(1);
  return [
    [
      'opening_narrow',
      openingOverThickness < RATIO_NARROW ? `Narrow: ${ratio} thicknesses, ${usual}.` : null,
    ],
    ['opening_wide', openingOverThickness > RATIO_WIDE ? `Wide: ${ratio} thicknesses, ${usual}.` : null],
  ];
}

function percent(share: number): string {
  return `${Math.round(share * 100)} %`;
}
