import { SETUP_SHEETS, type SetupCounts, type SetupProblem, type SetupSheet } from '@brakeven/contract';
import { type RegisterRow, type RegisterTable, type RegisterValues } from '@brakeven/database';
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

export const SHEET_NAMES: Record<SetupSheet, string> = {
  people: 'People',
  customers: 'Customers',
  operations: 'Operations',
  machines: 'Machines',
  machineCosts: 'Machine costs',
  machineRates: 'Machine rates',
  overhead: 'Overhead',
  jobs: 'Jobs',
  materials: 'Materials',
  sheetLots: 'Sheet lots',
  issues: 'Issues',
  outsideServices: 'Outside services',
  invoices: 'Invoices',
  estimates: 'Estimates',
};

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
};

/** The shop as a set-up workbook would leave it, with what is to be said about that. */
export class SetupDraft {
  readonly tables: Record<RegisterTable, TablePlan>;
  readonly problems: SetupProblem[] = [];
  readonly counts: Record<Verdict, SetupCounts> = {
    added: createCounts(),
    changed: createCounts(),
    alreadyThere: createCounts(),
  };

  constructor(register: SetupRegister) {
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
    const message = `${what} stands on sheet ${SHEET_NAMES[list]} more than once. Keep one of the rows.`;
    this.refuse(list, row, column, { code: 'row_twice', message });
  }

  /** The machine of this code, or of this name if only one has it; refused in words if there is none. */
  findMachine(list: SetupSheet, row: SetupRowSource, spelling: string): string | undefined {
    const byCode = this.tables.machine.findId(spelling);
    if (byCode) return byCode;
    const named = this.tables.machine
      .listRows()
      .filter(({ values }) => normaliseName(String(values['name'])) === normaliseName(spelling));
    if (named.length === 1) return named[0]?.id;
    const message =
      named.length > 1
        ? `More than one machine is called '${spelling}'. Write its code.`
        : `Machine '${spelling}' stands neither on sheet Machines nor in the shop. Add it to Machines or correct the code.`;
    this.refuse(list, row, 'machine', { code: 'machine_unknown', message });
    return undefined;
  }

  private report(
    severity: SetupProblem['severity'],
    list: SetupSheet,
    row: SetupRowSource,
    column: string,
    { code, message }: SetupTrouble,
  ): void {
    const cell = row.cells[column] ?? `A${row.row}`;
    this.problems.push({ code, message, severity, sheet: SHEET_NAMES[list], cell });
  }
}

function createCounts(): SetupCounts {
  return Object.fromEntries(SETUP_SHEETS.map((sheet) => [sheet, 0])) as SetupCounts;
}
