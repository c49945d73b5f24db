import { type JobStatus, type MachineCostKind, type MaterialForm } from '@brakeven/contract';
import { type LocalDate } from '@brakeven/values';

/** Where a row of the set-up workbook stands: its row number and the cell behind each column. */
export interface SetupRowSource {
  readonly row: number;
  readonly cells: Readonly<Record<string, string>>;
}

export interface SetupPerson {
  readonly number: string;
  readonly name: string;
  /** Null together with the wage and the burden when the row states no rate. */
  readonly rateFrom: LocalDate | null;
  readonly wagePerHour: string | null;
  readonly burdenPercent: string | null;
}

export interface SetupCustomer {
  readonly name: string;
}

export interface SetupOperation {
  readonly code: string;
  readonly name: string;
  /** Code of the machine the operation uses when an entry names none. */
  readonly machine: string | null;
}

export interface SetupMachine {
  readonly code: string;
  readonly name: string;
  readonly kind: string | null;
  readonly inServiceOn: LocalDate | null;
  /** Kilonewtons, exact decimal text. */
  readonly ratedForceKn: string | null;
  /** Millimetres, exact decimal text. */
  readonly bedLengthMm: string | null;
}

export interface SetupMachineCost {
  readonly machine: string;
  readonly date: LocalDate;
  readonly kind: MachineCostKind;
  readonly description: string | null;
  /** Money with 2 decimals. */
  readonly amount: string;
}

export interface SetupMachineRate {
  readonly machine: string;
  readonly validFrom: LocalDate;
  readonly machineHourRate: string;
  readonly chargeOutRate: string;
  readonly runningCostPerHour: string;
}

export interface SetupOverhead {
  readonly validFrom: LocalDate;
  readonly ratePerLabourHour: string;
}

export interface SetupJob {
  readonly number: string;
  readonly customer: string | null;
  readonly title: string | null;
  readonly quantity: number | null;
  readonly openedOn: LocalDate | null;
  readonly dueOn: LocalDate | null;
  readonly quotedPrice: string | null;
  readonly isBillable: boolean;
  readonly status: JobStatus;
}

export interface SetupPunch {
  /** Code of the press. */
  readonly machine: string;
  readonly punch: string;
  /** Millimetres, exact decimal text; so is the length. */
  readonly noseRadiusMm: string;
  /** Degrees, decimal text. */
  readonly angle: string | null;
  readonly lengthMm: string | null;
  /** Kilonewtons per metre, decimal text. */
  readonly forceLimitKnPerM: string | null;
}

/** One opening of a die. */
export interface SetupDieOpening {
  /** Code of the press. */
  readonly machine: string;
  readonly die: string;
  /** Millimetres, exact decimal text; so are radius and length. */
  readonly openingMm: string;
  /** Degrees, decimal text. */
  readonly angle: string | null;
  readonly shoulderRadiusMm: string | null;
  /** Of the die, like its force limit. */
  readonly lengthMm: string | null;
  /** Kilonewtons per metre, decimal text. */
  readonly forceLimitKnPerM: string | null;
}

export interface SetupMaterial {
  readonly name: string;
  readonly grade: string | null;
  readonly form: MaterialForm | null;
  /** As written, with its unit: '11 ga', '3/16', '0.12 in'. */
  readonly thickness: string | null;
  /** Kilograms per cubic metre, decimal text. */
  readonly densityKgM3: string | null;
  /** Megapascals, decimal text. */
  readonly tensileStrengthMpa: string | null;
  readonly recoveryPricePerKg: string | null;
}

export interface SetupSheetLot {
  readonly lot: string;
  readonly material: string;
  readonly receivedOn: LocalDate;
  readonly vendor: string | null;
  readonly sheets: number | null;
  /** Millimetres, exact decimal text; so is the width. */
  readonly sheetLengthMm: string | null;
  readonly sheetWidthMm: string | null;
  /** Kilograms, exact decimal text. */
  readonly weightKg: string | null;
  readonly cost: string;
  readonly freight: string | null;
}

export interface SetupIssue {
  readonly date: LocalDate;
  readonly job: string;
  readonly material: string;
  readonly kind: 'issue' | 'return';
  readonly sheets: number | null;
  readonly pieces: number | null;
  readonly blankLengthMm: string | null;
  readonly blankWidthMm: string | null;
  /** Kilograms, exact decimal text. */
  readonly weightKg: string | null;
  readonly note: string | null;
}

export interface SetupOutsideService {
  readonly date: LocalDate;
  readonly job: string;
  readonly vendor: string | null;
  readonly description: string | null;
  readonly amount: string;
}

export interface SetupInvoice {
  readonly number: string;
  readonly date: LocalDate;
  readonly job: string;
  readonly kind: 'invoice' | 'credit-note';
  readonly description: string | null;
  /** Above 0, for a credit note too. */
  readonly amount: string;
}

/** One line of a job's estimate; which cells it needs depends on its kind. */
export interface SetupEstimateLine {
  readonly job: string;
  readonly estimatedOn: LocalDate | null;
  readonly kind: 'operation' | 'material' | 'outside';
  readonly operation: string | null;
  readonly machine: string | null;
  readonly setupHours: string | null;
  readonly minutesPerPiece: string | null;
  readonly pieces: number | null;
  readonly labourRate: string | null;
  readonly machineHourRate: string | null;
  readonly overheadRate: string | null;
  readonly material: string | null;
  /** Kilograms, exact decimal text. */
  readonly weightKg: string | null;
  readonly pricePerKg: string | null;
  readonly description: string | null;
  readonly amount: string | null;
  readonly scrapAllowancePercent: string | null;
  readonly marginPercent: string | null;
}

/** All that a set-up workbook can state, each list in sheet order. */
export interface SetupData {
  readonly people: readonly SetupPerson[];
  readonly customers: readonly SetupCustomer[];
  readonly operations: readonly SetupOperation[];
  readonly machines: readonly SetupMachine[];
  readonly machineCosts: readonly SetupMachineCost[];
  readonly machineRates: readonly SetupMachineRate[];
  readonly overhead: readonly SetupOverhead[];
  readonly jobs: readonly SetupJob[];
  readonly punches: readonly SetupPunch[];
  readonly dies: readonly SetupDieOpening[];
  readonly materials: readonly SetupMaterial[];
  readonly sheetLots: readonly SetupSheetLot[];
  readonly issues: readonly SetupIssue[];
  readonly outsideServices: readonly SetupOutsideService[];
  readonly invoices: readonly SetupInvoice[];
  readonly estimates: readonly SetupEstimateLine[];
}

export interface SetupProblem {
  readonly code: string;
  /** A refused row is missing from the lists, so nothing may be imported; a warning hinders nothing. */
  readonly severity: 'refused' | 'warning';
  readonly message: string;
  readonly sheet: string;
  /** The cell, or `A1` when the whole sheet is meant. */
  readonly cell: string;
}

/** A set-up workbook as read: the rows that could be read whole, each with its source, and all problems. */
export type SetupFile = {
  readonly [List in keyof SetupData]: readonly (SetupData[List][number] & SetupRowSource)[];
} & { readonly problems: readonly SetupProblem[] };
