import { forceIn, parseForce, type Parsed, accepted, toForce, type UnitSystem } from '@brakeven/values';

/** Metres of the length that a force limit is given for: a foot or a metre. */
const METRES: Readonly<Record<UnitSystem, number>> = { us: 0.3048, metric: 1 };

/** The unit of a force limit of a tool. */
export const LIMIT_UNITS: Readonly<Record<UnitSystem, string>> = { us: 'US tons per ft', metric: 'kN per m' };

/** Reads a force limit of a tool over a length of the shop's unit, in kN per m. */
export function parseLimit(text: string, units: UnitSystem): Parsed<number> {
  const force = parseForce(text, units === 'us' ? 'US ton' : 'kN');
  return force.ok ? accepted(force.value.toNumber() / METRES[units]) : force;
}

/** A force limit as a field shows it; empty where none is known. */
export function toLimitText(kilonewtonsPerM: string | null, units: UnitSystem): string {
  if (kilonewtonsPerM === null) return '';
  const perLength = toForce((Number(kilonewtonsPerM) * METRES[units]).toFixed(9), 'kN');
  return String(
    Number(
      forceIn(perLength, units === 'us' ? 'US ton' : 'kN')
        .toNumber()
        .toFixed(3),
    ),
  );
}

/** What the server takes: kN per m; what was kept stays to the last digit where the text is as it was shown. */
export function toLimitInput(text: string, units: UnitSystem, kept: string | null): string | null {
  if (text.trim() === '') return null;
  if (text.trim() === toLimitText(kept, units)) return kept;
  const parsed = parseLimit(text, units);
  return parsed.ok ? String(Number(parsed.value.toFixed(5))) : null;
}

/** A plain number as the server takes it; null for an empty field. */
export function toPlainText(text: string): string | null {
  return text.trim() === '' ? null : text.trim().replace(/\s*°$/, '');
}

/** Words for what is no number within bounds; null for one that is, or for an empty field. */
export function numberWords(min: number, max: number, words: string) {
  return ({ value }: { value: unknown }) => {
    const text = toPlainText(String(value ?? ''));
    if (text === null) return null;
    const isNumber = /^(\d+\.?\d*|\.\d+)$/.test(text) && Number(text) >= min && Number(text) <= max;
    return isNumber ? null : { words };
  };
}

/** The range of a tool's angle, in words. */
export const TOOL_ANGLE_WORDS = 'The angle of a tool is 1 to 179 degrees, such as 85.';
