import {
  type Blank,
  type BlankInput,
  checkBlankInput,
  checkLayoutInput,
  computeBlank,
  computeLayouts,
  findKFactor,
  HANDBOOK_GROUPS,
  type HandbookGroup,
  insideRadiusMm,
  type KFactor,
  type KSource,
  pieceMassKg,
  type SheetLayout,
} from '@brakeven/forming';
import { parseLength, type UnitSystem } from '@brakeven/values';
import { type BendMaterial } from '../bend-material';
import { FieldReader } from '../field-reader';
import { findMaterialOf, type FitFacts } from '../fit/fit-question';
import { LENGTH_UNIT_OF } from '../forming-words';
import { type FieldWords } from '../show-field-words';

/** A part as typed; also the names in the address. Flanges and angles are lists with semicolons between. */
export interface BlankTexts {
  material: string;
  thickness: string;
  flanges: string;
  angles: string;
  /** `up` or `down` for each bend; says how the part is drawn, not how long its blank is. */
  ways: string;
  /** Inside radius; empty where it comes of the opening. */
  radius: string;
  opening: string;
  kFrom: string;
  k: string;
  /** Trial pieces: `blank: flange, flange; …`. */
  pieces: string;
  width: string;
  sheetWidth: string;
  sheetLength: string;
  gap: string;
  trim: string;
}

/** Between two flanges or two angles of a list: a comma might belong to a number. */
export const LIST_MARK = ';';

/** Where K comes from, in words for a choice. */
export const K_CHOICES: readonly { value: string; label: string }[] = [
  { value: 'radius', label: 'radius ÷ thickness (DIN 6935)' },
  ...Object.entries(HANDBOOK_GROUPS).map(([value, { words }]) => ({ value, label: `handbook: ${words}` })),
  { value: 'given', label: 'K as I give it' },
  { value: 'pieces', label: 'trial pieces that were bent' },
];

const COMMON = {
  material: 'mild-steel',
  angles: '90;90',
  ways: 'up;up',
  radius: '',
  kFrom: 'radius',
  k: '',
  pieces: '',
};

/** A channel to begin with. */
export const BLANK_DEFAULTS: Readonly<Record<UnitSystem, BlankTexts>> = {
  us: {
    ...COMMON,
    thickness: '10 ga',
    flanges: '2;4;2',
    opening: '1 1/4',
    width: '24',
    sheetWidth: '60',
    sheetLength: '120',
    gap: '0',
    trim: '0',
  },
  metric: {
    ...COMMON,
    thickness: '3 mm',
    flanges: '50;100;50',
    opening: '24',
    width: '600',
    sheetWidth: '1500',
    sheetLength: '3000',
    gap: '0',
    trim: '0',
  },
};

/** A blank with all that hangs on it. */
export interface BlankAnswer {
  input: BlankInput;
  blank: Blank;
  k: KFactor;
  /** Whether the radius was worked out from the opening. */
  isRadiusFromOpening: boolean;
  widthMm: number | null;
  massKg: number | null;
  /** Empty without a width or a sheet. */
  layouts: readonly SheetLayout[];
}

/** The part read: its blank, or what is wrong with which field. */
export interface BlankQuestion {
  answer: BlankAnswer | null;
  material: BendMaterial;
  note: string | null;
  issues: readonly FieldWords[];
}

const NAMES = { flanges: 'flange', angles: 'angle', width: 'bend length', k: 'K' };

/** Reads a part; bare numbers are in the shop's unit. */
export function readBlankQuestion(
  texts: BlankTexts,
  { materials, gauges, units }: Pick<FitFacts, 'materials' | 'gauges' | 'units'>,
): BlankQuestion {
  const reader = new FieldReader(units, gauges, NAMES);
  const material = findMaterialOf(texts.material, materials);
  const { mm: thicknessMm, note } = reader.thickness('thickness', texts.thickness, material);
  const shape = {
    flangesMm: splitList(texts.flanges).map((text, index) => readFlange(reader, text, index)),
    insideAngles: splitList(texts.angles).map((text, index) => readAngle(reader, text, index)),
    thicknessMm,
    radiusMm: readRadius(reader, texts, material),
  };
  const k = readK(reader, texts, shape, units);
  if (reader.issues.length === 0 && k) reader.addAll(checkBlankInput({ ...shape, k: k.k }));
  const pieces = readPieces(reader, texts);
  const isAnswered = reader.issues.length === 0 && k !== undefined;
  const answer = isAnswered ? toAnswer({ ...shape, k: k.k }, k, pieces, material) : null;
  if (answer && pieces.sheet && answer.widthMm !== null) {
    reader.addAll(
      checkLayoutInput({ ...pieces.sheet, flatMm: answer.blank.flatMm, widthMm: answer.widthMm }),
    );
  }
  const withRadius = answer && { ...answer, isRadiusFromOpening: texts.radius.trim() === '' };
  return { answer: withRadius, material, note, issues: reader.issues };
}

/** The parts of a list in the address. */
export function splitList(text: string): string[] {
  return text.split(LIST_MARK).map((part) => part.trim());
}

function readFlange(reader: FieldReader, text: string, index: number): number {
  const before = reader.issues.length;
  const mm = reader.lengthMm('flanges', text, 'flangeMm');
  nameRow(reader, before, `Flange ${index + 1}`);
  return mm;
}

function readAngle(reader: FieldReader, text: string, index: number): number {
  const before = reader.issues.length;
  const degrees = reader.angle('angles', text);
  nameRow(reader, before, `Bend ${index + 1}`);
  return degrees;
}

/** Says which of a list is meant. */
function nameRow(reader: FieldReader, before: number, name: string): void {
  const issue = reader.issues[before];
  if (issue) reader.issues[before] = { ...issue, message: `${name}: ${issue.message}` };
}

function readRadius(reader: FieldReader, texts: BlankTexts, material: BendMaterial): number {
  if (texts.radius.trim() !== '') return reader.lengthMm('radius', texts.radius, 'radiusMm');
  return insideRadiusMm(material.radiusPerOpening, reader.lengthMm('opening', texts.opening, 'openingMm'));
}

function readK(
  reader: FieldReader,
  texts: BlankTexts,
  shape: { radiusMm: number; thicknessMm: number; insideAngles: readonly number[] },
  units: UnitSystem,
): KFactor | undefined {
  const source = readKSource(reader, texts, shape.insideAngles[0] ?? 90, units);
  if (reader.issues.length > 0) return undefined;
  return reader.take(toKField(texts.kFrom), findKFactor(source, shape.radiusMm, shape.thicknessMm));
}

function toKField(kFrom: string): string {
  if (kFrom === 'given') return 'k';
  return kFrom === 'pieces' ? 'pieces' : 'kFrom';
}

function readKSource(
  reader: FieldReader,
  texts: BlankTexts,
  insideAngle: number,
  units: UnitSystem,
): KSource {
  const { kFrom } = texts;
  if (kFrom === 'given') return { kind: 'given', k: reader.number('k', texts.k, 'kFactor') };
  if (kFrom === 'pieces') {
    const pieces = texts.pieces.split(/[;\n]/).filter((line) => line.trim() !== '');
    return {
      kind: 'trials',
      insideAngle,
      pieces: pieces.map((line) => readTrialPiece(reader, line, units)),
    };
  }
  if (kFrom in HANDBOOK_GROUPS) return { kind: 'handbook', group: kFrom as HandbookGroup };
  return { kind: 'radius' };
}

function readTrialPiece(reader: FieldReader, line: string, units: UnitSystem) {
  const [blank = '', flanges = ''] = line.split(':');
  const lengths = [blank, ...flanges.split(',')].map((text) => parseLength(text, LENGTH_UNIT_OF[units]));
  const [first = NaN, ...others] = lengths.map((read) => (read.ok ? read.value.toNumber() : NaN));
  if (lengths.some((read) => !read.ok)) {
    const example = units === 'us' ? '5.770: 2.010, 4.005' : '146.6: 51.1, 101.7';
    const message = `'${line.trim()}' is not a trial piece. Write its blank, a colon, and its flanges as measured outside, such as ${example}.`;
    reader.add({ field: 'pieces', message });
  }
  return { blank: first, flanges: others };
}

interface Pieces {
  widthMm: number | null;
  sheet: { sheetWidthMm: number; sheetLengthMm: number; gapMm: number; trimMm: number } | null;
}

function readPieces(reader: FieldReader, texts: BlankTexts): Pieces {
  const widthMm = texts.width.trim() === '' ? null : reader.lengthMm('width', texts.width, 'lengthMm');
  if (widthMm === null || (texts.sheetWidth.trim() === '' && texts.sheetLength.trim() === '')) {
    return { widthMm, sheet: null };
  }
  return {
    widthMm,
    sheet: {
      sheetWidthMm: reader.lengthMm('sheetWidth', texts.sheetWidth, 'flangeMm'),
      sheetLengthMm: reader.lengthMm('sheetLength', texts.sheetLength, 'flangeMm'),
      gapMm: reader.lengthMm('gap', texts.gap || '0', 'radiusMm'),
      trimMm: reader.lengthMm('trim', texts.trim || '0', 'radiusMm'),
    },
  };
}

function toAnswer(
  input: BlankInput,
  k: KFactor,
  { widthMm, sheet }: Pieces,
  material: BendMaterial,
): Omit<BlankAnswer, 'isRadiusFromOpening'> {
  const blank = computeBlank(input);
  const massKg =
    widthMm === null ? null : pieceMassKg(blank.flatMm, widthMm, input.thicknessMm, material.densityGPerCm3);
  const layout = sheet && widthMm !== null ? { ...sheet, flatMm: blank.flatMm, widthMm } : null;
  const layouts = layout && checkLayoutInput(layout).length === 0 ? computeLayouts(layout) : [];
  return { input, blank, k, widthMm, massKg, layouts };
}
