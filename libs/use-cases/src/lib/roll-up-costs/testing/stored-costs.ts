import { computeJobCost, computeMachineDays } from '@brakeven/costing';
import { type ShopTransaction } from '@brakeven/database';
import { type TestShop } from '@brakeven/test-shop';
import { hoursText, moneyText, rateText } from '@brakeven/values';
import { type ExpectedCosts } from './expected-costs';

/** Everything that a rollup writes for a shop, comparable as text; the run's own id and clock left out. */
export type StoredCosts = Record<'lines' | 'gaps' | 'jobs' | 'machineDays' | 'machineJobDays', string[]>;

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

/** The same of what costing computed, so that the two can be compared whole. */
export function toStoredCosts({ lines, gaps, inServiceOn }: ExpectedCosts): StoredCosts {
  const jobIds = new Set([...lines, ...gaps].map((trace) => trace.jobId));
  const ofJob = (jobId: string) => (trace: { jobId: string }) => trace.jobId === jobId;
  const machineDays = computeMachineDays(lines, inServiceOn, gaps);
  return {
    lines: sorted(
      lines.map((l) =>
        text(
          l.workedOn,
          l.entryId,
          l.category,
          l.jobId,
          l.employeeId,
          l.machineId,
          hoursText(l.quantity),
          rateText(l.rate),
          l.rateFactor.toFixed(6),
          l.rateId,
          moneyText(l.amount),
        ),
      ),
    ),
    gaps: sorted(
      gaps.map((g) =>
        text(g.workedOn, g.entryId, g.category, g.jobId, g.employeeId, g.machineId, hoursText(g.hours)),
      ),
    ),
    jobs: sorted(
      [...jobIds].map((jobId) => {
        const cost = computeJobCost(lines.filter(ofJob(jobId)), gaps.filter(ofJob(jobId)));
        return text(
          jobId,
          hoursText(cost.hours),
          hoursText(cost.machineHours),
          moneyText(cost.labour),
          moneyText(cost.machine),
          moneyText(cost.overhead),
          moneyText(cost.earned),
        );
      }),
    ),
    machineDays: sorted(
      machineDays.map((d) =>
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
        computeMachineDays(lines.filter(ofJob(jobId)), inServiceOn, gaps.filter(ofJob(jobId))).map((d) =>
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

async function readLines(trx: ShopTransaction): Promise<string[]> {
  const rows = await trx.selectFrom('costLine').selectAll().execute();
  return sorted(
    rows.map((r) =>
      text(
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
    rows.map((r) => text(r.workedOn, r.entryId, r.category, r.jobId, r.employeeId, r.machineId, r.hours)),
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
        ...['labour', 'machine', 'overhead', 'earned'].map((category) => find(category)?.amount ?? '0.00'),
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
