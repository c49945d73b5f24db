import { D, formatNumber, formatForce, toForce, type UnitSystem } from '@brakeven/values';
import { toForceUnit } from '@brakeven/forming';

const MM_PER_UNIT: Readonly<Record<UnitSystem, number>> = { us: 25.4, metric: 1 };
const LOCALE = 'en-US';

/** The unit of length of a shop, and that of results. */
export const LENGTH_UNIT_OF: Readonly<Record<UnitSystem, 'in' | 'mm'>> = { us: 'in', metric: 'mm' };

/** A computed length in the shop's unit: 0.412 in or 10.46 mm; places as a scale on the press reads. */
export function toLengthWords(millimetres: number, units: UnitSystem): string {
  return `${toLengthNumber(millimetres, units)}\u00a0${LENGTH_UNIT_OF[units]}`;
}

/** The same without its unit, for a column that names it. */
export function toLengthNumber(millimetres: number, units: UnitSystem): string {
  const places = units === 'us' ? 3 : 2;
  return toNumberWords(millimetres / MM_PER_UNIT[units], places);
}

/** A size that was made to a round figure, without needless noughts: 1.25 in or 24 mm. */
export function toSizeWords(millimetres: number, units: UnitSystem): string {
  const value = D((millimetres / MM_PER_UNIT[units]).toFixed(6));
  const number = formatNumber(value, LOCALE, { maximumFractionDigits: units === 'us' ? 4 : 2 });
  return `${number}\u00a0${LENGTH_UNIT_OF[units]}`;
}

/** Millimetres as they are typed into a field: in the shop's unit where four decimals hold them, else in mm. */
export function toSizeText(millimetres: string, units: UnitSystem): string {
  const inches = Number((Number(millimetres) / MM_PER_UNIT.us).toFixed(4));
  const isHeld = Math.abs(inches * MM_PER_UNIT.us - Number(millimetres)) < 1e-5;
  return units === 'us' && isHeld ? `${inches} in` : `${Number(millimetres)} mm`;
}

/** A force in the shop's unit, one decimal: 42.1 US tons or 374.5 kN. */
export function toForceWords(kilonewtons: number, units: UnitSystem): string {
  return formatForce(toForce(kilonewtons.toFixed(6), 'kN'), units);
}

/** A band of force: 31.2–42.1 US tons. */
export function toForceBand(lowKn: number, highKn: number, units: UnitSystem): string {
  const low = toNumberWords(toForceUnit(lowKn, LENGTH_UNIT_OF[units]), 1);
  return `${low}–${toForceWords(highKn, units)}`;
}

/** The same band as bare numbers, for a column that names the unit. */
export function toForceBandNumbers(lowKn: number, highKn: number, units: UnitSystem): string {
  return [lowKn, highKn].map((force) => toForceNumber(force, units)).join('–');
}

/** A force as a bare number, one decimal. */
export function toForceNumber(kilonewtons: number, units: UnitSystem): string {
  return toNumberWords(toForceUnit(kilonewtons, LENGTH_UNIT_OF[units]), 1);
}

/** An angle in degrees: 90° or 92.5°. */
export function toAngleWords(degrees: number): string {
  return `${formatNumber(D(degrees.toFixed(2)), LOCALE, { maximumFractionDigits: 1 })}°`;
}

/** A share of one: 62 %. */
export function toPercentWords(share: number): string {
  return `${Math.round(share * 100)}\u00a0%`;
}

/** A number with so many decimals and a typographic minus; none before what rounds to nought. */
export function toNumberWords(value: number, places: number): string {
  return formatNumber(D(value.toFixed(places + 3)), LOCALE, {
    minimumFractionDigits: places,
    maximumFractionDigits: places,
    signDisplay: 'negative',
  });
}
