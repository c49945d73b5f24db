import { type ShopGauge } from '@brakeven/contract';
import { checkFigure } from '@brakeven/forming';
import { parseLength, type UnitSystem } from '@brakeven/values';
import { type BendMaterial } from '../bend-material';
import { FieldReader } from '../field-reader';
import { findMaterialOf } from '../fit/fit-question';
import { LENGTH_UNIT_OF } from '../forming-words';
import { type PressTooling, type RackOpening, type RackPunch } from '../press-tooling';
import { type FieldWords } from '../show-field-words';

/** A set-up and what is asked of it, as typed; also the names in the address. */
export interface DepthTexts {
  machine: string;
  punch: string;
  opening: string;
  material: string;
  thickness: string;
  angle: string;
  /** A reading of the ram, for the way back; may stay empty. */
  reading: string;
}

/** The set-up and the question read. */
export interface DepthQuestion {
  press: PressTooling | null;
  punch: RackPunch | null;
  opening: RackOpening | null;
  material: BendMaterial;
  /** NaN while it cannot be read. */
  thicknessMm: number;
  insideAngle: number;
  /** Null where none is asked for. */
  readingMm: number | null;
  note: string | null;
  issues: readonly FieldWords[];
}

export interface DepthFacts {
  materials: readonly BendMaterial[];
  gauges: readonly ShopGauge[];
  presses: readonly PressTooling[];
  units: UnitSystem;
}

/** Reads a set-up; a choice that is not there falls back to the first of its kind. */
export function readDepthQuestion(texts: DepthTexts, facts: DepthFacts): DepthQuestion {
  const reader = new FieldReader(facts.units, facts.gauges);
  const material = findMaterialOf(texts.material, facts.materials);
  const press = facts.presses.find(({ code }) => code === texts.machine) ?? facts.presses[0] ?? null;
  const punch = press?.punches.find(({ code }) => code === texts.punch) ?? press?.punches[0] ?? null;
  const opening = press?.openings.find(({ code }) => code === texts.opening) ?? press?.openings[0] ?? null;
  const { mm: thicknessMm, note } = reader.thickness('thickness', texts.thickness, material);
  const insideAngle = reader.angle('angle', texts.angle);
  const readingMm =
    texts.reading.trim() === '' ? null : readDepth(reader, 'reading', texts.reading, facts.units);
  return {
    press,
    punch,
    opening,
    material,
    thicknessMm,
    insideAngle,
    readingMm,
    note,
    issues: reader.issues,
  };
}

/** A reading of the ram in mm; it may lie below nought, as its zero is anybody's. */
export function readDepth(reader: FieldReader, field: string, text: string, units: UnitSystem): number {
  const mm = parseDepthMm(text, units);
  const [issue] = checkFigure('reading', mm, 'depthMm');
  const example = units === 'us' ? '0.412' : '10.46';
  if (issue)
    reader.add({ field, message: `Write the reading of the ram, such as ${example}: ${issue.message}` });
  return mm;
}

/** NaN if it cannot be read. */
export function parseDepthMm(text: string, units: UnitSystem): number {
  const [, sign, rest = ''] = /^([-−])?\s*(.*)$/.exec(text.trim()) ?? [];
  const read = parseLength(rest, LENGTH_UNIT_OF[units]);
  if (!read.ok || /^[+−-]/.test(rest)) return NaN;
  return sign === undefined ? read.value.toNumber() : -read.value.toNumber();
}
