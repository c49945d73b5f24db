import { accepted, type Parsed, refused } from '@brakeven/values';
import {
  type BendShape,
  findKByRadius,
  HANDBOOK_GROUPS,
  type HandbookGroup,
  handbookK,
  kOfTrialPiece,
  RADIUS_RATIO_MIN,
  type TrialPiece,
} from './bend-allowance';
import { checkFigure } from './forming-issue';
import { FORMING_RULES } from './rules';

/** How K is to be had. */
export type KSource =
  | { kind: 'given'; k: number }
  | { kind: 'radius' }
  | { kind: 'handbook'; group: HandbookGroup }
  | { kind: 'trials'; pieces: readonly TrialPiece[]; insideAngle: number };

/** K, and the choice in words. */
export interface KFactor {
  k: number;
  kind: KSource['kind'];
  words: string;
  /** Lowest and highest K of the trial pieces; null for the other sources. */
  spread: { min: number; max: number } | null;
}

/**
 * Finds K for a radius and a thickness (both in one unit). Codes: `out_of_range`, `radius_too_small_for_k`,
 * `no_trial_pieces`, `trial_piece_without_bend`, `trial_pieces_do_not_fit`.
 */
export function findKFactor(source: KSource, radius: number, thickness: number): Parsed<KFactor> {
  switch (source.kind) {
    case 'given':
      return readGiven(source.k);
    case 'radius':
      return readRadius(radius, thickness);
    case 'handbook':
      return accepted({
        k: handbookK(source.group),
        kind: 'handbook',
        words: `K of the handbook's lengths of metal in a bend for ${HANDBOOK_GROUPS[source.group].words}.`,
        spread: null,
      });
    case 'trials':
      return readTrials(source.pieces, { insideAngle: source.insideAngle, radius, thickness });
  }
}

function readGiven(k: number): Parsed<KFactor> {
  const [issue] = checkFigure('k', k, 'kFactor');
  if (issue) return refused(issue.code, issue.message);
  return accepted({ k, kind: 'given', words: FORMING_RULES.kGiven, spread: null });
}

function readRadius(radius: number, thickness: number): Parsed<KFactor> {
  const k = findKByRadius(radius, thickness);
  if (k !== undefined) return accepted({ k, kind: 'radius', words: FORMING_RULES.kByRadius, spread: null });
  const message = `The radius is below ${RADIUS_RATIO_MIN} thicknesses, where the published formula for K does not hold. Give K itself, such as 0.33, or the radius as it comes out of the die.`;
  return refused('radius_too_small_for_k', message);
}

function readTrials(pieces: readonly TrialPiece[], shape: BendShape): Parsed<KFactor> {
  if (pieces.length === 0) {
    return refused('no_trial_pieces', 'Give at least one trial piece: its blank and its measured flanges.');
  }
  if (pieces.some((piece) => piece.flanges.length < 2)) {
    return refused(
      'trial_piece_without_bend',
      'A trial piece has at least two flanges, such as 40 and 60 mm.',
    );
  }
  const ks = pieces.map((piece) => kOfTrialPiece(piece, shape));
  const [min, max] = [Math.min(...ks), Math.max(...ks)];
  const isPlausible = ks.every((k) => checkFigure('k', k, 'kFactor').length === 0);
  if (!isPlausible) {
    const message = `The trial pieces give K from ${min.toFixed(2)} to ${max.toFixed(2)}, which no sheet has (above 0, usually 0.3 to 0.5). Check blank and flanges (outside dimensions), radius and thickness.`;
    return refused('trial_pieces_do_not_fit', message);
  }
  const k = ks.reduce((total, value) => total + value, 0) / ks.length;
  return accepted({ k, kind: 'trials', words: FORMING_RULES.kFromTrials, spread: { min, max } });
}
