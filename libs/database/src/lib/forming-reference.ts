import { type Insertable, type Selectable, sql } from 'kysely';
import { type FormingMaterialTable, type ShopGaugeTable } from './tables';
import { type ShopTransaction } from './tenancy';

export type FormingMaterialRow = Omit<Selectable<FormingMaterialTable>, 'shopId'>;
export type ShopGaugeRow = Omit<Selectable<ShopGaugeTable>, 'shopId'>;

/** The share of a rating, in percent, that the shop keeps below. */
export async function getForceLinePercent(trx: ShopTransaction): Promise<string> {
  const row = await trx.selectFrom('shop').select('forceLinePercent').executeTakeFirstOrThrow();
  return row.forceLinePercent;
}

/** Materials that the shop keeps itself or has changed, by name. */
export function listFormingMaterialRows(trx: ShopTransaction): Promise<FormingMaterialRow[]> {
  return trx
    .selectFrom('formingMaterial')
    .select([
      'code',
      'name',
      'gaugeSystem',
      'tensileMinMpa',
      'tensileUsedMpa',
      'tensileSource',
      'densityKgM3',
      'densitySource',
      'radiusPerOpening',
      'radiusSource',
    ])
    .orderBy('name')
    .orderBy('code')
    .execute();
}

/** Adds a material; tells whether its code was free. */
export async function insertFormingMaterial(
  trx: ShopTransaction,
  row: Insertable<FormingMaterialTable>,
): Promise<boolean> {
  const result = await trx
    .insertInto('formingMaterial')
    .values(row)
    .onConflict((conflict) => conflict.columns(['shopId', 'code']).doNothing())
    .executeTakeFirst();
  return result.numInsertedOrUpdatedRows === 1n;
}

/** Changes a material; adds it if the shop has none of that code yet. */
export async function saveFormingMaterialRow(
  trx: ShopTransaction,
  row: Insertable<FormingMaterialTable>,
): Promise<void> {
  const { shopId: _shopId, code: _code, ...change } = row;
  await trx
    .insertInto('formingMaterial')
    .values(row)
    .onConflict((conflict) => conflict.columns(['shopId', 'code']).doUpdateSet(change))
    .execute();
}

/** Takes a material out; tells whether there was one. */
export async function deleteFormingMaterialRow(trx: ShopTransaction, code: string): Promise<boolean> {
  const result = await trx.deleteFrom('formingMaterial').where('code', '=', code).executeTakeFirst();
  return result.numDeletedRows > 0n;
}

/** Gauges whose thickness the shop has said itself. */
export function listShopGaugeRows(trx: ShopTransaction): Promise<ShopGaugeRow[]> {
  return trx
    .selectFrom('shopGauge')
    .select(['system', 'gauge', 'thicknessMm', 'source'])
    .orderBy('system')
    .orderBy('gauge')
    .execute();
}

/** Says how thick a gauge is. */
export async function saveShopGaugeRow(trx: ShopTransaction, row: Insertable<ShopGaugeTable>): Promise<void> {
  const { thicknessMm, source } = row;
  await trx
    .insertInto('shopGauge')
    .values(row)
    .onConflict((conflict) =>
      conflict.columns(['shopId', 'system', 'gauge']).doUpdateSet({ thicknessMm, source }),
    )
    .execute();
}

/** Takes a gauge out; tells whether there was one. */
export async function deleteShopGaugeRow(
  trx: ShopTransaction,
  system: ShopGaugeTable['system'],
  gauge: number,
): Promise<boolean> {
  const result = await trx
    .deleteFrom('shopGauge')
    .where('system', '=', system)
    .where('gauge', '=', gauge)
    .executeTakeFirst();
  return result.numDeletedRows > 0n;
}

/** How many bends refer to something, those voided among them. */
export interface BendCounts {
  trialBends: number;
  pressRuns: number;
}

/** How many trial bends and press runs name a material. */
export async function countBendsOfMaterial(trx: ShopTransaction, code: string): Promise<BendCounts> {
  const { rows } = await sql<BendCounts>`
    select (select count(*) from trial_bend where material_code = ${code}) as trial_bends,
      (select count(*) from press_run where material_code = ${code}) as press_runs`.execute(trx);
  return rows[0] ?? { trialBends: 0, pressRuns: 0 };
}
