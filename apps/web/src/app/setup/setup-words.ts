import { type SetupCounts, type SetupResult, type SetupSheet } from '@brakeven/contract';

/** What the sheets of a set-up workbook are called, in their order. */
export const SHEET_WORDS: Record<SetupSheet, string> = {
  people: 'People',
  customers: 'Customers',
  operations: 'Operations',
  machines: 'Machines',
  machineCosts: 'Machine costs',
  machineRates: 'Machine rates',
  overhead: 'Overhead',
  jobs: 'Jobs',
  punches: 'Punches',
  dies: 'Dies',
  materials: 'Materials',
  sheetLots: 'Sheet lots',
  issues: 'Issues',
  outsideServices: 'Outside services',
  invoices: 'Invoices',
  estimates: 'Estimates',
};

export interface SheetCount {
  sheet: string;
  added: number;
  changed: number;
  alreadyThere: number;
}

/** Rows by sheet that the workbook brings; sheets with none are left out. */
export function listSheetCounts({ added, changed, alreadyThere }: SetupResult): SheetCount[] {
  return (Object.keys(SHEET_WORDS) as SetupSheet[])
    .map((sheet) => ({
      sheet: SHEET_WORDS[sheet],
      added: added[sheet],
      changed: changed[sheet],
      alreadyThere: alreadyThere[sheet],
    }))
    .filter((count) => count.added + count.changed + count.alreadyThere > 0);
}

/** Whether the workbook may go in, and has anything to bring. */
export function findSetupVerdict(result: SetupResult): 'refused' | 'nothing new' | 'ready' {
  if (result.problems.some(({ severity }) => severity === 'refused')) return 'refused';
  return total(result.added) + total(result.changed) > 0 ? 'ready' : 'nothing new';
}

function total(counts: SetupCounts): number {
  return Object.values(counts).reduce((sum, count) => sum + count, 0);
}
