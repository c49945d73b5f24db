import { type DepthFit } from '@brakeven/contract';
import { fitRamDepth, punchTravelMm, type TrialBend } from '@brakeven/forming';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { getDepthCard, updateDepthCard } from './depth-card';
import { getDepthFit } from './depth-fit';
import { pasteTrialBends } from './paste-trial-bends';
import { createTrialBend, listTrialBends, restoreTrialBend, voidTrialBend } from './trial-bends';

let shop: TestShop;
let keys: { machineId: string; punchId: string; dieOpeningId: string; materialCode: string };
beforeEach(async () => {
  shop = await createTestShop();
  const machineId = await shop.addMachine({ ratedForceKn: '500' });
  const punchId = await shop.addPunch({ machineId, noseRadiusMm: '1' });
  const { dieOpeningId } = await shop.addDie({ machineId }, { openingMm: '16', shoulderRadiusMm: '2' });
  keys = { machineId, punchId, dieOpeningId, materialCode: 'mild-steel' };
});
afterEach(() => shop.close());

const now = () => new Date('2026-03-04T18:00:00Z');
const operator = () => shop.context('operator', { now });

const DATUM = 100;
const SPRINGBACK = 2;
/** A reading that a perfect press would show: the radius inside is 0.16 of the opening. */
const readingMm = (angle: number, thicknessMm = 2, openingMm = 16) => {
  const bend = { openingMm, thicknessMm, shoulderRadiusMm: 2, insideRadiusMm: 0.16 * openingMm };
  return DATUM + punchTravelMm(bend, 180 - angle + SPRINGBACK) - thicknessMm;
};
const reading = (angle: number, thicknessMm = 2) => readingMm(angle, thicknessMm).toFixed(5);
const bendOf = (angle: number, change: object = {}) => ({
  ...keys,
  thicknessMm: '2',
  stripWidthMm: null,
  depthMm: reading(angle),
  measuredAngle: String(angle),
  isFullLength: false,
  ...change,
});
const ask = (change: object = {}): Promise<DepthFit> => getDepthFit(operator(), { ...keys, ...change });

describe('a trial bend', () => {
  it('is noted with who and when, and listed latest first', async () => {
    const first = await createTrialBend(operator(), bendOf(90));
    expect(first).toMatchObject({
      bentBy: 'Test operator',
      bentOn: '2026-03-04',
      material: 'Mild steel',
      openingMm: '16',
      measuredAngle: '90',
      voidedAt: null,
    });
    const earlier = await createTrialBend(operator(), bendOf(120, { bentOn: '2026-03-01', bentBy: 'Wim' }));
    const later = await createTrialBend(operator(), bendOf(80));
    const page = await listTrialBends(operator(), { limit: 2, show: 'live' });
    expect(page.items.map(({ trialBendId }) => trialBendId)).toEqual([later.trialBendId, first.trialBendId]);
    const rest = await listTrialBends(operator(), { limit: 2, show: 'live', cursor: page.nextCursor ?? '' });
    expect(rest).toMatchObject({ items: [earlier], nextCursor: null });
  });

  it('is voided, counts no longer, and comes back', async () => {
    const { trialBendId } = await createTrialBend(operator(), bendOf(90));
    await voidTrialBend(operator(), { trialBendId });
    expect((await listTrialBends(operator(), { limit: 9, show: 'live' })).items).toEqual([]);
    const voided = await listTrialBends(operator(), { limit: 9, show: 'voided' });
    expect(voided.items).toMatchObject([{ trialBendId, voidedBy: 'Test operator' }]);
    await restoreTrialBend(operator(), { trialBendId });
    expect((await listTrialBends(operator(), { limit: 9, show: 'live' })).items).toHaveLength(1);
    await expect(voidTrialBend(operator(), { trialBendId: keys.punchId })).rejects.toMatchObject({
      code: 'not_found',
    });
  });

  it.each<[string, object]>([
    ['materialCode', { materialCode: 'cheese' }],
    ['dieOpeningId', { thicknessMm: '16' }],
    ['measuredAngle', { measuredAngle: '15' }],
    ['bentOn', { bentOn: '2026-03-05' }],
    ['machineId', { machineId: '0198f000-0000-7000-8000-000000000001' }],
  ])('is refused for its %s, and nothing is written', async (field, change) => {
    await expect(createTrialBend(operator(), bendOf(90, change))).rejects.toMatchObject({
      code: 'invalid_input',
      issues: expect.arrayContaining([expect.objectContaining({ field })]),
    });
    expect((await listTrialBends(operator(), { limit: 9, show: 'all' })).items).toEqual([]);
  });

  it('is refused with tools of another machine', async () => {
    const machineId = await shop.addMachine();
    const punchId = await shop.addPunch({ machineId });
    await expect(createTrialBend(operator(), bendOf(90, { punchId }))).rejects.toMatchObject({
      issues: [{ field: 'punchId' }],
    });
    await expect(createTrialBend(operator(), bendOf(90, { machineId, punchId }))).rejects.toMatchObject({
      issues: [{ field: 'dieOpeningId' }],
    });
  });
});

describe('trial bends from a sheet', () => {
  const paste = (text: string, thicknessMm: string | null = null) =>
    pasteTrialBends(operator(), { ...keys, text, thicknessMm });

  it('are read with the units of their header', async () => {
    const rows = [
      'Depth (mm)\tAngle (deg)\tThickness (in)\tStrip width [mm]\tFull length\tWho\tWhen\tRemark',
      `${reading(90)}\t90\t0.0787401575\t50\tno\tWim\t2026-03-02\tgood`,
      '',
      `-1.5\t120.5\t14 ga\t\tyes\t\t\t`,
    ];
    const { items, columnsIgnored } = await paste(rows.join('\r\n'));
    expect(columnsIgnored).toEqual(['Remark']);
    expect(items).toMatchObject([
      { measuredAngle: '90', thicknessMm: '2', stripWidthMm: '50', bentBy: 'Wim', bentOn: '2026-03-02' },
      { depthMm: '-1.5', thicknessMm: '1.89738', isFullLength: true, stripWidthMm: null },
    ]);
  });

  it('take the thickness of all rows where there is no column of it', async () => {
    const { items } = await paste('depth (in);angle\n4;90\n"4.1";88', '2.5');
    expect(items).toMatchObject([{ depthMm: '101.6', thicknessMm: '2.5' }, { depthMm: '104.14' }]);
  });

  it.each([
    ['depth (mm),angle,thickness (mm)', 'no_rows', 'under the header'],
    ['depth,angle,thickness (mm)\n1,90,2', 'unit_missing', "'depth'"],
    ['depth (furlong),angle,thickness (mm)\n1,90,2', 'unknown_unit', 'mm or in'],
    ['angle,thickness (mm)\n90,2', 'column_missing', 'depth'],
    ['depth (mm),angle,angle,thickness (mm)\n1,90,90,2', 'column_twice', 'twice'],
    ['depth (mm),angle,thickness (mm)\n,90,2', 'cell_not_readable', 'Line 2'],
    ['depth (mm),angle,thickness (mm)\n1,square,2', 'cell_not_readable', 'Line 2'],
    ['depth (mm),angle,thickness (mm)\n1,90,2\n1,90,99', 'out_of_range', 'Line 3'],
    ['depth (mm),angle,thickness (mm)\n1,90,2\n1,90,20', 'thickness_over_opening', 'Line 3'],
    ['depth (mm),angle,thickness (mm),when\n1,90,2,03/04/26', 'cell_not_readable', '2026-03-22'],
  ])('are refused whole: %j', async (text, code, words) => {
    await expect(paste(text)).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'text', code, message: expect.stringContaining(words) }],
    });
    expect((await listTrialBends(operator(), { limit: 9, show: 'all' })).items).toEqual([]);
  });

  it('are refused without any thickness', async () => {
    await expect(paste('depth (mm),angle\n1,90')).rejects.toMatchObject({
      issues: [{ field: 'thicknessMm', code: 'required' }],
    });
  });
});

describe('the ram depth', () => {
  const note = async (angles: readonly number[], change: object = {}) => {
    for (const angle of angles) await createTrialBend(operator(), bendOf(angle, change));
  };

  it('says what is missing under three bends', async () => {
    expect(await ask({ angle: '90' })).toMatchObject({
      fit: null,
      thicknessMm: null,
      refusal: { code: 'too_few_bends', message: expect.stringContaining('0 of the 3') },
      depth: { code: 'too_few_bends' },
    });
    await note([90, 120]);
    expect(await ask()).toMatchObject({ refusal: { message: expect.stringContaining('Bend 1 more') } });
  });

  it('is answered both ways, datum and springback recovered', async () => {
    await note([75, 90, 105, 130]);
    const fit = await ask({ angle: '90', depthMm: reading(88) });
    expect(fit).toMatchObject({ from: 'opening', refusal: null, thicknessMm: 2, correction: null });
    expect(fit.fit?.datumMm).toBeCloseTo(DATUM, 3);
    expect(fit.fit?.springback).toBeCloseTo(SPRINGBACK, 3);
    expect(fit.bends).toHaveLength(4);
    expect(fit.depth).toMatchObject({ isGuess: false, depthMm: expect.closeTo(readingMm(90), 3) });
    expect(fit.angle).toMatchObject({ insideAngle: expect.closeTo(88, 2) });
    expect(await ask({ angle: '45' })).toMatchObject({ depth: { code: 'beyond_trials' } });
  });

  it('is the fit of libs/forming to the bends that are stored, twelve on three sheets', async () => {
    const noise = [0.2, -0.3, 0.1, 0.4, -0.2, 0, -0.1, 0.3, -0.4, 0.2, 0.1, -0.3];
    const trials: TrialBend[] = noise.map((off, index) => {
      const thicknessMm = [1.5, 2, 2.5][index % 3] ?? 2;
      const angle = 70 + index * 5;
      return {
        openingMm: 16,
        thicknessMm,
        punchRadiusMm: 1,
        shoulderRadiusMm: 2,
        depthMm: Number(reading(angle, thicknessMm)),
        insideAngle: Number((angle + off).toFixed(4)),
      };
    });
    for (const { thicknessMm, depthMm, insideAngle } of trials) {
      await note([90], {
        thicknessMm: String(thicknessMm),
        depthMm: depthMm.toFixed(5),
        measuredAngle: String(insideAngle),
      });
    }
    const expected = fitRamDepth(trials, 0.16);
    const { fit } = await ask();
    expect(expected.ok && expected.value.looAngle).toBeGreaterThan(0.1);
    expect(fit?.looAngle).toBeCloseTo(expected.ok ? (expected.value.looAngle ?? 0) : 0, 8);
  });

  it('of narrow strips is corrected by the latest bend over the full length', async () => {
    await note([75, 90, 105, 130]);
    const { trialBendId } = await createTrialBend(
      operator(),
      bendOf(90, { depthMm: (readingMm(90) + 0.4).toFixed(5), isFullLength: true }),
    );
    const corrected = await ask({ angle: '90' });
    expect(corrected.correction).toMatchObject({ trialBendId, shiftMm: expect.closeTo(0.4, 3) });
    expect(corrected.depth).toMatchObject({ depthMm: expect.closeTo(readingMm(90) + 0.4, 3) });
    await voidTrialBend(operator(), { trialBendId });
    expect(await ask()).toMatchObject({ correction: null });
  });

  it('of an opening without bends is carried over from its neighbour, as a guess', async () => {
    await note([75, 90, 105, 130]);
    const { dieOpeningId } = await shop.addDie({ machineId: keys.machineId }, { openingMm: '20' });
    const fit = await ask({ dieOpeningId, angle: '90', thicknessMm: '2' });
    expect(fit).toMatchObject({ from: 'machine', depth: { isGuess: true } });
    expect(fit.depth).toMatchObject({ depthMm: expect.closeTo(readingMm(90, 2, 20), 2) });
    expect(await ask({ dieOpeningId, angle: '90', thicknessMm: '9' })).toMatchObject({
      depth: { code: 'too_far_from_trials' },
    });
  });

  it('waits for the radius of a shoulder that is not known', async () => {
    const { dieOpeningId } = await shop.addDie(
      { machineId: keys.machineId },
      { openingMm: '16', shoulderRadiusMm: null },
    );
    await note([75, 90, 105], { dieOpeningId });
    expect(await ask({ dieOpeningId, angle: '90' })).toMatchObject({
      fit: null,
      refusal: { code: 'shoulder_radius_missing' },
      depth: { code: 'shoulder_radius_missing' },
    });
  });

  it('stands on a card of the shop’s usual sheets and angles', async () => {
    await note([75, 90, 105, 130]);
    const { machineId, ...sheet } = keys;
    expect(await getDepthCard(operator(), { machineId })).toEqual({
      machineId,
      angles: [90, 120, 135],
      sheets: [],
    });
    const sheets = [{ ...sheet, thicknessMm: '2' }];
    const card = await updateDepthCard(
      shop.context('lead'),
      { machineId },
      { angles: [120, 90, 40, 90], sheets },
    );
    expect(card.angles).toEqual([40, 90, 120]);
    expect(card.sheets).toMatchObject([
      {
        material: 'Mild steel',
        openingMm: '16',
        cells: [
          { code: 'beyond_trials' },
          { depthMm: expect.closeTo(readingMm(90), 3) },
          { depthMm: expect.closeTo(readingMm(120), 3) },
        ],
      },
    ]);
    expect(await getDepthCard(operator(), { machineId })).toEqual(card);
    const wrong = [{ ...sheet, materialCode: 'cheese', thicknessMm: '2' }];
    await expect(
      updateDepthCard(shop.context('lead'), { machineId }, { angles: [90], sheets: wrong }),
    ).rejects.toMatchObject({ issues: [{ field: 'sheets.0.materialCode' }] });
    expect(await getDepthCard(operator(), { machineId })).toEqual(card);
  });
});
