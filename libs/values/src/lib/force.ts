import { type Branded, D, type DecimalInput, type Decimal, roundHalfUp } from './decimal';
import { formatNumber } from './number-text';
import { type Parsed } from './parsed';
import { findUnit, fromBaseUnit, parseQuantity, toBaseUnit, type UnitTable } from './quantity';
import { type UnitSystem } from './unit-system';

/** A force; kilonewtons inside. */
export type Force = Branded<'Force'>;

/** Units in which a force is written: kilonewton, US (short) ton-force, metric tonne-force, pound-force. */
export type ForceUnit = 'kN' | 'US ton' | 'tonne' | 'lbf';

// Source: 1 lb = 0.45359237 kg and standard gravity 9.80665 m/s², both exact (NIST SP 811, appendix B), so that
// 1 lbf = 4.4482216152605 N, and 2000 lbf make a US ton-force. 'tons' alone is the US ton, as brakes are rated there.
const FORCES: UnitTable<ForceUnit> = {
  kN: { factor: '1', words: ['kn', 'kilonewton', 'kilonewtons'] },
  'US ton': {
    factor: '8.896443230521',
    words: ['us ton', 'us tons', 'ton', 'tons', 'short ton', 'short tons', 'tonf', 'us tonf'],
  },
  tonne: {
    factor: '9.80665',
    words: ['tonne', 'tonnes', 'metric ton', 'metric tons', 'tonne-force', 'tf'],
  },
  lbf: { factor: '0.0044482216152605', words: ['lbf', 'lb', 'lbs', 'pounds', 'pounds-force'] },
};

/** A force of so many units, exactly. */
export function toForce(value: DecimalInput, unit: ForceUnit): Force {
  return toBaseUnit(FORCES, D(value), unit) as Force;
}

/** How many of `unit` a force is. */
export function forceIn(force: Force, unit: ForceUnit): Decimal {
  return fromBaseUnit(FORCES, force, unit);
}

/** A force as it is stored: kilonewtons, five decimals, half-up: '533.78659'. */
export function forceText(force: Force): string {
  return roundHalfUp(force, 5).toFixed(5);
}

/** Reads '60', '60 tons', '54.4 tonnes' or '534 kN'; a bare number is in `unitIfNone`. Codes as in `parseQuantity`. */
export function parseForce(text: string, unitIfNone: ForceUnit): Parsed<Force> {
  const example = 'Write a force such as 60 US tons, 54 tonnes or 534 kN.';
  return parseQuantity(FORCES, text, unitIfNone, example) as Parsed<Force>;
}

/** Finds the unit of force that a word names: 'tons', 'kN', 'tonnes'. */
export function findForceUnit(word: string): ForceUnit | undefined {
  return findUnit(FORCES, word);
}

/** A force for people, the kind of ton always said: '60 US tons' or '533.8 kN', one decimal at most. */
export function formatForce(force: Force, system: UnitSystem, locale = 'en-US'): string {
  const unit = system === 'us' ? 'US ton' : 'kN';
  const number = roundHalfUp(forceIn(force, unit), 1);
  const word = system === 'us' && !number.eq(1) ? 'US tons' : unit;
  return `${formatNumber(number, locale, { maximumFractionDigits: 1 })}\u00a0${word}`;
}
