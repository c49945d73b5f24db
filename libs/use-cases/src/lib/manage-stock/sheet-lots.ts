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
import { changeDatedRows } from '../change-dated-rows';
import { type ShopContext } from '../context';
import { getMaterialRow } from './materials';
import { computeStockWeight } from './stock-weight';

type LotValues = z.output<typeof sheetLotInputSchema>;

const changes = changeDatedRows({
  table: 'sheetLot',
  idField: 'lotId',
  dateField: 'receivedOn',
  // Stock that a correction takes away is missed by its weight, whatever else was changed.
  fields: { stock: 'weightKg' },
  conflicts: {
    sheet_lot_number: { field: 'number', message: 'Another lot has this number.' },
    sheet_lot_weight_kg_check: { field: 'weightKg', message: 'Must be more than 0.' },
  },
  noun: 'lot',
  getParent: getLotMaterial,
  toValues: toLotValues,
  toItem: toSheetLot,
});

/**
 * Receives a lot of a material; without a number it gets the next of the shop's own. Issues after its date are valued
 * anew, except those in closed months.
 * @throws AppError `not_found` (material), `conflict` (number taken), `invalid_input`
 */
export const createSheetLot = changes.create;

/** Corrects a lot; as `createSheetLot`, and refuses a stock that would not cover what was drawn. */
export const updateSheetLot = changes.correct;

/** Voids a lot; refuses one that an issue drew from. */
export const voidSheetLot = changes.void;

/** Takes back the voiding of a lot; refuses one whose number is taken by now. */
export const restoreSheetLot = changes.restore;

async function toLotValues(
  trx: ShopTransaction,
  { materialId }: { materialId: string },
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

async function toSheetLot(
  _context: ShopContext,
  lotId: string,
  values: DatedRowValues<'sheetLot'>,
): Promise<SheetLot> {
  const { number, materialId, receivedOn, weightKg, cost, freight } = values;
  const landedCost = moneyText(computeLandedLotCost(toMoney(cost), toMoney(freight ?? '0')));
  return { lotId, number, materialId, receivedOn, weightKg, landedCost };
}

async function getLotMaterial(trx: ShopTransaction, lotId: string): Promise<{ materialId: string }> {
  const materialId = await findLotMaterial(trx, lotId);
  if (materialId) return { materialId };
  throw new AppError('not_found', 'There is no such lot. Load the page again.');
}
