// A spreadsheet takes text that begins so for a formula when it opens a CSV file.
const READS_AS_FORMULA = /^[=+\-@\t\r]/;

/** Text for a CSV file that no spreadsheet runs as a formula: what looks like one is led by an apostrophe. */
export function guardText(text: string): string {
  return READS_AS_FORMULA.test(text) ? `'${text}` : text;
}

/** A cell of a CSV file; numbers, as decimal text, stand as they are: what is below 0 is no formula. */
export interface CsvCell {
  text: string;
  isNumber?: boolean;
}

/** One record of a CSV file as RFC 4180 has it, its end included; text guarded, null empty. */
export function toCsvRecord(cells: readonly (CsvCell | null)[]): string {
  return `${cells.map((cell) => (cell ? toFieldText(cell) : '')).join(',')}\r\n`;
}

function toFieldText({ text, isNumber }: CsvCell): string {
  const safe = isNumber ? text : guardText(text);
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
