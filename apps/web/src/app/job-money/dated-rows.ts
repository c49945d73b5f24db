import { type FigureRef } from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** What one cell says. Of its parts only those that are there are shown, in this order. */
export interface DatedCell {
  text?: string;
  /** Where the text leads. */
  link?: readonly string[];
  /** A word beside the text that tells its kind. */
  tag?: string;
  /** Said more quietly behind the text. */
  aside?: string | null;
  massKg?: string;
  /** Money; with `ref` it opens its workings, read out under `label`. */
  amount?: string | null;
  ref?: FigureRef;
  label?: string;
}

export interface DatedColumn<Row, List> {
  heading: string;
  isNumber?: boolean;
  cell(row: Row): DatedCell;
  /** What stands in the last row of the table. */
  total?(list: List): DatedCell;
}

export interface DatedAction {
  label: string;
  /** Shown quietly, and only once there are rows. */
  isSecond?: boolean;
  /** Emits what was done, in words, if anything was. */
  run(): Observable<string | null>;
}

export interface DatedRow {
  voidedAt: string | null;
}

/** One kind of dated rows of a job: what its card shows and what may be done there. */
export interface DatedRows<Row extends DatedRow, List extends { items: readonly Row[] }> {
  heading: string;
  /** What stands there while there are no rows: what is so, and what belongs there. */
  empty: readonly [fact: string, hint: string];
  totalLabel: string;
  /** After the date; the first names the row. */
  columns: readonly DatedColumn<Row, List>[];
  canEdit: boolean;
  actions: readonly DatedAction[];
  load(): Observable<List>;
  idOf(row: Row): string;
  dateOf(row: Row): string;
  nameOf(row: Row): string;
  correct(row: Row): Observable<string | null>;
  void(row: Row): Observable<void>;
  restore(row: Row): Observable<void>;
}
