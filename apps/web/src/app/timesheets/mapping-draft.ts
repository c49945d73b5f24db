import { type TimesheetCheck, type TimesheetField, type TimesheetMapping } from '@brakeven/contract';

/** The mapping to begin with: the one that the check used, or the first sheet in sight with nothing mapped. */
export function toMappingDraft(check: Pick<TimesheetCheck, 'mapping' | 'sheets'>): TimesheetMapping {
  if (check.mapping) return check.mapping;
  const sheet = check.sheets.find(({ isHidden, rows }) => !isHidden && rows > 0) ?? check.sheets[0];
  return { sheet: sheet?.name ?? '', headerRow: 1, columns: {} };
}

/** Says which column holds a field; null for none. A column holds one field, so another that had it lets go. */
export function withColumn(
  mapping: TimesheetMapping,
  field: TimesheetField,
  column: string | null,
): TimesheetMapping {
  const others = Object.entries(mapping.columns).filter(
    ([name, letter]) => name !== field && letter !== column,
  );
  const columns = Object.fromEntries(column === null ? others : [...others, [field, column]]);
  return { ...mapping, columns };
}

/** Another sheet or header row: the columns have to be found anew. */
export function withHeaderAt(mapping: TimesheetMapping, sheet: string, headerRow: number): TimesheetMapping {
  return { ...mapping, sheet, headerRow, columns: {} };
}
