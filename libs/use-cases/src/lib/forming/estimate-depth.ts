import { AppError } from '@brakeven/contract';
import {
  type BendSetup,
  findAngle,
  findDepth,
  fitRamDepth,
  FORMING_CAUTIONS,
  FORMING_RULES,
  FORMING_SOURCES,
  parseTrialTable,
  type RamDepthFit,
  type TrialBend,
} from '@brakeven/forming';
import { columnNumber, type FileBytes, readSheets, type Sheet, WorkbookError } from '@brakeven/workbook';
import { FormingInput, type ResultUnit, round } from './forming-input';

/** What a ram depth is asked for, as typed, beside the table of trial bends. */
export interface DepthQuestion {
  /** Inside angle that is wanted; or `atDepth`. */
  angle?: string;
  /** Reading of the ram of which the angle is wanted. */
  atDepth?: string;
  /** The material whose share of the opening is the inside radius; mild steel if left out. */
  material?: string;
  /** Another sheet or die than the trial bends' most frequent one. */
  thickness?: string;
  opening?: string;
  punchRadius?: string;
  shoulderRadius?: string;
}

/** A sheet on a die, in the unit of the answer. */
interface SetupOut {
  opening: number;
  thickness: number;
  punchRadius: number;
  shoulderRadius: number;
}

/** The fit, in the unit of the answer; angles in degrees. */
interface FitOut {
  rmsAngle: number;
  looAngle: number | null;
  springback: number;
  springbackError: number;
  datum: number;
  datumError: number;
  unit: ResultUnit;
  bendCount: number;
  setup: SetupOut;
  /** Whether this sheet on this die was never bent, so that the answer is by geometry alone. */
  isGuess: boolean;
  bends: {
    depth: number;
    measuredAngle: number;
    error: number;
    looError: number | null;
    isOutlier: boolean;
  }[];
  workings: { figure: string; rule: string; source: string | null }[];
  notes: string[];
  cautions: readonly string[];
}

/** The reading for an angle, and the readings between which 9 of 10 single bends need it. */
export interface DepthEstimate extends FitOut {
  depth: number;
  low: number;
  high: number;
  bandAngle: number;
}

/** The angle at a reading, and the inside angles between which 9 of 10 single bends come out. */
export interface AngleEstimate extends FitOut {
  insideAngle: number;
  low: number;
  high: number;
}

/**
 * Fits trial bends of a file (.csv or .xlsx) and answers the depth for an angle or the angle at a depth.
 * @throws AppError `file_refused`, or `invalid_input` naming each field, with the accepted range and an example
 */
export async function estimateDepth(
  file: FileBytes,
  question: DepthQuestion,
): Promise<DepthEstimate | AngleEstimate> {
  const table = await readTrials(file);
  const input = new FormingInput([table.unit === 'mm' ? '1 mm' : '1 in']);
  const material = input.material('material', question.material ?? 'mild-steel');
  const fit = material && input.take('trials', fitRamDepth(table.trials, material.radiusPerOpening));
  if (!fit || !material) throw toRefusalOf(input);
  const setup = readSetup(input, question, mostFrequentSetup(table.trials));
  if (question.atDepth !== undefined) return answerAngle(input, fit, setup, question.atDepth);
  return answerDepth(input, fit, setup, question.angle);
}

function toRefusalOf(input: FormingInput): Error {
  input.refuseIssues();
  return new Error('A fit that failed without an issue.');
}

async function readTrials(file: FileBytes): Promise<{ trials: TrialBend[]; unit: ResultUnit }> {
  const [header, ...rows] = toTexts((await readFirstSheet(file)).rows);
  const input = new FormingInput([]);
  const table = input.take('trials', parseTrialTable(header ?? [], rows));
  if (!table) throw toRefusalOf(input);
  return table;
}

async function readFirstSheet(file: FileBytes): Promise<Sheet> {
  try {
    const [sheet] = (await readSheets(file)).sheets;
    if (sheet) return sheet;
  } catch (cause) {
    if (cause instanceof WorkbookError) throw new AppError('file_refused', cause.message, { cause });
    throw cause;
  }
  throw new AppError(
    'file_refused',
    'This workbook has no sheet. Save it again with the trial bends on one.',
  );
}

function toTexts(rows: Sheet['rows']): string[][] {
  return rows.map(({ cells }) => {
    const texts: string[] = [];
    for (const cell of cells) texts[columnNumber(cell.address) - 1] = cell.text;
    return Array.from(texts, (text) => text ?? '');
  });
}

const SETUP_FIELDS = {
  opening: 'openingMm',
  thickness: 'thicknessMm',
  punchRadius: 'punchRadiusMm',
  shoulderRadius: 'shoulderRadiusMm',
} as const satisfies Record<string, keyof BendSetup>;
const SETUP_NAMES = Object.keys(SETUP_FIELDS) as (keyof typeof SETUP_FIELDS)[];

/** The set-up that most trials share; the first of those that tie. */
function mostFrequentSetup(trials: readonly TrialBend[]): BendSetup {
  const counts = new Map<string, { setup: TrialBend; count: number }>();
  for (const trial of trials) {
    const key = SETUP_NAMES.map((name) => trial[SETUP_FIELDS[name]]).join(' ');
    counts.set(key, { setup: counts.get(key)?.setup ?? trial, count: (counts.get(key)?.count ?? 0) + 1 });
  }
  const [most] = [...counts.values()].sort((a, b) => b.count - a.count);
  if (!most) throw new Error('A fit without trial bends.');
  const { openingMm, thicknessMm, punchRadiusMm, shoulderRadiusMm } = most.setup;
  return { openingMm, thicknessMm, punchRadiusMm, shoulderRadiusMm };
}

function readSetup(input: FormingInput, question: DepthQuestion, usual: BendSetup): BendSetup {
  const setup = { ...usual };
  for (const name of SETUP_NAMES) {
    const text = question[name];
    if (text === undefined) continue;
    const isSheet = name === 'thickness';
    const material =
      isSheet && question.material !== undefined ? input.material('material', question.material) : null;
    setup[SETUP_FIELDS[name]] = isSheet
      ? (input.thickness(name, text, material)?.thickness.toNumber() ?? NaN)
      : input.lengthMm(name, text);
  }
  input.refuseIssues();
  return setup;
}

function answerDepth(
  input: FormingInput,
  fit: RamDepthFit,
  setup: BendSetup,
  angleText: string | undefined,
): DepthEstimate {
  if (angleText === undefined) {
    const message = 'Say which inside angle is wanted, such as 90, or the depth at which it is wanted.';
    input.add({ field: 'angle', code: 'required', message });
  }
  const insideAngle = input.angle('angle', angleText ?? '');
  input.refuseIssues();
  const answer = input.take('angle', findDepth(fit, setup, insideAngle));
  if (!answer) throw toRefusalOf(input);
  return {
    depth: input.out(answer.depthMm),
    low: input.out(answer.lowMm),
    high: input.out(answer.highMm),
    bandAngle: round(answer.bandAngle),
    ...toFitOut(input, fit, setup, answer.isGuess),
  };
}

function answerAngle(
  input: FormingInput,
  fit: RamDepthFit,
  setup: BendSetup,
  depthText: string,
): AngleEstimate {
  const isNegative = /^\s*[-−]/.test(depthText);
  const sizeMm = input.lengthMm('atDepth', isNegative ? depthText.replace(/^\s*[-−]/, '') : depthText);
  input.refuseIssues();
  const answer = input.take('atDepth', findAngle(fit, setup, isNegative ? -sizeMm : sizeMm));
  if (!answer) throw toRefusalOf(input);
  return {
    insideAngle: round(answer.insideAngle),
    low: round(answer.low),
    high: round(answer.high),
    ...toFitOut(input, fit, setup, answer.isGuess),
  };
}

function toFitOut(input: FormingInput, fit: RamDepthFit, setup: BendSetup, isGuess: boolean): FitOut {
  return {
    rmsAngle: round(fit.rmsAngle),
    looAngle: fit.looAngle === null ? null : round(fit.looAngle),
    springback: round(fit.springback),
    springbackError: round(fit.springbackSe),
    datum: input.out(fit.datumMm),
    datumError: input.out(fit.datumSeMm),
    unit: input.unit,
    bendCount: fit.bends.length,
    setup: {
      opening: input.out(setup.openingMm),
      thickness: input.out(setup.thicknessMm),
      punchRadius: input.out(setup.punchRadiusMm),
      shoulderRadius: input.out(setup.shoulderRadiusMm),
    },
    isGuess,
    bends: fit.bends.map(({ trial, error, looError, isOutlier }) => ({
      depth: input.out(trial.depthMm),
      measuredAngle: trial.insideAngle,
      error: round(error),
      looError: looError === null ? null : round(looError),
      isOutlier,
    })),
    workings: [
      { figure: 'depth', rule: FORMING_RULES.ramDepth, source: FORMING_SOURCES.ramDepth ?? null },
      { figure: 'datum, springback, low, high', rule: FORMING_RULES.ramDepthFit, source: null },
      ...(isGuess ? [{ figure: 'isGuess', rule: FORMING_RULES.transfer, source: null }] : []),
    ],
    notes: fit.notes,
    cautions: FORMING_CAUTIONS,
  };
}
