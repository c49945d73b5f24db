import { z } from 'zod';
import { endpoint } from './endpoint';
import { hoursSchema, idSchema, instantSchema, localDateSchema } from './schema-values';

export const TIMESHEET_FIELDS = [
  'date',
  'employee',
  'job',
  'operation',
  'machine',
  'hours',
  'good',
  'scrap',
  'note',
] as const;
export type TimesheetField = (typeof TIMESHEET_FIELDS)[number];
export const REQUIRED_TIMESHEET_FIELDS = [
  'date',
  'employee',
  'job',
  'operation',
  'hours',
] as const satisfies readonly TimesheetField[];
export const DATE_FORMATS = [
  'YYYY-MM-DD',
  'MM/DD/YYYY',
  'DD/MM/YYYY',
  'DD.MM.YYYY',
  'MM-DD-YYYY',
  'DD-MM-YYYY',
  'DD MMM YYYY',
  'MMM DD YYYY',
  'YYYY/MM/DD',
] as const;

const columnSchema = z.string().regex(/^[A-Z]{1,3}$/);
/** Which column holds what. */
export const timesheetMappingSchema = z.object({
  sheet: z.string().max(100),
  headerRow: z.number().int().min(1).max(1000),
  columns: z.partialRecord(z.enum(TIMESHEET_FIELDS), columnSchema),
  dateFormat: z.enum(DATE_FORMATS).optional(),
  decimalMark: z.enum(['.', ',']).optional(),
});
export type TimesheetMapping = z.infer<typeof timesheetMappingSchema>;

export const ALIAS_KINDS = ['employee', 'job', 'operation', 'machine'] as const;
export type AliasKind = (typeof ALIAS_KINDS)[number];
export const aliasChoiceSchema = z.object({
  kind: z.enum(ALIAS_KINDS),
  spelling: z.string().min(1).max(200),
  targetId: idSchema,
});
export type AliasChoice = z.infer<typeof aliasChoiceSchema>;

export const timesheetOptionsSchema = z.object({
  mapping: timesheetMappingSchema.optional(),
  aliases: z.array(aliasChoiceSchema).max(1000).default([]),
  /** Commit the good rows and leave the refused ones out. */
  goodRows: z.boolean().default(false),
  /** Where progress is reported: `GET /progress/:progressId`. */
  progressId: idSchema.optional(),
});
export type TimesheetOptions = z.infer<typeof timesheetOptionsSchema>;

export const timesheetProblemSchema = z.object({
  code: z.string(),
  severity: z.enum(['refused', 'warning']),
  message: z.string(),
  sheet: z.string(),
  cell: z.string(),
  row: z.number().int().nullable(),
  field: z.enum(TIMESHEET_FIELDS).nullable(),
  /** For a name that is not known: its spelling in the file and known names that nearly match. */
  alias: z
    .object({
      kind: z.enum(ALIAS_KINDS),
      spelling: z.string(),
      offers: z.array(z.object({ targetId: idSchema, label: z.string() })),
    })
    .nullable(),
});
export type TimesheetProblem = z.infer<typeof timesheetProblemSchema>;

export const checkedRowSchema = z.object({
  row: z.number().int(),
  state: z.enum(['ready', 'already-there', 'refused']),
  /** The text of each mapped cell, and its address. */
  cells: z.partialRecord(z.enum(TIMESHEET_FIELDS), z.object({ address: z.string(), text: z.string() })),
});
export type CheckedRow = z.infer<typeof checkedRowSchema>;

/** A column with a header and values in the entries that no field is read from. */
export const unusedColumnSchema = z.object({
  column: z.string(),
  text: z.string(),
  /** Its first different values. */
  samples: z.array(z.string()),
  message: z.string(),
});
export type UnusedColumn = z.infer<typeof unusedColumnSchema>;

/** Text dates that are not read as declared, and what could be declared to read all text dates of the column. */
export const unreadDatesSchema = z.object({
  /** Addresses of the cells, as far as problems are listed. */
  cells: z.array(z.string()),
  /** Each order that reads them all, with the first text date and the day it would become. */
  offers: z.array(z.object({ dateFormat: z.enum(DATE_FORMATS), text: z.string(), date: localDateSchema })),
});
export type UnreadDates = z.infer<typeof unreadDatesSchema>;

export const alreadyImportedSchema = z.object({
  importId: idSchema,
  importedAt: instantSchema,
  importedBy: z.string(),
});

export const timesheetCheckSchema = z.object({
  file: z.object({ name: z.string(), bytes: z.number().int(), sha256: z.string() }),
  sheets: z.array(z.object({ name: z.string(), rows: z.number().int(), isHidden: z.boolean() })),
  mapping: timesheetMappingSchema.nullable(),
  mappingFrom: z.enum(['recognised', 'remembered', 'chosen']).nullable(),
  /** Cells of the header row with a sample of what stands below, for mapping by hand. */
  headerCells: z.array(z.object({ column: z.string(), text: z.string(), sample: z.string() })),
  missingFields: z.array(z.enum(TIMESHEET_FIELDS)),
  /** None as long as columns are missing: nothing is read then. */
  unusedColumns: z.array(unusedColumnSchema),
  unreadDates: unreadDatesSchema.nullable(),
  rowsRead: z.number().int(),
  entriesReady: z.number().int(),
  alreadyThere: z.number().int(),
  refused: z.number().int(),
  hoursRead: hoursSchema,
  hoursReady: hoursSchema,
  hoursAlreadyThere: hoursSchema,
  hoursRefused: hoursSchema,
  /** Refused rows whose hours cannot be read; they are in no sum of hours. */
  refusedWithoutHours: z.number().int(),
  controlTotal: z
    .object({ cell: z.string(), hours: hoursSchema, agrees: z.boolean(), difference: hoursSchema })
    .nullable(),
  alreadyImported: alreadyImportedSchema.nullable(),
  firstDay: localDateSchema.nullable(),
  lastDay: localDateSchema.nullable(),
  byEmployee: z.array(z.object({ employee: z.string(), entries: z.number().int(), hours: hoursSchema })),
  byDay: z.array(z.object({ workedOn: localDateSchema, entries: z.number().int(), hours: hoursSchema })),
  problems: z.array(timesheetProblemSchema),
  /** Rows for the screen: those with problems first come in full, the rest up to the limit. */
  rows: z.array(checkedRowSchema),
  rowsNotShown: z.number().int(),
});
export type TimesheetCheck = z.infer<typeof timesheetCheckSchema>;

export const timesheetImportedSchema = timesheetCheckSchema.extend({
  importId: idSchema.nullable(),
  entriesAdded: z.number().int(),
  hoursAdded: hoursSchema,
});
export type TimesheetImported = z.infer<typeof timesheetImportedSchema>;

export const timesheetImportSchema = z.object({
  importId: idSchema,
  fileName: z.string(),
  sheet: z.string(),
  importedAt: instantSchema,
  importedBy: z.string(),
  status: z.enum(['committed', 'undone']),
  undoneAt: instantSchema.nullable(),
  undoneBy: z.string().nullable(),
  rowsRead: z.number().int(),
  entriesAdded: z.number().int(),
  alreadyThere: z.number().int(),
  refused: z.number().int(),
  hoursRead: hoursSchema,
  hoursAdded: hoursSchema,
  firstDay: localDateSchema.nullable(),
  lastDay: localDateSchema.nullable(),
});
export type TimesheetImport = z.infer<typeof timesheetImportSchema>;
export const timesheetImportDetailSchema = timesheetImportSchema.extend({
  problems: z.array(timesheetProblemSchema),
});
export type TimesheetImportDetail = z.infer<typeof timesheetImportDetailSchema>;

export const timesheetUndoneSchema = z.object({ entriesVoided: z.number().int(), hoursVoided: hoursSchema });
export type TimesheetUndone = z.infer<typeof timesheetUndoneSchema>;

/** A few rows of the kept workbook around a row, as it stands in the sheet. */
export const sheetExcerptSchema = z.object({
  fileName: z.string(),
  sheet: z.string(),
  columns: z.array(z.string()),
  rows: z.array(
    z.object({ row: z.number().int(), cells: z.array(z.object({ address: z.string(), text: z.string() })) }),
  ),
});
export type SheetExcerpt = z.infer<typeof sheetExcerptSchema>;

/** One message of the progress stream. */
export const progressSchema = z.object({
  stage: z.enum(['reading', 'checking', 'writing', 'rolling-up', 'done', 'failed']),
  done: z.number(),
  total: z.number().nullable(),
  message: z.string(),
});
export type Progress = z.infer<typeof progressSchema>;

const importId = z.object({ importId: idSchema });
export const timesheetEndpoints = {
  checkTimesheet: endpoint({
    method: 'post',
    path: '/timesheets/check',
    summary: 'Read and check a timesheet; writes nothing',
    permission: 'timesheets.use',
    upload: true,
    body: timesheetOptionsSchema,
    response: timesheetCheckSchema,
  }),
  importTimesheet: endpoint({
    method: 'post',
    path: '/timesheets',
    summary: 'Check and commit a timesheet in one transaction',
    permission: 'timesheets.use',
    upload: true,
    body: timesheetOptionsSchema,
    response: timesheetImportedSchema,
  }),
  listImports: endpoint({
    method: 'get',
    path: '/timesheets',
    summary: 'History of imports, latest first',
    permission: 'timesheets.use',
    response: z.array(timesheetImportSchema),
  }),
  getImport: endpoint({
    method: 'get',
    path: '/timesheets/:importId',
    summary: 'An import with what was refused',
    permission: 'timesheets.use',
    params: importId,
    response: timesheetImportDetailSchema,
  }),
  getImportFile: endpoint({
    method: 'get',
    path: '/timesheets/:importId/file',
    summary: 'The workbook as it came',
    permission: 'timesheets.use',
    params: importId,
    response: 'application/octet-stream',
  }),
  getSheetExcerpt: endpoint({
    method: 'get',
    path: '/timesheets/:importId/excerpt',
    summary: 'Rows of the kept workbook around a row',
    permission: 'timesheets.use',
    params: importId,
    query: z.object({ sheet: z.string().max(100), row: z.coerce.number().int().min(1).max(200_000) }),
    response: sheetExcerptSchema,
  }),
  undoImport: endpoint({
    method: 'post',
    path: '/timesheets/:importId/undo',
    summary: 'Void all entries of an import',
    permission: 'timesheets.use',
    params: importId,
    response: timesheetUndoneSchema,
  }),
  watchProgress: endpoint({
    method: 'get',
    path: '/progress/:progressId',
    summary: 'Progress of long work, as server-sent events',
    permission: 'timesheets.use',
    params: z.object({ progressId: idSchema }),
    response: 'text/event-stream',
  }),
};
