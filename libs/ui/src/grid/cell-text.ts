import { formatHours, formatLocalDate, formatMoney, formatRate, toLocalDate } from '@brakeven/values';
import { type ShopFormat } from '../shop-format';
import { type GridKind } from './grid-column';

const NUMBERS: readonly GridKind[] = ['money', 'rate', 'hours', 'count', 'number'];

/** Whether a kind is written at the right and sorted as a number. */
export function isNumeric(kind: GridKind = 'text'): boolean {
  return NUMBERS.includes(kind);
}

/** What a cell says: the value in the way of its kind, nothing if there is none. */
export function toCellText(
  value: string | number | null | undefined,
  kind: GridKind = 'text',
  format: Pick<ShopFormat, 'currency'>,
): string {
  if (value === null || value === undefined || value === '') return '';
  const text = String(value);
  switch (kind) {
    case 'money':
      return formatMoney(text, format.currency);
    case 'rate':
      return formatRate(text, format.currency);
    case 'hours':
      return formatHours(text);
    case 'date':
      return formatLocalDate(toLocalDate(text));
    case 'count':
      return Number(text).toLocaleString('en-US');
    default:
      return text;
  }
}

/** Orders two values of a kind; absent ones first. For rows that are all here; the server sorts the others. */
export function compareValues(
  a: string | number | null | undefined,
  b: string | number | null | undefined,
  kind: GridKind = 'text',
): number {
  const [hasA, hasB] = [a !== null && a !== undefined, b !== null && b !== undefined];
  if (!hasA || !hasB) return Number(hasA) - Number(hasB);
  if (isNumeric(kind)) return Number(a) - Number(b);
  return String(a).localeCompare(String(b), 'en', { numeric: true });
}
