import { type Generated } from 'kysely';
import { type Instant, type InstantOrNull, type Numeric } from './table-columns';

export interface MaterialTable {
  shopId: string;
  materialId: Generated<string>;
  name: string;
  grade: Generated<string>;
  form: 'sheet' | 'plate' | 'bar' | 'tube' | 'other';
  /** As typed, such as `11 ga`. */
  gauge: string | null;
  thicknessMm: Numeric | null;
  densityKgM3: Numeric | null;
  tensileStrengthMpa: Numeric | null;
  recoveryPricePerKg: Generated<Numeric>;
}

export interface SheetLotTable {
  shopId: string;
  lotId: Generated<string>;
  number: string;
  materialId: string;
  receivedOn: string;
  vendor: Generated<string>;
  sheets: number | null;
  sheetLengthMm: Numeric | null;
  sheetWidthMm: Numeric | null;
  weightKg: Numeric;
  cost: Numeric;
  freight: Generated<Numeric>;
  createdAt: Instant;
  voidedAt: InstantOrNull;
  voidedBy: string | null;
  /** The first row that this one took the place of. */
  corrects: string | null;
}

export interface MaterialIssueTable {
  shopId: string;
  issueId: Generated<string>;
  jobId: string;
  materialId: string;
  issuedOn: string;
  kind: 'issue' | 'return';
  sheets: number | null;
  pieces: number | null;
  blankLengthMm: Numeric | null;
  blankWidthMm: Numeric | null;
  weightKg: Numeric;
  note: string | null;
  createdAt: Instant;
  voidedAt: InstantOrNull;
  voidedBy: string | null;
  /** The first row that this one took the place of. */
  corrects: string | null;
}

/** The stock ledger, written by the database itself whenever lots or issues change. Signed as stock moves. */
export interface StockMoveTable {
  shopId: string;
  materialId: string;
  movedOn: string;
  /** 0 lots, which come first on their day; 1 issues and returns. */
  rank: number;
  sourceId: string;
  weightKg: Numeric;
  amount: Numeric;
  /** At which an issue or return was valued; after it for a lot. */
  averagePerKg: Numeric;
  balanceKg: Numeric;
  balanceAmount: Numeric;
}

export interface OutsideServiceTable {
  shopId: string;
  outsideServiceId: Generated<string>;
  jobId: string;
  incurredOn: string;
  vendor: Generated<string>;
  description: Generated<string>;
  amount: Numeric;
  createdAt: Instant;
  voidedAt: InstantOrNull;
  voidedBy: string | null;
  /** The first row that this one took the place of. */
  corrects: string | null;
}

export interface InvoiceTable {
  shopId: string;
  invoiceId: Generated<string>;
  jobId: string;
  kind: 'invoice' | 'credit-note';
  number: string;
  invoicedOn: string;
  description: Generated<string>;
  /** Positive, for a credit note too. */
  amount: Numeric;
  createdAt: Instant;
  voidedAt: InstantOrNull;
  voidedBy: string | null;
  /** The first row that this one took the place of. */
  corrects: string | null;
}

export interface EstimateTable {
  shopId: string;
  jobId: string;
  estimatedOn: string;
  scrapAllowancePercent: Generated<Numeric>;
  marginPercent: Generated<Numeric>;
}

export interface EstimateLineTable {
  shopId: string;
  estimateLineId: Generated<string>;
  jobId: string;
  position: number;
  kind: 'operation' | 'material' | 'outside';
  operationId: string | null;
  machineId: string | null;
  setupHours: Numeric | null;
  minutesPerPiece: Numeric | null;
  pieces: number | null;
  labourRate: Numeric | null;
  machineHourRate: Numeric | null;
  overheadRate: Numeric | null;
  materialId: string | null;
  weightKg: Numeric | null;
  pricePerKg: Numeric | null;
  description: Generated<string>;
  amount: Numeric | null;
}
