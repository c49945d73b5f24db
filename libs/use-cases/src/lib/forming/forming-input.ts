import { AppError, type Issue } from '@brakeven/contract';
import {
  type FindGauge,
  findMaterial,
  findResultUnit,
  type FormingMaterial,
  MATERIALS,
  parseAngle,
  parseThickness,
  type SheetThickness,
} from '@brakeven/forming';
import {
  lengthIn,
  parseLength,
  type Parsed,
  parseStress,
  quoted,
  stressIn,
  toLength,
} from '@brakeven/values';

/** The unit that lengths of an answer are in. */
export type ResultUnit = 'in' | 'mm';

/** What a shop has instead of the materials and gauges that are shipped. */
export interface ShopFigures {
  materials: readonly FormingMaterial[];
  findGauge: FindGauge;
}

/**
 * Reads texts into figures and keeps what is wrong with them, so that all of it is told at once. A bare number is in
 * the unit that the answer is in.
 */
export class FormingInput {
  readonly issues: Issue[] = [];
  readonly unit: ResultUnit;

  /** `lengthTexts`: the lengths in the order in which they were given; the first that is written with a unit rules. */
  constructor(
    lengthTexts: readonly (string | undefined)[],
    private readonly shop?: ShopFigures,
  ) {
    this.unit = findResultUnit(lengthTexts.filter((text) => text !== undefined));
  }

  lengthMm(field: string, text: string): number {
    const length = this.take(field, parseLength(text, this.unit));
    return length ? lengthIn(length, 'mm').toNumber() : NaN;
  }

  angle(field: string, text: string): number {
    return this.take(field, parseAngle(text)) ?? NaN;
  }

  thickness(field: string, text: string, material: FormingMaterial | null): SheetThickness | null {
    const system = material?.gaugeSystem ?? null;
    return this.take(field, parseThickness(text, system, this.unit, this.shop?.findGauge)) ?? null;
  }

  tensileMpa(field: string, text: string): number {
    const stress = this.take(field, parseStress(text, this.unit === 'in' ? 'ksi' : 'MPa'));
    return stress ? stressIn(stress, 'MPa').toNumber() : NaN;
  }

  material(field: string, text: string): FormingMaterial | null {
    const materials = this.shop?.materials ?? MATERIALS;
    const material = findMaterial(text, materials);
    if (material) return material;
    const codes = materials.map(({ code }) => code).join(', ');
    this.add({
      field,
      code: 'unknown_material',
      message: `There is no material ${quoted(text)} here. Known are ${codes}.`,
    });
    return null;
  }

  add(...issues: readonly Issue[]): void {
    this.issues.push(...issues);
  }

  /** Keeps the value, or why there is none. */
  take<T>(field: string, read: Parsed<T>): T | undefined {
    if (read.ok) return read.value;
    this.add({ field, code: read.code, message: read.message });
    return undefined;
  }

  /** Adds issues of a check, unless the field is already known not to be readable. */
  addChecked(issues: readonly Issue[]): void {
    const unreadable = new Set(this.issues.map(({ field }) => field));
    this.add(...issues.filter(({ field }) => !unreadable.has(field)));
  }

  /** @throws AppError `invalid_input` with every issue found so far */
  refuseIssues(): void {
    if (this.issues.length > 0) throw toRefusal(this.issues);
  }

  /** A length in the unit of the answer. */
  out(millimetres: number): number {
    return round(lengthIn(toLength(millimetres, 'mm'), this.unit).toNumber());
  }
}

/** The refusal that tells these issues. */
export function toRefusal(issues: readonly Issue[]): AppError {
  const message = issues.map((issue) => issue.message).join(' ');
  return new AppError('invalid_input', message, { issues });
}

/** Six decimals are more than any figure here means, and enough to compare with. */
export function round(value: number): number {
  return Number(value.toFixed(6));
}

/** A list such as '2, 3 1/2, 2' in its parts. */
export function splitList(text: string): string[] {
  return text.split(',').map((part) => part.trim());
}
