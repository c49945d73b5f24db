import { type JobSort } from '@brakeven/contract';
import { sql } from 'kysely';
import {
  JOB_FIGURE_COLUMNS,
  JOB_FIGURE_TOTALS,
  JOB_FIGURES,
  type JobFigureColumns,
  LAST_WORKED_ON,
} from './job-figures';
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

const figure = (column: string, isNullable = false): SortKey => ({
  expression: sql.ref(column),
  type: 'numeric',
  isNullable,
});

const SORT_KEYS = {
  number: { expression: inReadingOrder(sql`j.number`), type: 'text' },
  customer: { expression: inReadingOrder(sql`c.name`), type: 'text', isNullable: true },
  title: { expression: inReadingOrder(sql`j.title`), type: 'text' },
  status: { expression: sql`j.status`, type: 'text' },
  quantity: { expression: sql`j.quantity`, type: 'numeric', isNullable: true },
  openedOn: { expression: sql`j.opened_on`, type: 'date', isNullable: true },
  dueOn: { expression: sql`j.due_on`, type: 'date', isNullable: true },
  hours: figure('f.hours'),
  machineHours: figure('f.machine_hours'),
  labour: figure('f.labour'),
  overtime: figure('f.overtime'),
  machine: figure('f.machine'),
  overhead: figure('f.overhead'),
  material: figure('f.material'),
  outside: figure('f.outside'),
  total: figure('f.total'),
  quotedPrice: figure('j.quoted_price', true),
  estimatedHours: figure('e.estimated_hours', true),
  estimate: figure('e.estimate', true),
  variance: figure('m.variance', true),
  invoiced: figure('f.invoiced'),
  margin: figure('m.margin'),
  workInProgress: figure('m.work_in_progress'),
  lastWorkedOn: { expression: LAST_WORKED_ON, type: 'date', isNullable: true },
} as const satisfies Record<JobSort, SortKey>;

/** The type that a cursor's value has for a sort. */
export function jobSortType(sort: JobSort): SortKey['type'] {
  return SORT_KEYS[sort].type;
}

export interface JobRow extends JobFigureColumns {
  jobId: string;
  number: string;
  customerId: string | null;
  customer: string | null;
  title: string;
  quantity: number | null;
  openedOn: string | null;
  dueOn: string | null;
  quotedPrice: string | null;
  isBillable: boolean;
  status: JobTable['status'];
  lastWorkedOn: string | null;
  /** Those whose cost on the job is not known. */
  entriesWithoutRate: number;
  sortValue: string | null;
}

/** Where a page goes on, and how far. */
export interface JobPaging {
  sort: JobSort;
  direction: Direction;
  after: KeysetPosition | null;
  limit: number;
}

/** A premium that is not known yet is missing on the job only where the shop lets jobs bear it. */
const ENTRIES_WITHOUT_RATE = sql`(
  select count(distinct g.entry_id) from rate_gap g join shop s on s.shop_id = g.shop_id
  where g.shop_id = j.shop_id and g.job_id = j.job_id
    and (g.category in ('labour', 'machine', 'overhead') or g.category = 'overtime' and s.overtime_to = 'jobs'))`;

/** A page of jobs with their figures as they are rolled up. */
export async function listJobRows(
  trx: ShopTransaction,
  selection: JobSelection,
  { sort, direction, after, limit }: JobPaging,
): Promise<JobRow[]> {
  const key = SORT_KEYS[sort];
  const id = sql`j.job_id`;
  const { rows } = await sql<JobRow>`
    select j.job_id, j.number, j.customer_id, c.name as customer, j.title, j.quantity, j.opened_on, j.due_on,
      j.quoted_price, j.is_billable, j.status, ${JOB_FIGURE_COLUMNS}, (${key.expression})::text as sort_value,
      ${LAST_WORKED_ON} as last_worked_on, ${ENTRIES_WITHOUT_RATE} as entries_without_rate
    from ${JOB_WITH_CUSTOMER} ${JOB_FIGURES}
    where ${isJobSelected(selection)} and ${isAfter(key, id, direction, after)}
    order by ${orderByKey(key, id, direction)}
    limit ${limit}`.execute(trx);
  return rows;
}

/** What all jobs of a selection come to. */
export interface JobTotals extends JobFigureColumns {
  jobs: number;
  quotedPrice: string;
  /** Jobs that have a variance, their cost and their estimate: cost − estimate is `variance`. */
  comparedJobs: number;
  comparedCost: string;
  comparedEstimate: string;
}

/** Sums over all jobs of a selection. */
export async function sumJobs(trx: ShopTransaction, selection: JobSelection): Promise<JobTotals> {
  const { rows } = await sql<JobTotals>`
    select count(*) as jobs, coalesce(sum(quoted_price), 0)::numeric(16,2) as quoted_price, ${JOB_FIGURE_TOTALS},
      count(variance) as compared_jobs,
      coalesce(sum(total) filter (where variance is not null), 0)::numeric(16,2) as compared_cost,
      coalesce(sum(estimate) filter (where variance is not null), 0)::numeric(16,2) as compared_estimate
    from (
      select j.quoted_price, ${JOB_FIGURE_COLUMNS} from ${JOB_WITH_CUSTOMER} ${JOB_FIGURES}
      where ${isJobSelected(selection)}
    ) g`.execute(trx);
  const [sums] = rows;
  if (!sums) throw new Error('An aggregate gave no row.');
  return sums;
}
