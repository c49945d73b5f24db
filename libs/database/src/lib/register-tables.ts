import { type Generated } from 'kysely';
import { type Numeric } from './table-columns';

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
