import { type Insertable, sql } from 'kysely';
import { inReadingOrder } from './keyset';
import { type MaterialIssueTable, type MaterialTable, type StockMoveTable } from './tables';
import { type ShopTransaction } from './tenancy';

/** A material with the stock after its last move and the lot received last; null where there is none. */
export interface MaterialRow extends Pick<
  MaterialTable,
  'name' | 'form' | 'gauge' | 'thicknessMm' | 'densityKgM3' | 'tensileStrengthMpa'
> {
  materialId: string;
  grade: string;
  recoveryPricePerKg: string;
  balanceKg: string | null;
  balanceAmount: string | null;
  /** At which the last move was valued. */
  lastAveragePerKg: string | null;
  lotNumber: string | null;
  lotReceivedOn: string | null;
  lotVendor: string | null;
  lotLengthMm: string | null;
  lotWidthMm: string | null;
}

/** All materials by name, or the one asked for by id or by name, whatever its case. */
export async function listMaterialRows(
  trx: ShopTransaction,
  { materialId, name }: { materialId?: string; name?: string } = {},
): Promise<MaterialRow[]> {
  const isMeant = materialId === undefined ? sql`true` : sql`m.material_id = ${materialId}::uuid`;
  const isNamed = name === undefined ? sql`true` : sql`lower(m.name) = lower(${name})`;
  const { rows } = await sql<MaterialRow>`
    select m.material_id, m.name, m.grade, m.form, m.gauge, m.thickness_mm, m.density_kg_m3,
      m.tensile_strength_mpa, m.recovery_price_per_kg, s.balance_kg, s.balance_amount,
      s.average_per_kg as last_average_per_kg, l.number as lot_number, l.received_on as lot_received_on,
      l.vendor as lot_vendor, l.sheet_length_mm as lot_length_mm, l.sheet_width_mm as lot_width_mm
    from material m
    left join lateral (
      select * from stock_move s where s.shop_id = m.shop_id and s.material_id = m.material_id
      order by s.moved_on desc, s.rank desc, s.source_id desc limit 1
    ) s on true
    left join lateral (
      select * from sheet_lot l
      where l.shop_id = m.shop_id and l.material_id = m.material_id and l.voided_at is null
      order by l.received_on desc, l.lot_id desc limit 1
    ) l on true
    where ${isMeant} and ${isNamed}
    order by ${inReadingOrder(sql`m.name`)}, m.material_id`.execute(trx);
  return rows;
}

/** Adds a material. */
export async function insertMaterial(trx: ShopTransaction, row: Insertable<MaterialTable>): Promise<void> {
  await trx.insertInto('material').values(row).execute();
}

/** Changes a material. */
export async function updateMaterialRow(
  trx: ShopTransaction,
  materialId: string,
  change: Omit<Insertable<MaterialTable>, 'shopId' | 'materialId'>,
): Promise<void> {
  await trx.updateTable('material').set(change).where('materialId', '=', materialId).execute();
}

/** The highest of the lot numbers that the shop's own numbering has given: `L-1`, `L-2` and so on; 0 for none. */
export async function findLastLotCount(trx: ShopTransaction): Promise<number> {
  const { rows } = await sql<{ last: number }>`
    select coalesce(max(substring(number from '^L-([0-9]{1,8})$')::int), 0) as last
    from sheet_lot where number ~ '^L-[0-9]{1,8}$'`.execute(trx);
  return rows[0]?.last ?? 0;
}

/** The material of a lot; null if there is no such lot. */
export async function findLotMaterial(trx: ShopTransaction, lotId: string): Promise<string | null> {
  const row = await trx
    .selectFrom('sheetLot')
    .select('materialId')
    .where('lotId', '=', lotId)
    .executeTakeFirst();
  return row?.materialId ?? null;
}

/** Where a page of moves goes on: the last move before it. */
export interface MovePosition {
  movedOn: string;
  rank: number;
  sourceId: string;
}

/** A move with what its lot or its issue says. Its value and the balance are null if it is voided. */
export interface StockLedgerRow extends MovePosition {
  kind: 'lot' | 'issue' | 'return';
  weightKg: string;
  amount: string | null;
  averagePerKg: string | null;
  balanceKg: string | null;
  balanceAmount: string | null;
  lotNumber: string | null;
  vendor: string | null;
  cost: string | null;
  freight: string | null;
  jobId: string | null;
  jobNumber: string | null;
  jobTitle: string | null;
  sheets: number | null;
  pieces: number | null;
  lengthMm: string | null;
  widthMm: string | null;
  note: string | null;
  voidedAt: Date | null;
  voidedBy: string | null;
}

const LIVE_MOVES = sql`select shop_id, material_id, moved_on, rank, source_id, weight_kg, amount, average_per_kg,
  balance_kg, balance_amount from stock_move`;

const VOIDED_MOVES = sql`
  select shop_id, material_id, received_on as moved_on, 0::smallint as rank, lot_id as source_id, weight_kg,
    null::numeric as amount, null::numeric as average_per_kg, null::numeric as balance_kg,
    null::numeric as balance_amount
  from sheet_lot where voided_at is not null
  union all
  select shop_id, material_id, issued_on, 1::smallint, issue_id,
    case kind when 'return' then weight_kg else -weight_kg end, null, null, null, null
  from material_issue where voided_at is not null`;

/** A page of a material's moves, latest first: those that count, or those voided. */
export async function listStockLedgerRows(
  trx: ShopTransaction,
  materialId: string,
  show: 'all' | 'lot' | 'issue' | 'return' | 'voided',
  after: MovePosition | null,
  limit: number,
): Promise<StockLedgerRow[]> {
  const isShown = show === 'all' || show === 'voided' ? sql`true` : sql`coalesce(i.kind, 'lot') = ${show}`;
  const isAfter = after
    ? sql`(s.moved_on, s.rank, s.source_id) < (${after.movedOn}::date, ${after.rank}::smallint, ${after.sourceId}::uuid)`
    : sql`true`;
  const { rows } = await sql<StockLedgerRow>`
    select s.moved_on, s.rank, s.source_id, coalesce(i.kind, 'lot') as kind, s.weight_kg, s.amount,
      s.average_per_kg, s.balance_kg, s.balance_amount, l.number as lot_number, l.vendor, l.cost, l.freight,
      j.job_id, j.number as job_number, j.title as job_title, coalesce(l.sheets, i.sheets) as sheets, i.pieces,
      coalesce(l.sheet_length_mm, i.blank_length_mm) as length_mm,
      coalesce(l.sheet_width_mm, i.blank_width_mm) as width_mm, i.note,
      coalesce(l.voided_at, i.voided_at) as voided_at, coalesce(l.voided_by, i.voided_by) as voided_by
    from (${show === 'voided' ? VOIDED_MOVES : LIVE_MOVES}) s
    left join sheet_lot l on s.rank = 0 and l.shop_id = s.shop_id and l.lot_id = s.source_id
    left join material_issue i on s.rank = 1 and i.shop_id = s.shop_id and i.issue_id = s.source_id
    left join job j on j.shop_id = i.shop_id and j.job_id = i.job_id
    where s.material_id = ${materialId}::uuid and ${isShown} and ${isAfter}
    order by s.moved_on desc, s.rank desc, s.source_id desc
    limit ${limit}`.execute(trx);
  return rows;
}

/** An issue or a return with its value in the stock ledger, signed as stock moves; null if it is voided. */
export interface MaterialIssueRow extends Omit<
  MaterialIssueTable,
  'shopId' | 'issueId' | 'createdAt' | 'voidedAt'
> {
  issueId: string;
  material: string;
  moveAmount: StockMoveTable['amount'] | null;
  averagePerKg: StockMoveTable['averagePerKg'] | null;
  voidedAt: Date | null;
}

/** Issues and returns, latest first, those voided among them: of a job, or the one asked for. */
export async function listMaterialIssueRows(
  trx: ShopTransaction,
  of: { jobId: string } | { issueId: string },
): Promise<MaterialIssueRow[]> {
  const isMeant = 'jobId' in of ? sql`i.job_id = ${of.jobId}::uuid` : sql`i.issue_id = ${of.issueId}::uuid`;
  const { rows } = await sql<MaterialIssueRow>`
    select i.issue_id, i.job_id, i.material_id, m.name as material, i.kind, i.issued_on, i.sheets, i.pieces,
      i.blank_length_mm, i.blank_width_mm, i.weight_kg, i.note, i.voided_at, i.voided_by,
      s.amount as move_amount, s.average_per_kg
    from material_issue i
    join material m on m.shop_id = i.shop_id and m.material_id = i.material_id
    left join stock_move s on s.shop_id = i.shop_id and s.material_id = i.material_id
      and s.moved_on = i.issued_on and s.rank = 1 and s.source_id = i.issue_id
    where ${isMeant}
    order by i.issued_on desc, i.issue_id desc`.execute(trx);
  return rows;
}
