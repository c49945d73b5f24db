// ISO/IEC 29500-1 22.9.2.19 ST_Xstring: _x000D_ stands for the character with that code, so that a text which looks
// like one needs its underscore escaped.
const ESCAPED = /_x([0-9a-f]{4})_/gi;
const LOOKS_ESCAPED = /_(?=x[0-9a-f]{4}_)/gi;

/** Text of a workbook cell as it is meant: `a_x000D_b` has a carriage return in it. */
export function decodeEscapedText(stored: string): string {
  return stored.replace(ESCAPED, (_, code: string) => String.fromCharCode(Number.parseInt(code, 16)));
}

/** Text as a workbook stores it, so that it comes back as it was. */
export function encodeEscapedText(text: string): string {
  return text.replace(LOOKS_ESCAPED, '_x005F_');
}
