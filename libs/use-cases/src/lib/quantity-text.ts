import { D } from '@brakeven/values';

/** Without the noughts that fill up the column's scale: '533.78650' is '533.7865'; null stays null. */
export function toPlainText<T extends string | null>(stored: T): T {
  return (stored === null ? null : D(stored).toFixed()) as T;
}
