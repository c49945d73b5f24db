/** What a number format makes of a number. `zeros` pads a whole number to that many digits (`00000`). */
export type NumberFormat =
  { readonly kind: 'number'; readonly zeros: number } | { readonly kind: 'percent' | 'date' | 'duration' };

const PLAIN: NumberFormat = { kind: 'number', zeros: 0 };
const DATE: NumberFormat = { kind: 'date' };
const DURATION: NumberFormat = { kind: 'duration' };
const PERCENT: NumberFormat = { kind: 'percent' };

// ISO/IEC 29500-1 18.8.30: formats that a file names by number alone. 27 to 36 and 50 to 58 are dates or times by the
// language of the program; 32 and 33 are times in all that use them. The rest count as dates, so that none is ever
// taken for a number of hours.
const BUILT_IN: ReadonlyMap<number, NumberFormat> = new Map([
  ...[9, 10].map((id) => [id, PERCENT] as const),
  ...[14, 15, 16, 17, 22, 27, 28, 29, 30, 31, 34, 35, 36].map((id) => [id, DATE] as const),
  ...[50, 51, 52, 53, 54, 55, 56, 57, 58].map((id) => [id, DATE] as const),
  ...[18, 19, 20, 21, 32, 33, 45, 46, 47].map((id) => [id, DURATION] as const),
]);

/** The format behind a built-in number, such as 46 for `[h]:mm:ss`. */
export function builtInNumberFormat(id: number): NumberFormat {
  return BUILT_IN.get(id) ?? PLAIN;
}

/**
 * Reads a format code, such as `[h]:mm;@` or `[$-409]d\-mmm\-yy`. Only its first section counts (that of numbers
 * above 0). Days, months, years and eras make a date; hours, minutes and seconds without them a duration.
 */
export function parseNumberFormat(code: string): NumberFormat {
  const section = firstSection(code);
  if (/^0{2,}$/.test(section)) return { kind: 'number', zeros: section.length };
  const letters = section
    .replace(/general/gi, '')
    .replace(/am\/pm|a\/p/gi, '')
    .replace(/e[+-]/gi, '')
    .toLowerCase();
  if (/[ydgeb]|mmm/.test(letters)) return DATE;
  if (/[hs]/.test(letters)) return DURATION;
  if (letters.includes('m')) return /\[m+\]/.test(letters) ? DURATION : DATE;
  return letters.includes('%') ? PERCENT : PLAIN;
}

/** The first section without quoted and escaped text, fillers, colours, conditions and locales; `[h]` stays. */
function firstSection(code: string): string {
  const bare = code.replace(/"[^"]*"?|\\.|_.|\*.|\[(?!(?:h+|m+|s+)\])[^\]]*\]/gi, '');
  return bare.split(';')[0] ?? '';
}
