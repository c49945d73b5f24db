import {
  type Job,
  JOB_SORTS,
  jobDetailSchema,
  type JobInput,
  jobLinePageSchema,
  type JobListQuery,
  jobPageSchema,
} from '@brakeven/contract';
import { computeJobCost } from '@brakeven/costing';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { D, hoursText, moneyText, sum } from '@brakeven/values';
import { type ShopContext } from '../context';
import { saveEstimate } from '../estimate-jobs/estimates';
import { getEstimateWorkings } from '../estimate-jobs/get-estimate-workings';
import { getRollupStatus } from '../roll-up-costs/get-rollup-status';
import { computeExpectedCosts } from '../roll-up-costs/testing/expected-costs';
import { runRollup } from '../roll-up-costs/run-rollup';
import { listCustomerFigures } from '../show-customers/customers';
import { createWorkedShop, WORKED_NOW, type WorkedShop } from '../testing/worked-shop';
import { changeJobStatus, createJob, listCustomers, updateJob } from './change-job';
import { getJob, listJobLines } from './get-job';
import { getJobCost, listJobCosts } from './job-costs';
import { listJobs } from './list-jobs';

jest.setTimeout(30_000);

const MONEY_KEYS =
  /"(labour|overtime|machine|overhead|material|outside|total|quotedPrice|invoiced|margin|workInProgress|estimate|variance|rate|rateFactor|amount)":/;

describe('jobs', () => {
  let shop: WorkedShop;
  let owner: ShopContext;

  beforeAll(async () => {
    shop = await createWorkedShop();
    owner = shop.context('owner', { now: WORKED_NOW });
  });
  afterAll(() => shop.close());

  async function listAll(query: Partial<JobListQuery>, context = owner): Promise<Job[]> {
    const items: Job[] = [];
    let cursor: string | undefined;
    do {
      const page = jobPageSchema.parse(
        await listJobs(context, { sort: 'number', direction: 'asc', limit: 1, ...query, cursor }),
      );
      items.push(...page.items);
      cursor = page.nextCursor ?? undefined;
    } while (cursor);
    return items;
  }
  const numbers = (jobs: readonly Job[]) => jobs.map((job) => job.number);

  it('cost what costing makes of their entries', async () => {
    const { lines, gaps } = await computeExpectedCosts(shop);
    const jobs = await listAll({});
    expect(jobs).toHaveLength(4);
    for (const job of jobs) {
      const isOfJob = (trace: { jobId: string | null }) => trace.jobId === job.jobId;
      const cost = computeJobCost(lines.filter(isOfJob), gaps.filter(isOfJob));
      expect(job).toMatchObject({
        hours: hoursText(cost.hours),
        machineHours: hoursText(cost.machineHours),
        labour: moneyText(cost.labour),
        machine: moneyText(cost.machine),
        overhead: moneyText(cost.overhead),
        total: moneyText(cost.total),
        entriesWithoutRate: new Set(gaps.filter(isOfJob).map((gap) => gap.entryId)).size,
      });
    }
  });

  it.each(JOB_SORTS)('come page by page in the order of %s, each once', async (sort) => {
    for (const direction of ['asc', 'desc'] as const) {
      const paged = numbers(await listAll({ sort, direction, limit: 1 }));
      expect([...paged].sort()).toEqual(['1042', '1043', '1100', '900']);
      expect(paged).toEqual(numbers(await listAll({ sort, direction, limit: 50 })));
    }
  });

  it('without a value come last in either direction', async () => {
    for (const direction of ['asc', 'desc'] as const) {
      const jobs = await listAll({ sort: 'quotedPrice', direction });
      expect(jobs.slice(0, 2).map((job) => job.quotedPrice)).not.toContain(null);
      expect(jobs.slice(2).map((job) => job.quotedPrice)).toEqual([null, null]);
    }
  });

  it('are found by number, title or customer, wildcards taken as they stand', async () => {
    expect(numbers(await listAll({ search: 'trench' }))).toEqual(['1043']);
    expect(numbers(await listAll({ search: 'NORTHGATE' }))).toEqual(['1042', '1100']);
    expect(numbers(await listAll({ search: '100%_' }))).toEqual(['900']);
    expect(numbers(await listAll({ search: '%' }))).toEqual(['900']);
    expect(numbers(await listAll({ status: 'finished' }))).toEqual(['1043']);
  });

  it('have totals over all of the filter, whatever the page', async () => {
    const jobs = await listAll({ search: '104' });
    const page = await listJobs(owner, { sort: 'number', direction: 'asc', limit: 1, search: '104' });
    expect(page.totals.jobs).toBe(2);
    expect(page.totals.total).toBe(sum(jobs.map((job) => D(job.total ?? '0'))).toFixed(2));
    expect(page.totals.hours).toBe(sum(jobs.map((job) => D(job.hours))).toFixed(4));
    expect(page.totals.quotedPrice).toBe('10249.99');
  });

  it('show no money to who may not see it, not even by their order', async () => {
    const lead = shop.context('lead');
    const page = await listJobs(lead, { sort: 'number', direction: 'asc', limit: 10 });
    const job = await getJob(lead, { jobId: shop.jobs.guards });
    const lines = await listJobLines(lead, { jobId: shop.jobs.guards, limit: 10 });
    expect(page.items).toHaveLength(4);
    expect(lines.items).toHaveLength(10);
    for (const sent of [page, job]) expect(JSON.stringify(sent)).not.toMatch(MONEY_KEYS);
    // A line's machine is its name.
    for (const line of lines.items)
      expect(JSON.stringify({ ...line, machine: undefined })).not.toMatch(MONEY_KEYS);
    await expect(listJobs(lead, { sort: 'total', direction: 'asc', limit: 10 })).rejects.toMatchObject({
      code: 'forbidden',
    });
  });

  it('open by operation and by week, each adding up to the job', async () => {
    const job = jobDetailSchema.parse(await getJob(owner, { jobId: shop.jobs.guards }));
    expect(job.byOperation.length).toBeGreaterThan(1);
    for (const parts of [job.byOperation, job.byWeek]) {
      expect(sum(parts.map((part) => D(part.total ?? '0'))).toFixed(2)).toBe(job.total);
      expect(sum(parts.map((part) => D(part.hours))).toFixed(4)).toBe(job.hours);
    }
    for (const { weekFrom } of job.byWeek) expect(new Date(`${weekFrom}T00:00:00Z`).getUTCDay()).toBe(1);
  });

  it('list their lines latest first, and these add up to the cost', async () => {
    const { jobId } = await getJob(owner, { jobId: shop.jobs.guards });
    const lines = [];
    let cursor: string | undefined;
    do {
      const page = jobLinePageSchema.parse(await listJobLines(owner, { jobId, limit: 20, cursor }));
      lines.push(...page.items);
      cursor = page.nextCursor ?? undefined;
    } while (cursor);
    const job = await getJob(owner, { jobId });
    expect(sum(lines.map((line) => D(line.amount ?? '0'))).toFixed(2)).toBe(job.total);
    const dates = lines.map((line) => line.workedOn);
    expect(dates).toEqual([...dates].sort().reverse());
    const labour = await listJobLines(owner, { jobId, limit: 500, category: 'labour' });
    expect(sum(labour.items.map((line) => D(line.amount ?? '0'))).toFixed(2)).toBe(job.labour);
    expect(labour.items.every((line) => line.rateFactor !== null)).toBe(true);
  });

  it('tell the command line what they cost', async () => {
    const job = await getJob(owner, { jobId: shop.jobs.guards });
    const { hours, labour, machine, overhead, total } = job;
    const { through } = await getRollupStatus(owner);
    const cost = await getJobCost(owner, ' 1042 ');
    expect(cost).toMatchObject({ job: '1042', through, hours, labour, machine, overhead, total });
    expect(cost).toMatchObject({ invoiced: '0.00', margin: `-${total}`, marginIsProvisional: true });
    expect(cost).toMatchObject({ workInProgress: total, estimate: null });
    const listed = await listJobCosts(owner, {});
    expect(listed.map((one) => one.job)).toEqual(['1042', '1043', '1100', '900']);
    expect(listed[0]).toMatchObject({ ...cost, number: '1042', status: 'open' });
    await expect(listJobCosts(shop.context('lead'), {})).rejects.toMatchObject({ code: 'forbidden' });
    await expect(getJobCost(owner, '77')).rejects.toMatchObject({ code: 'not_found' });
  });

  it('are not found under an id of another shop', async () => {
    const jobId = '0198aaaa-0000-7000-8000-000000000abc';
    await expect(getJob(owner, { jobId })).rejects.toMatchObject({ code: 'not_found' });
    await expect(listJobLines(owner, { jobId, limit: 5 })).rejects.toMatchObject({ code: 'not_found' });
  });
});

describe('jobs of which something is special', () => {
  let shop: TestShop;
  let owner: ShopContext;
  let ids: { employeeId: string; jobId: string; operationId: string };
  const rollUp = () => runRollup(owner, {});
  const work = (workedOn: string, hours = '8') => shop.addEntries([{ ...ids, workedOn, hours }]);

  beforeEach(async () => {
    shop = await createTestShop({ overtimeTo: 'jobs' });
    owner = shop.context('owner', { now: WORKED_NOW });
    ids = {
      employeeId: await shop.addEmployee(),
      jobId: await shop.addJob({ number: '3001' }),
      operationId: await shop.addOperation(),
    };
    await shop.addOverheadRate({ validFrom: '2026-01-01', ratePerLabourHour: '10' });
  });
  afterEach(() => shop.close());

  it('were worked on last on the day of the work, not on the one that late work is posted on', async () => {
    await shop.addPayRate({ employeeId: ids.employeeId, validFrom: '2026-01-01', wagePerHour: '30' });
    await work('2026-03-10');
    await rollUp();
    await shop.addMonthClose('2026-03-01');
    const [late] = await work('2026-03-12');
    await rollUp();
    expect((await getJob(owner, ids)).lastWorkedOn).toBe('2026-03-12');
    expect((await listCustomerFigures(owner)).items).toMatchObject([{ lastWorkedOn: '2026-03-12' }]);
    await shop.inShop((trx) =>
      trx
        .updateTable('timeEntry')
        .set({ voidedAt: new Date() })
        .where('entryId', '=', late ?? '')
        .execute(),
    );
    await rollUp();
    expect((await getJob(owner, ids)).lastWorkedOn).toBe('2026-03-10');
  });

  it('are not complete while a premium that they bear lacks a wage, though their own entries have one', async () => {
    await shop.addPayRate({ employeeId: ids.employeeId, validFrom: '2026-03-05', wagePerHour: '30' });
    const other = await shop.addJob();
    await shop.addEntries([{ ...ids, jobId: other, workedOn: '2026-03-02', hours: '24' }]);
    await work('2026-03-05', '24');
    await rollUp();
    expect((await getJob(owner, ids)).entriesWithoutRate).toBe(1);
    const { gaps } = await getRollupStatus(owner);
    const premium = gaps.find(({ category }) => category === 'overtime');
    expect(premium).toMatchObject({ subject: expect.stringMatching(/^Employee/), entries: 2 });
    await shop.inShop((trx) => trx.updateTable('shop').set({ overtimeTo: 'overhead' }).execute());
    await rollUp();
    expect((await getJob(owner, ids)).entriesWithoutRate).toBe(0);
  });

  it('are totalled so that cost less estimate is the variance, of those that have an estimate', async () => {
    await shop.addPayRate({ employeeId: ids.employeeId, validFrom: '2026-01-01', wagePerHour: '30' });
    const without = await shop.addJob({ number: '3002' });
    await work('2026-03-10');
    await shop.addEntries([{ ...ids, jobId: without, workedOn: '2026-03-11', hours: '5' }]);
    await rollUp();
    const estimate = { estimatedOn: '2026-03-01', scrapAllowancePercent: '0', marginPercent: '20' };
    const outside = { kind: 'outside', amount: '300.00', description: 'All of it' } as const;
    await saveEstimate(owner, ids, { ...estimate, lines: [outside] });
    const notBegun = await shop.addJob({ number: '3003' });
    await saveEstimate(owner, { jobId: notBegun }, { ...estimate, lines: [outside] });
    const { totals } = jobPageSchema.parse(
      await listJobs(owner, { sort: 'number', direction: 'asc', limit: 10 }),
    );
    expect(totals).toMatchObject({ jobs: 3, total: '520.00', estimate: '600.00' });
    const compared = { comparedJobs: 1, comparedCost: '320.00', comparedEstimate: '300.00' };
    expect(totals).toMatchObject({ ...compared, variance: '20.00' });
    const workings = await getEstimateWorkings(owner, { figure: 'estimate.variance', limit: 5 });
    expect(workings.inputs.map(({ label, value }) => [label, value])).toEqual([
      ['Cost of 1 job with an estimate', '$320.00'],
      ['Their estimate', '$300.00'],
    ]);
    expect([workings.amount, workings.lineCount]).toEqual(['20.00', 1]);
  });
});

describe('changing jobs', () => {
  let shop: WorkedShop;
  let owner: ShopContext;
  const input = (change: Partial<JobInput> = {}): JobInput => ({
    number: '2001',
    customer: 'Hollow Creek Dairy',
    title: 'Milk-room panels',
    quantity: 4,
    openedOn: '2026-05-01',
    dueOn: null,
    quotedPrice: '450.5',
    isBillable: true,
    status: 'open',
    ...change,
  });

  beforeAll(async () => {
    shop = await createWorkedShop();
    owner = shop.context('owner', { now: WORKED_NOW });
  });
  afterAll(() => shop.close());

  it('adds a job together with its new customer', async () => {
    const job = await createJob(owner, input());
    expect(job).toMatchObject({
      number: '2001',
      customer: 'Hollow Creek Dairy',
      quotedPrice: '450.50',
      total: '0.00',
    });
    expect((await listCustomers(owner)).map((customer) => customer.name)).toContain('Hollow Creek Dairy');
  });

  it('takes a customer that is known under the same name, whatever its case', async () => {
    const before = await listCustomers(owner);
    const job = await createJob(owner, input({ number: '2002', customer: 'northgate conveyors' }));
    expect(job.customer).toBe('Northgate Conveyors');
    expect(await listCustomers(owner)).toEqual(before);
  });

  it('refuses a number that is taken and names the field', async () => {
    const before = await listCustomers(owner);
    const twice = createJob(owner, input({ number: '1042', customer: 'Never added' }));
    await expect(twice).rejects.toMatchObject({ code: 'conflict', issues: [{ field: 'number' }] });
    expect(await listCustomers(owner)).toEqual(before);
  });

  it('changes a job, marks its days when it is no longer billable, and leaves a trail', async () => {
    const { jobId } = await getJob(owner, { jobId: shop.jobs.guards });
    const job = await updateJob(owner, { jobId }, input({ number: '1042', customer: '', isBillable: false }));
    expect(job).toMatchObject({ customer: null, isBillable: false, title: 'Milk-room panels' });
    expect((await getRollupStatus(owner)).daysWaiting).toBeGreaterThan(5);
    const trail = await shop.inShop((trx) =>
      trx
        .selectFrom('auditEvent')
        .select(['actor', 'action'])
        .where('subjectId', '=', jobId)
        .orderBy('eventId')
        .execute(),
    );
    expect(trail).toEqual([
      { actor: 'Test', action: 'added' },
      { actor: 'Test owner', action: 'changed' },
    ]);
  });

  it('does not find a job that is not there, and adds no customer for it', async () => {
    const jobId = '0198aaaa-0000-7000-8000-000000000abc';
    const before = await listCustomers(owner);
    const change = updateJob(owner, { jobId }, input({ number: '9', customer: 'Nobody' }));
    await expect(change).rejects.toMatchObject({ code: 'not_found' });
    expect(await listCustomers(owner)).toEqual(before);
  });

  it('have no work in progress where nobody will be invoiced', async () => {
    const jobId = shop.jobs.guards;
    const job = await getJob(owner, { jobId });
    const change = { number: job.number, title: job.title, status: 'open' } as const;
    const own = await updateJob(owner, { jobId }, input({ ...change, isBillable: false }));
    expect(own).toMatchObject({ total: job.total, workInProgress: '0.00' });
    const billable = await updateJob(owner, { jobId }, input({ ...change, isBillable: true }));
    expect(billable.workInProgress).toBe(job.total);
  });

  it('says where they stand, and whether their margin may still change', async () => {
    const jobId = shop.jobs.guards;
    const finished = await changeJobStatus(owner, { jobId }, { status: 'finished' });
    expect(finished).toMatchObject({ status: 'finished', marginIsProvisional: false, isToInvoice: true });
    expect(finished.workInProgress).toBe(finished.total);
    const lost = await changeJobStatus(owner, { jobId }, { status: 'lost' });
    expect(lost).toMatchObject({ workInProgress: '0.00', marginIsProvisional: true, isToInvoice: false });
    const nowhere = { jobId: '0198aaaa-0000-7000-8000-000000000abc' };
    await expect(changeJobStatus(owner, nowhere, { status: 'open' })).rejects.toMatchObject({
      code: 'not_found',
    });
  });
});
