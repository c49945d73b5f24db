import { AppError, type SheetLot, type sheetLotInputSchema } from '@brakeven/contract';
import { computeLandedLotCost } from '@brakeven/costing';
import {
  type DatedRowValues,
  findLastLotCount,
  findLotMaterial,
  type ShopTransaction,
} from '@brakeven/database';
import { moneyText, toMoney } from '@brakeven/values';
import { type z } from 'zod';
import {
  addDatedRow,
  type ChangeTools,
  correctDatedRow,
  type DatedRows,
  setVoided,
} from '../change-dated-rows';
import { type ShopContext } from '../context';
import { getMaterialRow } from './materials';
import { computeStockWeight } from './stock-weight';

type LotValues = z.output<typeof sheetLotInputSchema>;

const LOTS: DatedRows<'sheetLot'> = {
  table: 'sheetLot',
  dateField: 'receivedOn',
  // Stock that a correction takes away is missed by its weight, whatever else was changed.
  fields: { stock: 'weightKg' },
  conflicts: {
    sheet_lot_number: { field: 'number', message: 'Another lot has this number.' },
    sheet_lot_weight_kg_check: { field: 'weightKg', message: 'Must be more than 0.' },
  },
  noun: 'lot',
};

/**
 * Receives a lot; without a number it gets the next of the shop's own. Issues after its date are valued anew, except
 * those in closed months.
 * @throws AppError `not_found` (material), `conflict` (number taken), `invalid_input`
 */
export async function createSheetLot(
  context: ShopContext,
  { materialId }: { materialId: string },
  body: LotValues,
  tools: ChangeTools = {},
): Promise<SheetLot> {
  return keeping((toValues) => addDatedRow(context, LOTS, toValues, tools), materialId, body);
}

/**
 * Corrects a lot: it is voided and another takes its place.
 * @throws AppError `not_found`, `conflict` (stock that does not cover, number taken), `invalid_input`
 */
export async function updateSheetLot(
  context: ShopContext,
  { lotId }: { lotId: string },
  body: LotValues,
  tools: ChangeTools = {},
): Promise<SheetLot> {
  return keeping((toValues) => correctDatedRow(context, LOTS, lotId, toValues, tools), { lotId }, body);
}

/**
 * Voids a lot.
 * @throws AppError `not_found`, `conflict` if an issue drew from it
 */
export function voidSheetLot(
  context: ShopContext,
  { lotId }: { lotId: string },
  tools: ChangeTools = {},
): Promise<void> {
  return setVoided(context, LOTS, { id: lotId, isVoided: true }, tools);
}

/**
 * Takes back the voiding of a lot.
 * @throws AppError `not_found`, `conflict` if another lot has its number by now
 */
export function restoreSheetLot(
  context: ShopContext,
  { lotId }: { lotId: string },
  tools: ChangeTools = {},
): Promise<void> {
  return setVoided(context, LOTS, { id: lotId, isVoided: false }, tools);
}

/** Writes a lot by `write`, and answers it as it was written. */
async function keeping(
  write: (toValues: (trx: ShopTransaction) => Promise<DatedRowValues<'sheetLot'>>) => Promise<string>,
  of: string | { lotId: string },
  body: LotValues,
): Promise<SheetLot> {
  let values: DatedRowValues<'sheetLot'> | undefined;
  const lotId = await write(async (trx) => {
    const materialId = typeof of === 'string' ? of : await getLotMaterial(trx, of.lotId);
    values = await toLotValues(trx, materialId, body);
    return values;
  });
  if (!values) throw new Error('A lot was written without its values.');
  const { number, materialId, receivedOn, weightKg, cost, freight } = values;
  const landedCost = moneyText(computeLandedLotCost(toMoney(cost), toMoney(freight ?? '0')));
  return { lotId, number, materialId, receivedOn, weightKg, landedCost };
}

async function toLotValues(
  trx: ShopTransaction,
  materialId: string,
  { number, ...lot }: LotValues,
): Promise<DatedRowValues<'sheetLot'>> {
  const material = await getMaterialRow(trx, { materialId });
  const weightKg = computeStockWeight(material, {
    weightKg: lot.weightKg,
    count: lot.sheets,
    lengthMm: lot.sheetLengthMm,
    widthMm: lot.sheetWidthMm,
  });
  return { ...lot, number: number ?? `L-${(await findLastLotCount(trx)) + 1}`, materialId, weightKg };
}

async function getLotMaterial(trx: ShopTransaction, lotId: string): Promise<string> {
  const materialId = await findLotMaterial(trx, lotId);
  if (materialId) return materialId;
  throw new AppError('not_found', 'There is no such lot. Load the page again.');
}
