import {
  AppError,
  type FormingMaterialDto,
  type formingMaterialInputSchema,
  type FormingReference,
  type ShopGauge,
  type shopGaugeInputSchema,
} from '@brakeven/contract';
import {
  countBendsOfMaterial,
  deleteFormingMaterialRow,
  deleteShopGaugeRow,
  getForceLinePercent,
  insertFormingMaterial,
  listMachineRows,
  saveFormingMaterialRow,
  saveShopGaugeRow,
  type ShopGaugeRow,
  type ShopTransaction,
  updateShopRow,
} from '@brakeven/database';
import { findMaterial } from '@brakeven/forming';
import { type z } from 'zod';
import { inShopOf, type ShopContext } from '../context';
import { toPlainText } from '../quantity-text';
import { readDies } from './dies';
import { readPunches } from './punches';
import { toFormingMachine } from './setup-tools';
import { findShippedMaterial, readFormingMaterials, readShopGauges } from './shop-materials';
import { refuseUsed } from './tool-use';

type MaterialValues = z.output<typeof formingMaterialInputSchema>;

/** All that bends are computed from in this shop; machines with tools, a rating or a bed first. */
export function getFormingReference(context: ShopContext): Promise<FormingReference> {
  return inShopOf(context, async (trx) => {
    const [punches, dies] = [await readPunches(trx), await readDies(trx)];
    const withTools = new Set([...punches, ...dies].map(({ machineId }) => machineId));
    const machines = (await listMachineRows(trx)).map(toFormingMachine);
    const isPress = ({ machineId, ratedForceKn, bedLengthMm }: (typeof machines)[number]) =>
      withTools.has(machineId) || ratedForceKn !== null || bedLengthMm !== null;
    return {
      forceLinePercent: toPlainText(await getForceLinePercent(trx)),
      machines: [...machines.filter(isPress), ...machines.filter((machine) => !isPress(machine))],
      materials: await readFormingMaterials(trx),
      gauges: await readShopGauges(trx),
      punches,
      dies,
    };
  });
}

/** Changes the share of a rating that the shop keeps below. */
export function updateForceLine(
  context: ShopContext,
  { forceLinePercent }: { forceLinePercent: string },
): Promise<void> {
  return inShopOf(context, (trx) => updateShopRow(trx, context.shop.shopId, { forceLinePercent }));
}

/**
 * Adds a material of the shop's own.
 * @throws AppError `conflict` (code taken, by the shop or by what is shipped)
 */
export function createFormingMaterial(
  context: ShopContext,
  body: MaterialValues & { code: string },
): Promise<FormingMaterialDto> {
  return inShopOf(context, async (trx) => {
    const isFree = findMaterial(body.code) === undefined;
    if (!isFree || !(await insertFormingMaterial(trx, { shopId: context.shop.shopId, ...body }))) {
      const message = `The code ${body.code} is taken. Change that material, or take another code.`;
      throw new AppError('conflict', message, { issues: [{ field: 'code', code: 'taken', message }] });
    }
    return readMaterial(trx, body.code);
  });
}

/**
 * Changes a material of the shop's own, or what is shipped for this shop. Forces of runs already logged stay.
 * @throws AppError `not_found`
 */
export function updateFormingMaterial(
  context: ShopContext,
  { code }: { code: string },
  body: MaterialValues,
): Promise<FormingMaterialDto> {
  return inShopOf(context, async (trx) => {
    await readMaterial(trx, code);
    await saveFormingMaterialRow(trx, { shopId: context.shop.shopId, code, ...body });
    return readMaterial(trx, code);
  });
}

/**
 * Takes a material of the shop's own out, or puts a shipped one back to what is shipped.
 * @throws AppError `not_found` (nothing of the shop's under this code), `conflict` (bends were made of it)
 */
export function deleteFormingMaterial(context: ShopContext, { code }: { code: string }): Promise<void> {
  return inShopOf(context, async (trx) => {
    const material = await readMaterial(trx, code);
    if (!findShippedMaterial(code)) refuseUsed(material.name, await countBendsOfMaterial(trx, code));
    if (await deleteFormingMaterialRow(trx, code)) return;
    throw new AppError('not_found', `${material.name} is as it is shipped; there is nothing to put back.`);
  });
}

async function readMaterial(trx: ShopTransaction, code: string): Promise<FormingMaterialDto> {
  const found = (await readFormingMaterials(trx)).find((material) => material.code === code);
  if (found) return found;
  throw new AppError('not_found', `There is no material '${code}'. Load the page again.`);
}

type GaugeKey = Pick<ShopGaugeRow, 'system' | 'gauge'>;

/** Says how thick a gauge is in this shop. */
export function updateShopGauge(
  context: ShopContext,
  key: GaugeKey,
  body: z.output<typeof shopGaugeInputSchema>,
): Promise<ShopGauge> {
  return inShopOf(context, async (trx) => {
    await saveShopGaugeRow(trx, { shopId: context.shop.shopId, ...key, ...body });
    const gauges = await readShopGauges(trx);
    const saved = gauges.find(({ system, gauge }) => system === key.system && gauge === key.gauge);
    if (!saved) throw new Error('A gauge was saved and is not there.');
    return saved;
  });
}

/**
 * Puts a gauge back to what is shipped.
 * @throws AppError `not_found`
 */
export function deleteShopGauge(context: ShopContext, { system, gauge }: GaugeKey): Promise<void> {
  return inShopOf(context, async (trx) => {
    if (await deleteShopGaugeRow(trx, system, gauge)) return;
    throw new AppError('not_found', `The shop has no ${system} gauge ${gauge} of its own.`);
  });
}
