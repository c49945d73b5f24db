import { type AuditEvent } from '@brakeven/contract';
import { formatLocalDate, isLocalDate } from '@brakeven/values';

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
const NUMBER_KEYS = ['number', 'code'] as const;

/** Turns an event into what changed, value by value; what is only a key of the database is left out. */
export function toAuditLine(event: AuditEvent): AuditLine {
  const before = event.before ?? {};
  const after = event.after ?? {};
  const keys = [...new Set([...Object.keys(before), ...Object.keys(after)])].filter(isForPeople);
  const changes = keys
    .map((key) => ({ label: toWords(key), before: toText(before[key]), after: toText(after[key]) }))
    .filter(({ before: was, after: is }) => was !== is);
  return { event, subject: toWords(event.subjectKind), name: findName({ ...before, ...after }), changes };
}

function findName(row: Record<string, unknown>): string | null {
  const texts = (keys: readonly string[]) =>
    keys.map((key) => row[key]).filter((value): value is string => typeof value === 'string' && value !== '');
  const words = [...texts(NUMBER_KEYS), ...texts(NAME_KEYS).slice(0, 1)];
  return words.length > 0 ? words.join(' ') : null;
}

function isForPeople(key: string): boolean {
  return !key.endsWith('_id') && !key.endsWith('Id') && key !== 'file_sha256' && key !== 'header_signature';
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
