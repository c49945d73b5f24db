import { dateFromSerial } from '@brakeven/values';
import { type CellValue } from 'exceljs';
import { decodeEscapedText } from './escaped-text';
import { type NumberFormat } from './number-format';
import { type RawCell } from './sheet-file';
import { type StoredValue } from './sheet-xml';

/** How the numbers of a cell are to be understood. */
export interface CellContext {
  readonly address: string;
  readonly format: NumberFormat;
  readonly date1904: boolean;
  /** Days already put into words; the same few stand in most rows of a sheet. */
  readonly dayTexts: Map<number, string>;
}

interface CellPlace {
  readonly address: string;
  readonly hasFormula: boolean;
}

const SIGNIFICANT_DIGITS = 15;
const MS_PER_DAY = 86_400_000;
/** Day 25,569 of the 1900 system is 1970-01-01. */
const UNIX_EPOCH_SERIAL = 25_569;
const DAYS_BETWEEN_SYSTEMS = 1_462;

/** A cell as the library handed it over; null when it is blank. */
export function toRawCell(value: CellValue, context: CellContext): RawCell | null {
  const place = { address: context.address, hasFormula: false };
  if (typeof value === 'number') return toNumberCell(place, value, context);
  if (typeof value === 'boolean') return toBooleanCell(place, value);
  if (typeof value === 'string') return toTextCell(place, value);
  if (value === null || value === undefined || value instanceof Date) return null;
  if ('richText' in value) return toTextCell(place, value.richText.map(({ text }) => text).join(''));
  if ('error' in value) return toErrorCell(place, String(value.error));
  return null;
}

/**
 * A formula cell or an ISO date cell from what the file stores; null when its result is an empty text.
 * A formula never calculated, and a result in a form that cannot be told, become `formula-without-result`.
 */
export function toStoredCell({ type, value, isFormula }: StoredValue, context: CellContext): RawCell | null {
  const place = { address: context.address, hasFormula: isFormula };
  if (value !== null && type === 'str') return toTextCell(place, value);
  const missing = { ...place, kind: 'formula-without-result', value: null, text: '' } as const;
  if (value === null || value.trim() === '') return missing;
  if (type === 'n') return toNumberCell(place, Number(value), context);
  if (type === 'b') return toBooleanCell(place, value === '1' || value === 'true');
  if (type === 'e') return toErrorCell(place, value);
  if (type === 'd') return toIsoDateCell(place, value, context);
  return missing;
}

/** Spreadsheets keep 15 digits; what a sum leaves behind them (0.1 + 0.2) is noise. */
function toNumberCell(place: CellPlace, stored: number, context: CellContext): RawCell {
  const { address, hasFormula } = place;
  const { format } = context;
  if (!Number.isFinite(stored)) return toErrorCell(place, '#NUM!');
  const value = Number.isInteger(stored) ? stored : Number(stored.toPrecision(SIGNIFICANT_DIGITS));
  if (format.kind === 'date')
    return { address, hasFormula, kind: 'date', value, text: formatDay(value, context) };
  if (format.kind === 'duration')
    return { address, hasFormula, kind: 'duration', value, text: formatDuration(value) };
  const isPercent = format.kind === 'percent';
  return { address, hasFormula, kind: 'number', value, isPercent, text: formatNumber(value, format) };
}

function toTextCell(place: CellPlace, stored: string): RawCell | null {
  const value = decodeEscapedText(stored);
  return value.trim() === '' ? null : { ...place, kind: 'text', value, text: value.trim() };
}

function toBooleanCell(place: CellPlace, value: boolean): RawCell {
  return { ...place, kind: 'boolean', value, text: value ? 'TRUE' : 'FALSE' };
}

function toErrorCell(place: CellPlace, value: string): RawCell {
  return { ...place, kind: 'error', value, text: value };
}

function toIsoDateCell(place: CellPlace, stored: string, context: CellContext): RawCell | null {
  const [day = '', clock = '00:00:00'] = stored.replace(/Z$/, '').split('T');
  const ms = /^\d{4}-\d\d-\d\d$/.test(day) ? Date.parse(`${day}T${clock}Z`) : Number.NaN;
  if (Number.isNaN(ms)) return toTextCell(place, stored);
  const value = ms / MS_PER_DAY + UNIX_EPOCH_SERIAL - (context.date1904 ? DAYS_BETWEEN_SYSTEMS : 0);
  return { ...place, kind: 'date', value, text: formatDay(value, context) };
}

function formatNumber(value: number, format: NumberFormat): string {
  if (format.kind === 'percent') return `${Number((value * 100).toPrecision(SIGNIFICANT_DIGITS))}%`;
  const zeros = format.kind === 'number' && Number.isInteger(value) && value >= 0 ? format.zeros : 0;
  return String(value).padStart(zeros, '0');
}

/** `2026-03-02`, with the time of day behind it if there is one. */
function formatDay(serial: number, { date1904, dayTexts }: CellContext): string {
  const known = dayTexts.get(serial);
  if (known !== undefined) return known;
  const day = dateFromSerial(serial, date1904 ? '1904' : '1900');
  const time = serial - Math.floor(serial);
  const date = day.ok ? day.value : String(serial);
  const text = day.ok && time > 0 ? `${date} ${formatDuration(time)}` : date;
  dayTexts.set(serial, text);
  return text;
}

function formatDuration(days: number): string {
  const seconds = Math.round(Math.abs(days) * 86_400);
  const [hours, minutes, rest] = [Math.floor(seconds / 3_600), Math.floor(seconds / 60) % 60, seconds % 60];
  const two = (n: number) => String(n).padStart(2, '0');
  return `${days < 0 ? '-' : ''}${hours}:${two(minutes)}${rest ? `:${two(rest)}` : ''}`;
}
