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
  weekStart: Generated<number>;
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
export interface CostLineTable {
  shopId: string;
  workedOn: string;
  sourceId: string;
  category: 'labour' | 'machine' | 'overhead' | 'earned' | 'running';
  sourceKind: 'time_entry';
  jobId: string;
  operationId: string | null;
  employeeId: string | null;
  machineId: string | null;
  quantity: Numeric;
  rate: Numeric;
  rateFactor: Numeric;
  rateId: string;
  amount: Numeric;
  runId: string;
}
export interface JobDayTable {
  shopId: string;
  jobId: string;
  workedOn: string;
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
  workedOn: string;
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
  workedOn: string;
  category: CostLineTable['category'];
  entryId: string;
  jobId: string;
  operationId: string;
  employeeId: string;
  machineId: string | null;
  hours: Numeric;
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
}
