import { accepted, type Parsed, quoted, refused } from '@brakeven/values';

/**
 * Reads an inside angle in degrees: '90', '92.5°', '90 deg'. Its range is checked with the bend.
 * Code: `not_an_angle`.
 */
export function parseAngle(text: string): Parsed<number> {
  const [, number] = /^(\d+(?:\.\d*)?|\.\d+)\s*(?:°|deg|degrees?)?$/i.exec(text.trim()) ?? [];
  if (number !== undefined) return accepted(Number(number));
  const message = `${quoted(text)} cannot be read as an angle. Write the inside angle of the finished part in degrees, 20 to 175, such as 90.`;
  return refused('not_an_angle', message);
}
