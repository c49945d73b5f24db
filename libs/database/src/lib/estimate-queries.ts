import { sql } from 'kysely';
import { type EstimateLineTable, type EstimateTable } from './tables';
import { type ShopTransaction } from './tenancy';

export type EstimateHeadRow = Omit<EstimateTable, 'shopId' | 'scrapAllowancePercent' | 'marginPercent'> & {
  scrapAllowancePercent: string;
  marginPercent: string;
};

/** A line of an estimate with the names of what it refers to. */
export type EstimateLineRow = Omit<
  EstimateLineTable,
  'shopId' | 'jobId' | 'description' | 'estimateLineId'
> & {
  estimateLineId: string;
  description: string;
  operation: string | null;
  machine: string | null;
  material: string | null;
};

/** The head of a job's estimate, if it has one. */
export function findEstimate(trx: ShopTransaction, jobId: string): Promise<EstimateHeadRow | undefined> {
  return trx
    .selectFrom('estimate')
    .select(['jobId', 'estimatedOn', 'scrapAllowancePercent', 'marginPercent'])
    .where('jobId', '=', jobId)
    .executeTakeFirst();
}

/** The lines of a job's estimate in their order. */
export async function listEstimateLines(trx: ShopTransaction, jobId: string): Promise<EstimateLineRow[]> {
  const { rows } = await sql<EstimateLineRow>`
    select l.estimate_line_id, l.position, l.kind, l.operation_id, o.name as operation, l.machine_id,
      m.name as machine, l.setup_hours, l.minutes_per_piece, l.pieces, l.labour_rate, l.machine_hour_rate,
      l.overhead_rate, l.material_id, t.name as material, l.weight_kg, l.price_per_kg, l.description, l.amount
    from estimate_line l
    left join operation o on o.shop_id = l.shop_id and o.operation_id = l.operation_id
    left join machine m on m.shop_id = l.shop_id and m.machine_id = l.machine_id
    left join material t on t.shop_id = l.shop_id and t.material_id = l.material_id
    where l.job_id = ${jobId}::uuid
    order by l.position`.execute(trx);
  return rows;
}
