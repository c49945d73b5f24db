interface CellBase {
  /** Where the cell stands in its sheet, such as `F12`. */
  readonly address: string;
  /** The value in words, for messages and for reading names and numbers as text. */
  readonly text: string;
  readonly hasFormula: boolean;
}

/**
 * One cell as the file stores it; blank cells are left out.
 *
 * `date` and `duration` keep the serial day number of the file (see {@link Sheet.date1904}); which of the two a
 * number is follows from its number format alone: days, months or years make a date, hours, minutes or seconds
 * without them a duration.
 */
export type RawCell = CellBase &
  (
    | { readonly kind: 'number'; readonly value: number; readonly isPercent: boolean }
    | { readonly kind: 'date' | 'duration'; readonly value: number }
    | { readonly kind: 'text' | 'error'; readonly value: string }
    | { readonly kind: 'boolean'; readonly value: boolean }
    | { readonly kind: 'formula-without-result'; readonly value: null }
  );

export type RawCellKind = RawCell['kind'];

export interface SheetRow {
  /** Row number as a spreadsheet shows it, from 1. */
  readonly row: number;
  readonly cells: readonly RawCell[];
}

export interface Sheet {
  readonly name: string;
  readonly isHidden: boolean;
  /** True when serial day 0 is 1 January 1904, not 31 December 1899. */
  readonly date1904: boolean;
  /** Rows with at least one cell that is not blank. */
  readonly rows: readonly SheetRow[];
}

/** A workbook or CSV file, read whole. A CSV file is one sheet named `CSV` whose cells are all text. */
export interface SheetFile {
  readonly name: string;
  readonly form: 'xlsx' | 'csv';
  /** The separator of a CSV file; null for a workbook. */
  readonly separator: ',' | ';' | null;
  readonly sheets: readonly Sheet[];
}

export interface FileBytes {
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** How far the reading is: `done` of `total` steps of a stage (bytes unpacked, sheets parsed, rows taken over). */
export interface ReadProgress {
  readonly stage: 'unpack' | 'parse' | 'rows';
  readonly done: number;
  readonly total: number;
}

export type OnReadProgress = (progress: ReadProgress) => void;
