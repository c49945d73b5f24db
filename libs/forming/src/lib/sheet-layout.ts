import { assertNoIssues, checkFigure, type FormingIssue } from './forming-issue';

/** A sheet and the blank to be cut from it. Lengths in mm. */
export interface LayoutInput {
  sheetWidthMm: number;
  /** The sheet's grain runs along its length. */
  sheetLengthMm: number;
  /** Flat length of the blank, across its bends. */
  flatMm: number;
  /** Width of the blank, along its bends. */
  widthMm: number;
  /** Room between two pieces; nought for a shear. */
  gapMm: number;
  /** Rim of the sheet that is not used, on each side. */
  trimMm: number;
}

/** How the bends lie to the sheet's grain. */
export type GrainDirection = 'bends-along-grain' | 'bends-across-grain';

/** Pieces in rows and columns, all lying the same way. */
export interface SheetLayout {
  grain: GrainDirection;
  acrossSheet: number;
  alongSheet: number;
  pieces: number;
  /** Share of the sheet that becomes pieces, 0 to 1. */
  yield: number;
  /** The two strips left whole: full length beside the pieces, and behind them over their width. */
  offcuts: { widthMm: number; lengthMm: number }[];
}

/** Room for the rounding of sums, in mm: 12 pieces of 4 in fit on 48 in. */
const FIT_TOLERANCE_MM = 1e-6;

/** Checks a layout. */
export function checkLayoutInput(input: LayoutInput): FormingIssue[] {
  return [
    ...checkFigure('sheet', input.sheetWidthMm, 'flangeMm'),
    ...checkFigure('sheet', input.sheetLengthMm, 'flangeMm'),
    ...checkFigure('flat', input.flatMm, 'flangeMm'),
    ...checkFigure('width', input.widthMm, 'flangeMm'),
    ...checkFigure('gap', input.gapMm, 'radiusMm'),
    ...checkFigure('trim', input.trimMm, 'radiusMm'),
  ];
}

/**
 * Lays pieces out both ways; the one with more pieces first, bends across the grain before along it when they tie, as
 * a bend across the grain cracks less.
 * @throws RangeError for what `checkLayoutInput` refuses
 */
export function computeLayouts(input: LayoutInput): SheetLayout[] {
  assertNoIssues(checkLayoutInput(input));
  const across = layOut(input, 'bends-across-grain', input.widthMm, input.flatMm);
  const along = layOut(input, 'bends-along-grain', input.flatMm, input.widthMm);
  return [across, along].sort((a, b) => b.pieces - a.pieces);
}

/** `acrossMm` and `alongMm`: size of the piece across and along the sheet. */
function layOut(input: LayoutInput, grain: GrainDirection, acrossMm: number, alongMm: number): SheetLayout {
  const usableWidthMm = input.sheetWidthMm - 2 * input.trimMm;
  const usableLengthMm = input.sheetLengthMm - 2 * input.trimMm;
  const acrossSheet = countPieces(usableWidthMm, acrossMm, input.gapMm);
  const alongSheet = countPieces(usableLengthMm, alongMm, input.gapMm);
  const pieces = acrossSheet * alongSheet;
  const usedMm =
    pieces === 0 ? [0, 0] : [acrossSheet * (acrossMm + input.gapMm), alongSheet * (alongMm + input.gapMm)];
  const [usedWidthMm = 0, usedLengthMm = 0] = usedMm;
  return {
    grain,
    acrossSheet: pieces === 0 ? 0 : acrossSheet,
    alongSheet: pieces === 0 ? 0 : alongSheet,
    pieces,
    yield: (pieces * acrossMm * alongMm) / (input.sheetWidthMm * input.sheetLengthMm),
    offcuts: [
      { widthMm: usableWidthMm - usedWidthMm, lengthMm: usableLengthMm },
      { widthMm: Math.min(usedWidthMm, usableWidthMm), lengthMm: usableLengthMm - usedLengthMm },
    ].filter((offcut) => offcut.widthMm > FIT_TOLERANCE_MM && offcut.lengthMm > FIT_TOLERANCE_MM),
  };
}

function countPieces(roomMm: number, sizeMm: number, gapMm: number): number {
  return Math.max(0, Math.floor((roomMm + gapMm + FIT_TOLERANCE_MM) / (sizeMm + gapMm)));
}
