import {
  SETUP_SHEET_NAMES,
  SETUP_SHEETS,
  type SetupCounts,
  type SetupProblem,
  type SetupSheet,
} from '@brakeven/contract';
import { type RegisterRow, type RegisterTable, type RegisterValues } from '@brakeven/database';
import { type LocalDate, type UnitSystem } from '@brakeven/values';
import { type SetupRowSource } from '@brakeven/workbook';
import { normaliseName } from '../import-timesheet/near-matches';
import { TablePlan, type Verdict } from './table-plan';

/** What is wrong with a cell, in words. */
export interface SetupTrouble {
  code: string;
  message: string;
}

/** The shop's register, table by table. */
export type SetupRegister = Record<RegisterTable, readonly RegisterRow[]>;

const KEYS: Record<RegisterTable, (values: RegisterValues) => string> = {
  employee: ({ number }) => String(number),
  payRate: ({ employeeId, validFrom }) => `${employeeId}|${validFrom}`,
  customer: ({ name }) => String(name),
  machine: ({ code }) => String(code),
  machineCostItem: ({ machineId, incurredOn, kind, description }) =>
    [machineId, incurredOn, kind, description].join('|'),
  machineRate: ({ machineId, validFrom }) => `${machineId}|${validFrom}`,
  operation: ({ code }) => String(code),
  overheadRate: ({ validFrom }) => String(validFrom),
  job: ({ number }) => String(number),
  punch: ({ machineId, name }) => `${machineId}|${name}`,
  die: ({ machineId, name }) => `${machineId}|${name}`,
  dieOpening: ({ dieId, openingMm }) => `${dieId}|${openingMm}`,
  material: ({ name }) => String(name),
  sheetLot: ({ number }) => String(number),
  materialIssue: ({ jobId, materialId, issuedOn, kind }) => [jobId, materialId, issuedOn, kind].join('|'),
  outsideService: ({ jobId, incurredOn, amount }) => [jobId, incurredOn, amount].join('|'),
  invoice: ({ jobId, kind, number }) => [jobId, kind, number].join('|'),
  estimate: ({ jobId }) => String(jobId),
  estimateLine: ({ jobId, position }) => `${jobId}|${position}`,
};

/** Where rows name what others refer to, and by what. */
const REFERENCES = {
  machine: { sheet: 'Machines', key: 'code' },
  operation: { sheet: 'Operations', key: 'code' },
  material: { sheet: 'Materials', key: 'name' },
  job: { sheet: 'Jobs', key: 'number' },
} as const;

/** What a workbook is looked at with, besides the register. */
export interface SetupSurroundings {
  today: LocalDate;
  units: UnitSystem;
  /** What issues and returns cost their jobs in closed months. */
  postedAmounts: ReadonlyMap<string, string>;
}

/** The shop as a set-up workbook would leave it, with what is to be said about that. */
export class SetupDraft {
  readonly tables: Record<RegisterTable, TablePlan>;
  readonly problems: SetupProblem[] = [];
  readonly counts: Record<Verdict, SetupCounts> = {
    added: createCounts(),
    changed: createCounts(),
    alreadyThere: createCounts(),
  };

  constructor(
    register: SetupRegister,
    readonly surroundings: SetupSurroundings,
  ) {
    const plans = Object.entries(KEYS).map(([table, keyOf]) => [
      table,
      new TablePlan(register[table as RegisterTable], keyOf),
    ]);
    this.tables = Object.fromEntries(plans) as Record<RegisterTable, TablePlan>;
  }

  /** Whether anything stands in the way of writing. */
  get isRefused(): boolean {
    return this.problems.some(({ severity }) => severity === 'refused');
  }

  count(list: SetupSheet, verdict: Verdict): void {
    this.counts[verdict][list] += 1;
  }

  refuse(list: SetupSheet, row: SetupRowSource, column: string, trouble: SetupTrouble): void {
    this.report('refused', list, row, column, trouble);
  }

  warn(list: SetupSheet, row: SetupRowSource, column: string, trouble: SetupTrouble): void {
    this.report('warning', list, row, column, trouble);
  }

  /** A row that says again what a row above has said of the same thing. */
  refuseTwice(list: SetupSheet, row: SetupRowSource, column: string, what: string): void {
    const message = `${what} stands on sheet ${SETUP_SHEET_NAMES[list]} more than once. Keep one of the rows.`;
    this.refuse(list, row, column, { code: 'row_twice', message });
  }

  /** The machine of this code, or of this name if only one has it; refused in words if there is none. */
  findMachine(list: SetupSheet, row: SetupRowSource, spelling: string): string | undefined {
    return this.findNamed('machine', list, row, spelling);
  }

  /** The operation of this code, or of this name if only one has it; refused in words if there is none. */
  findOperation(list: SetupSheet, row: SetupRowSource, spelling: string): string | undefined {
    return this.findNamed('operation', list, row, spelling);
  }

  /** The material of this name; refused in words if there is none. */
  findMaterial(list: SetupSheet, row: SetupRowSource, spelling: string): string | undefined {
    const id = this.tables.material.findId(spelling);
    if (id === undefined) this.refuseUnknown('material', list, row, spelling);
    return id;
  }

  /** The job of this number; refused in words if there is none. */
  findJob(list: SetupSheet, row: SetupRowSource, spelling: string): string | undefined {
    const id = this.tables.job.findId(spelling);
    if (id === undefined) this.refuseUnknown('job', list, row, spelling);
    return id;
  }

  private findNamed(
    table: 'machine' | 'operation',
    list: SetupSheet,
    row: SetupRowSource,
    spelling: string,
  ): string | undefined {
    const byCode = this.tables[table].findId(spelling);
    if (byCode) return byCode;
    const named = this.tables[table]
      .listRows()
      .filter(({ values }) => normaliseName(String(values['name'])) === normaliseName(spelling));
    if (named.length === 1) return named[0]?.id;
    if (named.length === 0) this.refuseUnknown(table, list, row, spelling);
    else {
      const message = `More than one ${table} is called '${spelling}'. Write its code.`;
      this.refuse(list, row, table, { code: `${table}_unknown`, message });
    }
    return undefined;
  }

  private refuseUnknown(
    column: 'machine' | 'operation' | 'material' | 'job',
    list: SetupSheet,
    row: SetupRowSource,
    spelling: string,
  ): void {
    const { sheet, key } = REFERENCES[column];
    const what = `${column.charAt(0).toUpperCase()}${column.slice(1)} '${spelling}'`;
    const message = `${what} stands neither on sheet ${sheet} nor in the shop. Add it to ${sheet} or correct the ${key}.`;
    this.refuse(list, row, column, { code: `${column}_unknown`, message });
  }

  private report(
    severity: SetupProblem['severity'],
    list: SetupSheet,
    row: SetupRowSource,
    column: string,
    { code, message }: SetupTrouble,
  ): void {
    const cell = row.cells[column] ?? `A${row.row}`;
    this.problems.push({ code, message, severity, sheet: SETUP_SHEET_NAMES[list], cell });
  }
}

function createCounts(): SetupCounts {
  return Object.fromEntries(SETUP_SHEETS.map((sheet) => [sheet, 0])) as SetupCounts;
}
