import {
  type Blank,
  type BlankInput,
  checkBlankInput,
  checkFigure,
  checkLayoutInput,
  computeBlank,
  computeLayouts,
  FORMING_CAUTIONS,
  FORMING_RULES,
  findKFactor,
  type FlangeConvention,
  type FormingMaterial,
  HANDBOOK_GROUPS,
  type HandbookGroup,
  type KFactor,
  type KSource,
  pieceMassKg,
} from '@brakeven/forming';
import { massIn, toMass } from '@brakeven/values';
import { FormingInput, type ResultUnit, round, splitList } from './forming-input';

/** What a blank is asked for, as typed. */
export interface BlankQuestion {
  /** Outside flanges in order, with commas between them. */
  flanges: string;
  /** Inside angles of the finished part, one fewer. */
  angles: string;
  thickness: string;
  /** Inside radius of the bends. */
  radius: string;
  k?: string;
  /** Where K comes from if it is not given: the radius (by default) or a group of the handbook. */
  kFrom?: string;
  /** Trial pieces, each 'blank: flange, flange'; K is then taken from them. */
  trial?: readonly string[];
  /** Inside angle of the trial pieces; 90 if left out. */
  trialAngle?: string;
  /** Length of the bends, for weight and pieces. */
  width?: string;
  /** For gauges and weight. */
  material?: string;
  /** Width × length of the sheet, the grain along its length: '48 in x 96 in'. */
  sheet?: string;
}

/** A blank, with what it came from. Lengths are in `unit`. */
export interface BlankEstimate {
  flat: number;
  deductions: number[];
  /** Back gauge of each bend in order, the flange before it against the stop. */
  gauge: number[];
  unit: ResultUnit;
  k: { value: number; source: string; words: string; spread: { min: number; max: number } | null };
  bends: {
    insideAngle: number;
    turned: number;
    allowance: number;
    deduction: number;
    convention: FlangeConvention;
    conventionWords: string;
    gauge: number;
    /** Back gauge when the flange after the bend lies against the stop. */
    gaugeTurnedRound: number;
    /** Middle of the bend on the flat blank, from its first edge. */
    bendLine: number;
  }[];
  weight: { value: number; unit: 'lb' | 'kg' } | null;
  layouts: {
    grain: string;
    acrossSheet: number;
    alongSheet: number;
    pieces: number;
    yield: number;
    offcuts: { width: number; length: number }[];
  }[];
  workings: { figure: string; rule: string }[];
  notes: string[];
  cautions: readonly string[];
}

const CONVENTION_RULES: Readonly<Record<FlangeConvention, string>> = {
  'virtual-sharp': FORMING_RULES.bendDeduction,
  'outside-tangent': FORMING_RULES.acuteDeduction,
};

/**
 * Computes a blank. Results are in the unit of the first length of the question that has one, in the order of its
 * properties; so are bare numbers.
 * @throws AppError `invalid_input` naming each field, with the accepted range and an example
 */
export function estimateBlank(question: BlankQuestion): BlankEstimate {
  const input = new FormingInput(listLengthTexts(question));
  const material = question.material === undefined ? null : input.material('material', question.material);
  const sheet = input.thickness('thickness', question.thickness, material);
  const shape = {
    flangesMm: splitList(question.flanges).map((text) => input.lengthMm('flanges', text)),
    insideAngles: splitList(question.angles).map((text) => input.angle('angles', text)),
    thicknessMm: sheet?.thickness.toNumber() ?? NaN,
    radiusMm: input.lengthMm('radius', question.radius),
  };
  const source = readKSource(input, question);
  input.addChecked(checkBlankInput({ ...shape, k: 0.4 }));
  input.refuseIssues();
  const kFactor = input.take('k', findKFactor(source, shape.radiusMm, shape.thicknessMm));
  input.refuseIssues();
  if (!kFactor) throw new Error('A question without K has been refused above.');
  const blankInput = { ...shape, k: kFactor.k };
  const blank = computeBlank(blankInput);
  return {
    ...toEstimate(input, blank, kFactor),
    ...toPieces(input, question, { blankInput, blank, material }),
    notes: sheet?.note ? [sheet.note] : [],
  };
}

function listLengthTexts(question: BlankQuestion): string[] {
  const {
    angles: _angles,
    k: _k,
    kFrom: _kFrom,
    trialAngle: _trialAngle,
    material: _material,
    ...lengths
  } = question;
  const texts = Object.values(lengths).filter((value) => value !== undefined);
  return texts.flatMap((value) => (typeof value === 'string' ? [value] : value)).flatMap(listLengths);
}

/** The lengths in a list, a sheet's size or a trial piece. */
function listLengths(text: string): string[] {
  return text.split(/[,:×]|\bx\b|(?<=[\d"a-z])\s*x\s*(?=\d)/i).map((part) => part.trim());
}

function readKSource(input: FormingInput, question: BlankQuestion): KSource {
  const { k, kFrom = 'radius', trial = [], trialAngle = '90' } = question;
  if (k !== undefined) return { kind: 'given', k: readK(input, k) };
  if (trial.length > 0) {
    const pieces = trial.map((text) => readTrialPiece(input, text));
    return { kind: 'trials', pieces, insideAngle: input.angle('trialAngle', trialAngle) };
  }
  if (kFrom in HANDBOOK_GROUPS) return { kind: 'handbook', group: kFrom as HandbookGroup };
  if (kFrom !== 'radius') {
    const message = `K comes from 'radius' or a handbook group: ${Object.keys(HANDBOOK_GROUPS).join(', ')}.`;
    input.add({ field: 'kFrom', code: 'unknown_source', message });
  }
  return { kind: 'radius' };
}

function readK(input: FormingInput, text: string): number {
  const k = /^\s*(\d+\.?\d*|\.\d+)\s*$/.test(text) ? Number(text) : NaN;
  input.add(...checkFigure('k', k, 'kFactor'));
  return k;
}

function readTrialPiece(input: FormingInput, text: string): { blank: number; flanges: number[] } {
  const [blank = '', flanges = ''] = text.split(':');
  return {
    blank: input.lengthMm('trial', blank),
    flanges: splitList(flanges).map((flange) => input.lengthMm('trial', flange)),
  };
}

function toEstimate(input: FormingInput, blank: Blank, kFactor: KFactor) {
  const bends = blank.bends.map((bend) => ({
    insideAngle: bend.insideAngle,
    turned: bend.turned,
    allowance: input.out(bend.allowanceMm),
    deduction: input.out(bend.deductionMm),
    convention: bend.convention,
    conventionWords: CONVENTION_RULES[bend.convention],
    gauge: input.out(bend.gaugeMm),
    gaugeTurnedRound: input.out(bend.gaugeTurnedRoundMm),
    bendLine: input.out(bend.bendLineMm),
  }));
  const spread = kFactor.spread && { min: round(kFactor.spread.min), max: round(kFactor.spread.max) };
  return {
    flat: input.out(blank.flatMm),
    deductions: bends.map((bend) => bend.deduction),
    gauge: bends.map((bend) => bend.gauge),
    unit: input.unit,
    k: { value: round(kFactor.k), source: kFactor.kind, words: kFactor.words, spread },
    bends,
    workings: [
      { figure: 'allowance', rule: FORMING_RULES.bendAllowance },
      { figure: 'gauge', rule: FORMING_RULES.backGauge },
    ],
    cautions: FORMING_CAUTIONS,
  };
}

function toPieces(
  input: FormingInput,
  question: BlankQuestion,
  { blankInput, blank, material }: { blankInput: BlankInput; blank: Blank; material: FormingMaterial | null },
): Pick<BlankEstimate, 'weight' | 'layouts'> {
  if (question.width === undefined) {
    if (question.sheet !== undefined) {
      const message = 'Pieces from a sheet need the width of the piece along its bends, such as 24 in.';
      input.add({ field: 'width', code: 'required', message });
    }
    input.refuseIssues();
    return { weight: null, layouts: [] };
  }
  const widthMm = input.lengthMm('width', question.width);
  input.addChecked(checkFigure('width', widthMm, 'flangeMm'));
  const sheetMm = question.sheet === undefined ? null : readSheet(input, question.sheet);
  input.refuseIssues();
  return {
    weight:
      material &&
      toWeight(input, pieceMassKg(blank.flatMm, widthMm, blankInput.thicknessMm, material.densityGPerCm3)),
    layouts: sheetMm ? layOut(input, { ...sheetMm, flatMm: blank.flatMm, widthMm }) : [],
  };
}

function toWeight(input: FormingInput, massKg: number): BlankEstimate['weight'] {
  const unit = input.unit === 'in' ? 'lb' : 'kg';
  return { value: round(massIn(toMass(massKg, 'kg'), unit).toNumber()), unit };
}

function readSheet(input: FormingInput, text: string): { sheetWidthMm: number; sheetLengthMm: number } {
  const parts = listLengths(text);
  const [width = '', length = ''] = parts;
  if (parts.length !== 2) {
    const message = "Write a sheet as width x length, the grain along its length, such as '48 in x 96 in'.";
    input.add({ field: 'sheet', code: 'not_a_sheet', message });
    return { sheetWidthMm: NaN, sheetLengthMm: NaN };
  }
  return { sheetWidthMm: input.lengthMm('sheet', width), sheetLengthMm: input.lengthMm('sheet', length) };
}

function layOut(
  input: FormingInput,
  sizes: { sheetWidthMm: number; sheetLengthMm: number; flatMm: number; widthMm: number },
): BlankEstimate['layouts'] {
  const layoutInput = { ...sizes, gapMm: 0, trimMm: 0 };
  input.addChecked(checkLayoutInput(layoutInput));
  input.refuseIssues();
  return computeLayouts(layoutInput).map(({ offcuts, ...layout }) => ({
    ...layout,
    yield: round(layout.yield),
    offcuts: offcuts.map(({ widthMm, lengthMm }) => ({
      width: input.out(widthMm),
      length: input.out(lengthMm),
    })),
  }));
}
