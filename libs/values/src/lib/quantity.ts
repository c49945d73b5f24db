import { D, type Decimal } from './decimal';
import { findNumberInText } from './number-text';
import { accepted, type Parsed, quoted, refused } from './parsed';

/** Units of one kind of quantity: how many base units each holds, and the words that name it. */
export type UnitTable<Unit extends string> = Readonly<
  Record<Unit, { factor: string; words: readonly string[] }>
>;

/** Converts `value` of `unit` to the base unit of its table, exactly. */
export function toBaseUnit<U extends string>(table: UnitTable<U>, value: Decimal, unit: U): Decimal {
  return value.times(D(table[unit].factor));
}

/** Converts base units to `unit`; exact where the quotient ends, else to 40 digits. */
export function fromBaseUnit<U extends string>(table: UnitTable<U>, value: Decimal, unit: U): Decimal {
  return value.div(D(table[unit].factor));
}

/**
 * Reads a quantity of nought or more, in the unit written behind it, else in `unitIfNone`, into base units.
 * Codes: `not_a_quantity`, `unknown_unit`, `negative`. `example` ends every message.
 */
export function parseQuantity<U extends string>(
  table: UnitTable<U>,
  text: string,
  unitIfNone: U,
  example: string,
): Parsed<Decimal> {
  const [, numberText = '', unitText = ''] = /^([+−-]?[\d.,]+)\s*(.*)$/.exec(text.trim()) ?? [];
  const number = findNumberInText(numberText);
  if (!number) return refused('not_a_quantity', `${quoted(text)} cannot be read. ${example}`);
  if (number.lt(0)) return refused('negative', `${quoted(text)} is below 0. ${example}`);
  const unit = unitText === '' ? unitIfNone : findUnit(table, unitText);
  if (!unit) return refused('unknown_unit', `${quoted(unitText)} is not a unit known here. ${example}`);
  return accepted(toBaseUnit(table, number, unit));
}

/** Finds the unit that a word names, whatever its case. */
export function findUnit<U extends string>(table: UnitTable<U>, word: string): U | undefined {
  const plain = word.trim().toLowerCase().replace(/\.$/, '');
  const units = Object.keys(table) as U[];
  return units.find((unit) => table[unit].words.includes(plain));
}
