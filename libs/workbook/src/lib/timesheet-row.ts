import { type TimesheetField } from '@brakeven/contract';
import { type DateFormat, type LocalDate } from '@brakeven/values';

export type RowProblemCode =
  | 'date_missing'
  | 'date_unreadable'
  | 'date_out_of_range'
  | 'employee_missing'
  | 'employee_unreadable'
  | 'job_missing'
  | 'job_unreadable'
  | 'operation_missing'
  | 'operation_unreadable'
  | 'machine_unreadable'
  | 'hours_missing'
  | 'hours_unreadable'
  | 'pieces_unreadable'
  | 'cell_error'
  | 'formula_without_result';

/** Why a row cannot be taken in; the row is refused, its unreadable value is null and never 0. */
export interface RowProblem {
  readonly code: RowProblemCode;
  readonly message: string;
  readonly cell: string;
  readonly field: TimesheetField;
}

/** One entry as the sheet states it, not yet matched with employees, jobs, operations and machines. */
export interface TimesheetRow {
  readonly row: number;
  /** Address of the cell behind each field, also when it is blank; fields that are not mapped are absent. */
  readonly cells: Readonly<Partial<Record<TimesheetField, string>>>;
  readonly workedOn: LocalDate | null;
  readonly employee: string | null;
  readonly job: string | null;
  readonly operation: string | null;
  readonly machine: string | null;
  /** Hours with 4 decimals, such as `7.5000`. */
  readonly hours: string | null;
  readonly good: number | null;
  readonly scrap: number | null;
  readonly note: string | null;
  readonly problems: readonly RowProblem[];
}

/** Something worth knowing about the sheet that refuses no row. */
export interface SheetNotice {
  readonly code: 'subtotal_skipped' | 'text_row_skipped' | 'header_repeated' | 'total_unreadable';
  readonly severity: 'warning';
  readonly message: string;
  readonly cell: string;
}

/** A column with a header and values that no field is read from. */
export interface UnusedColumn {
  readonly column: string;
  /** What its header says. */
  readonly text: string;
  /** Its first different values in the entries, three at most, long ones cut. */
  readonly samples: readonly string[];
  readonly message: string;
}

/** An order of day and month that reads every text date of a column. */
export interface DateOrderOffer {
  readonly dateFormat: DateFormat;
  /** The first text date, and the day that it is in this order. */
  readonly text: string;
  readonly date: LocalDate;
}

export interface UnreadTextDates {
  /** Addresses of the text dates that are not read. */
  readonly cells: readonly string[];
  /** None when no single order reads all of the column. */
  readonly offers: readonly DateOrderOffer[];
}

export interface TimesheetRows {
  readonly sheet: string;
  readonly rows: readonly TimesheetRow[];
  /** The totals row at the foot, if there is one. */
  readonly controlTotal: { readonly row: number; readonly hours: string; readonly cell: string } | null;
  readonly problems: readonly SheetNotice[];
  readonly unusedColumns: readonly UnusedColumn[];
  /** Null when every text date is read. */
  readonly unreadDates: UnreadTextDates | null;
}
