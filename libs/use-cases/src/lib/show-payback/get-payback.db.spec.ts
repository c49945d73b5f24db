import { paybackSchema } from '@brakeven/contract';
import { computeMachineDays, computePayback } from '@brakeven/costing';
import { D, moneyText, sum, toLocalDate, toMoney } from '@brakeven/values';
import { type ShopContext } from '../context';
import { runRollup } from '../roll-up-costs/run-rollup';
import { computeExpectedCosts } from '../roll-up-costs/testing/expected-costs';
import { changeJobStatus } from '../show-jobs/change-job';
import { getJob } from '../show-jobs/get-job';
import { createWorkedShop, WORKED_NOW, type WorkedShop } from '../testing/worked-shop';
import { getMachinePayback, getPayback } from './get-payback';

jest.setTimeout(30_000);

describe('a machine’s payback', () => {
  let shop: WorkedShop;
  let owner: ShopContext;
  let machineId: string;

  beforeAll(async () => {
    shop = await createWorkedShop();
    owner = shop.context('owner', { now: WORKED_NOW });
    machineId = shop.machines.press;
  });
  afterAll(() => shop.close());

  it('equals what costing makes of the entries themselves', async () => {
    const { lines, gaps, inServiceOn } = await computeExpectedCosts(shop);
    const days = computeMachineDays(lines, inServiceOn, gaps).filter((day) => day.machineId === machineId);
    const asOf =
      lines
        .map((line) => line.workedOn)
        .sort()
        .at(-1) ?? null;
    const expected = computePayback({
      outlay: toMoney('15740.50'),
      days,
      asOf,
      inServiceOn: toLocalDate('2026-03-02'),
    });
    const payback = paybackSchema.parse(await getPayback(owner, { machineId }));
    expect(payback).toMatchObject({
      outlay: '15740.50',
      earned: moneyText(expected.earned),
      operatorLabour: moneyText(expected.operatorLabour),
      running: moneyText(expected.running),
      runningCost: moneyText(expected.runningCost),
      earnedBack: moneyText(expected.earnedBack),
      remaining: moneyText(expected.remaining),
      asOf,
      breakEven: expected.breakEven,
      basis: 'charge-out',
      hours: sum(days.map((day) => day.hours)).toFixed(4),
    });
    expect(days.length).toBeGreaterThan(20);
  });

  it('has a curve from minus the outlay to what is still missing', async () => {
    const { curve, outlay, earnedBack } = await getPayback(owner, { machineId });
    expect(curve[0]).toEqual({ on: '2026-03-02', netCash: `-${outlay}` });
    expect(
      D(curve.at(-1)?.netCash ?? '0')
        .plus(outlay)
        .toFixed(2),
    ).toBe(earnedBack);
    const dates = curve.slice(1).map((point) => point.on);
    expect(dates).toEqual([...new Set(dates)].sort());
  });

  it('splits into the jobs that brought it', async () => {
    const { topJobs, otherJobs, earnedBack } = await getPayback(owner, { machineId });
    const nets = topJobs.map((job) => D(job.net));
    expect(sum([...nets, D(otherJobs.net)]).toFixed(2)).toBe(earnedBack);
    expect(topJobs.map((job) => job.number)).toEqual(expect.arrayContaining(['1042', '1043', '900']));
    expect(nets.map(Number)).toEqual(nets.map(Number).sort((a, b) => b - a));
    expect(otherJobs).toEqual({ jobs: 0, net: '0.00' });
  });

  it('tells of a job whose hours paid most that it lost money as a whole', async () => {
    const topJobs = async () => (await getPayback(owner, { machineId })).topJobs;
    expect((await topJobs()).map(({ loss }) => loss)).toEqual([null, null, null]);
    const jobId = (await topJobs())[0]?.jobId ?? '';
    const { status } = await getJob(owner, { jobId });
    const { total, margin } = await changeJobStatus(owner, { jobId }, { status: 'invoiced' });
    expect(margin).toBe(`-${total}`);
    expect((await topJobs())[0]).toMatchObject({ jobId, loss: total });
    await changeJobStatus(owner, { jobId }, { status });
    const own = (await topJobs()).find((job) => job.number === '900')?.jobId ?? '';
    const ended = await changeJobStatus(owner, { jobId: own }, { status: 'finished' });
    expect(ended).toMatchObject({ isBillable: false, margin: `-${ended.total}` });
    expect((await topJobs()).find((job) => job.jobId === own)?.loss).toBeNull();
    await changeJobStatus(owner, { jobId: own }, { status: 'open' });
  });

  it('names the month’s charge-out rate, and none when it changed within the month', async () => {
    const { month } = await getPayback(owner, { machineId });
    expect(month).toMatchObject({ month: '2026-05', chargeOutRate: '98.50' });
    const april = await createWorkedShop();
    try {
      await april.inShop((trx) =>
        trx
          .updateTable('timeEntry')
          .set({ voidedAt: WORKED_NOW() })
          .where('workedOn', '>', '2026-04-30')
          .execute(),
      );
      await runRollup(april.context('owner', { now: WORKED_NOW }), {});
      const payback = await getPayback(april.context(), { machineId: april.machines.press });
      expect(payback.month).toMatchObject({ month: '2026-04', chargeOutRate: null });
    } finally {
      await april.close();
    }
  });

  it('says which of its lines are missing for want of a rate', async () => {
    const { gaps } = await getPayback(owner, { machineId });
    expect(gaps.map((gap) => [gap.category, gap.subject])).toEqual([['labour', 'Ode Sorrel']]);
  });

  it('has no figures and no date for a machine that is not in service', async () => {
    const payback = paybackSchema.parse(await getPayback(owner, { machineId: shop.machines.saw }));
    expect(payback).toMatchObject({
      earned: '0.00',
      earnedBack: '0.00',
      remaining: '0.00',
      breakEven: { date: null, method: 'no-data' },
      curve: [],
      month: null,
      topJobs: [],
      pacePerWeek: null,
      paceDays: 0,
    });
  });

  it.each(['PB2', 'pb2', ' Press 2 '])('is found for the command line by %p', async (name) => {
    const payback = await getPayback(owner, { machineId });
    const { outlay, earned, runningCost, earnedBack, remaining, asOf, breakEven } = payback;
    expect(await getMachinePayback(owner, name)).toMatchObject({
      machine: 'PB2',
      outlay,
      earned,
      runningCost,
      earnedBack,
      remaining,
      asOf,
      breakEven,
    });
  });

  it('is not found for a machine that is not there', async () => {
    await expect(getMachinePayback(owner, 'Press 9')).rejects.toMatchObject({
      code: 'not_found',
      message: expect.stringContaining('Press 9'),
    });
  });
});
