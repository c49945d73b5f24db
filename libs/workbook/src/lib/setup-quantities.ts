import {
  D,
  type Decimal,
  densityIn,
  findDensityUnit,
  findForcePerLengthUnit,
  findForceUnit,
  findLengthUnit,
  findMassUnit,
  findStressUnit,
  forceIn,
  forcePerLengthIn,
  lengthIn,
  massIn,
  type Parsed,
  parseDensity,
  parseForce,
  parseForcePerLength,
  parseLength,
  parseMass,
  parseStress,
  stressIn,
  toDensity,
  toForce,
  toForcePerLength,
  toLength,
  toMass,
  toStress,
  type UnitSystem,
} from '@brakeven/values';
import { findHeaderUnit, findPerUnit } from './header-text';
import { type SetupCellKind } from './setup-plan';

/** How one kind of quantity is read and written; base units are those of libs/values. */
export interface SetupQuantity {
  /** What it is called in messages. */
  readonly noun: string;
  /** Of columns whose header names none. */
  readonly units: Readonly<Record<UnitSystem, string>>;
  /** Written into headers. */
  readonly headerUnits: Readonly<Record<UnitSystem, string>>;
  readonly unitsInWords: string;
  findUnit(word: string): string | undefined;
  parse(text: string, unit: string): Parsed<Decimal>;
  toBase(value: number | string, unit: string): Decimal;
  fromBase(value: string, system: UnitSystem): Decimal;
}

interface Conversions<U extends string, Q extends Decimal> {
  units: Readonly<Record<UnitSystem, U>>;
  findUnit(word: string): U | undefined;
  parse(text: string, unitIfNone: U): Parsed<Q>;
  to(value: number | string, unit: U): Q;
  in(quantity: Q, unit: U): Decimal;
}

/** Units come from `findUnit` or the table, so that text may stand for them from here on. */
function quantity<U extends string, Q extends Decimal>(
  noun: string,
  unitsInWords: string,
  { units, findUnit, parse, to, in: convert }: Conversions<U, Q>,
  headerUnits: Readonly<Record<UnitSystem, string>> = units,
): SetupQuantity {
  return {
    noun,
    unitsInWords,
    units,
    headerUnits,
    findUnit,
    parse: (text, unit) => parse(text, unit as U),
    toBase: (value, unit) => to(value, unit as U),
    fromBase: (value, system) => convert(D(value) as Q, units[system]),
  };
}

const LENGTHS = {
  units: { us: 'in', metric: 'mm' },
  findUnit: findLengthUnit,
  parse: parseLength,
  to: toLength,
  in: lengthIn,
} as const;

const QUANTITIES: Readonly<Partial<Record<SetupCellKind, SetupQuantity>>> = {
  force: quantity(
    'force',
    '(tons), (tonnes) or (kN)',
    {
      units: { us: 'US ton', metric: 'kN' },
      findUnit: findForceUnit,
      parse: parseForce,
      to: toForce,
      in: forceIn,
    },
    { us: 'tons', metric: 'kN' },
  ),
  forcePerLength: quantity(
    'force per length',
    '(tons/ft), (kN/m) or (tonnes/m)',
    {
      units: { us: 'US ton/ft', metric: 'kN/m' },
      findUnit: findForcePerLengthUnit,
      parse: parseForcePerLength,
      to: toForcePerLength,
      in: forcePerLengthIn,
    },
    { us: 'tons/ft', metric: 'kN/m' },
  ),
  length: quantity('length', '(in), (ft) or (mm)', LENGTHS),
  radius: quantity('radius', '(in), (ft) or (mm)', LENGTHS),
  mass: quantity('weight', '(lb) or (kg)', {
    units: { us: 'lb', metric: 'kg' },
    findUnit: findMassUnit,
    parse: parseMass,
    to: toMass,
    in: massIn,
  }),
  density: quantity('density', '(lb/in³), (g/cm³) or (kg/m³)', {
    units: { us: 'lb/in³', metric: 'kg/m³' },
    findUnit: findDensityUnit,
    parse: parseDensity,
    to: toDensity,
    in: densityIn,
  }),
  strength: quantity('strength', '(ksi), (psi) or (MPa)', {
    units: { us: 'ksi', metric: 'MPa' },
    findUnit: findStressUnit,
    parse: parseStress,
    to: toStress,
    in: stressIn,
  }),
};

/** How a kind of quantity is read and written; undefined for what has no unit of its own. */
export function findSetupQuantity(kind: SetupCellKind): SetupQuantity | undefined {
  return QUANTITIES[kind];
}

/** A column whose cells are in a unit: which words its header takes, and the unit if it names none. */
interface HeaderUnits {
  named: string | null;
  findUnit(word: string): string | undefined;
  units: Readonly<Record<UnitSystem, string>>;
}

/**
 * The unit that a header or the shop's units give a column, empty for a column without units; undefined when the
 * header names one that is not known.
 */
export function findColumnUnit(kind: SetupCellKind, header: string, units: UnitSystem): string | undefined {
  const inHeader = findHeaderUnits(kind, header);
  if (!inHeader) return '';
  return inHeader.named === null ? inHeader.units[units] : inHeader.findUnit(inHeader.named);
}

function findHeaderUnits(kind: SetupCellKind, header: string): HeaderUnits | undefined {
  const form = findSetupQuantity(UNIT_OF[kind] ?? kind);
  if (!form) return undefined;
  const named = kind === 'pricePerWeight' ? findPerUnit(header) : findHeaderUnit(header);
  return { named, findUnit: form.findUnit, units: form.units };
}

/** Whose units a kind of cell has, if not its own. */
const UNIT_OF: Readonly<Partial<Record<SetupCellKind, SetupCellKind>>> = {
  thickness: 'length',
  pricePerWeight: 'mass',
};

/** The units that the header of a column may name, in words. */
export function listUnitsInWords(kind: SetupCellKind): string {
  if (kind === 'pricePerWeight') return 'per lb or per kg';
  return findSetupQuantity(UNIT_OF[kind] ?? kind)?.unitsInWords ?? '';
}

/** A column's header as it is written, with its unit. */
export function toUnitHeader(header: string, kind: SetupCellKind, units: UnitSystem): string {
  const form = findSetupQuantity(UNIT_OF[kind] ?? kind);
  if (!form) return header;
  const unit = form.headerUnits[units];
  return kind === 'pricePerWeight' ? `${header} per ${unit}` : `${header} (${unit})`;
}
