import { type Generated } from 'kysely';
import { type Instant, type InstantOrNull, type Json, type Numeric } from './table-columns';

export interface TimesheetImportTable {
  shopId: string;
  importId: Generated<string>;
  fileName: string;
  fileSha256: string;
  sheet: string;
  mapping: Json<unknown>;
  status: Generated<'committed' | 'undone'>;
  importedBy: string;
  importedAt: Instant;
  undoneBy: string | null;
  undoneAt: InstantOrNull;
  rowsRead: number;
  entriesAdded: number;
  alreadyThere: number;
  refused: number;
  hoursRead: Numeric;
  hoursAdded: Numeric;
  firstDay: string | null;
  lastDay: string | null;
  problems: Json<unknown[]>;
  refusalsReviewedAt: InstantOrNull;
  refusalsReviewedBy: string | null;
}

export interface TimesheetFileTable {
  shopId: string;
  importId: string;
  content: Buffer;
}

export interface SavedMappingTable {
  shopId: string;
  savedMappingId: Generated<string>;
  headerSignature: string;
  mapping: Json<unknown>;
  savedAt: Instant;
}

export interface NameAliasTable {
  shopId: string;
  aliasId: Generated<string>;
  kind: 'employee' | 'job' | 'operation' | 'machine';
  spelling: string;
  employeeId: string | null;
  jobId: string | null;
  operationId: string | null;
  machineId: string | null;
}

export interface TimeEntryTable {
  shopId: string;
  entryId: Generated<string>;
  workedOn: string;
  employeeId: string;
  jobId: string;
  operationId: string;
  /** As the row gave it; the operation's default is resolved when costs are rolled up. */
  machineId: string | null;
  hours: Numeric;
  goodPieces: number | null;
  scrapPieces: number | null;
  note: string | null;
  importId: string | null;
  sourceRow: number | null;
  sourceCell: string | null;
  createdAt: Instant;
  voidedAt: InstantOrNull;
  voidedBy: string | null;
}
