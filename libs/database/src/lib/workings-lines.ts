import { type RawBuilder, sql } from 'kysely';
import { isJobSelected, JOB_WITH_CUSTOMER, type JobSelection } from './job-selection';
import { allOf } from './keyset';
import { LINE_FACT_JOINS, type LineFactRow, LINE_FACTS, type LinePosition } from './line-facts';
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
  /** Jobs of a filter; one that leaves all of them still leaves out what went to overhead. */
  jobs?: JobSelection;
  operationId?: string;
  /** Only a machine in service: its lines from that day on; null takes none. */
  machine?: { machineId: string; inServiceOn: string | null };
  employeeId?: string;
  /** Only what went to overhead, or only what came late for a closed month. */
  part?: 'overhead' | 'late';
  /** Of one row. */
  sourceId?: string;
  /** Days in the books. */
  from?: string;
  to?: string;
  /** Days of the rows themselves, both ends included, whenever their lines were posted. */
  worked?: { from: string; to: string };
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
  /** The employee or the machine whose rate it is; null for overhead, for hours, and for lines without a rate. */
  subject: string | null;
  rateValidFrom: string | null;
}

/**
 * Adds up the lines by category and rate of the register: what a figure is made of, and the rates it was made with.
 * Lines that used no such rate (premiums, material, amounts as entered) make one group a category.
 */
export async function listLineGroups(trx: ShopTransaction, selection: LineSelection): Promise<LineGroup[]> {
  const byRate =
    selection.unit === 'money'
      ? sql`l.rate_id, case when l.rate_id is not null then l.rate end as rate,
          case when l.rate_id is not null then l.rate_factor end as rate_factor,
          case when l.rate_id is null or l.category = 'overhead' then null
            when l.category = 'labour' then l.employee_id else l.machine_id end as subject_id`
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
export interface WorkingsLineRow extends LineFactRow {
  job: string | null;
  /** Null for a gap. */
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
    select ${LINE_FACTS}, j.number as job, l.rate, l.rate_factor, ${RATE_VALID_FROM} as rate_valid_from,
      ${signedAmount(selection)} as amount
    from (
      select * from ${selectedLines(selection, { after, limit })} l
      order by l.posted_on desc, l.source_id desc, l.category desc
      limit ${limit}
    ) l
    left join job j on j.shop_id = l.shop_id and j.job_id = l.job_id
    ${LINE_FACT_JOINS}
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
    (select shop_id, posted_on, worked_on, source_id, source_kind, category, job_id, operation_id, employee_id,
      machine_id, quantity, rate, rate_factor, rate_id, amount
    from cost_line where ${isSelected(selection)} ${cutBy('source_id', cut)})`;
  if (selection.unit === 'money') return lines;
  return sql`(${lines} union all
    (select shop_id, posted_on, worked_on, entry_id, 'time_entry', category, job_id, operation_id, employee_id,
      machine_id, hours, null, null, null, null
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
  const { signs, jobId, jobs, operationId, employeeId, part, sourceId, machine, from, to, worked } =
    selection;
  const conditions: RawBuilder<unknown>[] = [sql`category = any (${Object.keys(signs)}::text[])`];
  if (jobId !== undefined) conditions.push(sql`job_id = ${jobId}::uuid`);
  if (jobs !== undefined) {
    const isFiltered = Object.values(jobs).some((value) => value !== undefined && value !== '');
    conditions.push(
      isFiltered
        ? sql`job_id in (select j.job_id from ${JOB_WITH_CUSTOMER} where ${isJobSelected(jobs)})`
        : sql`job_id is not null`,
    );
  }
  if (operationId !== undefined) conditions.push(sql`operation_id = ${operationId}::uuid`);
  if (employeeId !== undefined) conditions.push(sql`employee_id = ${employeeId}::uuid`);
  if (part === 'overhead') conditions.push(sql`job_id is null`);
  if (part === 'late') conditions.push(sql`posted_on <> worked_on`);
  if (sourceId !== undefined) conditions.push(sql`source_id = ${sourceId}::uuid`);
  if (worked !== undefined) conditions.push(isWorkedIn(worked));
  if (machine !== undefined) {
    conditions.push(sql`machine_id = ${machine.machineId}::uuid`);
    // A line may be posted after a machine went into service for work of before.
    conditions.push(
      sql`worked_on >= ${machine.inServiceOn}::date and posted_on >= ${machine.inServiceOn}::date`,
    );
  }
  if (from !== undefined) conditions.push(sql`posted_on >= ${from}::date`);
  if (to !== undefined) conditions.push(sql`posted_on <= ${to}::date`);
  return allOf(conditions);
}

/** Lines of their own day by the key, late ones by the index of those. */
function isWorkedIn({ from, to }: { from: string; to: string }): RawBuilder<boolean> {
  const worked = sql`worked_on between ${from}::date and ${to}::date`;
  return sql`((${worked} and posted_on between ${from}::date and ${to}::date) or (${worked} and posted_on <> worked_on))`;
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
