import { AppError } from '@brakeven/contract';
import { z } from 'zod';

const dateText = z.iso.date();
const numberText = z.string().regex(/^-?\d{1,20}(\.\d{1,10})?$/);
// PostgreSQL has no text with a NUL in it.
const text = z.string().refine((value) => !value.includes('\0'));

/** Kinds of sort values, as their columns have them. */
const VALUES = { date: dateText, numeric: numberText, text };
export type SortType = keyof typeof VALUES;

/** Schema of the place where a sorted list goes on: the last row's sort value and id. */
export function positionSchema(type: SortType) {
  return z.object({ value: VALUES[type].nullable(), id: z.uuid() });
}

/** Schema of the place where a list of cost lines goes on. */
export const linePositionSchema = z.object({
  postedOn: dateText,
  sourceId: z.uuid(),
  category: z.string().regex(/^[a-z]{1,20}$/),
});

/**
 * Packs the last row of a page into the text that asks for the next one.
 * @param list names the list and its order; a cursor of another one is refused
 */
export function writeCursor(list: string, position: object): string {
  return Buffer.from(JSON.stringify({ list, position })).toString('base64url');
}

/**
 * Unpacks a cursor; null without one.
 * @throws AppError `invalid_input` if it was not written by `writeCursor` for the same list
 */
export function readCursor<T>(cursor: string | undefined, list: string, position: z.ZodType<T>): T | null {
  if (cursor === undefined) return null;
  const parsed = z.object({ list: z.literal(list), position }).safeParse(unpack(cursor));
  if (parsed.success) return parsed.data.position;
  const message = 'This page cannot be continued from here. Load the list again from its start.';
  throw new AppError('invalid_input', message, {
    issues: [{ field: 'cursor', code: 'invalid_cursor', message }],
  });
}

function unpack(cursor: string): unknown {
  try {
    return JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
  } catch {
    return undefined;
  }
}

/** Of `limit + 1` rows read, those of the page, and the cursor if there are more. */
export function cutPage<Row>(
  rows: readonly Row[],
  limit: number,
  toCursor: (last: Row) => string,
): { rows: Row[]; nextCursor: string | null } {
  const page = rows.slice(0, limit);
  const last = page.at(-1);
  return { rows: page, nextCursor: last && rows.length > limit ? toCursor(last) : null };
}
