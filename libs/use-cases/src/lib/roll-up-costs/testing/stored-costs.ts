import { computeJobCost, computeMachineDays, JOB_COST_CATEGORIES, type PostedLine } from '@brakeven/costing';
import { type ShopTransaction } from '@brakeven/database';
import { type TestShop } from '@brakeven/test-shop';
import { type Decimal, hoursText, moneyText, rateText, roundHalfUp } from '@brakeven/values';
import { type ExpectedCosts } from './expected-costs';

/** Everything that a rollup writes for a shop, comparable as text; the run's own id and clock left out. */
export type StoredCosts = Record<'lines' | 'gaps' | 'jobs' | 'machineDays' | 'machineJobDays', string[]>;

const JOB_CATEGORIES = [...JOB_COST_CATEGORIES, 'invoiced', 'earned'] as const;

/** Reads what the rollup wrote. */
export function readStoredCosts(shop: TestShop): Promise<StoredCosts> {
  return shop.inShop(async (trx) => ({
    lines: await readLines(trx),
    gaps: await readGaps(trx),
    jobs: await readJobs(trx),
    machineDays: await readMachineDays(trx),
    machineJobDays: await readMachineJobDays(trx),
  }));
}

/** What closed months hold, every column of it. */
export function readClosedLines(shop: TestShop, through: string): Promise<string> {
  return shop.inShop(async (trx) => {
    const lines = await trx
      .selectFrom('costLine')
      .selectAll()
      .where('postedOn', '<=', through)
      .orderBy('postedOn')
      .orderBy('sourceId')
      .orderBy('category')
      .execute();
    const days = await trx
      .selectFrom('jobDay')
      .selectAll()
      .where('postedOn', '<=', through)
      .orderBy('jobId')
      .orderBy('postedOn')
      .orderBy('category')
      .execute();
    return JSON.stringify({ lines, days });
  });
}

/** The same of what costing computed, so that the two can be compared whole. */
export function toStoredCosts({ lines: open, gaps, frozen, inServiceOn }: ExpectedCosts): StoredCosts {
  const lines = [...frozen, ...open];
  const jobIds = new Set([...lines, ...gaps].flatMap((trace) => trace.jobId ?? []));
  const ofJob = (jobId: string) => (trace: { jobId: string | null }) => trace.jobId === jobId;
  const assigned = lines.filter((line) => line.jobId !== null);
  // The machine days of a premium alone do not exist, and it never stands alone.
  const ofMachines = assigned.filter((line) => line.category !== 'overtime');
  const owed = gaps.filter((gap) => gap.category !== 'overtime');
  return {
    lines: sorted(lines.map(toLineText)),
    gaps: sorted(
      gaps.map((g) =>
        text(
          g.postedOn,
          g.workedOn,
          g.entryId,
          g.category,
          g.jobId,
          g.employeeId,
          g.machineId,
          hoursText(g.hours),
        ),
      ),
    ),
    jobs: sorted(
      [...jobIds].map((jobId) => {
        const cost = computeJobCost(lines.filter(ofJob(jobId)), gaps.filter(ofJob(jobId)));
        const sums = JOB_CATEGORIES.map((category) => moneyText(cost[category]));
        return text(jobId, hoursText(cost.hours), hoursText(cost.machineHours), ...sums);
      }),
    ),
    machineDays: sorted(
      computeMachineDays(ofMachines, inServiceOn, owed).map((d) =>
        text(
          d.machineId,
          d.workedOn,
          hoursText(d.hours),
          hoursText(d.billableHours),
          moneyText(d.earned),
          moneyText(d.operatorLabour),
          moneyText(d.running),
        ),
      ),
    ),
    machineJobDays: sorted(
      [...jobIds].flatMap((jobId) =>
        computeMachineDays(ofMachines.filter(ofJob(jobId)), inServiceOn, owed.filter(ofJob(jobId))).map((d) =>
          text(
            d.machineId,
            d.workedOn,
            jobId,
            hoursText(d.hours),
            moneyText(d.earned),
            moneyText(d.operatorLabour),
            moneyText(d.running),
          ),
        ),
      ),
    ),
  };
}

function toLineText(l: PostedLine): string {
  return text(
    l.postedOn,
    l.workedOn,
    l.sourceId,
    l.category,
    l.jobId,
    l.employeeId,
    l.machineId,
    quantityText(l.quantity),
    rateText(l.rate),
    l.rateFactor.toFixed(6),
    l.rateId,
    moneyText(l.amount),
  );
}

/** As a line keeps it: hours exactly, kg rounded to a tenth of a gram. */
function quantityText(quantity: Decimal): string {
  return roundHalfUp(quantity, 4).toFixed(4);
}

async function readLines(trx: ShopTransaction): Promise<string[]> {
  const rows = await trx.selectFrom('costLine').selectAll().execute();
  return sorted(
    rows.map((r) =>
      text(
        r.postedOn,
        r.workedOn,
        r.sourceId,
        r.category,
        r.jobId,
        r.employeeId,
        r.machineId,
        r.quantity,
        shortRate(r.rate),
        r.rateFactor,
        r.rateId,
        r.amount,
      ),
    ),
  );
}

async function readGaps(trx: ShopTransaction): Promise<string[]> {
  const rows = await trx.selectFrom('rateGap').selectAll().execute();
  return sorted(
    rows.map((r) =>
      text(r.postedOn, r.workedOn, r.entryId, r.category, r.jobId, r.employeeId, r.machineId, r.hours),
    ),
  );
}

/** Job days added up by job: hours of labour are a job's hours, those of machine its machine hours. */
async function readJobs(trx: ShopTransaction): Promise<string[]> {
  const rows = await trx
    .selectFrom('jobDay')
    .select(({ fn }) => [
      'jobId',
      'category',
      fn.sum<string>('hours').as('hours'),
      fn.sum<string>('amount').as('amount'),
    ])
    .groupBy(['jobId', 'category'])
    .execute();
  const jobIds = [...new Set(rows.map((row) => row.jobId))];
  return sorted(
    jobIds.map((jobId) => {
      const find = (category: string) => rows.find((r) => r.jobId === jobId && r.category === category);
      return text(
        jobId,
        find('labour')?.hours ?? '0.0000',
        find('machine')?.hours ?? '0.0000',
        ...JOB_CATEGORIES.map((category) => find(category)?.amount ?? '0.00'),
      );
    }),
  );
}

async function readMachineDays(trx: ShopTransaction): Promise<string[]> {
  const rows = await trx.selectFrom('machineDay').selectAll().execute();
  return sorted(
    rows.map((r) =>
      text(r.machineId, r.postedOn, r.hours, r.billableHours, r.earned, r.operatorLabour, r.running),
    ),
  );
}

async function readMachineJobDays(trx: ShopTransaction): Promise<string[]> {
  const rows = await trx.selectFrom('machineJobDay').selectAll().execute();
  return sorted(
    rows.map((r) => text(r.machineId, r.postedOn, r.jobId, r.hours, r.earned, r.operatorLabour, r.running)),
  );
}

const text = (...parts: (string | null)[]): string => parts.join(' ');
const sorted = (texts: string[]): string[] => texts.sort();

/** '85.000000' as '85.00': two decimals at least. */
const shortRate = (rate: string): string => rate.replace(/(\.\d\d\d*?)0*$/, '$1');
