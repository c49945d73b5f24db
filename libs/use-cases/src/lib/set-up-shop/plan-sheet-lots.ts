import { type RegisterValues } from '@brakeven/database';
import { type SetupFile } from '@brakeven/workbook';
import { checkPast } from './dated-rows';
import { type SetupDraft } from './setup-draft';
import { computeSheetWeight, whyNoWeight } from './sheet-weight';
import { type DecimalColumn, toStoredNumber } from './stored-number';
import { listStated } from './table-plan';

type LotRow = SetupFile['sheetLots'][number];

const NEW_LOT = {
  vendor: '',
  sheets: null,
  sheetLengthMm: null,
  sheetWidthMm: null,
  freight: '0.00',
} as const;
/** What the stock is made of; the rest of a lot is words. */
const COSTING = ['materialId', 'receivedOn', 'weightKg', 'cost', 'freight'] as const;
const MEASURE = ['materialId', 'sheets', 'sheetLengthMm', 'sheetWidthMm'] as const;

/** Lots by their number. One that came in otherwise than the shop has it is voided, and another takes its place. */
export function planSheetLots(draft: SetupDraft, rows: SetupFile['sheetLots']): void {
  for (const row of rows) {
    const materialId = draft.findMaterial('sheetLots', row, row.material);
    const isPast = checkPast(draft, row, { list: 'sheetLots', column: 'receivedOn', date: row.receivedOn });
    if (draft.tables.sheetLot.hasStated(row.lot)) {
      draft.refuseTwice('sheetLots', row, 'lot', `Lot ${row.lot}`);
    } else if (materialId !== undefined && isPast) planLot(draft, row, materialId);
  }
}

function planLot(draft: SetupDraft, row: LotRow, materialId: string): void {
  const { sheetLot } = draft.tables;
  const before = sheetLot.find(row.lot);
  const decimal = (column: DecimalColumn['column'], form: DecimalColumn['form'], text: string | null) =>
    toStoredNumber(draft, row, { list: 'sheetLots', column, form }, text);
  const stated = listStated({
    materialId,
    receivedOn: row.receivedOn,
    vendor: row.vendor,
    sheets: row.sheets,
    sheetLengthMm: decimal('sheetLengthMm', 'quantity', row.sheetLengthMm),
    sheetWidthMm: decimal('sheetWidthMm', 'quantity', row.sheetWidthMm),
    weightKg: decimal('weightKg', 'weight', row.weightKg),
    cost: decimal('cost', 'money', row.cost),
    freight: decimal('freight', 'money', row.freight),
  });
  const weightKg =
    stated['weightKg'] ?? findWeight(draft, row, { ...before?.values, ...stated }, before?.values);
  if (weightKg === null) return;
  const values = { ...stated, weightKg };
  const { verdict } = before
    ? sheetLot.restate(before, values, COSTING)
    : sheetLot.state(row.lot, values, { ...NEW_LOT, number: row.lot });
  draft.count('sheetLots', verdict);
}

/** The weight that the shop has while its sheets are the same, else that of the sheets; refused in words if neither. */
function findWeight(
  draft: SetupDraft,
  row: LotRow,
  lot: RegisterValues,
  before: RegisterValues | undefined,
): string | null {
  if (before && MEASURE.every((name) => lot[name] === before[name])) return String(before['weightKg']);
  const material = draft.tables.material.get(String(lot['materialId']))?.values;
  const [sheets, length, width] = [lot['sheets'], lot['sheetLengthMm'], lot['sheetWidthMm']];
  const size = { pieces: sheets, lengthMm: length, widthMm: width };
  const weight = computeSheetWeight(material, size);
  if (weight !== null) {
    return toStoredNumber(draft, row, { list: 'sheetLots', column: 'sheets', form: 'weight' }, weight);
  }
  const message = `Lot ${row.lot} has no weight. ${whyNoWeight(material, size, 'sheets with their length and width')}`;
  draft.refuse('sheetLots', row, 'weightKg', { code: 'weight_missing', message });
  return null;
}
