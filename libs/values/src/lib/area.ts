import { type Branded, D, type Decimal, type DecimalInput } from './decimal';
import { type Parsed } from './parsed';
import { fromBaseUnit, parseQuantity, toBaseUnit, type UnitTable } from './quantity';

/** An area of floor; square metres inside. */
export type Area = Branded<'Area'>;

/** Units in which an area is written. */
export type AreaUnit = 'm²' | 'sq ft';

// Source: international yard and pound agreement of 1959 (NIST SP 811, appendix B): 1 ft = 0.3048 m exactly, squared.
const AREAS: UnitTable<AreaUnit> = {
  'm²': { factor: '1', words: ['m²', 'm2', 'sq m', 'square meters', 'square metres'] },
  'sq ft': { factor: '0.09290304', words: ['sq ft', 'ft²', 'ft2', 'square feet'] },
};

/** An area of so many units, exactly. */
export function toArea(value: DecimalInput, unit: AreaUnit): Area {
  return toBaseUnit(AREAS, D(value), unit) as Area;
}

/** How many of `unit` an area is. */
export function areaIn(area: Area, unit: AreaUnit): Decimal {
  return fromBaseUnit(AREAS, area, unit);
}

/** Reads '120', '120 sq ft' or '11.2 m²'; a bare number is in `unitIfNone`. Codes as in `parseQuantity`. */
export function parseArea(text: string, unitIfNone: AreaUnit): Parsed<Area> {
  const example = 'Write an area such as 120 sq ft or 11.2 m².';
  return parseQuantity(AREAS, text, unitIfNone, example) as Parsed<Area>;
}
