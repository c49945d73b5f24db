import { type PressRunQuery } from '@brakeven/contract';
import { computeBendForce, findLowestRating, MATERIALS } from '@brakeven/forming';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import fc from 'fast-check';
import { getForceDistribution } from './force-distribution';
import { correctPressRun, createPressRun } from './log-press-run';
import { getPressRunChoices, getSetupCard, listPressRuns, restorePressRun, voidPressRun } from './press-runs';

let shop: TestShop;
let jobId: string;
let machineId: string;
let punchId: string;
let dieOpeningId: string;
beforeEach(async () => {
  shop = await createTestShop();
  jobId = await shop.addJob({ number: 'J-100', openedOn: '2026-01-05' });
  machineId = await shop.addMachine({ ratedForceKn: '222.41108', bedLengthMm: '1830' });
  punchId = await shop.addPunch({ machineId, forceLimitKnPerM: '500' });
  ({ dieOpeningId } = await shop.addDie(
    { machineId, forceLimitKnPerM: '400' },
    { openingMm: '25.4', angle: '85' },
  ));
});
afterEach(() => shop.close());

const now = () => new Date('2026-03-04T18:00:00Z');
const USER = '0198f000-0000-7000-8000-00000000000a';
const lead = () => shop.context('lead', { now });
const operator = (userId: string | null = USER, employeeId: string | null = null) => {
  const context = shop.context('operator', { now, employeeId });
  return { ...context, actor: { ...context.actor, userId } };
};
const runOf = (change: object = {}) => ({
  jobId,
  machineId,
  punchId,
  dieOpeningId,
  materialCode: 'mild-steel',
  thicknessMm: '3.175',
  bendLengthMm: '600',
  strokes: 40,
  pieces: 20,
  highestForceKn: null,
  isGood: true,
  note: null,
  entryId: null,
  ...change,
});
const query = (change: Partial<PressRunQuery> = {}): PressRunQuery => ({
  limit: 100,
  show: 'live',
  sort: 'runOn',
  direction: 'desc',
  ...change,
});
const MILD_STEEL_MPA = MATERIALS.find(({ code }) => code === 'mild-steel')?.tensileUsed.toNumber() ?? NaN;

describe('a press run', () => {
  it('is logged with the force that both rules compute, and its share of the lowest rating', async () => {
    const run = await createPressRun(operator(), runOf());
    const force = computeBendForce({
      tensileMpa: MILD_STEEL_MPA,
      thicknessMm: 3.175,
      lengthMm: 600,
      openingMm: 25.4,
    });
    expect(Number(run.forceLowKn)).toBeCloseTo(force.lowKn, 4);
    expect(Number(run.forceHighKn)).toBeCloseTo(force.highKn, 4);
    expect(run).toMatchObject({
      runOn: '2026-03-04',
      jobNumber: 'J-100',
      material: 'Mild steel',
      openingMm: '25.4',
      forceUsedKn: run.forceHighKn,
      ratedKn: '222.41108',
      ratingOf: 'press',
      loggedBy: 'Test operator',
    });
    expect(run.share).toBeCloseTo(force.highKn / 222.41108, 5);
    expect(run.isAboveLine).toBe(false);
  });

  it('counts with the force that the gauge showed, if somebody read it', async () => {
    const run = await createPressRun(operator(), runOf({ highestForceKn: '190' }));
    expect(run).toMatchObject({ highestForceKn: '190', forceUsedKn: '190', isAboveLine: true });
    expect(run.share).toBeCloseTo(190 / 222.41108, 5);
  });

  it('needs neither punch nor rating', async () => {
    const bareId = await shop.addMachine();
    const bare = await shop.addDie({ machineId: bareId }, { openingMm: '16' });
    const change = { machineId: bareId, punchId: null, dieOpeningId: bare.dieOpeningId };
    expect(await createPressRun(operator(), runOf(change))).toMatchObject({
      punch: null,
      ratedKn: null,
      ratingOf: null,
      share: null,
      isAboveLine: false,
    });
  });

  it.each<[string, string, object]>([
    ['jobId', 'unknown', { jobId: USER }],
    ['materialCode', 'unknown_material', { materialCode: 'cheese' }],
    ['dieOpeningId', 'thickness_over_opening', { thicknessMm: '25.4' }],
    ['bendLengthMm', 'too_long', { bendLengthMm: '1831' }],
    ['runOn', 'in_the_future', { runOn: '2026-03-05' }],
    ['runOn', 'before_job', { runOn: '2026-01-04' }],
    ['entryId', 'unknown', { entryId: USER }],
    ['punchId', 'unknown', { punchId: USER }],
  ])('is refused for its %s: %s', async (field, code, change) => {
    await expect(createPressRun(operator(), runOf(change))).rejects.toMatchObject({
      code: 'invalid_input',
      issues: expect.arrayContaining([expect.objectContaining({ field, code })]),
    });
    expect((await listPressRuns(lead(), query())).items).toEqual([]);
  });

  it('goes with a time entry of its job; an operator with an own one only', async () => {
    const employeeId = await shop.addEmployee();
    const otherId = await shop.addEmployee();
    const operationId = await shop.addOperation();
    const entry = { workedOn: '2026-03-03', jobId, operationId, hours: '2' };
    const [own = '', strange = ''] = await shop.addEntries([
      { ...entry, employeeId },
      { ...entry, employeeId: otherId },
    ]);
    const me = operator(USER, employeeId);
    expect(await getPressRunChoices(me, { jobId })).toMatchObject({
      jobs: [{ jobId, number: 'J-100' }],
      entries: [{ entryId: own, hours: '2.0000' }],
    });
    expect((await getPressRunChoices(lead(), { jobId })).entries).toHaveLength(2);
    expect((await getPressRunChoices(operator(), { jobId })).entries).toEqual([]);
    expect(await createPressRun(me, runOf({ entryId: own }))).toMatchObject({ entryId: own });
    await expect(createPressRun(me, runOf({ entryId: strange }))).rejects.toMatchObject({
      issues: [{ field: 'entryId' }],
    });
    expect(await createPressRun(lead(), runOf({ entryId: strange }))).toMatchObject({ entryId: strange });
  });

  it('keeps its force when the material changes later', async () => {
    const run = await createPressRun(lead(), runOf());
    await shop.inShop((trx) =>
      trx
        .updateTable('dieOpening')
        .set({ openingMm: '50' })
        .where('dieOpeningId', '=', dieOpeningId)
        .execute(),
    );
    const [listed] = (await listPressRuns(lead(), query())).items;
    expect(listed).toMatchObject({ forceHighKn: run.forceHighKn, openingMm: '50' });
  });
});

describe('a correction of a press run', () => {
  it('takes its place, logged by the same person, with its own force', async () => {
    const wrong = await createPressRun(operator(), runOf({ runOn: '2026-03-01' }));
    const right = await correctPressRun(lead(), wrong, runOf({ bendLengthMm: '1200', strokes: 41 }));
    expect(right).toMatchObject({
      runOn: '2026-03-01',
      strokes: 41,
      loggedBy: 'Test operator',
      voidedAt: null,
    });
    expect(Number(right.forceHighKn)).toBeCloseTo(2 * Number(wrong.forceHighKn), 4);
    expect((await listPressRuns(operator(), query())).items).toEqual([right]);
    expect((await listPressRuns(lead(), query({ show: 'voided' }))).items).toMatchObject([
      { pressRunId: wrong.pressRunId, voidedBy: 'Test lead' },
    ]);
  });

  it('keeps what it replaced from coming back, until it is voided itself', async () => {
    const first = await createPressRun(lead(), runOf());
    const second = await correctPressRun(lead(), first, runOf({ pieces: 19 }));
    const third = await correctPressRun(lead(), second, runOf({ pieces: 18 }));
    for (const replaced of [first, second]) {
      await expect(restorePressRun(lead(), replaced)).rejects.toMatchObject({ code: 'conflict' });
      await expect(correctPressRun(lead(), replaced, runOf())).rejects.toMatchObject({ code: 'conflict' });
    }
    await voidPressRun(lead(), third);
    await restorePressRun(lead(), first);
    expect((await listPressRuns(lead(), query())).items).toEqual([first]);
    await expect(restorePressRun(lead(), third)).rejects.toMatchObject({ code: 'conflict' });
  });

  it('is refused to an operator who did not log the run, and when it is wrong itself, and then nothing changes', async () => {
    const theirs = await createPressRun(lead(), runOf());
    await expect(correctPressRun(operator(), theirs, runOf())).rejects.toMatchObject({ code: 'not_found' });
    await expect(correctPressRun(lead(), { pressRunId: USER }, runOf())).rejects.toMatchObject({
      code: 'not_found',
    });
    await expect(correctPressRun(lead(), theirs, runOf({ bendLengthMm: '1831' }))).rejects.toMatchObject({
      issues: [{ field: 'bendLengthMm', code: 'too_long' }],
    });
    expect((await listPressRuns(lead(), query())).items).toEqual([theirs]);
  });
});

describe('press runs', () => {
  it('of others are hidden from an operator, who voids the own ones only', async () => {
    const mine = await createPressRun(operator(), runOf());
    const theirs = await createPressRun(lead(), runOf());
    expect((await listPressRuns(operator(), query())).items).toEqual([mine]);
    expect((await listPressRuns(operator(null), query())).items).toEqual([]);
    expect((await listPressRuns(lead(), query())).items).toHaveLength(2);
    await expect(voidPressRun(operator(), theirs)).rejects.toMatchObject({ code: 'not_found' });
    await expect(voidPressRun(operator(null), mine)).rejects.toMatchObject({ code: 'not_found' });
    await voidPressRun(operator(), mine);
    expect((await listPressRuns(operator(), query())).items).toEqual([]);
    const voided = await listPressRuns(lead(), query({ show: 'voided' }));
    expect(voided.items).toMatchObject([{ pressRunId: mine.pressRunId, voidedBy: 'Test operator' }]);
    await restorePressRun(operator(), mine);
    expect((await listPressRuns(operator(), query())).items).toEqual([mine]);
  });

  it('are filtered, and paged in any order without a gap', async () => {
    const otherJobId = await shop.addJob({ number: 'J-2', title: 'Hopper chute' });
    for (let index = 0; index < 7; index += 1) {
      await createPressRun(
        lead(),
        runOf({
          jobId: index % 2 === 0 ? jobId : otherJobId,
          bendLengthMm: String(300 + 150 * (index % 4)),
          runOn: `2026-02-0${1 + (index % 3)}`,
          materialCode: index === 6 ? 'stainless-304' : 'mild-steel',
          highestForceKn: index === 5 ? '200' : null,
        }),
      );
    }
    for (const sort of ['runOn', 'job', 'material', 'openingMm', 'share', 'forceUsedKn'] as const) {
      const whole = await listPressRuns(lead(), query({ sort }));
      const ids: string[] = [];
      let cursor: string | null = null;
      do {
        const page: Awaited<ReturnType<typeof listPressRuns>> = await listPressRuns(
          lead(),
          query({ sort, limit: 3, ...(cursor ? { cursor } : {}) }),
        );
        ids.push(...page.items.map(({ pressRunId }) => pressRunId));
        cursor = page.nextCursor;
      } while (cursor !== null);
      expect([sort, ids]).toEqual([sort, whole.items.map(({ pressRunId }) => pressRunId)]);
      expect(ids).toHaveLength(7);
    }
    const count = async (change: Partial<PressRunQuery>) =>
      (await listPressRuns(lead(), query(change))).items.length;
    expect(await count({ jobId: otherJobId })).toBe(3);
    expect(await count({ search: 'hopper' })).toBe(3);
    expect(await count({ search: '100%' })).toBe(0);
    expect(await count({ materialCode: 'stainless-304' })).toBe(1);
    expect(await count({ from: '2026-02-02', to: '2026-02-02' })).toBe(2);
    // The bend of 750 mm, the one that showed 200 kN, and the one in stainless.
    expect(await count({ aboveLine: 'true' })).toBe(3);
    expect(await count({ dieOpeningId })).toBe(7);
    await expect(listPressRuns(lead(), query({ cursor: 'x' }))).rejects.toMatchObject({
      code: 'invalid_input',
    });
  });

  it('show how much of the rating the work uses', async () => {
    const empty = await getForceDistribution(lead(), {});
    expect(empty).toMatchObject({ runs: 0, highestShare: null, forceLinePercent: '80' });
    // 222.41108 kN: a tenth exactly belongs to the lower tenth.
    for (const highestForceKn of ['22.241108', '22.3', '177.9', '178', '222.41108', '223']) {
      await createPressRun(lead(), runOf({ highestForceKn, strokes: 10 }));
    }
    const bareId = await shop.addMachine();
    const bare = await shop.addDie({ machineId: bareId }, { openingMm: '16' });
    const unrated = { machineId: bareId, punchId: null, dieOpeningId: bare.dieOpeningId };
    await createPressRun(lead(), runOf(unrated));
    const voided = await createPressRun(lead(), runOf());
    await voidPressRun(lead(), voided);
    const { bins, ...totals } = await getForceDistribution(lead(), {});
    expect(totals).toMatchObject({
      runs: 7,
      strokes: 100,
      runsAboveLine: 3,
      strokesAboveLine: 30,
      runsWithoutRating: 1,
      highestShare: expect.closeTo(223 / 222.41108, 5),
    });
    expect(bins.map(({ runs }) => runs)).toEqual([1, 1, 0, 0, 0, 0, 0, 1, 1, 1, 1]);
    expect(bins.at(-1)).toEqual({ fromPercent: 100, toPercent: null, runs: 1, strokes: 10 });
    expect((await getForceDistribution(lead(), { aboveLine: 'true' })).runs).toBe(3);
  });

  it('have the rating that libs/forming finds, whatever is known of press, die and punch', async () => {
    const rating = fc.option(fc.integer({ min: 50, max: 900 }));
    await fc.assert(
      fc.asyncProperty(
        rating,
        rating,
        rating,
        fc.integer({ min: 50, max: 3000 }),
        async (press, die, punch, lengthMm) => {
          const id = await shop.addMachine({ ratedForceKn: press?.toString() ?? null });
          const tools = {
            machineId: id,
            punchId: await shop.addPunch({ machineId: id, forceLimitKnPerM: punch?.toString() ?? null }),
            dieOpeningId: (
              await shop.addDie(
                { machineId: id, forceLimitKnPerM: die?.toString() ?? null },
                { openingMm: '16' },
              )
            ).dieOpeningId,
          };
          const run = await createPressRun(lead(), runOf({ ...tools, bendLengthMm: String(lengthMm) }));
          const opening = { code: '', openingMm: 16, dieAngle: null, lengthMm: null, ratedKnPerM: die };
          const expected = findLowestRating(
            {
              tensileMpa: MILD_STEEL_MPA,
              radiusPerOpening: 0.16,
              thicknessMm: 3.175,
              lengthMm,
              insideAngle: 90,
              flangeMm: null,
              press: { ratedKn: press, bedLengthMm: null },
              punch: { noseRadiusMm: 1, angle: null, ratedKnPerM: punch },
              openings: [opening],
              lineShare: 0.8,
            },
            opening,
          );
          expect(run.ratingOf).toBe(expected?.of ?? null);
          expect(run.ratedKn === null ? null : Number(run.ratedKn)).toEqual(
            expected && expect.closeTo(expected.ratedKn, 4),
          );
        },
      ),
      { numRuns: 15 },
    );
  }, 30_000);
});

describe('the set-up card of a job', () => {
  it('shows what the last good run of each bend used', async () => {
    expect(await getSetupCard(operator(), { jobId })).toMatchObject({ jobNumber: 'J-100', runs: [] });
    await createPressRun(lead(), runOf({ runOn: '2026-02-01' }));
    const last = await createPressRun(lead(), runOf({ runOn: '2026-02-10', note: 'Shim 0.1 left' }));
    await createPressRun(lead(), runOf({ runOn: '2026-02-12', isGood: false }));
    const long = await createPressRun(lead(), runOf({ runOn: '2026-02-11', bendLengthMm: '900' }));
    const voided = await createPressRun(lead(), runOf({ runOn: '2026-02-13' }));
    await voidPressRun(lead(), voided);
    const { runs } = await getSetupCard(operator(), { jobId });
    expect(runs.map(({ pressRunId }) => pressRunId)).toEqual([long.pressRunId, last.pressRunId]);
    expect(runs[1]).toMatchObject({ note: 'Shim 0.1 left', noseRadiusMm: '1', dieAngle: '85' });
    await expect(getSetupCard(operator(), { jobId: USER })).rejects.toMatchObject({ code: 'not_found' });
  });
});
