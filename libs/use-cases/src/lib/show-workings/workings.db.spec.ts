import { type Figure, type FigureRef } from '@brakeven/contract';
import { D } from '@brakeven/values';
import { type ShopContext } from '../context';
import { getJob } from '../show-jobs/get-job';
import { listJobs } from '../show-jobs/list-jobs';
import { getPayback } from '../show-payback/get-payback';
import { createWorkedShop, WORKED_NOW, type WorkedShop } from '../testing/worked-shop';
import { getJobHoursWorkings, getJobWorkings } from './get-job-workings';
import { getPaybackWorkings } from './get-payback-workings';
import { expectToAddUp, readAll } from './testing/read-workings';

jest.setTimeout(30_000);

describe('workings', () => {
  let shop: WorkedShop;
  let owner: ShopContext;

  beforeAll(async () => {
    shop = await createWorkedShop();
    owner = shop.context('owner', { now: WORKED_NOW });
  }, 60_000);
  afterAll(() => shop.close());

  /** The figure as another page shows it. */
  async function findShownFigure(ref: FigureRef): Promise<string | null | undefined> {
    const key = ref.figure.split('.')[1] ?? '';
    if (ref.machineId) return shownIn(await getPayback(owner, { machineId: ref.machineId }), key);
    if (ref.jobId) return shownIn(await getJob(owner, { jobId: ref.jobId }), key);
    const page = await listJobs(owner, { limit: 1, sort: 'number', direction: 'asc', search: ref.search });
    return shownIn(page.totals, key);
  }
  const shownIn = (figures: object, key: string) => (figures as Record<string, string | null>)[key];

  const jobFigures = [
    'job.hours',
    'job.machineHours',
    'job.labour',
    'job.machine',
    'job.overhead',
    'job.total',
    'job.margin',
    'job.quotedPrice',
  ] as const;
  const paybackFigures = [
    'payback.outlay',
    'payback.hours',
    'payback.earned',
    'payback.operatorLabour',
    'payback.running',
    'payback.runningCost',
    'payback.earnedBack',
    'payback.remaining',
  ] as const;

  it.each(jobFigures)('of %s of a job add up to what its page shows', async (figure) => {
    const ref = { figure, jobId: shop.jobs.guards };
    const workings = await readAll(owner, ref);
    expectToAddUp(workings);
    expect(workings.lineCount).toBeGreaterThan(0);
    expect(workings.amount).toBe(await findShownFigure(ref));
  });

  it.each(jobFigures)('of %s over a filter add up to the totals of the list', async (figure) => {
    const ref = { figure, search: '104' };
    const workings = await readAll(owner, ref);
    expectToAddUp(workings);
    expect(workings.amount).toBe(await findShownFigure(ref));
    expect(new Set(workings.lines.map((line) => line.job))).toEqual(new Set(['1042', '1043']));
  });

  it.each(paybackFigures)('of %s add up to what the payback page shows', async (figure) => {
    const ref = { figure, machineId: shop.machines.press };
    const workings = await readAll(owner, ref);
    expectToAddUp(workings);
    expect(D(workings.amount).isZero()).toBe(false);
    expect(workings.amount).toBe(await findShownFigure(ref));
  });

  it('of what jobs earned split into the machines’ earnings', async () => {
    const ofJobs = await readAll(owner, { figure: 'job.earned' });
    expectToAddUp(ofJobs);
    const ofPress = await readAll(owner, { figure: 'payback.earned', machineId: shop.machines.press });
    expect(ofJobs.amount).toBe(ofPress.amount);
  });

  it('of each part lead to the part', async () => {
    for (const figure of [
      'job.total',
      'payback.runningCost',
      'payback.earnedBack',
      'payback.remaining',
    ] as const) {
      const ref: FigureRef = figure.startsWith('payback.')
        ? { figure, machineId: shop.machines.press }
        : { figure, jobId: shop.jobs.covers };
      const { parts } = await readAll(owner, ref);
      expect(parts.length).toBeGreaterThan(1);
      for (const part of parts) {
        if (part.figure === null) throw new Error(`${part.label} cannot be opened.`);
        const opened = await readAll(owner, part.figure);
        expect(D(opened.amount).abs().toFixed(2)).toBe(D(part.amount).abs().toFixed(2));
      }
    }
  });

  it('of a job’s share of a payback are those of the month and the job', async () => {
    const base = { figure: 'payback.earnedBack' as const, machineId: shop.machines.press };
    const payback = await getPayback(owner, { machineId: shop.machines.press });
    for (const job of payback.topJobs) {
      const ofJob = await readAll(owner, { ...base, jobId: job.jobId });
      expectToAddUp(ofJob);
      expect(ofJob.amount).toBe(job.net);
    }
    const month = payback.month;
    const ofMonth = await readAll(owner, { ...base, from: `${month?.month}-01`, to: `${month?.month}-31` });
    expect(ofMonth.amount).toBe(month?.net);
  });

  it('of an operation and of a week add up to the job’s rows', async () => {
    const job = await getJob(owner, { jobId: shop.jobs.guards });
    for (const row of job.byOperation) {
      const ref = { figure: 'job.total' as const, jobId: job.jobId, operationId: row.operationId };
      expect((await readAll(owner, ref)).amount).toBe(row.total);
      expect((await readAll(owner, { ...ref, figure: 'job.hours' })).amount).toBe(row.hours);
    }
    const [week] = job.byWeek;
    const from = week?.weekFrom ?? '';
    const to = new Date(Date.parse(from) + 6 * 86_400_000).toISOString().slice(0, 10);
    const ofWeek = await readAll(owner, { figure: 'job.total', jobId: job.jobId, from, to });
    expect(ofWeek.amount).toBe(week?.total);
  });

  it('name the rates with the day from which each was valid', async () => {
    const { inputs, lines } = await readAll(owner, { figure: 'job.labour', jobId: shop.jobs.guards });
    expect(inputs).toContainEqual({
      label: 'Wage of Mara Lind',
      value: '$28.50 per hour + 28.125\u00a0% burden',
      validFrom: '2026-01-01',
      figure: null,
    });
    expect(inputs).toContainEqual({
      label: 'Wage of Mara Lind',
      value: '$29.75 per hour + 28.125\u00a0% burden',
      validFrom: '2026-04-06',
      figure: null,
    });
    const line = lines.find((candidate) => candidate.label === 'Mara Lind' && candidate.on === '2026-02-24');
    expect(line).toMatchObject({ rate: '28.50', rateFactor: '1.28125', rateValidFrom: '2026-01-01' });
  });

  it('lead from each imported line to its cell', async () => {
    const { lines } = await readAll(owner, { figure: 'job.labour' });
    const imported = lines.filter((line) => line.source !== null);
    expect(imported.length).toBeGreaterThan(10);
    for (const { source } of imported) {
      expect(source).toMatchObject({
        importId: shop.importId,
        fileName: 'march week 1.xlsx',
        sheet: 'Week 10',
      });
      expect(source?.cell).toBe(`F${source?.row}`);
    }
    expect(lines.some((line) => line.source === null)).toBe(true);
  });

  it('count the hours of entries without a rate, and give them no amount', async () => {
    const hours = await readAll(owner, { figure: 'job.hours' });
    const labour = await readAll(owner, { figure: 'job.labour' });
    expect(hours.lineCount).toBe(90);
    expect(labour.lineCount).toBeLessThan(90);
    expect(labour.lines.some((line) => line.label === 'Ode Sorrel' && (line.on ?? '') < '2026-05-01')).toBe(
      false,
    );
  });

  it('of hours show neither rates nor money', async () => {
    const lead = shop.context('lead');
    const workings = await getJobHoursWorkings(lead, { figure: 'job.machineHours', limit: 500 });
    expect(workings.unit).toBe('hours');
    expect(workings.inputs).toEqual([]);
    for (const line of workings.lines) {
      expect(line).toMatchObject({
        rate: null,
        rateFactor: null,
        rateValidFrom: null,
        amount: line.quantity,
      });
    }
  });

  it('cover a surplus once more is earned back than was laid out', async () => {
    const machineId = await shop.addMachine({ code: 'CHEAP', inServiceOn: '2026-03-02' });
    const workings = await readAll(owner, { figure: 'payback.remaining', machineId });
    expectToAddUp(workings);
    expect(workings.amount).toBe('0.00');
    await shop.inShop((trx) =>
      trx.updateTable('machineCostItem').set({ amount: '1.00' }).where('kind', '=', 'price').execute(),
    );
    const paidBack = await readAll(owner, { figure: 'payback.remaining', machineId: shop.machines.press });
    await shop.inShop((trx) =>
      trx.updateTable('machineCostItem').set({ amount: '14500.00' }).where('kind', '=', 'price').execute(),
    );
    expectToAddUp(paidBack);
    expect(paidBack.amount).toBe('0.00');
    expect(paidBack.parts).toHaveLength(3);
  });

  const refusals: [string, FigureRef & { cursor?: string }, string][] = [
    ['a payback figure among jobs', { figure: 'payback.earned' }, 'figure'],
    ['a status that no job has', { figure: 'job.total', status: 'asleep' }, 'status'],
    ['a cursor that is no cursor', { figure: 'job.total', cursor: 'x' }, 'cursor'],
  ];
  it.each(refusals)('refuse %s', async (_words, ref, field) => {
    await expect(getJobWorkings(owner, { ...ref, limit: 10 })).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field }],
    });
  });

  it('refuse money where only hours are open, and a payback without a machine', async () => {
    const money: Figure = 'job.labour';
    await expect(getJobHoursWorkings(owner, { figure: money, limit: 10 })).rejects.toMatchObject({
      code: 'invalid_input',
    });
    await expect(getPaybackWorkings(owner, { figure: 'payback.earned', limit: 10 })).rejects.toMatchObject({
      issues: [{ field: 'machineId' }],
    });
  });

  it('refuse the cursor of another figure', async () => {
    const { nextCursor } = await getJobWorkings(owner, { figure: 'job.labour', limit: 3 });
    await expect(
      getJobWorkings(owner, { figure: 'job.total', limit: 3, cursor: nextCursor ?? '' }),
    ).rejects.toMatchObject({ issues: [{ field: 'cursor' }] });
  });

  it('do not find jobs and machines of other shops', async () => {
    const elsewhere = '0198aaaa-0000-7000-8000-000000000abc';
    await expect(
      getJobWorkings(owner, { figure: 'job.total', jobId: elsewhere, limit: 3 }),
    ).rejects.toMatchObject({
      code: 'not_found',
    });
    await expect(
      getPaybackWorkings(owner, { figure: 'payback.earned', machineId: elsewhere, limit: 3 }),
    ).rejects.toMatchObject({ code: 'not_found' });
  });
});
