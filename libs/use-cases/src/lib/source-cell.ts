import { type SourceCell } from '@brakeven/contract';
import { type SourceColumns } from '@brakeven/database';

/** The cell that a row came from; null if it came from no file. */
export function toSourceCell(row: SourceColumns): SourceCell | null {
  const { importId, fileName, sheet, sourceRow, sourceCell } = row;
  if (importId === null || fileName === null || sheet === null) return null;
  if (sourceRow === null || sourceCell === null) return null;
  return { importId, fileName, sheet, row: sourceRow, cell: sourceCell };
}
