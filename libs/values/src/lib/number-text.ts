import { D, type Decimal } from './decimal';

const PLAIN = /^[+-]?(\d+(\.\d*)?|\.\d+)$/;
const GROUPED = /^[+-]?\d{1,3}(,\d{3})+(\.\d*)?$/;

/**
 * Reads a number as people write it in the United States: a decimal point, commas only between full groups of
 * three digits, a hyphen or a typographic minus. `7,5` and `1.234,50` give undefined, so they are never misread.
 */
export function findNumberInText(text: string): Decimal | undefined {
  const tidy = text.trim().replace('−', '-');
  if (PLAIN.test(tidy)) return D(tidy);
  if (GROUPED.test(tidy)) return D(tidy.replaceAll(',', ''));
  return undefined;
}

/**
 * Formats a decimal with grouping and a typographic minus sign.
 * `options` are those of Intl.NumberFormat; formatters are kept, since making one costs more than using it.
 */
export function formatNumber(value: Decimal, locale: string, options: Intl.NumberFormatOptions): string {
  const parts = numberFormat(locale, options).formatToParts(value.toFixed() as Intl.StringNumericLiteral);
  return parts.map((part) => (part.type === 'minusSign' ? '−' : part.value)).join('');
}

const formats = new Map<string, Intl.NumberFormat>();

function numberFormat(locale: string, options: Intl.NumberFormatOptions): Intl.NumberFormat {
  const key = `${locale} ${JSON.stringify(options)}`;
  const known = formats.get(key);
  if (known) return known;
  const made = new Intl.NumberFormat(locale, { roundingMode: 'halfExpand', ...options });
  formats.set(key, made);
  return made;
}
