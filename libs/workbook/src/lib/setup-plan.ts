import { type SetupData } from './setup-data';

/** How the cells of a column are read and written. */
export type SetupCellKind =
  | 'label'
  | 'date'
  | 'money'
  | 'rate'
  | 'percent'
  | 'count'
  | 'hours'
  | 'minutes'
  | 'yesNo'
  | 'force'
  | 'forcePerLength'
  | 'length'
  | 'radius'
  | 'angle'
  | 'mass'
  | 'density'
  | 'strength'
  | 'thickness'
  | 'pricePerWeight'
  | 'costKind'
  | 'jobStatus'
  | 'materialForm'
  | 'issueKind'
  | 'invoiceKind'
  | 'estimateKind';

export interface SetupColumn {
  readonly key: string;
  /** Of a price per weight without the weight's unit, which the written header adds. */
  readonly header: string;
  readonly kind: SetupCellKind;
  /** The column must be there and its cells filled. */
  readonly isRequired: boolean;
  /** What to write in it, for the sheet that explains. */
  readonly help: string;
  readonly example: string;
  /** Other wordings of the header. */
  readonly alsoHeaded?: readonly string[];
  /** What a blank cell means. */
  readonly ifBlank?: string;
  /** 0 makes no sense here. */
  readonly isAboveZero?: true;
  /** What to do instead of writing a number below 0. */
  readonly insteadOfMinus?: string;
}

export interface SetupSheetPlan {
  readonly list: keyof SetupData;
  readonly sheet: string;
  readonly columns: readonly SetupColumn[];
  /** Columns that no two rows may share; none when equal rows may stand. */
  readonly uniqueBy: readonly string[];
  readonly help: string;
}

/** A column that must be there, with its cells filled. */
export const needed = (
  key: string,
  header: string,
  kind: SetupCellKind,
  example: string,
  help: string,
): SetupColumn => ({ key, header, kind, isRequired: true, example, help });

/** A column that may be missing, and whose cells may be blank. */
export const optional = (...args: Parameters<typeof needed>): SetupColumn => ({
  ...needed(...args),
  isRequired: false,
});

/** The same column for numbers above 0 only. */
export const aboveZero = (column: SetupColumn): SetupColumn => ({ ...column, isAboveZero: true });
