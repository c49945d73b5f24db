import {
  type DirtyDayTable,
  type RollupRunTable,
  type CostLineTable,
  type JobDayTable,
  type MachineDayTable,
  type MachineJobDayTable,
  type RateGapTable,
  type PaybackSnapshotTable,
  type MonthCloseTable,
  type PayrollHoursTable,
} from './book-tables';
import {
  type DepthCardSheetTable,
  type DepthCardTable,
  type DieOpeningTable,
  type DieTable,
  type FormingMaterialTable,
  type PressRunTable,
  type PunchTable,
  type ShopGaugeTable,
  type TrialBendTable,
} from './forming-tables';
import {
  type MaterialTable,
  type SheetLotTable,
  type MaterialIssueTable,
  type StockMoveTable,
  type OutsideServiceTable,
  type InvoiceTable,
  type EstimateTable,
  type EstimateLineTable,
} from './job-money-tables';
import {
  type EmployeeTable,
  type PayRateTable,
  type OverheadRateTable,
  type MachineTable,
  type MachineCostItemTable,
  type MachineRateTable,
  type MachineRateBasisTable,
  type OperationTable,
  type CustomerTable,
  type JobTable,
} from './register-tables';
import {
  type ShopTable,
  type UserAccountTable,
  type AuditEventTable,
  type SavedViewTable,
} from './shop-tables';
import {
  type TimesheetImportTable,
  type TimesheetFileTable,
  type SavedMappingTable,
  type NameAliasTable,
  type TimeEntryTable,
} from './timesheet-tables';

export type * from './book-tables';
export type * from './forming-tables';
export type * from './job-money-tables';
export type * from './register-tables';
export type * from './shop-tables';
export type * from './timesheet-tables';

/** Row types as Kysely returns them: camelCase, `date` and `numeric` as text, instants as Date. */
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
  formingMaterial: FormingMaterialTable;
  shopGauge: ShopGaugeTable;
  punch: PunchTable;
  die: DieTable;
  dieOpening: DieOpeningTable;
  trialBend: TrialBendTable;
  depthCard: DepthCardTable;
  depthCardSheet: DepthCardSheetTable;
  pressRun: PressRunTable;
}
