import { type RawBuilder, sql } from 'kysely';
import { type SourceColumns } from './entry-pages';
import { type LinePosition } from './job-detail';
import { isJobSelected, JOB_WITH_CUSTOMER, type JobSelection } from './job-selection';
import { allOf } from './keyset';
import { type CostLineTable } from './tables';
import { type ShopTransaction } from './tenancy';

type Category = CostLineTable['category'];

/** Which lines make a figure. */
export interface LineSelection {
  /** What the lines are added up by: their amounts, or the hours of their entries, those without a rate too. */
  unit: 'money' | 'hours';
  /** Each category with the sign it counts with. */
  signs: Partial<Record<Category, 1 | -1>>;
  jobId?: string;
  /** Jobs of a filter. */
  jobs?: JobSelection;
  operationId?: string;
  /** Only a machine in service: its lines from that day on; null takes none. */
  machine?: { machineId: string; inServiceOn: string | null };
  from?: string;
  to?: string;
}

/** Of the three tables of rates that `rateJoins` joins. */
const RATE_VALID_FROM = sql`coalesce(pr.valid_from, hr.valid_from, mr.valid_from)`;

/** Sum of the lines that share a category and a rate. */
export interface LineGroup {
  category: Category;
  lines: number;
  /** Signed as it counts. */
  amount: string;
  rate: string | null;
  rateFactor: string | null;
  /** The employee or the machine whose rate it is; null for overhead, and for hours. */
  subject: string | null;
  rateValidFrom: string | null;
}

/** Adds up the lines by category and rate: what a figure is made of, and the rates it was made with. */
export async function listLineGroups(trx: ShopTransaction, selection: LineSelection): Promise<LineGroup[]> {
  const byRate =
    selection.unit === 'money'
      ? sql`l.rate_id, l.rate, l.rate_factor,
          case l.category when 'labour' then l.employee_id when 'overhead' then null else l.machine_id end as subject_id`
      : sql`null::uuid as rate_id, null::numeric as rate, null::numeric as rate_factor, null::uuid as subject_id`;
  const { rows } = await sql<LineGroup>`
    select g.category, g.lines, g.amount, g.rate, g.rate_factor, coalesce(e.name, m.name) as subject,
      ${RATE_VALID_FROM} as rate_valid_from
    from (
      select l.category, ${byRate}, count(*) as lines, sum(${signedAmount(selection)}) as amount
      from ${selectedLines(selection)} l
      group by 1, 2, 3, 4, 5
    ) g
    left join employee e on e.employee_id = g.subject_id
    left join machine m on m.machine_id = g.subject_id
    ${rateJoins('g')}
    order by g.category, subject, rate_valid_from, g.rate`.execute(trx);
  return rows;
}

/** A line as workings show it. */
export interface WorkingsLineRow extends SourceColumns, LinePosition {
  workedOn: string;
  employee: string;
  job: string;
  operation: string;
  machine: string | null;
  hours: string;
  rate: string | null;
  rateFactor: string | null;
  rateValidFrom: string | null;
  /** Signed as it counts. */
  amount: string;
}

/** A page of the lines of a figure, latest first. */
export async function listWorkingsLineRows(
  trx: ShopTransaction,
  selection: LineSelection,
  after: LinePosition | null,
  limit: number,
): Promise<WorkingsLineRow[]> {
  const { rows } = await sql<WorkingsLineRow>`
    select l.posted_on, l.worked_on, l.source_id, l.category, e.name as employee, j.number as job, o.name as operation,
      m.name as machine, l.quantity as hours, l.rate, l.rate_factor, ${RATE_VALID_FROM} as rate_valid_from,
      ${signedAmount(selection)} as amount, t.import_id, i.file_name, i.sheet, t.source_row, t.source_cell
    from (
      select * from ${selectedLines(selection, { after, limit })} l
      order by l.posted_on desc, l.source_id desc, l.category desc
      limit ${limit}
    ) l
    join employee e on e.shop_id = l.shop_id and e.employee_id = l.employee_id
    join job j on j.shop_id = l.shop_id and j.job_id = l.job_id
    join operation o on o.shop_id = l.shop_id and o.operation_id = l.operation_id
    join time_entry t on t.shop_id = l.shop_id and t.entry_id = l.source_id
    left join machine m on m.shop_id = l.shop_id and m.machine_id = l.machine_id
    left join timesheet_import i on i.shop_id = t.shop_id and i.import_id = t.import_id
    ${rateJoins('l')}
    order by l.posted_on desc, l.source_id desc, l.category desc`.execute(trx);
  return rows;
}

interface LineCut {
  after: LinePosition | null;
  limit: number;
}

/**
 * Cost lines, and for hours the gaps as well: an entry without a rate was worked all the same. For a page, each of
 * the two is cut by its own index before they are put together.
 */
function selectedLines(selection: LineSelection, cut?: LineCut): RawBuilder<unknown> {
  const lines = sql`
    (select shop_id, posted_on, worked_on, source_id, category, job_id, operation_id, employee_id, machine_id, quantity,
      rate, rate_factor, rate_id, amount
    from cost_line where ${isSelected(selection)} ${cutBy('source_id', cut)})`;
  if (selection.unit === 'money') return lines;
  return sql`(${lines} union all
    (select shop_id, posted_on, worked_on, entry_id, category, job_id, operation_id, employee_id, machine_id, hours,
      null, null, null, null
    from rate_gap where ${isSelected(selection)} ${cutBy('entry_id', cut)}))`;
}

function cutBy(idColumn: 'source_id' | 'entry_id', cut: LineCut | undefined): RawBuilder<unknown> {
  if (cut === undefined) return sql``;
  const { after, limit } = cut;
  const id = sql.ref(idColumn);
  const isAfter = after
    ? sql`and (posted_on, ${id}, category) < (${after.postedOn}::date, ${after.sourceId}::uuid, ${after.category})`
    : sql``;
  return sql`${isAfter} order by posted_on desc, ${id} desc, category desc limit ${limit}`;
}

function isSelected(selection: LineSelection): RawBuilder<boolean> {
  const { signs, jobId, jobs, operationId, machine, from, to } = selection;
  const conditions: RawBuilder<unknown>[] = [sql`category = any (${Object.keys(signs)}::text[])`];
  if (jobId !== undefined) conditions.push(sql`job_id = ${jobId}::uuid`);
  if (jobs !== undefined && Object.values(jobs).some((value) => value !== undefined && value !== '')) {
    conditions.push(sql`job_id in (select j.job_id from ${JOB_WITH_CUSTOMER} where ${isJobSelected(jobs)})`);
  }
  if (operationId !== undefined) conditions.push(sql`operation_id = ${operationId}::uuid`);
  if (machine !== undefined) {
    conditions.push(sql`machine_id = ${machine.machineId}::uuid`);
    conditions.push(sql`posted_on >= ${machine.inServiceOn}::date`);
  }
  if (from !== undefined) conditions.push(sql`posted_on >= ${from}::date`);
  if (to !== undefined) conditions.push(sql`posted_on <= ${to}::date`);
  return allOf(conditions);
}

function signedAmount({ unit, signs }: LineSelection): RawBuilder<string> {
  if (unit === 'hours') return sql`l.quantity`;
  const negative = Object.entries(signs).flatMap(([category, sign]) => (sign === -1 ? [category] : []));
  if (negative.length === 0) return sql`l.amount`;
  return sql`case when l.category = any (${negative}::text[]) then -l.amount else l.amount end`;
}

/** A rate's id is found in one of three tables, by the line's category. */
function rateJoins(alias: string): RawBuilder<unknown> {
  const [category, rateId] = [sql.ref(`${alias}.category`), sql.ref(`${alias}.rate_id`)];
  return sql`
    left join pay_rate pr on ${category} = 'labour' and pr.pay_rate_id = ${rateId}
    left join overhead_rate hr on ${category} = 'overhead' and hr.overhead_rate_id = ${rateId}
    left join machine_rate mr on ${category} in ('machine', 'earned', 'running') and mr.machine_rate_id = ${rateId}`;
}
