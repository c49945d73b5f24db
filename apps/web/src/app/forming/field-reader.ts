import { type ShopGauge } from '@brakeven/contract';
import {
  checkFigure,
  type FormingIssue,
  isGaugeText,
  parseAngle,
  parseThickness,
  type RangeName,
} from '@brakeven/forming';
import { type Parsed, parseForce, parseLength, type UnitSystem } from '@brakeven/values';
import { type BendMaterial } from './bend-material';
import { LENGTH_UNIT_OF } from './forming-words';
import { type FieldWords } from './show-field-words';

/** What a field is called in messages, where its own name would not be understood. */
type FieldNames = Readonly<Record<string, string>>;

/** Reads fields of a calculator and gathers what is wrong with them, each with the range and an example. */
export class FieldReader {
  readonly issues: FieldWords[] = [];

  constructor(
    private readonly units: UnitSystem,
    private readonly gauges: readonly ShopGauge[],
    private readonly names: FieldNames = {},
  ) {}

  /** A thickness in mm as typed: gauge, fraction, decimal or mm; and what a gauge leaves open. */
  thickness(field: string, text: string, material: BendMaterial): { mm: number; note: string | null } {
    const own = this.findOwnGauge(text, material);
    if (own) return { mm: Number(own.thicknessMm), note: `As the shop’s own chart has it: ${own.source}` };
    const read = this.take(field, parseThickness(text, material.gaugeSystem, LENGTH_UNIT_OF[this.units]));
    const mm = this.inRange(field, read?.thickness.toNumber() ?? NaN, 'thicknessMm');
    return { mm, note: read?.note ?? null };
  }

  /** A length in mm; a bare number is in the shop's unit. */
  lengthMm(field: string, text: string, range: RangeName): number {
    const read = this.take(field, parseLength(text, LENGTH_UNIT_OF[this.units]));
    return this.inRange(field, read?.toNumber() ?? NaN, range);
  }

  /** An inside angle in degrees. */
  angle(field: string, text: string): number {
    return this.inRange(field, this.take(field, parseAngle(text)) ?? NaN, 'insideAngle');
  }

  /** A force in kN; a bare number is in the shop's unit. */
  forceKn(field: string, text: string): number {
    const read = this.take(field, parseForce(text, this.units === 'us' ? 'US ton' : 'kN'));
    return this.inRange(field, read?.toNumber() ?? NaN, 'ratingKn');
  }

  /** A bare number. */
  number(field: string, text: string, range: RangeName): number {
    const value = /^\s*(\d+\.?\d*|\.\d+)\s*$/.test(text) ? Number(text) : NaN;
    return this.inRange(field, value, range);
  }

  /** What a reader has made of a field; undefined, and the reason kept, if it could not. */
  take<T>(field: string, parsed: Parsed<T>): T | undefined {
    if (parsed.ok) return parsed.value;
    this.add({ field, message: parsed.message });
    return undefined;
  }

  /** Keeps what a rule says about fields. */
  addAll(issues: readonly FormingIssue[]): void {
    for (const { field, message } of issues) this.add({ field, message });
  }

  /** One reason for a field is enough: the first says what to do. */
  add(issue: FieldWords): void {
    if (!this.issues.some(({ field }) => field === issue.field)) this.issues.push(issue);
  }

  /** The shop's own thickness of a gauge, where it differs from the table. */
  private findOwnGauge(text: string, { gaugeSystem }: BendMaterial): ShopGauge | undefined {
    if (!isGaugeText(text)) return undefined;
    const number = Number(/\d+/.exec(text)?.[0]);
    return this.gauges.find(({ system, gauge }) => system === gaugeSystem && gauge === number);
  }

  private inRange(field: string, value: number, range: RangeName): number {
    const name = this.names[field] ?? field;
    const [issue] = checkFigure(name, value, range);
    if (issue) this.add({ field, message: toSentence(issue.message) });
    return value;
  }
}

function toSentence(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
