import { type TimesheetMapping } from '@brakeven/contract';
import { columnOf } from './cell-address';
import { type SheetRow } from './sheet-file';
import { toLabel } from './timesheet-cells';
import { type UnusedColumn } from './timesheet-row';

const SAMPLES_MAX = 3;
const SAMPLES_TOLD = 2;
const SAMPLE_LENGTH_MAX = 24;

/**
 * Columns with a header and values in the entries that no field is read from, so that none is left out in silence.
 * A column without a header, or without a value in any entry, is none of them.
 */
export function listUnusedColumns(
  header: SheetRow | undefined,
  entries: readonly SheetRow[],
  columns: TimesheetMapping['columns'],
): UnusedColumn[] {
  const used = new Set(Object.values(columns));
  const headed = (header?.cells ?? []).map(({ address, text }) => ({
    column: columnOf(address),
    text: toLabel(text),
  }));
  const unused = headed.filter(({ column, text }) => text !== '' && !used.has(column));
  const samples = sampleColumns(entries, new Set(unused.map(({ column }) => column)));
  return unused.flatMap((one) => {
    const found = [...(samples.get(one.column) ?? [])];
    return found.length === 0 ? [] : [{ ...one, samples: found, message: toMessage(one, found) }];
  });
}

/** The first different values of each of the columns. */
function sampleColumns(entries: readonly SheetRow[], wanted: ReadonlySet<string>): Map<string, Set<string>> {
  const samples = new Map<string, Set<string>>();
  if (wanted.size === 0) return samples;
  for (const { cells } of entries) {
    for (const { address, text } of cells) {
      const column = columnOf(address);
      const value = toLabel(text);
      if (!wanted.has(column) || value === '') continue;
      const known = samples.get(column) ?? new Set<string>();
      if (known.size < SAMPLES_MAX) samples.set(column, known.add(shorten(value)));
    }
  }
  return samples;
}

function toMessage({ column, text }: { column: string; text: string }, samples: readonly string[]): string {
  const told = samples.slice(0, SAMPLES_TOLD).join(', ');
  const more = samples.length > SAMPLES_TOLD ? ', …' : '';
  return `Column ${column} '${text}' (${told}${more}) is not used.`;
}

function shorten(text: string): string {
  return text.length <= SAMPLE_LENGTH_MAX ? text : `${text.slice(0, SAMPLE_LENGTH_MAX - 1).trimEnd()}…`;
}
