import { type NameAliasTable } from './tables';
import { type ShopTransaction } from './tenancy';

/** A spelling confirmed by somebody; `aliasId` of the one it takes the place of, null for a new one. */
export interface AliasToSave {
  aliasId: string | null;
  kind: NameAliasTable['kind'];
  spelling: string;
  targetId: string;
}

/** A mapping remembered for headers of one signature. */
export interface SavedMapping {
  headerSignature: string;
  mapping: unknown;
}

/** All remembered mappings of the shop, latest first. */
export function listSavedMappings(trx: ShopTransaction, shopId: string): Promise<SavedMapping[]> {
  return trx
    .selectFrom('savedMapping')
    .select(['headerSignature', 'mapping'])
    .where('shopId', '=', shopId)
    .orderBy('savedAt', 'desc')
    .execute();
}

/** Remembers a mapping for its header; one remembered before gives way. */
export async function saveMapping(
  trx: ShopTransaction,
  shopId: string,
  { headerSignature, mapping }: SavedMapping,
): Promise<void> {
  const row = { mapping: JSON.stringify(mapping), savedAt: new Date() };
  await trx
    .insertInto('savedMapping')
    .values({ shopId, headerSignature, ...row })
    .onConflict((conflict) => conflict.columns(['shopId', 'headerSignature']).doUpdateSet(row))
    .execute();
}

/** Remembers spellings. The caller sees to it that each spelling is given once. */
export async function saveAliases(
  trx: ShopTransaction,
  shopId: string,
  aliases: readonly AliasToSave[],
): Promise<void> {
  const added = aliases.filter(({ aliasId }) => aliasId === null);
  if (added.length > 0) {
    const rows = added.map((alias) => ({
      shopId,
      kind: alias.kind,
      spelling: alias.spelling,
      ...toTargets(alias),
    }));
    await trx.insertInto('nameAlias').values(rows).execute();
  }
  for (const alias of aliases) {
    if (alias.aliasId === null) continue;
    await trx
      .updateTable('nameAlias')
      .set(toTargets(alias))
      .where('shopId', '=', shopId)
      .where('aliasId', '=', alias.aliasId)
      .execute();
  }
}

function toTargets({ kind, targetId }: AliasToSave) {
  return {
    employeeId: kind === 'employee' ? targetId : null,
    jobId: kind === 'job' ? targetId : null,
    operationId: kind === 'operation' ? targetId : null,
    machineId: kind === 'machine' ? targetId : null,
  };
}
