import { sql } from 'kysely';
import { LINE_FACT_JOINS, LINE_FACTS, type LineFactRow } from './line-facts';
import { type CostLineTable, type MonthCloseTable } from './tables';
import { type ShopTransaction } from './tenancy';

/** A closing of a month, reopened since or not. */
export type MonthCloseRow = Pick<MonthCloseTable, 'month' | 'closedBy' | 'reopenedBy' | 'reopenReason'> & {
  closedAt: Date;
  reopenedAt: Date | null;
};

/** Every closing there was, latest first. */
export function listMonthCloseRows(trx: ShopTransaction): Promise<MonthCloseRow[]> {
  return trx
    .selectFrom('monthClose')
    .select(['month', 'closedAt', 'closedBy', 'reopenedAt', 'reopenedBy', 'reopenReason'])
    .orderBy('closedAt', 'desc')
    .orderBy('monthCloseId', 'desc')
    .execute();
}

/** The first day that has hours or costs; null if there is none. */
export async function findFirstDay(trx: ShopTransaction): Promise<string | null> {
  const { rows } = await sql<{ firstDay: string | null }>`
    select least(
      (select min(worked_on) from time_entry where voided_at is null),
      (select min(posted_on) from cost_line)
    )::text as first_day`.execute(trx);
  return rows[0]?.firstDay ?? null;
}

/** Closes a month, given by its first day. */
export async function insertMonthClose(
  trx: ShopTransaction,
  row: { shopId: string; monthCloseId: string; month: string; closedBy: string },
): Promise<void> {
  await trx.insertInto('monthClose').values(row).execute();
}

/** Notes on the closing of a month that it was reopened; tells whether it was closed. */
export async function markMonthReopened(
  trx: ShopTransaction,
  month: string,
  reopened: { reopenedBy: string; reopenReason: string },
): Promise<boolean> {
  const result = await trx
    .updateTable('monthClose')
    .set({ ...reopened, reopenedAt: sql`now()` })
    .where('month', '=', month)
    .where('reopenedAt', 'is', null)
    .executeTakeFirst();
  return result.numUpdatedRows > 0n;
}

/** What a category comes to in the books of a period. */
export interface MonthTotalRow {
  category: CostLineTable['category'];
  amount: string;
  toOverhead: string;
  late: string;
  lines: number;
}

/** Sums the cost lines posted in a period by category. */
export async function listMonthTotalRows(
  trx: ShopTransaction,
  from: string,
  to: string,
): Promise<MonthTotalRow[]> {
  const { rows } = await sql<MonthTotalRow>`
    select category, sum(amount) as amount,
      coalesce(sum(amount) filter (where job_id is null), 0) as to_overhead,
      coalesce(sum(amount) filter (where posted_on <> worked_on), 0) as late, count(*) as lines
    from cost_line
    where posted_on between ${from}::date and ${to}::date
    group by category`.execute(trx);
  return rows;
}

/** A late line with what it says of itself and the job it is on. */
export type LateLineRow = LineFactRow & { amount: string; jobId: string | null; job: string | null };

/** Which late lines are meant: those posted in a period, or those of work done in it. */
export interface LateSelection {
  by: 'posted' | 'worked';
  from: string;
  to: string;
  limit: number;
}

/** Late lines by the day of their work, the first of them and how many there are. */
export async function listLateLineRows(
  trx: ShopTransaction,
  { by, from, to, limit }: LateSelection,
): Promise<{ rows: LateLineRow[]; count: number }> {
  const day = sql.ref(by === 'posted' ? 'l.posted_on' : 'l.worked_on');
  const isMeant = sql`l.posted_on <> l.worked_on and ${day} between ${from}::date and ${to}::date`;
  const counted = await sql<{ count: number }>`
    select count(*) as count from cost_line l where ${isMeant}`.execute(trx);
  const { rows } = await sql<LateLineRow>`
    select ${LINE_FACTS}, l.amount, l.job_id, j.number as job
    from (
      select * from cost_line l where ${isMeant} order by l.worked_on, l.source_id, l.category, l.posted_on
      limit ${limit}
    ) l
    left join job j on j.shop_id = l.shop_id and j.job_id = l.job_id
    ${LINE_FACT_JOINS}
    order by l.worked_on, l.source_id, l.category, l.posted_on`.execute(trx);
  return { rows, count: counted.rows[0]?.count ?? 0 };
}
