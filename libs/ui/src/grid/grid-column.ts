import { type FigureRef } from '@brakeven/contract';
import { type Tone } from '../states/status-tag';

export type GridKind = 'text' | 'money' | 'rate' | 'hours' | 'date' | 'count' | 'number';

export interface GridAction {
  label: string;
  run: () => void;
}

export interface GridNote {
  text: string;
  /** `quiet`: a remark, no problem. */
  severity: 'refused' | 'warning' | 'quiet';
}

/** A column: what it shows of a row, and what a press on it does. */
export interface GridColumn<T> {
  /** Also the name by which the server sorts. */
  id: string;
  header: string;
  /** How the value is written and aligned; text if absent. */
  kind?: GridKind;
  value: (row: T) => string | number | null | undefined;
  /** Makes the cell a figure that opens its workings. */
  figure?: (row: T) => FigureRef | null;
  /** Makes the cell a link within the application. */
  href?: (row: T) => string | null;
  /** Shows the value as a tag of this tone. */
  tone?: (row: T) => Tone | null;
  /** Money that was lost; the sign says it, the colour helps. */
  isLoss?: (row: T) => boolean;
  /** A problem with this cell: tinted, with a sign and the words. */
  note?: (row: T) => GridNote | null;
  /** Buttons instead of a value. */
  actions?: (row: T) => readonly GridAction[];
  isSortable?: boolean;
  /** Stays at the left when the rest scrolls; only where there is room for it. */
  isPinned?: boolean;
  width?: number;
  minWidth?: number;
  flex?: number;
}

/** A cell of the totals row, written by its column's kind. */
export interface GridTotal {
  value: string | number | null;
  figure?: FigureRef | null;
  /** Written as it is, whatever the column's kind; for 'Total' or '214 jobs'. */
  isText?: boolean;
}

/** The totals row: cells by column id. */
export type GridTotals = Readonly<Record<string, GridTotal>>;

export interface GridOrder {
  sort: string;
  direction: 'asc' | 'desc';
}
