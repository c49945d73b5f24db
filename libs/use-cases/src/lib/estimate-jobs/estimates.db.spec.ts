import {
  type EstimateInput,
  estimateChoicesSchema,
  estimateDraftSchema,
  estimateInputSchema,
  type EstimateLineInput,
  estimateSchema,
  jobDetailSchema,
  workingsSchema,
} from '@brakeven/contract';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { D, sum } from '@brakeven/values';
import fc from 'fast-check';
import { type ShopContext } from '../context';
import { getJob } from '../show-jobs/get-job';
import { getJobCost, listJobCosts } from '../show-jobs/job-costs';
import { listJobs } from '../show-jobs/list-jobs';
import { draftEstimate, listLikeJobs } from './copy-estimate';
import { getEstimateChoices } from './estimate-choices';
import { deleteEstimate, getEstimate, quotePrice, saveEstimate, toEstimateVersion } from './estimates';
import { getEstimateWorkings } from './get-estimate-workings';

jest.setTimeout(60_000);

describe('estimates', () => {
  let shop: TestShop;
  let owner: ShopContext;
  let ids: { press: string; form: string; steel: string; job: string; other: string };

  beforeAll(async () => {
    shop = await createTestShop();
    owner = shop.context('owner');
    const press = await shop.addMachine({ name: 'Press 2' });
    await shop.addMachineRate({
      machineId: press,
      validFrom: '2026-01-01',
      machineHourRate: '31.25',
      chargeOutRate: '95',
      runningCostPerHour: '4',
    });
    const [lind, abara] = [await shop.addEmployee(), await shop.addEmployee()];
    await shop.addEmployee({ isActive: false });
    await shop.addPayRate({
      employeeId: lind,
      validFrom: '2026-01-01',
      wagePerHour: '30',
      burdenPercent: '20',
    });
    await shop.addPayRate({
      employeeId: abara,
      validFrom: '2026-01-01',
      wagePerHour: '25',
      burdenPercent: '20',
    });
    await shop.addOverheadRate({ validFrom: '2026-01-01', ratePerLabourHour: '18' });
    const customerId = await shop.addCustomer('Northgate Conveyors');
    ids = {
      press,
      form: await shop.addOperation({ name: 'Form', defaultMachineId: press }),
      steel: await shop.inShop(async (trx) => {
        const row = { shopId: shop.shop.shopId, name: '11 ga mild steel', form: 'sheet' as const };
        const added = await trx.insertInto('material').values(row).returning('materialId').executeTakeFirst();
        return added?.materialId ?? '';
      }),
      job: await shop.addJob({ number: '2231', title: 'Conveyor guards', quantity: 24, customerId }),
      other: await shop.addJob({ number: '2260', title: 'Conveyor guards, long', quantity: 60, customerId }),
    };
  });
  afterAll(() => shop.close());

  const forming = (): EstimateLineInput => ({
    kind: 'operation',
    operationId: ids.form,
    machineId: ids.press,
    setupHours: '0.5',
    minutesPerPiece: '7.5',
    pieces: 24,
    labourRate: '33',
    machineHourRate: '31.25',
    overheadRate: '18',
    description: '',
  });
  const metal = (): EstimateLineInput => ({
    kind: 'material',
    materialId: ids.steel,
    weightKg: '100',
    pricePerKg: '1.9',
    description: 'Guards',
  });
  const input = (change: Partial<EstimateInput> = {}): EstimateInput => ({
    estimatedOn: '2026-05-01',
    scrapAllowancePercent: '5',
    marginPercent: '20',
    lines: [forming(), metal(), { kind: 'outside', amount: '120.00', description: 'Powder coat' }],
    ...change,
  });

  it('are saved whole and say what they come to', async () => {
    const saved = estimateSchema.parse(await saveEstimate(owner, { jobId: ids.job }, input()));
    // 0.5 h + 24 × 7.5 min × 1.05 = 3.65 h; 100 kg × 1.05 × 1.90
    expect(saved.cost).toEqual({
      hours: '3.6500',
      labour: '120.45',
      overtime: '0.00',
      machine: '114.06',
      overhead: '65.70',
      material: '199.50',
      outside: '120.00',
      total: '619.71',
    });
    expect(saved.priceForMargin).toBe('774.64');
    expect((await getEstimate(owner, { jobId: ids.job })).estimate).toEqual(saved);
    expect(estimateInputSchema.parse(saved)).toMatchObject({
      lines: input().lines.map(({ kind }) => ({ kind })),
    });
    const fewer = await saveEstimate(owner, { jobId: ids.job }, input({ lines: [metal()] }));
    expect(fewer.lines).toHaveLength(1);
    await saveEstimate(owner, { jobId: ids.job }, input());
  });

  it('are saved and removed only as the version that they were read in', async () => {
    const { estimate } = await getEstimate(owner, { jobId: ids.job });
    const ref = { jobId: ids.job, version: toEstimateVersion(estimate) };
    const outdated = { jobId: ids.job, version: toEstimateVersion(null) };
    await expect(saveEstimate(owner, outdated, input())).rejects.toMatchObject({ code: 'changed_meanwhile' });
    await expect(deleteEstimate(owner, outdated)).rejects.toMatchObject({ code: 'changed_meanwhile' });
    const both = await Promise.allSettled(
      ['15', '25'].map((marginPercent) => saveEstimate(owner, ref, input({ marginPercent }))),
    );
    const refused = both.flatMap((one) => (one.status === 'rejected' ? [one.reason as unknown] : []));
    expect(refused).toMatchObject([{ code: 'changed_meanwhile' }]);
    const saved = await saveEstimate(owner, { jobId: ids.job }, input());
    expect(toEstimateVersion(saved)).toBe(ref.version);
  });

  it('stand beside the cost, with the variance in two parts that add up', async () => {
    const job = jobDetailSchema.parse(await getJob(owner, { jobId: ids.job }));
    // While nothing is spent there is nothing to hold against the estimate in a list of jobs.
    expect(job).toMatchObject({ estimate: '619.71', estimatedHours: '3.6500', variance: null });
    expect(job.comparison?.total.variance).toBe('-619.71');
    expect(job.byOperation).toEqual([
      expect.objectContaining({ operation: 'Form', estimatedHours: '3.6500' }),
    ]);
    for (const one of job.comparison?.categories ?? [])
      expect(D(one.ratePart).plus(one.quantityPart).toFixed(2)).toBe(one.variance);
    expect((await getJob(shop.context('lead'), { jobId: ids.job })).comparison).toBeUndefined();
    const { estimate } = await getJobCost(owner, '2231');
    expect(estimate).toMatchObject({ hours: '3.6500', total: '619.71', invoiced: null, margin: null });
    const listed = await listJobCosts(owner, {});
    expect(listed.map((job) => job.estimate)).toEqual([estimate, null]);
  });

  it('open into their lines, which add up', async () => {
    const figures = ['hours', 'labour', 'machine', 'overhead', 'material', 'outside', 'total'] as const;
    for (const figure of figures) {
      const query = { figure: `estimate.${figure}`, jobId: ids.job, limit: 100 } as const;
      const workings = workingsSchema.parse(await getEstimateWorkings(owner, query));
      expect(sum(workings.lines.map((line) => D(line.amount))).eq(workings.amount)).toBe(true);
      expect(workings.lineCount).toBeGreaterThan(0);
    }
    for (const figure of ['estimate.total', 'estimate.price', 'estimate.variance'] as const) {
      const workings = workingsSchema.parse(
        await getEstimateWorkings(owner, { figure, jobId: ids.job, limit: 5 }),
      );
      expect(sum(workings.parts.map((part) => D(part.amount))).eq(workings.amount)).toBe(true);
    }
    const all = workingsSchema.parse(
      await getEstimateWorkings(owner, { figure: 'estimate.total', limit: 5 }),
    );
    expect([all.amount, all.lineCount]).toEqual(['619.71', 1]);
    await expect(
      getEstimateWorkings(owner, { figure: 'estimate.total', jobId: ids.other, limit: 5 }),
    ).rejects.toMatchObject({ code: 'not_found' });
  });

  it('refuse a line that refers to nothing, by its place', async () => {
    const lost = { ...forming(), operationId: '0198aaaa-0000-7000-8000-000000000abc' } as EstimateLineInput;
    await expect(
      saveEstimate(owner, { jobId: ids.job }, input({ lines: [metal(), lost] })),
    ).rejects.toMatchObject({ code: 'invalid_input', issues: [{ field: 'lines.1.operationId' }] });
    expect((await getEstimate(owner, { jobId: ids.job })).estimate?.lines).toHaveLength(3);
  });

  it('are refused by the contract where a number makes no sense, with the field', () => {
    const fieldsOf = (change: object, line = forming()) => {
      const result = estimateInputSchema.safeParse({
        ...input({ lines: [{ ...line, ...change } as never] }),
      });
      return result.error?.issues.map((issue) => issue.path.join('.'));
    };
    expect(fieldsOf({ pieces: 0 })).toEqual(['lines.0.pieces']);
    expect(fieldsOf({ setupHours: '0', minutesPerPiece: '0' })).toEqual(['lines.0.minutesPerPiece']);
    expect(fieldsOf({ machineId: null })).toEqual(['lines.0.machineHourRate']);
    expect(fieldsOf({ labourRate: '-3' })).toEqual(['lines.0.labourRate']);
    expect(fieldsOf({ weightKg: '0' }, metal())).toEqual(['lines.0.weightKg']);
    expect(estimateInputSchema.safeParse(input({ marginPercent: '100' })).success).toBe(false);
    expect(estimateInputSchema.safeParse(input({ lines: [] })).success).toBe(false);
  });

  it('take the rates of the day as they begin, and none where none holds', async () => {
    const choices = estimateChoicesSchema.parse(await getEstimateChoices(owner, { on: '2026-05-01' }));
    expect(choices).toMatchObject({ labourRate: '33.00', overheadRate: '18.00' });
    expect(choices.machines).toEqual([{ id: ids.press, name: 'Press 2', machineHourRate: '31.25' }]);
    expect(choices.materials).toEqual([{ id: ids.steel, name: '11 ga mild steel', averagePerKg: null }]);
    const before = await getEstimateChoices(owner, { on: '2025-05-01' });
    expect(before).toMatchObject({ labourRate: null, overheadRate: null });
    expect(before.machines[0]?.machineHourRate).toBeNull();
  });

  it('are copied from a like job, scaled by pieces, without being saved', async () => {
    const like = await listLikeJobs(owner, { jobId: ids.other });
    expect(like).toMatchObject([{ number: '2231', estimate: '619.71', materials: ['11 ga mild steel'] }]);
    expect(await listLikeJobs(owner, { jobId: ids.other, search: 'mild STEEL' })).toHaveLength(1);
    expect(await listLikeJobs(owner, { jobId: ids.other, search: '100%' })).toEqual([]);
    const query = { jobId: ids.other, fromJobId: ids.job, on: '2026-06-01' };
    const copied = estimateDraftSchema.parse(await draftEstimate(owner, { ...query, rates: 'copied' }));
    expect(copied).toMatchObject({ scaled: { from: 24, to: 60 }, ratesKept: [], estimatedOn: '2026-06-01' });
    expect(copied.lines).toMatchObject([{ pieces: 60 }, { weightKg: '250' }, { amount: '300' }]);
    await shop.addOverheadRate({ validFrom: '2026-06-01', ratePerLabourHour: '20' });
    const today = await draftEstimate(owner, { ...query, rates: 'today' });
    expect(today.lines[0]).toMatchObject({ overheadRate: '20.00', labourRate: '33.00' });
    expect(today.lines[1]).toMatchObject({ pricePerKg: '1.90' });
    expect(today.ratesKept).toEqual(['price of 11 ga mild steel']);
    expect((await getEstimate(owner, { jobId: ids.other })).estimate).toBeNull();
  });

  it('lend their price to the job, and can be removed', async () => {
    await quotePrice(owner, { jobId: ids.job }, { quotedPrice: '774.64' });
    const { estimate } = await getJobCost(owner, '2231');
    expect(estimate).toMatchObject({ invoiced: '774.64', margin: '154.93' });
    await saveEstimate(owner, { jobId: ids.other }, input());
    await deleteEstimate(owner, { jobId: ids.other });
    await expect(deleteEstimate(owner, { jobId: ids.other })).rejects.toMatchObject({ code: 'not_found' });
    expect((await getJob(owner, { jobId: ids.other })).estimate).toBeNull();
  });

  it('come to the same in the grid as by the rule, whatever their numbers', async () => {
    const decimal = (max: number, places: number) =>
      fc.integer({ min: 0, max: max * 10 ** places }).map((n) => (n / 10 ** places).toFixed(places));
    const operation = fc.record({
      setupHours: decimal(9, 4),
      minutesPerPiece: decimal(40, 4).filter((text) => Number(text) > 0),
      pieces: fc.integer({ min: 1, max: 900 }),
      labourRate: decimal(80, 6),
      machineHourRate: decimal(80, 6),
      overheadRate: decimal(80, 6),
    });
    const material = fc.record({
      weightKg: decimal(500, 6).filter((text) => Number(text) > 0),
      pricePerKg: decimal(9, 6),
    });
    const lines = fc.array(
      fc.oneof(
        operation.map((numbers) => ({ ...forming(), ...numbers })),
        material.map((numbers) => ({ ...metal(), ...numbers })),
      ),
      { minLength: 1, maxLength: 6 },
    );
    await fc.assert(
      fc.asyncProperty(lines, decimal(100, 4), async (some, scrapAllowancePercent) => {
        const body = input({ lines: some as EstimateLineInput[], scrapAllowancePercent });
        const saved = await saveEstimate(owner, { jobId: ids.job }, body);
        const query = { search: '2231', sort: 'estimate', direction: 'asc', limit: 5 } as const;
        const { items, totals } = await listJobs(owner, query);
        expect(items[0]).toMatchObject({ estimate: saved.cost.total, estimatedHours: saved.cost.hours });
        expect(totals.estimate).toBe(saved.cost.total);
      }),
      { numRuns: 40 },
    );
  });
});
