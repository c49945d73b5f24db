import { type RawBuilder, sql } from 'kysely';
import {
  allOf,
  containing,
  type Direction,
  inReadingOrder,
  isAfter,
  type KeysetPosition,
  orderByKey,
  type SortKey,
} from './keyset';
import { type ShopTransaction } from './tenancy';

/** Which press runs are meant. */
export interface PressRunSelection {
  pressRunId?: string;
  from?: string;
  to?: string;
  jobId?: string;
  machineId?: string;
  dieOpeningId?: string;
  materialCode?: string;
  isAboveLine?: boolean;
  isGood?: boolean;
  /** Only those that this account has logged. */
  loggedByUserId?: string;
  search?: string;
  show: 'live' | 'voided' | 'all';
}

/** A press run with its tools, its force and what that is of the rating. */
export interface PressRunRow {
  pressRunId: string;
  runOn: string;
  jobId: string;
  jobNumber: string;
  jobTitle: string;
  machineId: string;
  machine: string;
  punchId: string | null;
  punch: string | null;
  noseRadiusMm: string | null;
  dieOpeningId: string;
  die: string;
  openingMm: string;
  dieAngle: string | null;
  materialCode: string;
  thicknessMm: string;
  bendLengthMm: string;
  strokes: number;
  pieces: number;
  forceLowKn: string;
  forceHighKn: string;
  highestForceKn: string | null;
  forceUsedKn: string;
  ratedKn: string | null;
  ratingOf: 'press' | 'die' | 'punch' | null;
  share: string | null;
  isAboveLine: boolean;
  isGood: boolean;
  note: string | null;
  entryId: string | null;
  loggedBy: string;
  loggedByUserId: string | null;
  voidedAt: Date | null;
  voidedBy: string | null;
  sortValue: string | null;
}

const FORCE_USED = sql`coalesce(r.highest_force_kn, r.force_high_kn)`;
// To six decimals, which a page's cursor can hold.
const SHARE = sql`round(${FORCE_USED} / rating.rated_kn, 6)`;
const IS_ABOVE_LINE = sql<boolean>`coalesce(${FORCE_USED} > rating.rated_kn * s.force_line_percent / 100, false)`;

/** The rating is the lowest that is known, as `findLowestRating` of libs/forming has it. */
const RUNS = sql`
  press_run r
  join shop s on s.shop_id = r.shop_id
  join job j on j.shop_id = r.shop_id and j.job_id = r.job_id
  join machine m on m.shop_id = r.shop_id and m.machine_id = r.machine_id
  join die_opening o on o.shop_id = r.shop_id and o.die_opening_id = r.die_opening_id
  join die d on d.shop_id = o.shop_id and d.die_id = o.die_id
  left join punch p on p.shop_id = r.shop_id and p.punch_id = r.punch_id
  left join lateral (
    select known.rated_kn, known.rating_of
    from (values (m.rated_force_kn, 'press', 1), (d.force_limit_kn_per_m * r.bend_length_mm / 1000, 'die', 2),
      (p.force_limit_kn_per_m * r.bend_length_mm / 1000, 'punch', 3)) known (rated_kn, rating_of, rank)
    where known.rated_kn is not null
    order by known.rated_kn, known.rank
    limit 1
  ) rating on true`;

const COLUMNS = sql`
  r.press_run_id, r.run_on, r.job_id, j.number as job_number, j.title as job_title, r.machine_id,
  m.name as machine, r.punch_id, p.name as punch, p.nose_radius_mm, r.die_opening_id, d.name as die,
  o.opening_mm, o.angle as die_angle, r.material_code, r.thickness_mm, r.bend_length_mm, r.strokes, r.pieces,
  r.force_low_kn, r.force_high_kn, r.highest_force_kn, ${FORCE_USED} as force_used_kn,
  round(rating.rated_kn, 5) as rated_kn, rating.rating_of, ${SHARE} as share, ${IS_ABOVE_LINE} as is_above_line,
  r.is_good, r.note, r.entry_id, r.logged_by, r.logged_by_user_id, r.voided_at, r.voided_by`;

const SORT_KEYS = {
  runOn: { expression: sql`r.run_on`, type: 'date' },
  job: { expression: inReadingOrder(sql`j.number`), type: 'text' },
  machine: { expression: inReadingOrder(sql`m.name`), type: 'text' },
  material: { expression: inReadingOrder(sql`r.material_code`), type: 'text' },
  openingMm: { expression: sql`o.opening_mm`, type: 'numeric' },
  bendLengthMm: { expression: sql`r.bend_length_mm`, type: 'numeric' },
  strokes: { expression: sql`r.strokes`, type: 'numeric' },
  pieces: { expression: sql`r.pieces`, type: 'numeric' },
  forceUsedKn: { expression: FORCE_USED, type: 'numeric' },
  share: { expression: SHARE, type: 'numeric', isNullable: true },
} as const satisfies Record<string, SortKey>;

export type PressRunSort = keyof typeof SORT_KEYS;

/** The type that a cursor's value has for a sort. */
export function pressRunSortType(sort: PressRunSort): SortKey['type'] {
  return SORT_KEYS[sort].type;
}

/** Where a page goes on, and how far. */
export interface PressRunPaging {
  sort: PressRunSort;
  direction: Direction;
  after: KeysetPosition | null;
  limit: number;
}

/** A page of press runs in the order of the sort. */
export async function listPressRunRows(
  trx: ShopTransaction,
  selection: PressRunSelection,
  { sort, direction, after, limit }: PressRunPaging,
): Promise<PressRunRow[]> {
  const key: SortKey = SORT_KEYS[sort];
  const id = sql`r.press_run_id`;
  const { rows } = await sql<PressRunRow>`
    select ${COLUMNS}, (${key.expression})::text as sort_value
    from ${RUNS}
    where ${isSelected(selection)} and ${isAfter(key, id, direction, after)}
    order by ${orderByKey(key, id, direction)}
    limit ${limit}`.execute(trx);
  return rows;
}

/** Of each machine, material, thickness and bend length of a job, the latest good run; the latest of them first. */
export async function listLastGoodRuns(trx: ShopTransaction, jobId: string): Promise<PressRunRow[]> {
  const { rows } = await sql<PressRunRow>`
    select * from (
      select distinct on (r.machine_id, r.material_code, r.thickness_mm, r.bend_length_mm)
        ${COLUMNS}, r.run_on::text as sort_value
      from ${RUNS}
      where ${isSelected({ jobId, isGood: true, show: 'live' })}
      order by r.machine_id, r.material_code, r.thickness_mm, r.bend_length_mm, r.run_on desc, r.press_run_id desc
    ) latest
    order by run_on desc, press_run_id desc`.execute(trx);
  return rows;
}

/** A tenth of the rating each; tenth 10 is all above it, null where no rating is known. */
export interface ForceBin {
  tenth: number | null;
  runs: number;
  strokes: number;
  runsAboveLine: number;
  strokesAboveLine: number;
  highestShare: string | null;
}

/** How press runs lie by their share of the rating; a share on the edge of two tenths belongs to the lower one. */
export async function countRunsByShare(
  trx: ShopTransaction,
  selection: PressRunSelection,
): Promise<ForceBin[]> {
  const { rows } = await sql<ForceBin>`
    select case when rating.rated_kn is not null then least(ceil(${SHARE} * 10) - 1, 10) end::integer as tenth, count(*) as runs,
      sum(r.strokes) as strokes, count(*) filter (where ${IS_ABOVE_LINE}) as runs_above_line,
      coalesce(sum(r.strokes) filter (where ${IS_ABOVE_LINE}), 0) as strokes_above_line,
      max(${SHARE}) as highest_share
    from ${RUNS}
    where ${isSelected(selection)}
    group by 1 order by 1`.execute(trx);
  return rows;
}

function isSelected(selection: PressRunSelection): RawBuilder<boolean> {
  const conditions: RawBuilder<unknown>[] = [];
  const { pressRunId, from, to, jobId, machineId, dieOpeningId, materialCode, show } = selection;
  const { isAboveLine, isGood, loggedByUserId, search } = selection;
  if (show !== 'all')
    conditions.push(show === 'live' ? sql`r.voided_at is null` : sql`r.voided_at is not null`);
  if (pressRunId !== undefined) conditions.push(sql`r.press_run_id = ${pressRunId}::uuid`);
  if (from !== undefined) conditions.push(sql`r.run_on >= ${from}::date`);
  if (to !== undefined) conditions.push(sql`r.run_on <= ${to}::date`);
  if (jobId !== undefined) conditions.push(sql`r.job_id = ${jobId}::uuid`);
  if (machineId !== undefined) conditions.push(sql`r.machine_id = ${machineId}::uuid`);
  if (dieOpeningId !== undefined) conditions.push(sql`r.die_opening_id = ${dieOpeningId}::uuid`);
  if (materialCode !== undefined) conditions.push(sql`r.material_code = ${materialCode}`);
  if (isGood !== undefined) conditions.push(sql`r.is_good = ${isGood}`);
  if (isAboveLine) conditions.push(IS_ABOVE_LINE);
  if (loggedByUserId !== undefined) conditions.push(sql`r.logged_by_user_id = ${loggedByUserId}::uuid`);
  if (search !== undefined && search !== '') conditions.push(isFound(containing(search)));
  return allOf(conditions);
}

function isFound(pattern: string): RawBuilder<boolean> {
  return sql`(j.number ilike ${pattern} or j.title ilike ${pattern} or m.name ilike ${pattern}
    or d.name ilike ${pattern} or r.note ilike ${pattern})`;
}

/** Jobs that can be run on, latest opened first. */
export function listRunnableJobs(trx: ShopTransaction) {
  return trx
    .selectFrom('job')
    .select(['jobId', 'number', 'title'])
    .where('status', 'in', ['open', 'finished', 'invoiced'])
    .orderBy(sql`status = 'open'`, 'desc')
    .orderBy('openedOn', (order) => order.desc().nullsLast())
    .orderBy('number')
    .limit(500)
    .execute();
}

/** Live time entries of a job that a run may go with, latest first. */
export function listRunEntries(trx: ShopTransaction, jobId: string, employeeId?: string) {
  return trx
    .selectFrom('timeEntry as t')
    .innerJoin('employee as e', (join) =>
      join.onRef('e.shopId', '=', 't.shopId').onRef('e.employeeId', '=', 't.employeeId'),
    )
    .innerJoin('operation as o', (join) =>
      join.onRef('o.shopId', '=', 't.shopId').onRef('o.operationId', '=', 't.operationId'),
    )
    .select(['t.entryId', 't.workedOn', 'e.name as employee', 'o.name as operation', 't.hours'])
    .where('t.jobId', '=', jobId)
    .where('t.voidedAt', 'is', null)
    .$if(employeeId !== undefined, (query) => query.where('t.employeeId', '=', employeeId ?? ''))
    .orderBy('t.workedOn', 'desc')
    .orderBy('t.entryId', 'desc')
    .limit(100)
    .execute();
}

/** The job and employee of a live time entry. */
export function findRunEntry(trx: ShopTransaction, entryId: string) {
  return trx
    .selectFrom('timeEntry')
    .select(['jobId', 'employeeId'])
    .where('entryId', '=', entryId)
    .where('voidedAt', 'is', null)
    .executeTakeFirst();
}

/** A job as a press run needs it. */
export function findRunJob(trx: ShopTransaction, jobId: string) {
  return trx
    .selectFrom('job')
    .select(['jobId', 'number', 'title', 'openedOn'])
    .where('jobId', '=', jobId)
    .executeTakeFirst();
}
