import {
  AppError,
  REQUIRED_TIMESHEET_FIELDS,
  LIMITS,
  type TimesheetField,
  type TimesheetMapping,
  timesheetMappingSchema,
} from '@brakeven/contract';
import { type SavedMapping } from '@brakeven/database';
import {
  describeTimesheetHeader,
  findTimesheetHeader,
  headerSignature,
  type HeaderCell,
  type SheetFile,
  type SheetRow,
  type TimesheetHeader,
  WorkbookError,
} from '@brakeven/workbook';

/** Which column holds what, and how that is known. */
export interface FoundMapping {
  /** Null if no row looks like a header at all. */
  mapping: TimesheetMapping | null;
  mappingFrom: 'recognised' | 'remembered' | 'chosen' | null;
  headerCells: readonly HeaderCell[];
  /** Required fields without a column. */
  missingFields: TimesheetField[];
  /** For remembering a chosen mapping; null without a header. */
  headerSignature: string | null;
  /** Other sheets with a header as good as the one used. */
  otherSheets: readonly string[];
  /** Why there is no header; null if there is one. */
  headerProblem: string | null;
}

/**
 * Finds the mapping of a file: the one chosen, else the one remembered for a header of the file, else what its
 * header words say.
 * @throws AppError `invalid_input` if a chosen mapping does not fit the file
 */
export function findMapping(
  file: SheetFile,
  chosen: TimesheetMapping | undefined,
  saved: readonly SavedMapping[],
): FoundMapping {
  if (chosen) return describeChosen(file, chosen);
  return findRemembered(file, saved) ?? recognise(file);
}

function describeChosen(file: SheetFile, mapping: TimesheetMapping): FoundMapping {
  assertColumnsOnce(mapping);
  const recognised = recognise(file);
  try {
    const header = describeTimesheetHeader(file, mapping);
    return toFound(header, mapping, 'chosen', listOtherSheets(recognised, mapping.sheet));
  } catch (error) {
    if (!(error instanceof WorkbookError)) throw error;
    const field = error.code === 'sheet_not_found' ? 'mapping.sheet' : 'mapping.headerRow';
    const issues = [{ field, code: error.code, message: error.message }];
    throw new AppError('invalid_input', error.message, { issues, cause: error });
  }
}

function assertColumnsOnce({ columns }: TimesheetMapping): void {
  const taken = new Map<string, string>();
  for (const [field, column] of Object.entries(columns)) {
    const other = taken.get(column);
    taken.set(column, field);
    if (other === undefined) continue;
    const message = `Column ${column} cannot hold both ${other} and ${field}. Choose another column for one of them.`;
    const issues = [{ field: `mapping.columns.${field}`, code: 'column_taken', message }];
    throw new AppError('invalid_input', message, { issues });
  }
}

/** A remembered mapping counts wherever its header stands now; how values are written is remembered with it. */
function findRemembered(file: SheetFile, saved: readonly SavedMapping[]): FoundMapping | null {
  if (saved.length === 0) return null;
  const bySignature = new Map(saved.map(({ headerSignature, mapping }) => [headerSignature, mapping]));
  for (const { sheet, row } of listHeaderRows(file)) {
    const remembered = timesheetMappingSchema.safeParse(bySignature.get(signatureOf(row)));
    if (!remembered.success) continue;
    const place = { sheet, headerRow: row.row };
    const header = describeTimesheetHeader(file, place);
    const mapping = { ...header.mapping, ...remembered.data, ...place };
    return toFound(header, mapping, 'remembered', listOtherSheets(recognise(file), sheet));
  }
  return null;
}

/** Rows where a header may stand, those of sheets in sight first. */
function listHeaderRows(file: SheetFile): { sheet: string; row: SheetRow }[] {
  return [...file.sheets]
    .sort((a, b) => Number(a.isHidden) - Number(b.isHidden))
    .flatMap(({ name, rows }) =>
      rows.filter(({ row }) => row <= LIMITS.headerRowsSearched).map((row) => ({ sheet: name, row })),
    );
}

function signatureOf({ cells }: SheetRow): string {
  return headerSignature(cells.map(({ address, text }) => ({ column: address.replace(/\d+$/, ''), text })));
}

function recognise(file: SheetFile): FoundMapping {
  try {
    const header = findTimesheetHeader(file);
    return toFound(header, header.mapping, 'recognised', header.alsoOnSheets);
  } catch (error) {
    if (!(error instanceof WorkbookError && error.code === 'header_not_found')) throw error;
    return { ...NOTHING_FOUND, headerProblem: error.message };
  }
}

const NOTHING_FOUND: FoundMapping = {
  mapping: null,
  mappingFrom: null,
  headerCells: [],
  missingFields: [...REQUIRED_TIMESHEET_FIELDS],
  headerSignature: null,
  otherSheets: [],
  headerProblem: null,
};

function toFound(
  { headerCells, signature }: Omit<TimesheetHeader, 'mapping'>,
  mapping: TimesheetMapping,
  mappingFrom: FoundMapping['mappingFrom'],
  otherSheets: readonly string[],
): FoundMapping {
  return {
    mapping,
    mappingFrom,
    headerCells,
    missingFields: REQUIRED_TIMESHEET_FIELDS.filter((field) => !mapping.columns[field]),
    headerSignature: signature,
    otherSheets,
    headerProblem: null,
  };
}

/** Sheets that are recognised as whole timesheets and are not the one that is read. */
function listOtherSheets({ mapping, missingFields, otherSheets }: FoundMapping, sheet: string): string[] {
  if (!mapping || missingFields.length > 0) return [];
  return [mapping.sheet, ...otherSheets].filter((other) => other !== sheet);
}
