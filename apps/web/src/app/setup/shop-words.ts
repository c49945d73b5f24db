import { type UnitSystem } from '@brakeven/values';

/** Sunday first, as the shop's setting counts. */
export const WEEKDAYS = [
  'Sunday',
  'Monday',
  'Tuesday',
  'Wednesday',
  'Thursday',
  'Friday',
  'Saturday',
] as const;

export const UNIT_WORDS: Record<UnitSystem, string> = {
  us: 'Inches, pounds, US tons',
  metric: 'Millimetres, kilograms, kilonewtons',
};
export const UNIT_OPTIONS = Object.entries(UNIT_WORDS).map(([value, label]) => ({ value, label }));

/** The time zones that this browser knows, and the shop's own in any case. */
export function listTimeZones(own: string): string[] {
  const known = Intl.supportedValuesOf('timeZone');
  return known.includes(own) ? known : [own, ...known];
}
