import { runRollup } from '@brakeven/use-cases';
import { sql } from 'kysely';
import { type Bench, type BenchContext, type BenchRow } from './bench';
import { type BenchShop, createBenchShop } from './bench-shop';
import { alternate, formatAgainst, timeMs } from './measure';

const ENTRIES = 200_000;
const ENTRIES_OF_SHORT_HISTORY = 20_000;
const ENTRIES_PER_DAY = 80;
const FULL_ROUNDS = 3;
const DAY_ROUNDS = 15;

const bench: Bench = async (context) => {
  const shop = await createShop(context, 'bench_rollup', ENTRIES);
  await setOvertime(shop, null);
  const full = await compareFullWithStatement(shop);
  const whole = await compareAllCategories(shop);
  const day = await compareHistories(context, shop);
  await shop.close();
  return [...full, whole, day];
};
export default bench;

/** @param thresholdHours null computes none, so that entries alone are measured */
async function setOvertime(shop: BenchShop, thresholdHours: string | null): Promise<void> {
  await shop.inShop((trx) =>
    sql`update shop set overtime_threshold_hours = ${thresholdHours}, overtime_to = 'jobs'`.execute(trx),
  );
}

async function createShop({ makeDatabase }: BenchContext, name: string, entries: number): Promise<BenchShop> {
  const shop = await createBenchShop(await makeDatabase(name), entries / 100);
  await shop.addHistory({ entries, entriesPerDay: ENTRIES_PER_DAY });
  await shop.tidy();
  return shop;
}

async function compareFullWithStatement(shop: BenchShop): Promise<BenchRow[]> {
  const rollUp = () => timeMs(() => runRollup(shop.owner, { full: true }));
  await rollUp();
  const expected = await summarise(shop);
  const taken = await alternate(FULL_ROUNDS, {
    statement: async () => {
      await emptyCosts(shop);
      const ms = await timeMs(() => shop.inShop((trx) => writeLinesAtOnce(trx)));
      const written = await summarise(shop);
      if (written !== expected) throw new Error(`The statement wrote ${written}, the rollup ${expected}.`);
      return ms;
    },
    first: async () => {
      await emptyCosts(shop);
      return rollUp();
    },
    again: async () => {
      await shop.tidy();
      return rollUp();
    },
    replace: async () => {
      await shop.tidy();
      return timeMs(() =>
        shop.inShop(async (trx) => {
          await sql`delete from cost_line`.execute(trx);
          await writeLinesAtOnce(trx);
        }),
      );
    },
  });
  return [
    {
      measure: `first full rollup of ${ENTRIES} entries ÷ one INSERT … SELECT … ORDER BY the key`,
      ratio: taken.first / taken.statement,
      aim: { atMost: 1.5 },
      detail: formatAgainst('rollup', taken.first, 'statement', taken.statement, FULL_ROUNDS),
    },
    {
      measure: 'full rollup again ÷ DELETE and the same statement',
      ratio: taken.again / taken.replace,
      aim: { atMost: 1.5 },
      detail: formatAgainst('rollup', taken.again, 'statements', taken.replace, FULL_ROUNDS),
    },
  ];
}

/** As if nothing had been rolled up yet. */
async function emptyCosts({ ownerDb }: BenchShop): Promise<void> {
  await sql`truncate cost_line, rate_gap, job_day, machine_job_day, machine_day`.execute(ownerDb);
}

type Trx = Parameters<Parameters<BenchShop['inShop']>[0]>[0];

/** Count and sums by category, the same whoever wrote the lines. */
async function summarise(shop: BenchShop): Promise<string> {
  const { rows } = await shop.inShop((trx) =>
    sql<{ category: string }>`
      select category, count(*) as lines, sum(quantity) as hours, sum(amount) as amount
      from cost_line group by category order by category`.execute(trx),
  );
  return JSON.stringify(rows);
}

/**
 * The lines as one would write them at first: an entry joined with its rates, once for each category, and sorted
 * by the key. It has the memory that the rollup gives itself, and is not compiled either.
 */
async function writeLinesAtOnce(trx: Trx): Promise<void> {
  await sql`select set_config('work_mem', '64MB', true), set_config('jit', 'off', true)`.execute(trx);
  await sql`
    insert into cost_line (shop_id, posted_on, worked_on, source_id, category, source_kind, job_id, operation_id,
      employee_id, machine_id, quantity, rate, rate_factor, rate_id, amount, run_id)
    select e.shop_id, e.worked_on, e.worked_on, e.entry_id, c.category, 'time_entry', e.job_id, e.operation_id, e.employee_id,
      m.machine_id, e.hours, c.rate, c.factor, c.rate_id, round(e.hours * c.rate * c.factor, 2), e.shop_id
    from time_entry e
    join job j on j.shop_id = e.shop_id and j.job_id = e.job_id
    join operation o on o.shop_id = e.shop_id and o.operation_id = e.operation_id
    left join machine m on m.shop_id = e.shop_id and m.machine_id = coalesce(e.machine_id, o.default_machine_id)
    left join (select *, lead(valid_from) over (partition by employee_id order by valid_from) as until from pay_rate) p
      on p.employee_id = e.employee_id and e.worked_on >= p.valid_from and (p.until is null or e.worked_on < p.until)
    left join (select *, lead(valid_from) over (order by valid_from) as until from overhead_rate) h
      on e.worked_on >= h.valid_from and (h.until is null or e.worked_on < h.until)
    left join (select *, lead(valid_from) over (partition by machine_id order by valid_from) as until from machine_rate) r
      on r.machine_id = m.machine_id and e.worked_on >= r.valid_from and (r.until is null or e.worked_on < r.until)
    cross join lateral (values
      ('labour', true, p.pay_rate_id, p.wage_per_hour, 1 + p.burden_percent / 100),
      ('overhead', true, h.overhead_rate_id, h.rate_per_labour_hour, 1),
      ('machine', true, r.machine_rate_id, r.machine_hour_rate, 1),
      ('earned', j.is_billable and e.worked_on >= m.in_service_on, r.machine_rate_id, r.charge_out_rate, 1),
      ('running', e.worked_on >= m.in_service_on, r.machine_rate_id, r.running_cost_per_hour, 1)
    ) as c (category, is_due, rate_id, rate, factor)
    where e.voided_at is null and c.is_due and c.rate_id is not null
    order by e.shop_id, e.worked_on, e.entry_id, c.category`.execute(trx);
}

/** Entries with overtime, material, outside services and invoices against one plain statement for each. */
async function compareAllCategories(shop: BenchShop): Promise<BenchRow> {
  await setOvertime(shop, '40');
  await shop.addMoney({ entries: ENTRIES, entriesPerDay: ENTRIES_PER_DAY });
  await shop.tidy();
  await runRollup(shop.owner, { full: true });
  const expected = await summarise(shop);
  const taken = await alternate(FULL_ROUNDS, {
    statements: async () => {
      await emptyCosts(shop);
      const ms = await timeMs(() =>
        shop.inShop(async (trx) => {
          await writeLinesAtOnce(trx);
          await writeOvertimeAtOnce(trx);
          await writeAmountsAtOnce(trx);
        }),
      );
      const written = await summarise(shop);
      if (written !== expected) throw new Error(`The statements wrote ${written}, the rollup ${expected}.`);
      return ms;
    },
    rollup: async () => {
      await emptyCosts(shop);
      return timeMs(() => runRollup(shop.owner, { full: true }));
    },
  });
  return {
    measure: `full rollup of all categories over ${ENTRIES} entries ÷ the bare statements of the same sums`,
    ratio: taken.rollup / taken.statements,
    aim: { atMost: 3 },
    detail: formatAgainst('rollup', taken.rollup, 'statements', taken.statements, FULL_ROUNDS),
  };
}

/** Half the regular rate for the hours above forty, shared out by hours in whole cents, in one statement. */
async function writeOvertimeAtOnce(trx: Trx): Promise<void> {
  await sql`
    with paid as (
      select e.*, coalesce(e.machine_id, o.default_machine_id) as resolved_machine_id,
        date_trunc('week', e.worked_on)::date as week,
        sum(e.hours) over w as week_hours, sum(e.hours * p.wage_per_hour) over w as week_pay
      from time_entry e
      join operation o on o.shop_id = e.shop_id and o.operation_id = e.operation_id
      join (select *, lead(valid_from, 1, 'infinity') over (partition by employee_id order by valid_from) as until
        from pay_rate) p
        on p.employee_id = e.employee_id and e.worked_on >= p.valid_from and e.worked_on < p.until
      where e.voided_at is null
      window w as (partition by e.employee_id, date_trunc('week', e.worked_on))
    ),
    premium as (
      select *, round((week_pay * (week_hours - 40))::numeric(60,30) / (2 * week_hours), 2) as premium
      from paid where week_hours > 40
    ),
    cut as (
      select *, div(premium * 100 * hours, week_hours) as units, mod(premium * 100 * hours, week_hours) as remainder
      from premium
    ),
    shared as (
      select *, units + case when row_number() over (partition by employee_id, week
          order by remainder desc, worked_on, entry_id)
        <= premium * 100 - sum(units) over (partition by employee_id, week) then 1 else 0 end as cents
      from cut
    )
    insert into cost_line (shop_id, posted_on, worked_on, source_id, category, source_kind, job_id, operation_id,
      employee_id, machine_id, quantity, rate, rate_factor, amount, run_id)
    select shop_id, worked_on, worked_on, entry_id, 'overtime', 'time_entry', job_id, operation_id, employee_id,
      resolved_machine_id, hours, round(premium::numeric(60,30) / week_hours, 6), 1, cents / 100, shop_id
    from shared where cents > 0
    order by worked_on, entry_id`.execute(trx);
}

async function writeAmountsAtOnce(trx: Trx): Promise<void> {
  await sql`
    insert into cost_line (shop_id, posted_on, worked_on, source_id, category, source_kind, job_id, quantity, rate,
      rate_factor, amount, run_id)
    select i.shop_id, i.issued_on, i.issued_on, i.issue_id, 'material', 'material_issue', i.job_id, -s.weight_kg,
      s.average_per_kg, 1, -s.amount, i.shop_id
    from stock_move s join material_issue i on i.shop_id = s.shop_id and i.issue_id = s.source_id
    union all
    select shop_id, incurred_on, incurred_on, outside_service_id, 'outside', 'outside_service', job_id, 1, amount, 1,
      amount, shop_id
    from outside_service where voided_at is null
    union all
    select shop_id, invoiced_on, invoiced_on, invoice_id, 'invoiced', 'invoice', job_id,
      case kind when 'invoice' then 1 else -1 end, amount, 1, case kind when 'invoice' then amount else -amount end,
      shop_id
    from invoice where voided_at is null
    order by 2, 4`.execute(trx);
}

/** One changed day, another one each time, in a year of entries and in ten. */
async function compareHistories(context: BenchContext, longer: BenchShop): Promise<BenchRow> {
  const shorter = await createShop(context, 'bench_rollup_short', ENTRIES_OF_SHORT_HISTORY);
  for (const shop of [shorter, longer]) {
    await runRollup(shop.owner, { full: true });
    await shop.tidy();
  }
  const taken = await alternate(DAY_ROUNDS, {
    shorter: () => rollUpOneDay(shorter),
    longer: () => rollUpOneDay(longer),
  });
  await shorter.close();
  return {
    measure: `rollup of one day, history of ${ENTRIES} ÷ of ${ENTRIES_OF_SHORT_HISTORY} entries`,
    ratio: taken.longer / taken.shorter,
    aim: { atMost: 1.3 },
    detail: formatAgainst('longer', taken.longer, 'shorter', taken.shorter, DAY_ROUNDS),
  };
}

let day = 0;

async function rollUpOneDay(shop: BenchShop): Promise<number> {
  day = (day + 17) % (ENTRIES_OF_SHORT_HISTORY / ENTRIES_PER_DAY);
  await shop.inShop((trx) =>
    sql`update time_entry set good_pieces = coalesce(good_pieces, 0) + 1
      where entry_id = (select entry_id from time_entry where voided_at is null
        and worked_on = (select max(worked_on) from time_entry) - ${day}::integer limit 1)`.execute(trx),
  );
  let days = 0;
  const ms = await timeMs(async () => {
    ({ days } = await runRollup(shop.owner, {}));
  });
  if (days !== 1) throw new Error(`${days} days were rolled up instead of one.`);
  return ms;
}
