import { type RawBuilder, sql } from 'kysely';
import { allOf, containing } from './keyset';
import { type JobTable } from './tables';

/** Which jobs are meant. */
export interface JobSelection {
  jobId?: string;
  number?: string;
  search?: string;
  status?: JobTable['status'];
  customerId?: string;
  /** Only those that have none. */
  without?: 'customer';
}

/** The condition on `job j left join customer c`. */
export function isJobSelected({
  jobId,
  number,
  search,
  status,
  customerId,
  without,
}: JobSelection): RawBuilder<boolean> {
  const conditions: RawBuilder<unknown>[] = [];
  if (jobId !== undefined) conditions.push(sql`j.job_id = ${jobId}::uuid`);
  if (number !== undefined) conditions.push(sql`lower(j.number) = lower(${number})`);
  if (status !== undefined) conditions.push(sql`j.status = ${status}`);
  if (customerId !== undefined) conditions.push(sql`j.customer_id = ${customerId}::uuid`);
  if (without === 'customer') conditions.push(sql`j.customer_id is null`);
  if (search !== undefined && search !== '') {
    const pattern = containing(search);
    conditions.push(sql`(j.number ilike ${pattern} or j.title ilike ${pattern} or c.name ilike ${pattern})`);
  }
  return allOf(conditions);
}

/** `job j` with its customer `c`, if it has one. */
export const JOB_WITH_CUSTOMER = sql`job j
  left join customer c on c.shop_id = j.shop_id and c.customer_id = j.customer_id`;
