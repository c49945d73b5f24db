import { type ReadProgress, type Sheet, type SheetFile, type SheetRow } from './sheet-file';
import { type WorkbookErrorCode } from './workbook-error';

/** A file read, without its rows; they follow in pieces. */
export interface SheetFileOutline extends Omit<SheetFile, 'sheets'> {
  readonly sheets: readonly (Omit<Sheet, 'rows'> & { readonly rowCount: number })[];
}

/** What the reading worker tells. Rows are sent only when asked for with {@link NEXT_ROWS}. */
export type WorkerMessage =
  | { readonly kind: 'progress'; readonly progress: ReadProgress }
  | { readonly kind: 'outline'; readonly file: SheetFileOutline }
  | { readonly kind: 'rows'; readonly sheetIndex: number; readonly rows: readonly SheetRow[] }
  | { readonly kind: 'end' }
  | { readonly kind: 'refused'; readonly code: WorkbookErrorCode; readonly message: string };

/** Asks the worker for more rows, so that taking them over never holds up the asking side for long. */
export const NEXT_ROWS = 'next-rows';
