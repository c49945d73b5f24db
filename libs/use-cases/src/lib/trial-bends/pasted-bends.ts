import { type Issue } from '@brakeven/contract';
import {
  type FindGauge,
  type GaugeSystem,
  parseAngle,
  parseThickness,
  readLengthMm,
} from '@brakeven/forming';
import { D, findLengthUnit, isLocalDate, type LengthUnit, parseDateText, quoted } from '@brakeven/values';

/** A row of a pasted table; null where it has no such column or the cell is blank. */
export interface PastedBend {
  line: number;
  depthMm: string;
  measuredAngle: string;
  thicknessMm: string | null;
  stripWidthMm: string | null;
  isFullLength: boolean;
  bentBy: string | null;
  bentOn: string | null;
}

/** What was read of a pasted table, and what could not be. */
export interface PastedTable {
  bends: PastedBend[];
  columnsIgnored: string[];
  issues: Issue[];
}

/** How gauges in the table are read. */
export interface GaugeReading {
  system: GaugeSystem;
  findGauge: FindGauge;
}

const COLUMNS = {
  depth: /^(?:ram )?(?:depth|reading)(?: of the ram)?$/,
  angle: /^(?:measured |inside )*angle$/,
  thickness: /^(?:sheet )?thickness$/,
  width: /^(?:strip )?width(?: of the strip)?$/,
  fullLength: /^full length$/,
  bentBy: /^(?:bent by|who|operator)$/,
  bentOn: /^(?:bent on|date|when)$/,
} as const;
type ColumnName = keyof typeof COLUMNS;
const LENGTH_COLUMNS: readonly ColumnName[] = ['depth', 'thickness', 'width'];

interface Column {
  name: ColumnName;
  index: number;
  unit: LengthUnit | null;
}

/** The most bends of one table. */
const BENDS_MAX = 1000;
const ISSUES_MAX = 20;
const EXAMPLE =
  'Write the header as Depth (mm), Angle, Thickness (mm), Width (mm), Full length, Bent by, Bent on.';

/**
 * Reads trial bends from a table that was copied as text: a header with the unit of each length, then a row a bend,
 * cells parted by tabs, semicolons or commas. Nothing that cannot be read becomes a figure.
 * Codes: `no_rows`, `too_many_bends`, `column_missing`, `column_twice`, `unit_missing`, `unknown_unit`,
 * `cell_not_readable`.
 */
export function readPastedBends(text: string, gauges: GaugeReading): PastedTable {
  const lines = text.split(/\r?\n/).map((line, index) => ({ line, number: index + 1 }));
  const filled = lines.filter(({ line }) => line.trim() !== '');
  const [header, ...rows] = filled;
  const table: PastedTable = { bends: [], columnsIgnored: [], issues: [] };
  if (!header || rows.length === 0) {
    return refuse(table, 'no_rows', `There are no bends under the header. ${EXAMPLE}`);
  }
  if (rows.length > BENDS_MAX) {
    return refuse(
      table,
      'too_many_bends',
      `These are ${rows.length} bends; at most ${BENDS_MAX} are taken at once.`,
    );
  }
  const separator = ['\t', ';', ','].find((sign) => header.line.includes(sign)) ?? '\t';
  const columns = readHeader(header.line.split(separator), table);
  if (table.issues.length > 0) return table;
  for (const { line, number } of rows) {
    const cells = line.split(separator).map((cell) => cell.trim().replace(/^"(.*)"$/, '$1'));
    const bend = new BendReader(cells, { columns, line: number, gauges, issues: table.issues }).read();
    if (bend) table.bends.push(bend);
    if (table.issues.length >= ISSUES_MAX) break;
  }
  return table;
}

function refuse(table: PastedTable, code: string, message: string): PastedTable {
  table.issues.push({ field: 'text', code, message });
  return table;
}

function readHeader(titles: readonly string[], table: PastedTable): Column[] {
  const columns: Column[] = [];
  for (const [index, title] of titles.entries()) {
    const [, words = '', unitText = ''] =
      /^"?\s*([a-z _-]*?)\s*(?:[([,:/]\s*([^)\]"]*)[)\]]?)?\s*"?$/i.exec(title) ?? [];
    const plain = words
      .toLowerCase()
      .replace(/[\s_-]+/g, ' ')
      .trim();
    const name = (Object.keys(COLUMNS) as ColumnName[]).find((column) => COLUMNS[column].test(plain));
    if (!name) {
      if (title.trim() !== '') table.columnsIgnored.push(title.trim());
    } else if (columns.some((column) => column.name === name)) {
      refuse(table, 'column_twice', `Column ${quoted(title.trim())} is there twice. ${EXAMPLE}`);
    } else columns.push({ name, index, unit: readUnit(name, title, unitText, table) });
  }
  const missing = (['depth', 'angle'] as const).filter(
    (name) => !columns.some((column) => column.name === name),
  );
  if (missing.length > 0)
    refuse(table, 'column_missing', `Missing columns: ${missing.join(', ')}. ${EXAMPLE}`);
  return columns;
}

function readUnit(name: ColumnName, title: string, unitText: string, table: PastedTable): LengthUnit | null {
  if (!LENGTH_COLUMNS.includes(name)) return null;
  const unit = findLengthUnit(unitText.trim());
  if (unit) return unit;
  const code = unitText.trim() === '' ? 'unit_missing' : 'unknown_unit';
  refuse(table, code, `Column ${quoted(title.trim())} does not say whether it is in mm or in. ${EXAMPLE}`);
  return null;
}

const EXAMPLES: Readonly<Record<ColumnName, string>> = {
  depth: 'a reading such as 12.35',
  angle: 'an inside angle such as 90.5',
  thickness: 'a thickness such as 3 or 10 ga',
  width: 'a width such as 50',
  fullLength: 'yes or no',
  bentBy: 'a name',
  bentOn: 'a date such as 2026-03-22',
};

interface Reading {
  columns: readonly Column[];
  line: number;
  gauges: GaugeReading;
  issues: Issue[];
}

/** Reads one row, cell by cell, keeping what is wrong. */
class BendReader {
  constructor(
    private readonly cells: readonly string[],
    private readonly reading: Reading,
  ) {}

  read(): PastedBend | null {
    const { line, issues } = this.reading;
    const before = issues.length;
    const required = (name: 'depth' | 'angle', of: (text: string, unit: LengthUnit) => string | undefined) =>
      this.cell(name, of) ?? (this.text(name) === '' ? this.refuse(name) : null);
    const depthMm = required('depth', (text, unit) => toText(readLengthMm(text, unit)));
    const measuredAngle = required('angle', (text) => toText(orUndefined(parseAngle(text))));
    const bend = {
      line,
      thicknessMm: this.cell('thickness', (text, unit) => this.toThickness(text, unit)),
      stripWidthMm: this.cell('width', (text, unit) => toText(readLengthMm(text, unit))),
      isFullLength: this.cell('fullLength', toYesNo) ?? false,
      bentBy: this.cell('bentBy', (text) => (text.length <= 200 ? text : undefined)),
      bentOn: this.cell('bentOn', toDate),
    };
    if (issues.length > before || depthMm === null || measuredAngle === null) return null;
    return { ...bend, depthMm, measuredAngle };
  }

  private text(name: ColumnName): string {
    const column = this.reading.columns.find((candidate) => candidate.name === name);
    return column ? (this.cells[column.index] ?? '') : '';
  }

  private cell<T>(name: ColumnName, read: (text: string, unit: LengthUnit) => T | undefined): T | null {
    const text = this.text(name);
    if (text === '') return null;
    const unit = this.reading.columns.find((column) => column.name === name)?.unit ?? 'mm';
    return read(text, unit) ?? this.refuse(name);
  }

  private refuse(name: ColumnName): null {
    const { line, issues } = this.reading;
    const message = `Line ${line}: ${quoted(this.text(name))} is not ${EXAMPLES[name]}.`;
    issues.push({ field: 'text', code: 'cell_not_readable', message });
    return null;
  }

  private toThickness(text: string, unit: LengthUnit): string | undefined {
    const { system, findGauge } = this.reading.gauges;
    return toText(orUndefined(parseThickness(text, system, unit, findGauge))?.thickness.toNumber());
  }
}

function orUndefined<T>(parsed: { ok: true; value: T } | { ok: false }): T | undefined {
  return parsed.ok ? parsed.value : undefined;
}

function toText(figure: number | undefined): string | undefined {
  return figure === undefined ? undefined : D(figure.toFixed(5)).toFixed();
}

function toYesNo(text: string): boolean | undefined {
  if (/^(y|yes|true|x|1)$/i.test(text)) return true;
  return /^(n|no|false|0|-)$/i.test(text) ? false : undefined;
}

function toDate(text: string): string | undefined {
  if (isLocalDate(text)) return text;
  for (const format of ['YYYY/MM/DD', 'DD MMM YYYY', 'MMM DD YYYY'] as const) {
    const date = parseDateText(text, format);
    if (date.ok) return date.value;
  }
  return undefined;
}
