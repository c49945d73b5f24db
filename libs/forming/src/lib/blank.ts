import {
  bendAllowance,
  bendDeduction,
  type BendShape,
  type FlangeConvention,
  flangeConvention,
} from './bend-allowance';
import { assertNoIssues, checkFigure, type FormingIssue } from './forming-issue';

/** A part bent from one strip: flanges in order, outside, with a bend between each two. Lengths in mm. */
export interface BlankInput {
  flangesMm: readonly number[];
  /** Inside angles of the finished part in degrees, one fewer than the flanges. */
  insideAngles: readonly number[];
  thicknessMm: number;
  /** Inside radius of every bend. */
  radiusMm: number;
  k: number;
}

/** One bend of a blank. */
export interface BlankBend {
  insideAngle: number;
  turned: number;
  convention: FlangeConvention;
  allowanceMm: number;
  deductionMm: number;
  /** Back gauge with the flange before this bend against the stop; `FORMING_RULES.backGauge`. */
  gaugeMm: number;
  /** Back gauge with the flange after this bend against the stop, for a part that is turned round. */
  gaugeTurnedRoundMm: number;
  /** Middle of the bend, from the first edge of the flat blank. */
  bendLineMm: number;
}

/** A blank: its flat length, and what each bend takes. */
export interface Blank {
  flatMm: number;
  bends: BlankBend[];
}

/** The most bends of one part. */
export const BENDS_MAX = 50;

/** Checks a part: figures in range, an angle for each bend, and flanges longer than their bends are. */
export function checkBlankInput(input: BlankInput): FormingIssue[] {
  const { flangesMm, insideAngles } = input;
  const figures = [
    ...checkCounts(flangesMm.length, insideAngles.length),
    ...flangesMm.flatMap((flange, index) =>
      checkFigure('flanges', flange, 'flangeMm', `Flange ${index + 1}`),
    ),
    ...insideAngles.flatMap((angle, index) =>
      checkFigure('angles', angle, 'insideAngle', `Angle ${index + 1}`),
    ),
    ...checkFigure('thickness', input.thicknessMm, 'thicknessMm'),
    ...checkFigure('radius', input.radiusMm, 'radiusMm'),
    ...checkFigure('k', input.k, 'kFactor'),
  ];
  return figures.length > 0 ? figures : checkFlatFlanges(input);
}

function checkCounts(flangeCount: number, angleCount: number): FormingIssue[] {
  if (flangeCount >= 2 && flangeCount === angleCount + 1 && angleCount <= BENDS_MAX) return [];
  const message = `${flangeCount} flanges and ${angleCount} angles do not go together: give 2 to ${BENDS_MAX + 1} flanges and one angle fewer, such as flanges 40,60,40 and angles 90,90.`;
  return [{ field: 'angles', code: 'counts_differ', message }];
}

/** Each flange must leave something flat beside its bends' tangents. */
function checkFlatFlanges(input: BlankInput): FormingIssue[] {
  const setbacks = toShapes(input).map(
    (shape) => (bendDeduction(shape, input.k) + bendAllowance(shape, input.k)) / 2,
  );
  return input.flangesMm.flatMap((flange, index) => {
    const taken = (setbacks[index - 1] ?? 0) + (setbacks[index] ?? 0);
    if (flange >= taken) return [];
    const message = `Flange ${index + 1} is shorter than its bends alone: radius and thickness already take ${taken.toFixed(2)} mm (${(taken / 25.4).toFixed(3)} in) of it. Give a longer flange or a smaller radius.`;
    return [{ field: 'flanges', code: 'flange_inside_bend', message }];
  });
}

/**
 * Computes a blank. Rules in words: `FORMING_RULES.bendAllowance`, `.bendDeduction`, `.acuteDeduction`, `.backGauge`.
 * @throws RangeError for what `checkBlankInput` refuses
 */
export function computeBlank(input: BlankInput): Blank {
  assertNoIssues(checkBlankInput(input));
  const bends: BlankBend[] = [];
  let lastLineMm = 0;
  for (const [index, shape] of toShapes(input).entries()) {
    const bend = toBlankBend(shape, input.k, input.flangesMm[index] ?? 0, input.flangesMm[index + 1] ?? 0);
    const lineMm = lastLineMm + bend.gaugeMm - (bends.at(-1)?.deductionMm ?? 0) / 2;
    bends.push({ ...bend, bendLineMm: lineMm });
    lastLineMm = lineMm;
  }
  const outsideMm = input.flangesMm.reduce((total, flange) => total + flange, 0);
  const flatMm = bends.reduce((left, bend) => left - bend.deductionMm, outsideMm);
  return { flatMm, bends };
}

function toShapes({ insideAngles, radiusMm, thicknessMm }: BlankInput): BendShape[] {
  return insideAngles.map((insideAngle) => ({ insideAngle, radius: radiusMm, thickness: thicknessMm }));
}

function toBlankBend(
  shape: BendShape,
  k: number,
  beforeMm: number,
  afterMm: number,
): Omit<BlankBend, 'bendLineMm'> {
  const deductionMm = bendDeduction(shape, k);
  return {
    insideAngle: shape.insideAngle,
    turned: 180 - shape.insideAngle,
    convention: flangeConvention(shape.insideAngle),
    allowanceMm: bendAllowance(shape, k),
    deductionMm,
    gaugeMm: beforeMm - deductionMm / 2,
    gaugeTurnedRoundMm: afterMm - deductionMm / 2,
  };
}

/** Mass in kg of a flat piece. */
export function pieceMassKg(
  flatMm: number,
  widthMm: number,
  thicknessMm: number,
  densityGPerCm3: number,
): number {
  return (flatMm * widthMm * thicknessMm * densityGPerCm3) / 1e6;
}
