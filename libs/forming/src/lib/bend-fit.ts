import { checkForceInput, computeBendForce } from './bend-force';
import { preferredOpeningRatios } from './die-choice';
import {
  checkFitInput,
  findLowestRating,
  type FitInput,
  type FitRow,
  type OwnedOpening,
  toFitRow,
} from './fit-row';
import { assertNoIssues, RANGES } from './forming-issue';

/** The openings judged, and the one to take. */
export interface BendFit {
  rows: FitRow[];
  /** Code of the best opening; null if none will do. */
  best: string | null;
  reason: string;
}

/**
 * Judges every opening owned and picks the best: of those that fit (else of those that do with care) the one whose
 * opening ÷ thickness is in the usual range or nearest to it, the narrower one breaking ties, as it makes the tighter
 * radius and takes the shorter flange.
 * @throws RangeError for what `checkFitInput` refuses
 */
export function computeBendFit(input: FitInput): BendFit {
  assertNoIssues(checkFitInput(input));
  const rows = input.openings.map((opening) => toFitRow(input, opening));
  const fitting = rows.filter((row) => row.verdict === 'fits');
  const candidates = fitting.length > 0 ? fitting : rows.filter((row) => row.verdict === 'with-care');
  const usual = preferredOpeningRatios(input.thicknessMm);
  const [best] = [...candidates].sort(
    (a, b) => distanceTo(usual, a) - distanceTo(usual, b) || a.openingOverThickness - b.openingOverThickness,
  );
  return {
    rows,
    best: best?.opening.code ?? null,
    reason: best ? wordsFor(best, usual) : wordsForNone(rows),
  };
}

interface RatioRange {
  from: number;
  to: number;
}

/** Nought inside the range, else how far off, as a ratio, so that half and double count alike. */
function distanceTo({ from, to }: RatioRange, { openingOverThickness }: FitRow): number {
  return Math.max(0, Math.log(from / openingOverThickness), Math.log(openingOverThickness / to));
}

function wordsFor(row: FitRow, { from, to }: RatioRange): string {
  const share = row.share === null ? '' : `, at ${Math.round(row.share * 100)} % of the rating`;
  const care = row.objections.map((objection) => ` ${objection.words}`).join('');
  return `Opening ÷ thickness of ${row.openingOverThickness.toFixed(1)} is nearest to the usual ${from} to ${to}${share}.${care}`;
}

function wordsForNone(rows: readonly FitRow[]): string {
  if (rows.length === 0) return 'There are no openings to choose from. Enter the dies of this machine.';
  return 'None of the openings will do; each row says why.';
}

/** A limit found by turning the question round. */
export type FitLimit = { found: true; valueMm: number; words: string } | { found: false; words: string };

/** The longest bend in this sheet on an opening that stays under the shop's line, within bed and die. */
export function findLongestBend(input: FitInput, opening: OwnedOpening): FitLimit {
  assertNoIssues(checkFitInput(input));
  const isUnder = (lengthMm: number) => isUnderLine({ ...input, lengthMm }, opening);
  const room = Math.min(
    input.press.bedLengthMm ?? RANGES.lengthMm.max,
    opening.lengthMm ?? RANGES.lengthMm.max,
    RANGES.lengthMm.max,
  );
  if (isUnder(room)) {
    return { found: true, valueMm: room, words: 'As long as bed and die are; the force leaves room.' };
  }
  return bisect(isUnder, RANGES.lengthMm.min, room, 'The longest bend under the line.');
}

/** The thickest sheet of this length on an opening that stays under the shop's line, and 5 times thinner than it. */
export function findThickestSheet(input: FitInput, opening: OwnedOpening): FitLimit {
  assertNoIssues(checkFitInput(input));
  const isUnder = (thicknessMm: number) => isUnderLine({ ...input, thicknessMm }, opening);
  const thickest = Math.min(RANGES.thicknessMm.max, opening.openingMm / OPENING_RATIO_MIN);
  if (isUnder(thickest)) {
    return { found: true, valueMm: thickest, words: 'A fifth of the opening; the force would allow more.' };
  }
  return bisect(isUnder, RANGES.thicknessMm.min, thickest, 'The thickest sheet under the line.');
}

/** The narrowest opening, owned or not, on which this bend stays under the shop's line of the press. */
export function findOpeningNeeded(input: FitInput): FitLimit {
  assertNoIssues(checkFitInput(input));
  const isUnder = (openingMm: number) =>
    isUnderLine(input, { code: '', openingMm, dieAngle: null, lengthMm: null, ratedKnPerM: null });
  const narrowest = OPENING_RATIO_MIN * input.thicknessMm;
  if (isUnder(narrowest)) {
    return { found: true, valueMm: narrowest, words: 'Five thicknesses; the force would allow less.' };
  }
  if (!isUnder(RANGES.openingMm.max)) return NOTHING;
  return bisect(isUnder, RANGES.openingMm.max, narrowest, 'The narrowest opening under the line.');
}

/** Narrower than this many thicknesses is outside the stated range of the force rules. */
const OPENING_RATIO_MIN = 5;

const NOTHING: FitLimit = {
  found: false,
  words: 'Nothing stays under the line, or no rating of press, punch or die is known.',
};

function isUnderLine(input: FitInput, opening: OwnedOpening): boolean {
  const force = { ...input, openingMm: opening.openingMm };
  const rating = findLowestRating(input, opening);
  if (!rating || checkForceInput(force).length > 0) return false;
  return computeBendForce(force).highKn <= input.lineShare * rating.ratedKn;
}

/** Closes in on the last value that is allowed, from `allowed` towards `refused`. */
function bisect(
  isAllowed: (value: number) => boolean,
  allowed: number,
  refused: number,
  words: string,
): FitLimit {
  if (!isAllowed(allowed)) return NOTHING;
  let [inside, outside] = [allowed, refused];
  for (let step = 0; step < 60; step += 1) {
    const middle = (inside + outside) / 2;
    if (isAllowed(middle)) inside = middle;
    else outside = middle;
  }
  return { found: true, valueMm: inside, words };
}
