import { sql } from 'kysely';
import { isJobSelected, JOB_WITH_CUSTOMER, type JobSelection } from './job-selection';
import {
  type Direction,
  inReadingOrder,
  isAfter,
  type KeysetPosition,
  orderByKey,
  type SortKey,
} from './keyset';
import { type JobTable } from './tables';
import { type ShopTransaction } from './tenancy';

const SORT_KEYS = {
  number: { expression: inReadingOrder(sql`j.number`), type: 'text' },
  customer: { expression: inReadingOrder(sql`c.name`), type: 'text', isNullable: true },
  title: { expression: inReadingOrder(sql`j.title`), type: 'text' },
  status: { expression: sql`j.status`, type: 'text' },
  dueOn: { expression: sql`j.due_on`, type: 'date', isNullable: true },
  hours: { expression: sql`f.hours`, type: 'numeric' },
  machineHours: { expression: sql`f.machine_hours`, type: 'numeric' },
  labour: { expression: sql`f.labour`, type: 'numeric' },
  machine: { expression: sql`f.machine`, type: 'numeric' },
  overhead: { expression: sql`f.overhead`, type: 'numeric' },
  total: { expression: sql`f.total`, type: 'numeric' },
  quotedPrice: { expression: sql`j.quoted_price`, type: 'numeric', isNullable: true },
  lastWorkedOn: { expression: sql`f.last_worked_on`, type: 'date', isNullable: true },
} as const satisfies Record<string, SortKey>;

export type JobSort = keyof typeof SORT_KEYS;

/** The type that a cursor's value has for a sort. */
export function jobSortType(sort: JobSort): SortKey['type'] {
  return SORT_KEYS[sort].type;
}

/** Sums over job days: hours with four decimals, money with two, as text. */
export interface JobSums {
  hours: string;
  machineHours: string;
  labour: string;
  machine: string;
  overhead: string;
  /** labour + machine + overhead */
  total: string;
}

export interface JobRow extends JobSums {
  jobId: string;
  number: string;
  customer: string | null;
  title: string;
  quantity: number | null;
  openedOn: string | null;
  dueOn: string | null;
  quotedPrice: string | null;
  isBillable: boolean;
  status: JobTable['status'];
  lastWorkedOn: string | null;
  entriesWithoutRate: number;
  sortValue: string | null;
}

/** Every entry owes labour, so that the hours of labour are the job's; those of machine are its machine hours. */
export const JOB_SUMS = sql`
  coalesce(sum(d.hours) filter (where d.category = 'labour'), 0)::numeric(14,4) as hours,
  coalesce(sum(d.hours) filter (where d.category = 'machine'), 0)::numeric(14,4) as machine_hours,
  coalesce(sum(d.amount) filter (where d.category = 'labour'), 0)::numeric(16,2) as labour,
  coalesce(sum(d.amount) filter (where d.category = 'machine'), 0)::numeric(16,2) as machine,
  coalesce(sum(d.amount) filter (where d.category = 'overhead'), 0)::numeric(16,2) as overhead,
  coalesce(sum(d.amount) filter (where d.category in ('labour', 'machine', 'overhead')), 0)::numeric(16,2) as total`;

/** Where a page goes on, and how far. */
export interface JobPaging {
  sort: JobSort;
  direction: Direction;
  after: KeysetPosition | null;
  limit: number;
}

/** A page of jobs with their figures as they are rolled up. */
export async function listJobRows(
  trx: ShopTransaction,
  selection: JobSelection,
  { sort, direction, after, limit }: JobPaging,
): Promise<JobRow[]> {
  const key = SORT_KEYS[sort];
  const id = sql`j.job_id`;
  const { rows } = await sql<JobRow>`
    select j.job_id, j.number, c.name as customer, j.title, j.quantity, j.opened_on, j.due_on, j.quoted_price,
      j.is_billable, j.status, f.*, (${key.expression})::text as sort_value,
      (select count(distinct g.entry_id) from rate_gap g
        where g.shop_id = j.shop_id and g.job_id = j.job_id and g.category in ('labour', 'machine', 'overhead')
      ) as entries_without_rate
    from ${JOB_WITH_CUSTOMER}
    cross join lateral (
      select ${JOB_SUMS}, max(d.posted_on) as last_worked_on
      from job_day d where d.shop_id = j.shop_id and d.job_id = j.job_id
    ) f
    where ${isJobSelected(selection)} and ${isAfter(key, id, direction, after)}
    order by ${orderByKey(key, id, direction)}
    limit ${limit}`.execute(trx);
  return rows;
}

/** Sums over all jobs of a selection. */
export async function sumJobs(
  trx: ShopTransaction,
  selection: JobSelection,
): Promise<JobSums & { jobs: number; quotedPrice: string }> {
  const { rows } = await sql<JobSums & { jobs: number; quotedPrice: string }>`
    with selected as (
      select j.shop_id, j.job_id, j.quoted_price from ${JOB_WITH_CUSTOMER} where ${isJobSelected(selection)}
    )
    select j.jobs, j.quoted_price, f.*
    from (select count(*) as jobs, coalesce(sum(quoted_price), 0)::numeric(16,2) as quoted_price from selected) j
    cross join (
      select ${JOB_SUMS} from job_day d join selected s on s.shop_id = d.shop_id and s.job_id = d.job_id
    ) f`.execute(trx);
  const [sums] = rows;
  if (!sums) throw new Error('An aggregate gave no row.');
  return sums;
}
