import { type Insertable, type Selectable, sql, type Updateable } from 'kysely';
import { type BendCounts } from './forming-reference';
import { type DieOpeningTable, type DieTable, type PunchTable } from './tables';
import { type ShopTransaction } from './tenancy';

export type PunchRow = Omit<Selectable<PunchTable>, 'shopId'>;
export type DieRow = Omit<Selectable<DieTable>, 'shopId'>;
export type DieOpeningRow = Omit<Selectable<DieOpeningTable>, 'shopId'>;

/** Punches by machine and name, or the one asked for. */
export function listPunchRows(trx: ShopTransaction, punchId?: string): Promise<PunchRow[]> {
  return trx
    .selectFrom('punch')
    .select(['punchId', 'machineId', 'name', 'noseRadiusMm', 'angle', 'lengthMm', 'forceLimitKnPerM'])
    .$if(punchId !== undefined, (query) => query.where('punchId', '=', punchId ?? ''))
    .orderBy('machineId')
    .orderBy('name')
    .execute();
}

/** Adds a punch. */
export async function insertPunch(trx: ShopTransaction, row: Insertable<PunchTable>): Promise<void> {
  await trx.insertInto('punch').values(row).execute();
}

/** Changes a punch. */
export async function updatePunchRow(
  trx: ShopTransaction,
  punchId: string,
  change: Updateable<PunchTable>,
): Promise<void> {
  await trx.updateTable('punch').set(change).where('punchId', '=', punchId).execute();
}

/** Takes a punch out; tells whether there was one. */
export async function deletePunchRow(trx: ShopTransaction, punchId: string): Promise<boolean> {
  const result = await trx.deleteFrom('punch').where('punchId', '=', punchId).executeTakeFirst();
  return result.numDeletedRows > 0n;
}

/** Dies by machine and name, or the one asked for. */
export function listDieRows(trx: ShopTransaction, dieId?: string): Promise<DieRow[]> {
  return trx
    .selectFrom('die')
    .select(['dieId', 'machineId', 'name', 'lengthMm', 'forceLimitKnPerM'])
    .$if(dieId !== undefined, (query) => query.where('dieId', '=', dieId ?? ''))
    .orderBy('machineId')
    .orderBy('name')
    .execute();
}

/** Openings, narrowest first, of one die or of all. */
export function listDieOpeningRows(trx: ShopTransaction, dieId?: string): Promise<DieOpeningRow[]> {
  return trx
    .selectFrom('dieOpening')
    .select(['dieOpeningId', 'dieId', 'openingMm', 'angle', 'shoulderRadiusMm'])
    .$if(dieId !== undefined, (query) => query.where('dieId', '=', dieId ?? ''))
    .orderBy('openingMm')
    .execute();
}

/** Adds a die; its openings follow. */
export async function insertDie(trx: ShopTransaction, row: Insertable<DieTable>): Promise<void> {
  await trx.insertInto('die').values(row).execute();
}

/** Changes a die. */
export async function updateDieRow(
  trx: ShopTransaction,
  dieId: string,
  change: Updateable<DieTable>,
): Promise<void> {
  await trx.updateTable('die').set(change).where('dieId', '=', dieId).execute();
}

/** Takes a die out whose openings are gone. */
export async function deleteDieRow(trx: ShopTransaction, dieId: string): Promise<void> {
  await trx.deleteFrom('die').where('dieId', '=', dieId).execute();
}

/** Adds openings. */
export async function insertDieOpenings(
  trx: ShopTransaction,
  rows: readonly Insertable<DieOpeningTable>[],
): Promise<void> {
  if (rows.length > 0) await trx.insertInto('dieOpening').values(rows).execute();
}

/** Changes an opening. */
export async function updateDieOpeningRow(
  trx: ShopTransaction,
  dieOpeningId: string,
  change: Updateable<DieOpeningTable>,
): Promise<void> {
  await trx.updateTable('dieOpening').set(change).where('dieOpeningId', '=', dieOpeningId).execute();
}

/** Takes openings out. */
export async function deleteDieOpeningRows(trx: ShopTransaction, ids: readonly string[]): Promise<void> {
  if (ids.length > 0) await trx.deleteFrom('dieOpening').where('dieOpeningId', 'in', ids).execute();
}

/** How many trial bends and press runs were made with a punch. */
export async function countBendsOfPunch(trx: ShopTransaction, punchId: string): Promise<BendCounts> {
  const { rows } = await sql<BendCounts>`
    select (select count(*) from trial_bend where punch_id = ${punchId}::uuid) as trial_bends,
      (select count(*) from press_run where punch_id = ${punchId}::uuid) as press_runs`.execute(trx);
  return rows[0] ?? { trialBends: 0, pressRuns: 0 };
}

/** How many trial bends and press runs were made on openings. */
export async function countBendsOnOpenings(
  trx: ShopTransaction,
  ids: readonly string[],
): Promise<BendCounts> {
  const { rows } = await sql<BendCounts>`
    select (select count(*) from trial_bend where die_opening_id = any (${ids}::uuid[])) as trial_bends,
      (select count(*) from press_run where die_opening_id = any (${ids}::uuid[])) as press_runs`.execute(
    trx,
  );
  return rows[0] ?? { trialBends: 0, pressRuns: 0 };
}
