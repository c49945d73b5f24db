import { AppError, hasPermission, type Material, type materialInputSchema } from '@brakeven/contract';
import { roundFraction } from '@brakeven/costing';
import {
  insertMaterial,
  listMaterialRows,
  type MaterialRow,
  type ShopTransaction,
  updateMaterialRow,
} from '@brakeven/database';
import { isGaugeText } from '@brakeven/forming';
import { D, moneyText, rateText, toMoney, toRate } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { type z } from 'zod';
import { inShopOf, type ShopContext } from '../context';
import { toPlainText } from '../quantity-text';
import { refusingConflicts } from '../refuse-conflict';

type MaterialValues = z.output<typeof materialInputSchema>;

const CONFLICTS = {
  material_shop_id_name_key: { field: 'name', message: 'Another material has this name.' },
  material_thickness_mm_check: { field: 'thicknessMm', message: 'Must be more than 0.' },
  material_density_kg_m3_check: { field: 'densityKgM3', message: 'Must be more than 0.' },
  material_tensile_strength_mpa_check: { field: 'tensileStrengthMpa', message: 'Must be more than 0.' },
};

/** All materials by name with their stock; what it is worth only for those who may see it. */
export function listMaterials(context: ShopContext): Promise<Material[]> {
  return inShopOf(context, async (trx) =>
    (await listMaterialRows(trx)).map((row) => toMaterial(context, row)),
  );
}

/**
 * One material with its stock.
 * @throws AppError `not_found`
 */
export function getMaterial(context: ShopContext, { materialId }: { materialId: string }): Promise<Material> {
  return inShopOf(context, async (trx) => toMaterial(context, await getMaterialRow(trx, { materialId })));
}

/**
 * Adds a material.
 * @throws AppError `conflict` (name taken), `invalid_input`
 */
export function createMaterial(context: ShopContext, body: MaterialValues): Promise<Material> {
  const materialId = newId();
  checkGauge(body);
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await insertMaterial(trx, { shopId: context.shop.shopId, materialId, ...body });
      return toMaterial(context, await getMaterialRow(trx, { materialId }));
    }),
  );
}

/**
 * Changes a material. Weights of lots and issues that are in the books stay as they were worked out.
 * @throws AppError `not_found`, `conflict` (name taken), `invalid_input`
 */
export function updateMaterial(
  context: ShopContext,
  { materialId }: { materialId: string },
  body: MaterialValues,
): Promise<Material> {
  checkGauge(body);
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await updateMaterialRow(trx, materialId, body);
      return toMaterial(context, await getMaterialRow(trx, { materialId }));
    }),
  );
}

/**
 * Reads the one material that is meant.
 * @throws AppError `not_found`
 */
export async function getMaterialRow(
  trx: ShopTransaction,
  selection: { materialId: string } | { name: string },
): Promise<MaterialRow> {
  const [row] = await listMaterialRows(trx, selection);
  if (row) return row;
  const words = 'name' in selection ? ` ${selection.name}` : '';
  throw new AppError('not_found', `There is no material${words}. Look on the Materials page.`);
}

/** Whether the actor sees what material costs. */
export function seesMaterialMoney({ actor }: ShopContext): boolean {
  return hasPermission(actor.role, 'materials.money');
}

function checkGauge({ gauge }: MaterialValues): void {
  if (gauge === null || isGaugeText(gauge)) return;
  const message = `'${gauge}' is not a gauge. Write it like 11 ga, or leave the gauge out and give the thickness.`;
  throw new AppError('invalid_input', message, {
    issues: [{ field: 'gauge', code: 'not_a_gauge', message }],
  });
}

function toMaterial(context: ShopContext, row: MaterialRow): Material {
  return {
    materialId: row.materialId,
    name: row.name,
    grade: row.grade,
    form: row.form,
    gauge: row.gauge,
    thicknessMm: toPlainText(row.thicknessMm),
    densityKgM3: toPlainText(row.densityKgM3),
    tensileStrengthMpa: toPlainText(row.tensileStrengthMpa),
    stockKg: toPlainText(row.balanceKg ?? '0'),
    ...(seesMaterialMoney(context) ? toMaterialMoney(row) : {}),
    lastLot: toLastLot(row),
  };
}

function toMaterialMoney(row: MaterialRow) {
  return {
    recoveryPricePerKg: rateText(toRate(row.recoveryPricePerKg)),
    stockValue: moneyText(toMoney(row.balanceAmount ?? '0')),
    averagePerKg: toAverage(row),
  };
}

/** Value ÷ weight, once; with no stock, what the last move was valued at. */
function toAverage({ balanceKg, balanceAmount, lastAveragePerKg }: MaterialRow): string | null {
  if (balanceKg === null || balanceAmount === null || lastAveragePerKg === null) return null;
  const weight = D(balanceKg);
  const average = weight.gt(0) ? roundFraction(D(balanceAmount), weight, 6) : D(lastAveragePerKg);
  return rateText(toRate(average));
}

function toLastLot(row: MaterialRow): Material['lastLot'] {
  if (row.lotNumber === null || row.lotReceivedOn === null) return null;
  return {
    number: row.lotNumber,
    receivedOn: row.lotReceivedOn,
    vendor: row.lotVendor ?? '',
    sheetLengthMm: toPlainText(row.lotLengthMm),
    sheetWidthMm: toPlainText(row.lotWidthMm),
  };
}
