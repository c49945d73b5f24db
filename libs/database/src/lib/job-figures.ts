import { type RawBuilder, sql } from 'kysely';

/** Categories that a job's cost is the sum of, in the order of reading. */
const COST = ['labour', 'overtime', 'machine', 'overhead', 'material', 'outside'] as const;

/** Sums of work: hours with four decimals, money with two, as text. */
export interface JobSums extends Record<(typeof COST)[number], string> {
  hours: string;
  machineHours: string;
  /** The sum of the categories. */
  total: string;
}

/** A job's sums beside its income and its estimate. */
export interface JobFigureColumns extends JobSums {
  invoiced: string;
  margin: string;
  marginIsProvisional: boolean;
  /** Finished, and invoices are still to come. */
  isToInvoice: boolean;
  workInProgress: string;
  estimatedHours: string | null;
  estimate: string | null;
  variance: string | null;
}

const sumOf = (category: string): RawBuilder<unknown> =>
  sql`coalesce(sum(d.amount) filter (where d.category = ${sql.lit(category)}), 0)::numeric(16,2)`;

/**
 * Over `d`, which has a category, hours and an amount. Every entry owes labour, so that the hours of labour are the
 * job's; those of machine are its machine hours.
 */
export const JOB_SUMS = sql`
  coalesce(sum(d.hours) filter (where d.category = 'labour'), 0)::numeric(14,4) as hours,
  coalesce(sum(d.hours) filter (where d.category = 'machine'), 0)::numeric(14,4) as machine_hours,
  ${sql.join(COST.map((category) => sql`${sumOf(category)} as ${sql.ref(category)}`))},
  coalesce(sum(d.amount) filter (where d.category in (${sql.join(COST.map((category) => sql.lit(category)))})), 0)
    ::numeric(16,2) as total`;

/** Hours of an operation's line `l` of estimate `s`: (set-up × 60 + minutes × (1 + allowance)) ÷ 60, half-up once. */
export const ESTIMATED_HOURS = sql`(div(
  (l.setup_hours * 60 + l.pieces * l.minutes_per_piece * (1 + s.scrap_allowance_percent * 0.01)) * 20000 + 60, 120
) * 0.0001)`;

/** Cost of line `l` of estimate `s`, whose hours are `h.hours`; each part to the cent. */
const ESTIMATED_COST = sql`case l.kind
  when 'operation' then round(h.hours * l.labour_rate, 2) + round(h.hours * l.overhead_rate, 2)
    + coalesce(round(h.hours * l.machine_hour_rate, 2), 0)
  when 'material' then round(l.weight_kg * (1 + s.scrap_allowance_percent * 0.01) * l.price_per_kg, 2)
  else l.amount end`;

/**
 * To follow `job j`: its sums `f`, its estimate `e` and what they come to beside each other `m`. The rules are
 * `computeJobCost` and `computeEstimate` of costing.
 */
export const JOB_FIGURES = sql`
  cross join lateral (
    select ${JOB_SUMS}, ${sumOf('invoiced')} as invoiced
    from job_day d where d.shop_id = j.shop_id and d.job_id = j.job_id
  ) f
  left join lateral (
    select coalesce(sum(h.hours), 0)::numeric(14,4) as estimated_hours,
      coalesce(sum(${ESTIMATED_COST}), 0)::numeric(16,2) as estimate
    from estimate s
    left join estimate_line l on l.shop_id = s.shop_id and l.job_id = s.job_id
    left join lateral (select ${ESTIMATED_HOURS} as hours where l.kind = 'operation') h on true
    where s.shop_id = j.shop_id and s.job_id = j.job_id
    group by s.job_id
  ) e on true
  cross join lateral (
    select f.invoiced - f.total as margin,
      j.status not in ('finished', 'invoiced') as margin_is_provisional,
      j.status = 'finished' and j.is_billable
        and (f.invoiced = 0 or coalesce(f.invoiced < j.quoted_price, false)) as is_to_invoice,
      case when j.is_billable and j.status in ('open', 'finished') then greatest(f.total - f.invoiced, 0) else 0 end
        ::numeric(16,2) as work_in_progress,
      case when f.total <> 0 then f.total - e.estimate end as variance
  ) m`;

/** Of `job j`: the last day that somebody worked on it, which is not the day in the books of what came late. */
export const LAST_WORKED_ON = sql`(
  select max(t.worked_on) from time_entry t
  where t.shop_id = j.shop_id and t.job_id = j.job_id and t.voided_at is null)`;

/** What `JOB_FIGURES` gives of one job. */
export const JOB_FIGURE_COLUMNS = sql`f.*, e.estimated_hours, e.estimate, m.*`;

const SUMMED = ['hours', 'machine_hours', ...COST, 'total', 'invoiced', 'margin', 'work_in_progress'];
const SUMMED_IF_ANY = ['estimated_hours', 'estimate', 'variance'];

/** The same over many jobs `g`: null only where no job has an estimate. */
export const JOB_FIGURE_TOTALS = sql`
  ${sql.join(SUMMED.map((column) => sql`coalesce(sum(${sql.ref(column)}), 0) as ${sql.ref(column)}`))},
  ${sql.join(SUMMED_IF_ANY.map((column) => sql`sum(${sql.ref(column)}) as ${sql.ref(column)}`))},
  coalesce(bool_or(margin_is_provisional), false) as margin_is_provisional,
  coalesce(bool_or(is_to_invoice), false) as is_to_invoice`;
