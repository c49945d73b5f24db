import { type Insertable, type RawBuilder, sql } from 'kysely';
import { allOf, isAfter, type KeysetPosition, orderByKey } from './keyset';
import { type DepthCardSheetTable, type TrialBendTable } from './tables';
import { type ShopTransaction } from './tenancy';

/** A trial bend with the tools that it was made with. */
export interface TrialBendRow {
  trialBendId: string;
  machineId: string;
  machine: string;
  punchId: string;
  punch: string;
  noseRadiusMm: string;
  dieOpeningId: string;
  die: string;
  openingMm: string;
  shoulderRadiusMm: string | null;
  materialCode: string;
  thicknessMm: string;
  stripWidthMm: string | null;
  depthMm: string;
  measuredAngle: string;
  isFullLength: boolean;
  bentBy: string;
  bentOn: string;
  voidedAt: Date | null;
  voidedBy: string | null;
}

/** Which trial bends are meant. */
export interface TrialBendSelection {
  trialBendIds?: readonly string[];
  machineId?: string;
  punchId?: string;
  dieOpeningId?: string;
  materialCode?: string;
  show: 'live' | 'voided' | 'all';
}

const SORT_KEY = { expression: sql`t.bent_on`, type: 'date' } as const;

/** Trial bends, latest first; from `after` on where a page goes on. */
export async function listTrialBendRows(
  trx: ShopTransaction,
  selection: TrialBendSelection,
  { after, limit }: { after: KeysetPosition | null; limit: number },
): Promise<TrialBendRow[]> {
  const id = sql`t.trial_bend_id`;
  const { rows } = await sql<TrialBendRow>`
    select t.trial_bend_id, t.machine_id, m.name as machine, t.punch_id, p.name as punch, p.nose_radius_mm,
      t.die_opening_id, d.name as die, o.opening_mm, o.shoulder_radius_mm, t.material_code, t.thickness_mm,
      t.strip_width_mm, t.depth_mm, t.measured_angle, t.is_full_length, t.bent_by, t.bent_on, t.voided_at,
      t.voided_by
    from trial_bend t
    join machine m on m.shop_id = t.shop_id and m.machine_id = t.machine_id
    join punch p on p.shop_id = t.shop_id and p.punch_id = t.punch_id
    join die_opening o on o.shop_id = t.shop_id and o.die_opening_id = t.die_opening_id
    join die d on d.shop_id = o.shop_id and d.die_id = o.die_id
    where ${isSelected(selection)} and ${isAfter(SORT_KEY, id, 'desc', after)}
    order by ${orderByKey(SORT_KEY, id, 'desc')}
    limit ${limit}`.execute(trx);
  return rows;
}

function isSelected(selection: TrialBendSelection): RawBuilder<boolean> {
  const conditions: RawBuilder<unknown>[] = [];
  const { trialBendIds, machineId, punchId, dieOpeningId, materialCode, show } = selection;
  if (show !== 'all')
    conditions.push(show === 'live' ? sql`t.voided_at is null` : sql`t.voided_at is not null`);
  if (trialBendIds !== undefined) conditions.push(sql`t.trial_bend_id = any (${trialBendIds}::uuid[])`);
  if (machineId !== undefined) conditions.push(sql`t.machine_id = ${machineId}::uuid`);
  if (punchId !== undefined) conditions.push(sql`t.punch_id = ${punchId}::uuid`);
  if (dieOpeningId !== undefined) conditions.push(sql`t.die_opening_id = ${dieOpeningId}::uuid`);
  if (materialCode !== undefined) conditions.push(sql`t.material_code = ${materialCode}`);
  return allOf(conditions);
}

/** Adds trial bends in one statement. */
export async function insertTrialBends(
  trx: ShopTransaction,
  rows: readonly Insertable<TrialBendTable>[],
): Promise<void> {
  if (rows.length > 0) await trx.insertInto('trialBend').values(rows).execute();
}

/** Voids a trial bend in a person's name, or restores it with null; tells whether there is such a bend. */
export async function setTrialBendVoided(
  trx: ShopTransaction,
  trialBendId: string,
  voidedBy: string | null,
): Promise<boolean> {
  const result = await trx
    .updateTable('trialBend')
    .set({ voidedAt: voidedBy === null ? null : sql<Date>`coalesce(voided_at, now())`, voidedBy })
    .where('trialBendId', '=', trialBendId)
    .executeTakeFirst();
  return result.numUpdatedRows > 0n;
}

export type DepthCardSheetRow = Omit<DepthCardSheetTable, 'shopId' | 'machineId' | 'position'>;

/** What stands on a machine's depth card; null if nobody has said yet. */
export async function findDepthCard(
  trx: ShopTransaction,
  machineId: string,
): Promise<{ angles: number[]; sheets: DepthCardSheetRow[] } | null> {
  const card = await trx
    .selectFrom('depthCard')
    .select('angles')
    .where('machineId', '=', machineId)
    .executeTakeFirst();
  if (!card) return null;
  const sheets = await trx
    .selectFrom('depthCardSheet')
    .select(['materialCode', 'thicknessMm', 'punchId', 'dieOpeningId'])
    .where('machineId', '=', machineId)
    .orderBy('position')
    .execute();
  return { angles: card.angles, sheets };
}

/** Says what stands on a machine's depth card, whatever stood there before. */
export async function saveDepthCard(
  trx: ShopTransaction,
  { shopId, machineId }: { shopId: string; machineId: string },
  card: { angles: readonly number[]; sheets: readonly DepthCardSheetRow[] },
): Promise<void> {
  const angles = JSON.stringify(card.angles);
  await trx
    .insertInto('depthCard')
    .values({ shopId, machineId, angles })
    .onConflict((conflict) => conflict.columns(['shopId', 'machineId']).doUpdateSet({ angles }))
    .execute();
  await trx.deleteFrom('depthCardSheet').where('machineId', '=', machineId).execute();
  const sheets = card.sheets.map((sheet, index) => ({ shopId, machineId, position: index + 1, ...sheet }));
  if (sheets.length > 0) await trx.insertInto('depthCardSheet').values(sheets).execute();
}
