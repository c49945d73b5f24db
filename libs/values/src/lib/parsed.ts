/** What reading a text gave: the value, or a code for programs and words for people. */
export type Parsed<T> = { ok: true; value: T } | { ok: false; code: string; message: string };

/** Wraps a value that was read. */
export function accepted<T>(value: T): Parsed<T> {
  return { ok: true, value };
}

/** Wraps the reason why nothing was read; the message says what is accepted, with an example. */
export function refused<T>(code: string, message: string): Parsed<T> {
  return { ok: false, code, message };
}

/** A text as messages quote it: in quotation marks, cut after 40 characters, so that no cell floods a message. */
export function quoted(text: string): string {
  return `'${text.length > 40 ? `${text.slice(0, 40)}…` : text}'`;
}
