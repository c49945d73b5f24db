import { type AuditEvent } from '@brakeven/contract';
import {
  formatForce,
  formatLength,
  formatLocalDate,
  formatMass,
  isLocalDate,
  toForce,
  toLength,
  toMass,
  type UnitSystem,
} from '@brakeven/values';

/** One value that an event changed; null where there was nothing before or is nothing after. */
export interface AuditChange {
  label: string;
  before: string | null;
  after: string | null;
}

/** An audit event as it is read out: 'machine Press 2 changed: …'. */
export interface AuditLine {
  event: AuditEvent;
  subject: string;
  name: string | null;
  changes: AuditChange[];
}

/** Where the name of a thing is found, the plainest first. */
const NAME_KEYS = ['name', 'title', 'file_name', 'spelling', 'description', 'email'] as const;
/** Fingerprints and settings that only programs read. */
const OMITTED: readonly string[] = ['file_sha256', 'header_signature', 'mapping'];
const NUMBER_KEYS = ['number', 'code'] as const;

/** What is kept in a unit is read out in the shop's; what is kept per unit, such as a price, stays as it is. */
const UNITS: readonly { ending: RegExp; format: (value: string, units: UnitSystem) => string }[] = [
  { ending: /_mm$/, format: (value, units) => formatLength(toLength(value, 'mm'), units) },
  { ending: /_kn$/, format: (value, units) => formatForce(toForce(value, 'kN'), units) },
  { ending: /(?<!_per)_kg$/, format: (value, units) => formatMass(toMass(value, 'kg'), units) },
];

/** Turns an event into what changed, value by value; what is only a key of the database is left out. */
export function toAuditLine(event: AuditEvent, units: UnitSystem): AuditLine {
  const before = event.before ?? {};
  const after = event.after ?? {};
  const keys = [...new Set([...Object.keys(before), ...Object.keys(after)])];
  const changes = keys
    .filter((key) => toText(before[key]) !== toText(after[key]))
    .flatMap((key) => toChange(key, before[key], after[key], units) ?? []);
  return { event, subject: toWords(event.subjectKind), name: findName({ ...before, ...after }), changes };
}

function findName(row: Record<string, unknown>): string | null {
  const texts = (keys: readonly string[]) =>
    keys.map((key) => row[key]).filter((value): value is string => typeof value === 'string' && value !== '');
  const words = [...texts(NUMBER_KEYS), ...texts(NAME_KEYS).slice(0, 1)];
  return words.length > 0 ? words.join(' ') : null;
}

/** Keys of the database and moments say little by themselves: of those only that they changed, where it matters. */
function toChange(key: string, before: unknown, after: unknown, units: UnitSystem): AuditChange | null {
  if (key === 'password_changed_at') return { label: 'password', before: null, after: 'changed' };
  if (OMITTED.includes(key) || key.endsWith('_at')) return null;
  const unit = UNITS.find(({ ending }) => ending.test(key));
  if (unit) {
    const read = (value: unknown) => {
      const text = toText(value);
      return text && unit.format(text, units);
    };
    return { label: toWords(key.replace(unit.ending, '')), before: read(before), after: read(after) };
  }
  if (!key.endsWith('_id')) return { label: toWords(key), before: toText(before), after: toText(after) };
  const isAnother = toText(before) !== null && key !== 'shop_id';
  return isAnother ? { label: toWords(key.slice(0, -3)), before: null, after: 'another' } : null;
}

/** 'wage_per_hour' and 'wagePerHour' are read 'wage per hour'. */
function toWords(key: string): string {
  return key
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .replace(/_/g, ' ')
    .toLowerCase();
}

function toText(value: unknown): string | null {
  if (value === null || value === undefined || value === '') return null;
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (Array.isArray(value)) return `${value.length} listed`;
  if (typeof value === 'object') return JSON.stringify(value);
  const text = String(value);
  return isLocalDate(text) ? formatLocalDate(text) : text;
}
