import { sql } from 'kysely';
import { ESTIMATED_HOURS } from './job-figures';
import { type CostLineTable } from './tables';
import { type ShopTransaction } from './tenancy';

/** What a job's lines of one category come to: hours or kg, and money. */
export interface CategorySum {
  category: CostLineTable['category'];
  quantity: string;
  amount: string;
}

/** Sums over a job's cost lines by category; entries without a rate have no line and are not in them. */
export async function listJobCategorySums(trx: ShopTransaction, jobId: string): Promise<CategorySum[]> {
  const { rows } = await sql<CategorySum>`
    select l.category, sum(l.quantity) as quantity, sum(l.amount)::numeric(16,2) as amount
    from cost_line l where l.job_id = ${jobId}::uuid
    group by l.category`.execute(trx);
  return rows;
}

/** Estimated hours of a job by operation. */
export async function listEstimatedOperationHours(
  trx: ShopTransaction,
  jobId: string,
): Promise<{ operationId: string; operation: string; hours: string }[]> {
  const { rows } = await sql<{ operationId: string; operation: string; hours: string }>`
    select l.operation_id, o.name as operation, sum(${ESTIMATED_HOURS})::numeric(14,4) as hours
    from estimate s
    join estimate_line l on l.shop_id = s.shop_id and l.job_id = s.job_id and l.kind = 'operation'
    join operation o on o.shop_id = l.shop_id and o.operation_id = l.operation_id
    where s.job_id = ${jobId}::uuid
    group by l.operation_id, o.name
    order by min(l.position)`.execute(trx);
  return rows;
}
