import {
  accepted,
  findWrittenLengthUnit,
  type Length,
  type LengthUnit,
  parseLength,
  type Parsed,
  quoted,
  refused,
  toLength,
} from '@brakeven/values';
import { findGaugeInches, GAUGE_NOTES, GAUGE_RANGE, type GaugeSystem } from './gauges';

/** A thickness as read; `note` says what a gauge leaves open, null for a measured thickness. */
export interface SheetThickness {
  thickness: Length;
  gauge: number | null;
  note: string | null;
}

/** Thickness in inches of a gauge; undefined if the system has no such gauge. */
export type FindGauge = (system: GaugeSystem, gauge: number) => number | undefined;

const GAUGE_TEXT = /^(?:#\s*)?(\d{1,3})\s*(?:ga|gauge|gage)\.?$/i;
const EXAMPLE = 'Write a thickness such as 10 ga, 3/16, 0.1345 in or 3 mm.';

/**
 * Reads a thickness: a gauge of the material's own table (`10 ga`), a fraction (`3/16`), or a length (`0.1345"`,
 * `4.5mm`). A bare number is in `unitIfNone`; a shop that has gauges of its own says so with `findGauge`.
 * Codes: `gauge_needs_material`, `unknown_gauge`, `not_a_quantity`, `unknown_unit`, `negative`.
 */
export function parseThickness(
  text: string,
  system: GaugeSystem | null,
  unitIfNone: LengthUnit,
  findGauge: FindGauge = findGaugeInches,
): Parsed<SheetThickness> {
  const gaugeText = GAUGE_TEXT.exec(text.trim())?.[1];
  if (gaugeText !== undefined) return readGauge(Number(gaugeText), system, findGauge);
  const read = parseLength(text, unitIfNone);
  if (read.ok) return accepted({ thickness: read.value, gauge: null, note: null });
  return refused(read.code, `${quoted(text)} cannot be read as a thickness. ${EXAMPLE}`);
}

function readGauge(gauge: number, system: GaugeSystem | null, findGauge: FindGauge): Parsed<SheetThickness> {
  if (system === null) {
    const message = `${gauge} ga is another thickness in steel, galvanized, stainless and aluminium. Say the material, or write the thickness itself, such as 0.0598 in.`;
    return refused('gauge_needs_material', message);
  }
  const inches = findGauge(system, gauge);
  if (inches === undefined) {
    const thickest = system === 'galvanized' ? 8 : GAUGE_RANGE.thickest;
    return refused(
      'unknown_gauge',
      `There is no ${system} gauge ${gauge} here: ${thickest} ga to ${GAUGE_RANGE.thinnest} ga, such as 16 ga. ${EXAMPLE}`,
    );
  }
  return accepted({ thickness: toLength(inches, 'in'), gauge, note: GAUGE_NOTES[system] });
}

/** Whether a text is a gauge rather than a length. */
export function isGaugeText(text: string): boolean {
  return GAUGE_TEXT.test(text.trim());
}

/**
 * The unit that results are given in: that of the first text that is written with one (feet, fractions and gauges
 * count as inches, metres and centimetres as millimetres); inches if none is.
 */
export function findResultUnit(texts: readonly string[]): 'in' | 'mm' {
  for (const text of texts) {
    const unit = isGaugeText(text) ? 'in' : findWrittenLengthUnit(text);
    if (unit !== undefined) return toResultUnit(unit);
  }
  return 'in';
}

/** Results are in inches or millimetres, whichever goes with a unit. */
export function toResultUnit(unit: LengthUnit): 'in' | 'mm' {
  return unit === 'in' || unit === 'ft' ? 'in' : 'mm';
}
