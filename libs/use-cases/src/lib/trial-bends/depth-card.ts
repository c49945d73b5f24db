import {
  AppError,
  type DepthCard,
  type depthCardInputSchema,
  type FormingMaterialDto,
} from '@brakeven/contract';
import {
  type DepthCardSheetRow,
  findDepthCard,
  listMachineRows,
  saveDepthCard,
  type ShopTransaction,
} from '@brakeven/database';
import { type z } from 'zod';
import { inShopOf, type ShopContext } from '../context';
import { readSetupTools } from '../manage-tooling/setup-tools';
import { getFormingMaterial, readFormingMaterials } from '../manage-tooling/shop-materials';
import { toPlainText } from '../quantity-text';
import { answerDepth, fitTrials, toSetup } from './depth-fit';

type CardValues = z.output<typeof depthCardInputSchema>;

/** Angles of a card that nobody has edited yet. */
const USUAL_ANGLES = [90, 120, 135];

/**
 * Depths of the shop's usual sheets and angles on a machine; a cell that cannot be answered says why.
 * @throws AppError `not_found`
 */
export function getDepthCard(context: ShopContext, { machineId }: { machineId: string }): Promise<DepthCard> {
  return inShopOf(context, (trx) => readCard(trx, machineId));
}

/**
 * Says which sheets and angles stand on a machine's card.
 * @throws AppError `not_found`, `invalid_input` (no such tool or material)
 */
export function updateDepthCard(
  context: ShopContext,
  { machineId }: { machineId: string },
  { angles, sheets }: CardValues,
): Promise<DepthCard> {
  return inShopOf(context, async (trx) => {
    await refuseUnknownMachine(trx, machineId);
    const materials = await readFormingMaterials(trx);
    for (const [index, sheet] of sheets.entries()) {
      getFormingMaterial(materials, sheet.materialCode, `sheets.${index}.materialCode`);
      await readSetupTools(trx, { machineId, ...sheet });
    }
    const inOrder = [...new Set(angles)].sort((a, b) => a - b);
    await saveDepthCard(trx, { shopId: context.shop.shopId, machineId }, { angles: inOrder, sheets });
    return readCard(trx, machineId);
  });
}

async function readCard(trx: ShopTransaction, machineId: string): Promise<DepthCard> {
  await refuseUnknownMachine(trx, machineId);
  const { angles, sheets } = (await findDepthCard(trx, machineId)) ?? { angles: USUAL_ANGLES, sheets: [] };
  const materials = await readFormingMaterials(trx);
  const rows: DepthCard['sheets'] = [];
  for (const sheet of sheets) rows.push(await toCardRow(trx, { machineId, materials, angles }, sheet));
  return { machineId, angles, sheets: rows };
}

async function toCardRow(
  trx: ShopTransaction,
  { machineId, materials, angles }: { machineId: string; materials: FormingMaterialDto[]; angles: number[] },
  sheet: DepthCardSheetRow,
): Promise<DepthCard['sheets'][number]> {
  const tools = await readSetupTools(trx, { machineId, ...sheet });
  const material = materials.find(({ code }) => code === sheet.materialCode);
  const plain = {
    ...sheet,
    thicknessMm: toPlainText(sheet.thicknessMm),
    material: material?.name ?? sheet.materialCode,
    punch: tools.punch?.name ?? '',
    die: tools.die.name,
    openingMm: tools.opening.openingMm,
  };
  if (!material) {
    const cell = { code: 'unknown_material', message: 'This material is no longer there.' };
    return { ...plain, cells: angles.map(() => cell) };
  }
  const { fit } = await fitTrials(trx, { machineId, ...sheet }, Number(material.radiusPerOpening));
  const setup = toSetup(tools, Number(sheet.thicknessMm));
  return { ...plain, cells: angles.map((angle) => answerDepth(fit, setup, angle)) };
}

async function refuseUnknownMachine(trx: ShopTransaction, machineId: string): Promise<void> {
  const [machine] = await listMachineRows(trx, machineId);
  if (!machine) throw new AppError('not_found', 'There is no such machine.');
}
