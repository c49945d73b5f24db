import { type ColumnType } from 'kysely';

/** An instant, read as Date. */
export type Instant = ColumnType<Date, Date | string | undefined, Date | string>;
export type InstantOrNull = ColumnType<Date | null, Date | string | null | undefined, Date | string | null>;
/** A decimal: text in and out; PostgreSQL checks and keeps the scale. */
export type Numeric = string;
export type Json<T> = ColumnType<T, string, string>;
