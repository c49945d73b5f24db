import { type ColumnType, type Generated } from 'kysely';

/** Row types as Kysely returns them: camelCase, `date` and `numeric` as text, instants as Date. */
type Instant = ColumnType<Date, Date | string | undefined, Date | string>;
type InstantOrNull = ColumnType<Date | null, Date | string | null | undefined, Date | string | null>;
/** Text in and out; PostgreSQL checks and keeps the scale. */
type Numeric = string;
type Json<T> = ColumnType<T, string, string>;

export interface ShopTable {
  shopId: Generated<string>;
  name: string;
  timeZone: string;
  currency: string;
  units: 'us' | 'metric';
  /** 0 Sunday … 6 Saturday. */
  weekStart: Generated<number>;
  /** Null: overtime is not computed. */
  overtimeThresholdHours: ColumnType<Numeric | null, Numeric | null | undefined, Numeric | null>;
  overtimeTo: Generated<'overhead' | 'jobs'>;
  createdAt: Instant;
}
export interface UserAccountTable {
  shopId: string;
  userId: Generated<string>;
  name: string;
  email: string;
  role: 'owner' | 'bookkeeper' | 'lead' | 'operator';
  employeeId: string | null;
  isActive: Generated<boolean>;
  passwordHash: string;
  passwordChangedAt: Instant;
  mustChangePassword: Generated<boolean>;
  lastSignInAt: InstantOrNull;
  createdAt: Instant;
}
export interface AuditEventTable {
  shopId: string;
  eventId: Generated<string>;
  at: Instant;
  actorId: string | null;
  actor: string;
  action: string;
  subjectKind: string;
  subjectId: string;
  before: Json<Record<string, unknown>> | null;
  after: Json<Record<string, unknown>> | null;
}
export interface EmployeeTable {
  shopId: string;
  employeeId: Generated<string>;
  number: string;
  name: string;
  isActive: Generated<boolean>;
}
export interface PayRateTable {
  shopId: string;
  payRateId: Generated<string>;
  employeeId: string;
  validFrom: string;
  wagePerHour: Numeric;
  burdenPercent: Numeric;
}
export interface OverheadRateTable {
  shopId: string;
  overheadRateId: Generated<string>;
  validFrom: string;
  ratePerLabourHour: Numeric;
}
export interface MachineTable {
  shopId: string;
  machineId: Generated<string>;
  code: string;
  name: string;
  kind: string;
  inServiceOn: string | null;
  ratedForceKn: Numeric | null;
  bedLengthMm: Numeric | null;
}
export interface MachineCostItemTable {
  shopId: string;
  machineCostItemId: Generated<string>;
  machineId: string;
  incurredOn: string;
  kind: 'price' | 'freight' | 'rigging' | 'electrical' | 'tooling' | 'installation' | 'training' | 'other';
  description: Generated<string>;
  amount: Numeric;
}
export interface MachineRateTable {
  shopId: string;
  machineRateId: Generated<string>;
  machineId: string;
  validFrom: string;
  machineHourRate: Numeric;
  chargeOutRate: Numeric;
  runningCostPerHour: Numeric;
}
export interface OperationTable {
  shopId: string;
  operationId: Generated<string>;
  code: string;
  name: string;
  defaultMachineId: string | null;
}
export interface CustomerTable {
  shopId: string;
  customerId: Generated<string>;
  name: string;
}
export interface JobTable {
  shopId: string;
  jobId: Generated<string>;
  number: string;
  customerId: string | null;
  title: string;
  quantity: number | null;
  openedOn: string | null;
  dueOn: string | null;
  quotedPrice: Numeric | null;
  isBillable: Generated<boolean>;
  status: 'quoted' | 'open' | 'finished' | 'invoiced' | 'lost' | 'cancelled';
}
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
export interface DirtyDayTable {
  shopId: string;
  workedOn: string;
  entryChanges: Generated<number>;
  markedAt: Instant;
}
export interface RollupRunTable {
  shopId: string;
  runId: Generated<string>;
  startedAt: Instant;
  finishedAt: InstantOrNull;
  isFull: boolean;
  startedBy: string;
  days: Generated<number>;
  lines: Generated<number>;
  through: string | null;
}
/** What the rollup wrote from one source row in one category. */
export interface CostLineTable {
  shopId: string;
  /** The day in the books; later than `workedOn` if that lies in a closed month. */
  postedOn: string;
  workedOn: string;
  sourceId: string;
  category:
    | 'labour'
    | 'overtime'
    | 'machine'
    | 'overhead'
    | 'material'
    | 'outside'
    | 'invoiced'
    | 'earned'
    | 'running';
  sourceKind: 'time_entry' | 'material_issue' | 'outside_service' | 'invoice';
  /** Null for what went to overhead. */
  jobId: string | null;
  operationId: string | null;
  employeeId: string | null;
  machineId: string | null;
  /** Hours, kg, or ±1 for an amount as such; negative in a line that takes back one of a closed month. */
  quantity: Numeric;
  rate: Numeric;
  rateFactor: Numeric;
  rateId: string | null;
  amount: Numeric;
  runId: string;
}
export interface JobDayTable {
  shopId: string;
  jobId: string;
  postedOn: string;
  category: CostLineTable['category'];
  /** Of all entries that owe the category, with or without a rate. */
  hours: Numeric;
  amount: Numeric;
  lines: number;
}
/** What a machine in service did on one day. */
export interface MachineDayTable {
  shopId: string;
  machineId: string;
  postedOn: string;
  hours: Numeric;
  billableHours: Numeric;
  earned: Numeric;
  operatorLabour: Numeric;
  running: Numeric;
}
/** The part of a machine's day that belongs to one job. */
export interface MachineJobDayTable extends MachineDayTable {
  jobId: string;
}
export interface RateGapTable {
  shopId: string;
  postedOn: string;
  workedOn: string;
  category: CostLineTable['category'];
  entryId: string;
  jobId: string;
  operationId: string;
  employeeId: string;
  machineId: string | null;
  hours: Numeric;
}
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
/** What a machine-hour rate was built from. */
export interface MachineRateBasisTable {
  shopId: string;
  machineRateId: string;
  price: Numeric;
  salvage: Numeric;
  lifeYears: Numeric;
  interestPercent: Numeric;
  floorAreaM2: Numeric;
  spaceCostPerM2Year: Numeric;
  insurancePerYear: Numeric;
  upkeepPerYear: Numeric;
  productiveHoursPerYear: Numeric;
  powerKw: Numeric;
  loadPercent: Numeric;
  tariffPerKwh: Numeric;
  consumablesPerHour: Numeric;
}
export interface MonthCloseTable {
  shopId: string;
  monthCloseId: Generated<string>;
  /** Its first day. */
  month: string;
  closedAt: Instant;
  closedBy: string;
  reopenedAt: InstantOrNull;
  reopenedBy: string | null;
  reopenReason: string | null;
}
/** Hours of an employee's month as payroll has them. */
export interface PayrollHoursTable {
  shopId: string;
  employeeId: string;
  month: string;
  hours: Numeric;
}
export interface SavedViewTable {
  shopId: string;
  savedViewId: Generated<string>;
  userId: string;
  page: string;
  name: string;
  state: Json<unknown>;
  savedAt: Instant;
}
export interface PaybackSnapshotTable {
  shopId: string;
  machineId: string;
  asOf: string;
  basis: string;
  outlay: Numeric;
  earned: Numeric;
  operatorLabour: Numeric;
  running: Numeric;
  breakEvenOn: string | null;
  breakEvenMethod: string;
  runId: string;
}

export interface Tables {
  shop: ShopTable;
  userAccount: UserAccountTable;
  auditEvent: AuditEventTable;
  employee: EmployeeTable;
  payRate: PayRateTable;
  overheadRate: OverheadRateTable;
  machine: MachineTable;
  machineCostItem: MachineCostItemTable;
  machineRate: MachineRateTable;
  operation: OperationTable;
  customer: CustomerTable;
  job: JobTable;
  timesheetImport: TimesheetImportTable;
  timesheetFile: TimesheetFileTable;
  savedMapping: SavedMappingTable;
  nameAlias: NameAliasTable;
  timeEntry: TimeEntryTable;
  dirtyDay: DirtyDayTable;
  rollupRun: RollupRunTable;
  costLine: CostLineTable;
  jobDay: JobDayTable;
  machineDay: MachineDayTable;
  machineJobDay: MachineJobDayTable;
  rateGap: RateGapTable;
  paybackSnapshot: PaybackSnapshotTable;
  material: MaterialTable;
  sheetLot: SheetLotTable;
  materialIssue: MaterialIssueTable;
  stockMove: StockMoveTable;
  outsideService: OutsideServiceTable;
  invoice: InvoiceTable;
  estimate: EstimateTable;
  estimateLine: EstimateLineTable;
  machineRateBasis: MachineRateBasisTable;
  monthClose: MonthCloseTable;
  payrollHours: PayrollHoursTable;
  savedView: SavedViewTable;
}
