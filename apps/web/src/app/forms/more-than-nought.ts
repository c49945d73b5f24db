import { type Decimal, type Parsed, refused } from '@brakeven/values';

/** A reader that refuses nought and less, for what cannot be nothing. Code: `not_positive`. */
export function moreThanNought<T extends Decimal>(
  parse: (text: string) => Parsed<T>,
): (text: string) => Parsed<T> {
  return (text) => {
    const parsed = parse(text);
    if (!parsed.ok || parsed.value.gt(0)) return parsed;
    return refused('not_positive', 'Must be more than 0.');
  };
}
