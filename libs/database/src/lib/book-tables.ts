import { type Generated } from 'kysely';
import { type Instant, type InstantOrNull, type Numeric } from './table-columns';

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
