import { type SourceCell } from '@brakeven/contract';

/** The page that shows a source cell in its workbook. */
export function toSourceUrl({ importId, sheet, row, cell }: SourceCell): string {
  return `/timesheets/${importId}?${new URLSearchParams({ sheet, row: String(row), cell }).toString()}`;
}
