import { toLocalDate } from '@brakeven/values';
import {
  type SetupData,
  type SetupEstimateLine,
  type SetupInvoice,
  type SetupIssue,
  type SetupMaterial,
  type SetupOutsideService,
  type SetupSheetLot,
} from '@brakeven/workbook';
import { DATA, GUARDS } from './setup-shop';

const day = (text: string) => toLocalDate(text);

export const ROLLED: SetupMaterial = {
  ...{ name: '11 ga hot-rolled', grade: 'A1011', form: 'sheet' as const, thickness: '11 ga' },
  ...{ densityKgM3: '7850', tensileStrengthMpa: '414', recoveryPricePerKg: '0.25' },
};
/** Four sheets of 10 ft by 4 ft. */
export const LOT: SetupSheetLot = {
  ...{ lot: 'L-1', material: '11 ga hot-rolled', receivedOn: day('2026-02-03'), vendor: 'Millrace Steel' },
  ...{ sheets: 4, sheetLengthMm: '3048', sheetWidthMm: '1219.2', weightKg: null },
  ...{ cost: '540.00', freight: '60.00' },
};
export const ISSUE: SetupIssue = {
  ...{
    date: day('2026-02-05'),
    job: 'J-1041',
    material: '11 ga hot-rolled',
    kind: 'issue' as const,
    note: null,
  },
  ...{ sheets: null, pieces: 24, blankLengthMm: '508', blankWidthMm: '254', weightKg: null },
};
/** By weight: 10 kg come back. */
export const RETURN: SetupIssue = {
  ...{ ...ISSUE, date: day('2026-02-06'), kind: 'return' as const, note: 'Remnant' },
  ...{ pieces: null, blankLengthMm: null, blankWidthMm: null, weightKg: '10' },
};
export const COATING: SetupOutsideService = {
  ...{ date: day('2026-02-19'), job: 'J-1041', vendor: 'Fernside', description: 'Powder coat' },
  amount: '412.00',
};
export const INVOICE: SetupInvoice = {
  ...{ number: '7731', date: day('2026-03-02'), job: 'J-1041', kind: 'invoice' as const },
  ...{ description: '24 guards', amount: '5400.00' },
};
export const EMPTY_LINE: Omit<SetupEstimateLine, 'kind'> = {
  ...{ job: 'J-1041', estimatedOn: null, operation: null, machine: null, setupHours: null },
  ...{ minutesPerPiece: null, pieces: null, labourRate: null, machineHourRate: null, overheadRate: null },
  ...{ material: null, weightKg: null, pricePerKg: null, description: null, amount: null },
  ...{ scrapAllowancePercent: null, marginPercent: null },
};
/** Forming on its own machine, at the rates of the day. */
export const FORMING: SetupEstimateLine = {
  ...EMPTY_LINE,
  ...{
    kind: 'operation' as const,
    estimatedOn: day('2026-02-10'),
    operation: 'FORM',
    minutesPerPiece: '2.5',
  },
  ...{ setupHours: '0.7500', scrapAllowancePercent: '3.00' },
};
export const SHEET_STOCK: SetupEstimateLine = {
  ...{
    ...EMPTY_LINE,
    kind: 'material',
    material: '11 ga hot-rolled',
    weightKg: '70',
    marginPercent: '18.00',
  },
};
export const COSTS: SetupData = {
  ...DATA,
  jobs: [GUARDS],
  punches: [],
  dies: [],
  materials: [ROLLED],
  sheetLots: [LOT],
  issues: [ISSUE, RETURN],
  outsideServices: [COATING, COATING],
  invoices: [INVOICE, { ...INVOICE, kind: 'credit-note', date: day('2026-03-09'), amount: '120.00' }],
  estimates: [
    FORMING,
    SHEET_STOCK,
    { ...EMPTY_LINE, kind: 'outside', description: 'Coat', amount: '400.00' },
  ],
};
