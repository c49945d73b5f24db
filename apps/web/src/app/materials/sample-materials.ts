import { type Material, type StockMove } from '@brakeven/contract';

/** For specs: 11 gauge steel of which 90 kg are left. */
export const STEEL: Material = {
  materialId: 'steel',
  name: 'Mild steel 11 ga',
  grade: 'A1011 CS',
  form: 'sheet',
  gauge: '11 ga',
  thicknessMm: '3.03784',
  densityKgM3: '7850',
  tensileStrengthMpa: '413.685',
  recoveryPricePerKg: '0.220462',
  stockKg: '45.359237',
  stockValue: '100.00',
  averagePerKg: '2.204623',
  lastLot: {
    number: 'L-7',
    receivedOn: '2026-03-09',
    vendor: 'Millbrook Metals',
    sheetLengthMm: '3048',
    sheetWidthMm: '1219.2',
  },
};

/** For specs: bars whose thickness nobody has said, and that never came in. */
export const BAR: Material = {
  ...STEEL,
  materialId: 'bar',
  name: 'Flat bar',
  form: 'bar',
  gauge: null,
  thicknessMm: null,
  stockKg: '0',
  stockValue: '0.00',
  averagePerKg: null,
  lastLot: null,
};

/** What somebody without money is sent of a material. */
export function withoutMoney(material: Material): Material {
  const { recoveryPricePerKg: _price, stockValue: _value, averagePerKg: _average, ...facts } = material;
  return facts;
}

const MOVE = {
  sheets: null,
  pieces: null,
  lengthMm: null,
  widthMm: null,
  note: null,
  voidedAt: null,
  voidedBy: null,
};

/** For specs: ten sheets that came in at 1,575.50. */
export const LOT: StockMove = {
  ...MOVE,
  moveId: 'lot',
  kind: 'lot',
  movedOn: '2026-03-02',
  lot: { number: 'L-7', vendor: 'Millbrook Metals', cost: '1500.00', freight: '75.50' },
  job: null,
  sheets: 10,
  lengthMm: '3048',
  widthMm: '1219.2',
  weightKg: '886.1851530455',
  amount: '1575.50',
  averagePerKg: '1.777845',
  balanceKg: '886.1851530455',
  balanceAmount: '1575.50',
};

/** For specs: blanks cut from them. */
export const ISSUE: StockMove = {
  ...MOVE,
  moveId: 'issue',
  kind: 'issue',
  movedOn: '2026-03-04',
  lot: null,
  job: { jobId: 'job', number: '1042', title: 'Rack shelves' },
  pieces: 24,
  lengthMm: '500',
  widthMm: '250',
  weightKg: '-71.541132',
  amount: '-127.19',
  averagePerKg: '1.777845',
  balanceKg: '814.6440210455',
  balanceAmount: '1448.31',
  note: 'Remnant kept',
};
