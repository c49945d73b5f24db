import { type RawBuilder, sql } from 'kysely';

export type Direction = 'asc' | 'desc';

/** What a list is sorted by. Rows without a value come last in either direction. */
export interface SortKey {
  expression: RawBuilder<unknown>;
  type: 'date' | 'numeric' | 'text';
  isNullable?: boolean;
}

/** The last row of the page before: its sort value as text, and its id, which makes the order total. */
export interface KeysetPosition {
  value: string | null;
  id: string;
}

/** Names and numbers in the order that people expect, the same on every machine. */
export function inReadingOrder(expression: RawBuilder<unknown>): RawBuilder<unknown> {
  return sql`${expression} collate "und-x-icu"`;
}

/** The condition of the rows after a position; true for the first page. */
export function isAfter(
  key: SortKey,
  idExpression: RawBuilder<unknown>,
  direction: Direction,
  position: KeysetPosition | null,
): RawBuilder<boolean> {
  if (position === null) return sql`true`;
  const beyond = sql.raw(direction === 'asc' ? '>' : '<');
  const id = sql`${position.id}::uuid`;
  if (position.value === null) return sql`${key.expression} is null and ${idExpression} ${beyond} ${id}`;
  const value = sql`${position.value}::${sql.raw(key.type)}`;
  const later = sql<boolean>`(${key.expression}, ${idExpression}) ${beyond} (${value}, ${id})`;
  return key.isNullable ? sql`(${later} or ${key.expression} is null)` : later;
}

/** The `order by` that goes with `isAfter`. */
export function orderByKey(
  key: SortKey,
  idExpression: RawBuilder<unknown>,
  direction: Direction,
): RawBuilder<unknown> {
  const way = sql.raw(direction);
  return sql`${key.expression} ${way} ${sql.raw(key.isNullable ? 'nulls last' : '')}, ${idExpression} ${way}`;
}

/** A pattern that finds `text` anywhere, whatever its case; wildcards in it stand for themselves. */
export function containing(text: string): string {
  return `%${text.replace(/[\\%_]/g, '\\$&')}%`;
}

/** Conditions joined by `and`; `true` if there are none. */
export function allOf(conditions: readonly RawBuilder<unknown>[]): RawBuilder<boolean> {
  return conditions.length === 0 ? sql`true` : sql`${sql.join(conditions, sql` and `)}`;
}
