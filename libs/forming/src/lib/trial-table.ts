import {
  accepted,
  findLengthUnit,
  lengthIn,
  type LengthUnit,
  parseLength,
  type Parsed,
  quoted,
  refused,
} from '@brakeven/values';
import { parseAngle } from './parse-angle';
import { toResultUnit } from './parse-thickness';
import { type TrialBend } from './trial-bend';

/** Trial bends as read from a table, and the unit of its first column of lengths. */
export interface TrialTable {
  trials: TrialBend[];
  unit: 'in' | 'mm';
}

const COLUMNS = {
  opening: 'openingMm',
  thickness: 'thicknessMm',
  punchradius: 'punchRadiusMm',
  shoulderradius: 'shoulderRadiusMm',
  depth: 'depthMm',
  angle: 'insideAngle',
} as const;

type ColumnName = keyof typeof COLUMNS;

interface TrialColumn {
  name: ColumnName;
  index: number;
  /** Null for the angle. */
  unit: LengthUnit | null;
}

const HEADER =
  /^(opening|thickness|punch[ _-]?radius|shoulder[ _-]?radius|depth|angle)[\s_,:/([-]*([^\s)\]]*)[)\]]?$/i;
const DEGREE_WORDS = ['', 'deg', 'degree', 'degrees', '°'];
const EXAMPLE =
  'Write the columns as opening (mm),thickness (mm),punchRadius (mm),shoulderRadius (mm),depth (mm),angle (deg).';

/** The most trial bends of one table. */
export const TRIALS_MAX = 1000;

/**
 * Reads a table of trial bends: a header with the unit of each length (`opening (mm)`, `depth_in`), then a row a bend;
 * other columns are left alone. Angles are inside angles of the finished part in degrees.
 * Codes: `column_missing`, `column_twice`, `unit_missing`, `unknown_unit`, `cell_not_a_number`, `too_many_bends`.
 */
export function parseTrialTable(
  header: readonly string[],
  rows: readonly (readonly string[])[],
): Parsed<TrialTable> {
  const columns: TrialColumn[] = [];
  for (const [index, text] of header.entries()) {
    const column = readColumn(text, index);
    if (column && !column.ok) return column;
    if (column) columns.push(column.value);
  }
  const refusal = findHeaderRefusal(columns) ?? findCountRefusal(rows.length);
  if (refusal) return refusal;
  const unit = toResultUnit(columns.find((column) => column.unit !== null)?.unit ?? 'in');
  const trials: TrialBend[] = [];
  for (const [index, row] of rows.entries()) {
    const trial = readTrial(row, columns, index + 2);
    if (!trial.ok) return trial;
    trials.push(trial.value);
  }
  return accepted({ trials, unit });
}

function readColumn(text: string, index: number): Parsed<TrialColumn> | undefined {
  const [, word, unitText = ''] = HEADER.exec(text.trim()) ?? [];
  if (word === undefined) return undefined;
  const name = word.toLowerCase().replace(/[ _-]/g, '') as ColumnName;
  if (name === 'angle') {
    if (DEGREE_WORDS.includes(unitText.toLowerCase())) return accepted({ name, index, unit: null });
    return refused('unknown_unit', `The unit of column ${quoted(text)} is not degrees. ${EXAMPLE}`);
  }
  if (unitText === '')
    return refused('unit_missing', `Column ${quoted(text)} does not say its unit. ${EXAMPLE}`);
  const unit = findLengthUnit(unitText);
  if (unit) return accepted({ name, index, unit });
  return refused('unknown_unit', `The unit of column ${quoted(text)} is not mm, cm, m, in or ft. ${EXAMPLE}`);
}

function findHeaderRefusal(columns: readonly TrialColumn[]): Parsed<TrialTable> | undefined {
  const names = columns.map((column) => column.name);
  const missing = (Object.keys(COLUMNS) as ColumnName[]).filter((name) => !names.includes(name));
  if (missing.length > 0)
    return refused('column_missing', `Missing columns: ${missing.join(', ')}. ${EXAMPLE}`);
  const twice = names.find((name, index) => names.indexOf(name) !== index);
  return twice && refused('column_twice', `Column ${quoted(twice)} is there twice. ${EXAMPLE}`);
}

function findCountRefusal(count: number): Parsed<TrialTable> | undefined {
  if (count <= TRIALS_MAX) return undefined;
  return refused('too_many_bends', `The table has ${count} bends; at most ${TRIALS_MAX} are fitted at once.`);
}

function readTrial(row: readonly string[], columns: readonly TrialColumn[], line: number): Parsed<TrialBend> {
  const trial = {
    openingMm: 0,
    thicknessMm: 0,
    punchRadiusMm: 0,
    shoulderRadiusMm: 0,
    depthMm: 0,
    insideAngle: 0,
  };
  for (const { name, index, unit } of columns) {
    const text = row[index] ?? '';
    const figure = unit === null ? readAngle(text) : readLengthMm(text, unit);
    if (figure === undefined) {
      const message = `Row ${line}, ${name}: ${quoted(text)} cannot be read. Write a number such as ${unit === null ? '90.5' : '12.4'}.`;
      return refused('cell_not_a_number', message);
    }
    trial[COLUMNS[name]] = figure;
  }
  return accepted(trial);
}

function readAngle(text: string): number | undefined {
  const read = parseAngle(text);
  return read.ok ? read.value : undefined;
}

/**
 * Reads a length in mm that may lie below nought, as a reading of the ram may; a bare number is in `unit`. Undefined
 * for what is no length. Ranges are checked with the fit.
 */
export function readLengthMm(text: string, unit: LengthUnit): number | undefined {
  const [, sign, rest = ''] = /^([-−])?\s*(.*)$/.exec(text.trim()) ?? [];
  const read = parseLength(rest, unit);
  if (!read.ok || /^[+−-]/.test(rest)) return undefined;
  const millimetres = lengthIn(read.value, 'mm').toNumber();
  return sign === undefined ? millimetres : -millimetres;
}
