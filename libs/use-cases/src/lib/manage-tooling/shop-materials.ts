import { AppError, type FormingMaterialDto, type ShopGauge } from '@brakeven/contract';
import {
  type FormingMaterialRow,
  listFormingMaterialRows,
  listShopGaugeRows,
  type ShopGaugeRow,
  type ShopTransaction,
} from '@brakeven/database';
import { findGaugeInches, type FindGauge, type FormingMaterial, MATERIALS } from '@brakeven/forming';
import { D, type Decimal, lengthIn, quoted, stressIn, toLength, toStress } from '@brakeven/values';
import { toPlainText } from '../quantity-text';

/** The materials of the shop: those that are shipped, as the shop has changed them, and its own. */
export async function readFormingMaterials(trx: ShopTransaction): Promise<FormingMaterialDto[]> {
  const rows = await listFormingMaterialRows(trx);
  const shipped = MATERIALS.map((material) => {
    const row = rows.find(({ code }) => code === material.code);
    return row ? toChangedMaterial(row) : toShippedMaterial(material);
  });
  const own = rows.filter(({ code }) => findShippedMaterial(code) === undefined).map(toChangedMaterial);
  return [...shipped, ...own];
}

/** The material that is shipped under a code. */
export function findShippedMaterial(code: string): FormingMaterial | undefined {
  return MATERIALS.find((material) => material.code === code);
}

/**
 * The material of a code, among those of the shop.
 * @throws AppError `invalid_input`, naming `field`
 */
export function getFormingMaterial(
  materials: readonly FormingMaterialDto[],
  code: string,
  field = 'materialCode',
): FormingMaterialDto {
  const found = materials.find((material) => material.code === code);
  if (found) return found;
  const message = `There is no material ${quoted(code)} here. Known are ${materials.map((material) => material.code).join(', ')}.`;
  throw new AppError('invalid_input', message, { issues: [{ field, code: 'unknown_material', message }] });
}

/** A material of the shop as the rules of forming take it. */
export function toRuleMaterial(material: FormingMaterialDto): FormingMaterial {
  const {
    origin: _origin,
    tensileMinMpa,
    tensileUsedMpa,
    densityKgM3,
    radiusPerOpening,
    ...plain
  } = material;
  // Stored strengths have five decimals; where nothing was changed, the exact one stands.
  const shipped = material.origin === 'shipped' ? findShippedMaterial(material.code) : undefined;
  if (shipped) return shipped;
  return {
    ...plain,
    tensileMin: tensileMinMpa === null ? null : toStress(D(tensileMinMpa), 'MPa'),
    tensileUsed: toStress(D(tensileUsedMpa), 'MPa'),
    densityGPerCm3: D(densityKgM3).div(1000).toNumber(),
    radiusPerOpening: Number(radiusPerOpening),
  };
}

function toShippedMaterial(material: FormingMaterial): FormingMaterialDto {
  const { tensileMin, tensileUsed, densityGPerCm3, radiusPerOpening, aliases, ...plain } = material;
  return {
    ...plain,
    aliases: [...aliases],
    tensileMinMpa: tensileMin && quantity(stressIn(tensileMin, 'MPa')),
    tensileUsedMpa: quantity(stressIn(tensileUsed, 'MPa')),
    densityKgM3: quantity(D(densityGPerCm3).times(1000)),
    radiusPerOpening: quantity(D(radiusPerOpening)),
    origin: 'shipped',
  };
}

function toChangedMaterial(row: FormingMaterialRow): FormingMaterialDto {
  const shipped = findShippedMaterial(row.code);
  return {
    ...row,
    aliases: [...(shipped?.aliases ?? [])],
    tensileMinMpa: toPlainText(row.tensileMinMpa),
    tensileUsedMpa: toPlainText(row.tensileUsedMpa),
    densityKgM3: toPlainText(row.densityKgM3),
    radiusPerOpening: toPlainText(row.radiusPerOpening),
    origin: shipped ? 'changed' : 'own',
  };
}

/** The shop's own gauges. */
export async function readShopGauges(trx: ShopTransaction): Promise<ShopGauge[]> {
  return (await listShopGaugeRows(trx)).map(toShopGauge);
}

function toShopGauge(row: ShopGaugeRow): ShopGauge {
  const isShipped = findGaugeInches(row.system, row.gauge) !== undefined;
  return { ...row, thicknessMm: toPlainText(row.thicknessMm), origin: isShipped ? 'changed' : 'own' };
}

/** Looks a gauge up in the shop's own ones before the tables that are shipped. */
export function toGaugeFinder(gauges: readonly ShopGauge[]): FindGauge {
  return (system, gauge) => {
    const own = gauges.find((row) => row.system === system && row.gauge === gauge);
    if (!own) return findGaugeInches(system, gauge);
    return lengthIn(toLength(D(own.thicknessMm), 'mm'), 'in').toNumber();
  };
}

function quantity(value: Decimal): string {
  return D(value.toFixed(5)).toFixed();
}
