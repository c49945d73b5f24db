import {
  D,
  forceIn,
  type ForceUnit,
  lengthIn,
  type LengthUnit,
  parseForce,
  parseLength,
  roundHalfUp,
  toForce,
  toLength,
  type UnitSystem,
} from '@brakeven/values';

/** Decimals that a quantity is kept with, and those that a field shows. */
const KEPT_DECIMALS = 5;
const SHOWN_DECIMALS = 4;

export const FORCE_UNITS: Record<UnitSystem, ForceUnit> = { us: 'US ton', metric: 'kN' };
export const LENGTH_UNITS: Record<UnitSystem, LengthUnit> = { us: 'in', metric: 'mm' };

/** Kilonewtons as a field shows them in the shop's unit; empty for none. */
export function toForceText(kilonewtons: string | null, units: UnitSystem): string {
  if (kilonewtons === null) return '';
  return D(roundHalfUp(forceIn(toForce(kilonewtons, 'kN'), FORCE_UNITS[units]), SHOWN_DECIMALS)).toString();
}

/** Millimetres as a field shows them in the shop's unit; empty for none. */
export function toLengthText(millimetres: string | null, units: UnitSystem): string {
  if (millimetres === null) return '';
  return D(
    roundHalfUp(lengthIn(toLength(millimetres, 'mm'), LENGTH_UNITS[units]), SHOWN_DECIMALS),
  ).toString();
}

/** What a field says in kilonewtons; what was kept before stays to the last digit when the text is as it was shown. */
export function toKilonewtons(text: string, units: UnitSystem, kept: string | null): string | null {
  if (text.trim() === '') return null;
  if (text.trim() === toForceText(kept, units)) return kept;
  const parsed = parseForce(text, FORCE_UNITS[units]);
  return parsed.ok ? roundHalfUp(parsed.value, KEPT_DECIMALS).toFixed() : null;
}

/** What a field says in millimetres; likewise. */
export function toMillimetres(text: string, units: UnitSystem, kept: string | null): string | null {
  if (text.trim() === '') return null;
  if (text.trim() === toLengthText(kept, units)) return kept;
  const parsed = parseLength(text, LENGTH_UNITS[units]);
  return parsed.ok ? roundHalfUp(parsed.value, KEPT_DECIMALS).toFixed() : null;
}
