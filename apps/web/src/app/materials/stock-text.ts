import {
  D,
  type Decimal,
  densityIn,
  type DensityUnit,
  formatNumber,
  massIn,
  type MassUnit,
  parseDensity,
  parseMass,
  parseRate,
  parseStress,
  rateText,
  roundHalfUp,
  stressIn,
  type StressUnit,
  toDensity,
  toMass,
  toRate,
  toStress,
  type UnitSystem,
} from '@brakeven/values';

export const MASS_UNITS: Record<UnitSystem, MassUnit> = { us: 'lb', metric: 'kg' };
export const DENSITY_UNITS: Record<UnitSystem, DensityUnit> = { us: 'lb/in³', metric: 'kg/m³' };
export const STRESS_UNITS: Record<UnitSystem, StressUnit> = { us: 'ksi', metric: 'MPa' };

const SHOWN_DECIMALS = 4;
const shown = (value: Decimal, decimals = SHOWN_DECIMALS): string =>
  D(roundHalfUp(value, decimals)).toFixed();

/** How many kilograms the shop's unit of weight holds, exactly. */
const kilogramsPerUnit = (units: UnitSystem): Decimal => toMass(1, MASS_UNITS[units]);

/** Kilograms as a field shows them in the shop's unit; empty for none. */
export function toMassFieldText(kilograms: string | null, units: UnitSystem): string {
  return kilograms === null ? '' : shown(massIn(toMass(kilograms, 'kg'), MASS_UNITS[units]));
}

/** What a field says in kilograms, ten decimals; what was kept stays when the text is as it was shown. */
export function toKilograms(text: string, units: UnitSystem, kept: string | null): string | null {
  if (text.trim() === '') return null;
  if (kept !== null && text.trim() === toMassFieldText(kept, units)) return kept;
  const parsed = parseMass(text, MASS_UNITS[units]);
  return parsed.ok ? roundHalfUp(parsed.value, 10).toFixed() : null;
}

/** A weight for people, with its sign and unit, always two decimals so that columns of them align. */
export function toMassWords(kilograms: string, units: UnitSystem): string {
  const unit = MASS_UNITS[units];
  const decimals = { minimumFractionDigits: 2, maximumFractionDigits: 2 };
  return `${formatNumber(massIn(toMass(kilograms, 'kg'), unit), 'en-US', decimals)}\u00a0${unit}`;
}

/** Money per kilogram as money per unit of weight of the shop, four decimals. */
export function toRatePerUnit(ratePerKg: string, units: UnitSystem): string {
  return rateText(toRate(roundHalfUp(D(ratePerKg).times(kilogramsPerUnit(units)), SHOWN_DECIMALS)));
}

/** Money per kilogram as people of the shop read it, per unit of weight and always four decimals; a dash for none. */
export function toPriceWords(
  ratePerKg: string | null | undefined,
  { units, currency }: { units: UnitSystem; currency: string },
): string {
  if (ratePerKg === null || ratePerKg === undefined) return '–';
  const decimals = { minimumFractionDigits: SHOWN_DECIMALS, maximumFractionDigits: SHOWN_DECIMALS };
  return formatNumber(D(toRatePerUnit(ratePerKg, units)), 'en-US', {
    style: 'currency',
    currency,
    ...decimals,
  });
}

/** Money per unit of weight of the shop, as typed, as money per kilogram; what cannot be read goes as it is. */
export function toRatePerKg(text: string, units: UnitSystem, kept: string | null): string {
  if (text.trim() === '') return '0';
  if (kept !== null && text.trim() === toRatePerUnit(kept, units)) return kept;
  const parsed = parseRate(text);
  return parsed.ok ? rateText(toRate(parsed.value.div(kilogramsPerUnit(units)))) : text;
}

/** kg/m³ as a field shows them in the shop's unit; empty for none. */
export function toDensityText(kgPerM3: string | null, units: UnitSystem): string {
  return kgPerM3 === null ? '' : shown(densityIn(toDensity(kgPerM3, 'kg/m³'), DENSITY_UNITS[units]));
}

/** What a field says in kg/m³; one of those known stays to the last digit when the text is as it was shown. */
export function toKilogramsPerM3(
  text: string,
  units: UnitSystem,
  known: readonly (string | null)[],
): string | null {
  const kept = known.find((density) => density !== null && toDensityText(density, units) === text.trim());
  if (kept !== undefined) return kept;
  const parsed = parseDensity(text, DENSITY_UNITS[units]);
  return text.trim() !== '' && parsed.ok ? roundHalfUp(parsed.value, 3).toFixed() : null;
}

/** MPa as a field shows them in the shop's unit; empty for none. */
export function toStressText(mpa: string | null, units: UnitSystem): string {
  return mpa === null ? '' : shown(stressIn(toStress(mpa, 'MPa'), STRESS_UNITS[units]), 2);
}

/** What a field says in MPa; likewise. */
export function toMegapascals(
  text: string,
  units: UnitSystem,
  known: readonly (string | null)[],
): string | null {
  const kept = known.find((stress) => stress !== null && toStressText(stress, units) === text.trim());
  if (kept !== undefined) return kept;
  const parsed = parseStress(text, STRESS_UNITS[units]);
  return text.trim() !== '' && parsed.ok ? roundHalfUp(parsed.value, 3).toFixed() : null;
}
