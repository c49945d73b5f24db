const LETTERS = 26;
const CODE_BEFORE_A = 64;

/** Letters of a column counted from 1: 1 → `A`, 27 → `AA`. */
export function columnLetters(column: number): string {
  let rest = column;
  let letters = '';
  while (rest > 0) {
    const digit = (rest - 1) % LETTERS;
    letters = String.fromCharCode(CODE_BEFORE_A + 1 + digit) + letters;
    rest = (rest - 1 - digit) / LETTERS;
  }
  return letters;
}

/** Number of the column of an address or of column letters: `C` or `C12` → 3. */
export function columnNumber(address: string): number {
  let column = 0;
  for (const letter of columnOf(address)) column = column * LETTERS + letter.charCodeAt(0) - CODE_BEFORE_A;
  return column;
}

/** Column letters of an address: `AB12` → `AB`. */
export function columnOf(address: string): string {
  let end = 0;
  while (address.charCodeAt(end) > CODE_BEFORE_A) end += 1;
  return address.slice(0, end);
}

/** Row number of an address: `AB12` → 12. */
export function rowOf(address: string): number {
  return Number(/\d+$/.exec(address)?.[0] ?? 0);
}
