/**
 * A header in its plainest form for comparing: lower case, units in brackets and punctuation gone, `#` and `No.`
 * as `no`, no spaces. `Emp. # (badge)` → `empno`.
 */
export function toPlainHeader(text: string): string {
  return text
    .toLowerCase()
    .replace(/\([^)]*\)|\[[^\]]*\]/g, ' ')
    .replace(/#/g, ' no ')
    .replace(/\bnum(ber)?\b|№/g, 'no')
    .replace(/[^\p{L}\p{N}%]+/gu, '');
}

/** The unit in the last brackets of a header, such as `tons` of `Rated force (tons)`; null without brackets. */
export function findHeaderUnit(text: string): string | null {
  const units = [...text.matchAll(/[([]([^)\]]*)[)\]]/g)].map(([, unit = '']) => unit.trim());
  return units.at(-1) || null;
}

const PER_UNIT = /\bper\s+([\p{L}]+)/iu;

/** The unit behind `per`, such as `lb` of `Price per lb ($)`; else what the last brackets hold; null without either. */
export function findPerUnit(text: string): string | null {
  return PER_UNIT.exec(text)?.[1] ?? findHeaderUnit(text);
}

/** A header without `per` and the unit behind it: `Price per lb` → `Price `. */
export function withoutPerUnit(text: string): string {
  return text.replace(PER_UNIT, ' ');
}
