import { type PressRunPage } from '@brakeven/contract';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { createPressRun, type FitEstimate } from '@brakeven/use-cases';
import { runCli, runJson } from './run-cli';

jest.setTimeout(60_000);

let shop: TestShop;
beforeAll(async () => {
  shop = await createTestShop();
  // 25 US tons of 8.896443230521 kN and 1250 mm; a block with two openings.
  const machineId = await shop.addMachine({ code: 'P1', ratedForceKn: '222.41108', bedLengthMm: '1250' });
  await shop.addPunch({ machineId, name: 'Gooseneck', noseRadiusMm: '0.8', forceLimitKnPerM: '100' });
  const die = await shop.addDie({ machineId, name: 'Block' }, { openingMm: '25.4', angle: '85' });
  await shop.addDie({ machineId, name: 'Wide' }, { openingMm: '50.8', angle: '85' });
  const jobId = await shop.addJob({ number: '1042' });
  await createPressRun(shop.context('lead'), {
    ...{ jobId, machineId, punchId: null, dieOpeningId: die.dieOpeningId, materialCode: 'mild-steel' },
    ...{ thicknessMm: '3.175', bendLengthMm: '1000', strokes: 4, pieces: 2, highestForceKn: '200' },
    ...{ isGood: true, note: null, entryId: null },
  });
});
afterAll(() => shop.close());

const fit = (...args: string[]) =>
  runJson<FitEstimate>('forming', 'fit', '--machine', 'p1', '--shop', shop.shop.name, ...args);

describe('forming fit', () => {
  it('judges each opening that the shop owns and marks the best', async () => {
    const { code, json } = await fit('--material', 'mild-steel', '--thickness', '1/8', '--length', '2ft');
    expect(code).toBe(0);
    expect(json).toMatchObject({ unit: 'in', forceUnit: 'US ton', thickness: 0.125, linePercent: 80 });
    // 575 · t² · L ÷ V: 575 · (1/8)² · 2 ÷ 1 = 17.969 US tons of the press's 25, 8.984 on the opening twice as wide.
    expect(json.rows).toMatchObject([
      {
        die: 'Block',
        opening: 1,
        openingOverThickness: 8,
        forceHigh: expect.closeTo(17.96875, 4),
        rating: expect.closeTo(25, 4),
        ratingOf: 'press',
        share: expect.closeTo(0.71875, 4),
        verdict: 'fits',
        isBest: true,
      },
      { die: 'Wide', forceHigh: expect.closeTo(8.984375, 4), verdict: 'with-care', isBest: false },
    ]);
    // 80 % of 25 tons is 20 tons: 20 ÷ 17.96875 · 24 in.
    expect(json.rows[0]?.longestBend).toBeCloseTo(26.713, 2);
  });

  it('looks at the punch if one is named, and says why nothing fits', async () => {
    const { json } = await fit(
      ...['--material', 'mild-steel', '--thickness', '3mm', '--length', '1000mm', '--punch', 'gooseneck'],
    );
    expect(json).toMatchObject({ unit: 'mm', forceUnit: 'kN' });
    expect(json.rows.map(({ ratingOf, verdict }) => [ratingOf, verdict])).toEqual([
      ['punch', 'no'],
      ['punch', 'no'],
    ]);
    expect(json.rows[0]?.objections.map(({ code }) => code)).toContain('over_rating');
    expect(json.reason).toContain('None of the openings');
  });

  it('is printed as a table with its cautions', async () => {
    const args = ['--material', '304', '--thickness', '16ga', '--length', '30in', '--flange', '0.2in'];
    const { code, stdout } = await runCli([
      ...['forming', 'fit', '--machine', 'P1', '--shop', shop.shop.name],
      ...args,
    ]);
    expect(code).toBe(0);
    expect(stdout).toMatch(/Block\s+1\s+16/);
    expect(stdout).toContain('The shortest flange would slip into the opening.');
    expect(stdout).toContain('Keep hands out of the tooling');
  });

  it.each([
    [['--machine', 'P9'], 'not_found', 'Known are P1'],
    [['--punch', 'Nobody'], 'not_found', 'Known are Gooseneck'],
    [['--material', 'cheese'], 'invalid_input', 'mild-steel'],
    [['--thickness', '99ga'], 'invalid_input', '3 ga to 30 ga'],
    [['--angle', '10'], 'invalid_input', '20 to 175'],
    [['--length', '0in'], 'invalid_input', '4 ft'],
    [['--flange', '-1in'], 'invalid_input', 'below 0'],
  ])('is refused with what is accepted: %j', async (change, code, words) => {
    const usual = ['--material', 'mild-steel', '--thickness', '10ga', '--length', '2ft'];
    const { code: exit, json } = await runJson<{ error: { code: string; message: string } }>(
      ...['forming', 'fit', '--machine', 'P1', '--shop', shop.shop.name, ...usual, ...change],
    );
    expect(exit).toBe(1);
    expect(json.error).toMatchObject({ code, message: expect.stringContaining(words) });
  });
});

describe('the shop’s tools and press runs', () => {
  it('are listed', async () => {
    const { json } = await runJson('forming', 'tools', '--shop', shop.shop.name);
    expect(json).toMatchObject({
      machines: [
        { machine: 'P1', punches: [{ name: 'Gooseneck' }], dies: [{ name: 'Block' }, { name: 'Wide' }] },
      ],
    });
    const { stdout } = await runCli(['forming', 'tools', '--shop', shop.shop.name]);
    expect(stdout).toMatch(/P1\s+die\s+Block\s+1(\.0+)? in/);
    const { json: runs } = await runJson<{ runs: PressRunPage['items'] }>(
      ...['forming', 'runs', '--shop', shop.shop.name, '--above-line'],
    );
    expect(runs.runs).toMatchObject([{ jobNumber: '1042', forceUsedKn: '200', isAboveLine: true }]);
    const printed = await runCli(['forming', 'runs', '--shop', shop.shop.name]);
    expect(printed.stdout).toMatch(/1042.*90 %\s+above the line/);
  });
});
