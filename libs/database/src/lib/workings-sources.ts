import { sql } from 'kysely';
import { isAfter, type KeysetPosition, orderByKey, type SortKey } from './keyset';
import { type MaterialIssueTable } from './tables';
import { type ShopTransaction } from './tenancy';
import { type ItemRow } from './workings-items';

/** An entry of a week with the wage of its date; null if there was none. */
export interface PaidEntry {
  entryId: string;
  workedOn: string;
  hours: string;
  wagePerHour: string | null;
}

/** The live entries of an employee from one day through another, with their wages. */
export async function listPaidEntries(
  trx: ShopTransaction,
  employeeId: string,
  from: string,
  to: string,
): Promise<PaidEntry[]> {
  const { rows } = await sql<PaidEntry>`
    select t.entry_id, t.worked_on, t.hours, p.wage_per_hour
    from time_entry t
    left join lateral (
      select wage_per_hour from pay_rate
      where shop_id = t.shop_id and employee_id = t.employee_id and valid_from <= t.worked_on
      order by valid_from desc
      limit 1
    ) p on true
    where t.employee_id = ${employeeId}::uuid and t.worked_on between ${from}::date and ${to}::date
      and t.voided_at is null
    order by t.worked_on, t.entry_id`.execute(trx);
  return rows;
}

/** An employee's name; null if there is no such employee. */
export async function findEmployeeName(trx: ShopTransaction, employeeId: string): Promise<string | null> {
  const found = await trx
    .selectFrom('employee')
    .select('name')
    .where('employeeId', '=', employeeId)
    .executeTakeFirst();
  return found?.name ?? null;
}

/** A material's name; null if there is no such material. */
export async function findMaterialName(trx: ShopTransaction, materialId: string): Promise<string | null> {
  const found = await trx
    .selectFrom('material')
    .select('name')
    .where('materialId', '=', materialId)
    .executeTakeFirst();
  return found?.name ?? null;
}

/** An issue or a return with its moment in the stock ledger; the moment is null once it is voided. */
export interface IssueMoment {
  issueId: string;
  materialId: string;
  material: string;
  jobNumber: string;
  jobTitle: string;
  issuedOn: string;
  kind: MaterialIssueTable['kind'];
  weightKg: string;
  moment: StockMoment | null;
}

/** The stock around a move. */
export interface StockMoment {
  averagePerKg: string;
  beforeKg: string;
  beforeAmount: string;
  afterKg: string;
  afterAmount: string;
}

/** Finds an issue with its moment in the stock ledger. */
export async function findIssueMoment(trx: ShopTransaction, issueId: string): Promise<IssueMoment | null> {
  const { rows } = await sql<Omit<IssueMoment, 'moment'> & Partial<StockMoment>>`
    select s.issue_id, s.material_id, a.name as material, j.number as job_number, j.title as job_title, s.issued_on,
      s.kind, s.weight_kg, k.average_per_kg, k.balance_kg - k.weight_kg as before_kg,
      k.balance_amount - k.amount as before_amount, k.balance_kg as after_kg, k.balance_amount as after_amount
    from material_issue s
    join material a on a.shop_id = s.shop_id and a.material_id = s.material_id
    join job j on j.shop_id = s.shop_id and j.job_id = s.job_id
    left join stock_move k on k.shop_id = s.shop_id and k.material_id = s.material_id and k.moved_on = s.issued_on
      and k.rank = 1 and k.source_id = s.issue_id
    where s.issue_id = ${issueId}::uuid`.execute(trx);
  const [found] = rows;
  if (!found) return null;
  const { averagePerKg, beforeKg, beforeAmount, afterKg, afterAmount, ...issue } = found;
  const moment =
    averagePerKg && beforeKg && beforeAmount && afterKg && afterAmount
      ? { averagePerKg, beforeKg, beforeAmount, afterKg, afterAmount }
      : null;
  return { ...issue, moment };
}

/** Moves of a material's stock: all of them, those through a day, or those before an issue or return. */
export interface StockSelection {
  materialId: string;
  to?: string;
  before?: { issuedOn: string; issueId: string };
}

const MOVED_ON: SortKey = { expression: sql`x.moved_on`, type: 'date' };

/** A page of moves of stock, latest first, signed as the stock sees them. */
export async function listStockMoveRows(
  trx: ShopTransaction,
  selection: StockSelection,
  after: KeysetPosition | null,
  limit: number,
): Promise<ItemRow[]> {
  const id = sql`x.source_id`;
  const { rows } = await sql<ItemRow>`
    select x.source_id as id, x.moved_on as "on", coalesce(s.kind, 'lot') as category,
      case when l.lot_id is not null then 'Lot ' || l.number || coalesce(' from ' || nullif(l.vendor, ''), '')
        when s.kind = 'return' then 'Returned from job ' || j.number else 'Issued to job ' || j.number end as label,
      nullif(s.note, '') as detail, j.number as job, round(x.weight_kg, 4) as quantity, x.amount
    from (select * from stock_move where ${isChosen(selection)}) x
    left join sheet_lot l on x.rank = 0 and l.shop_id = x.shop_id and l.lot_id = x.source_id
    left join material_issue s on x.rank = 1 and s.shop_id = x.shop_id and s.issue_id = x.source_id
    left join job j on j.shop_id = s.shop_id and j.job_id = s.job_id
    where ${isAfter(MOVED_ON, id, 'desc', after)}
    order by ${orderByKey(MOVED_ON, id, 'desc')}
    limit ${limit}`.execute(trx);
  return rows;
}

/** Counts moves of stock and adds up their weight and value. */
export async function sumStockMoves(
  trx: ShopTransaction,
  selection: StockSelection,
): Promise<{ lines: number; amount: string; weightKg: string }> {
  const { rows } = await sql<{ lines: number; amount: string; weightKg: string }>`
    select count(*) as lines, coalesce(sum(amount), 0)::numeric(16,2) as amount,
      coalesce(sum(weight_kg), 0) as weight_kg
    from stock_move where ${isChosen(selection)}`.execute(trx);
  return rows[0] ?? { lines: 0, amount: '0.00', weightKg: '0' };
}

function isChosen({ materialId, to, before }: StockSelection) {
  const ofMaterial = sql<boolean>`material_id = ${materialId}::uuid`;
  if (before !== undefined) {
    return sql<boolean>`${ofMaterial}
      and (moved_on, rank, source_id) < (${before.issuedOn}::date, 1::smallint, ${before.issueId}::uuid)`;
  }
  return to === undefined ? ofMaterial : sql<boolean>`${ofMaterial} and moved_on <= ${to}::date`;
}
