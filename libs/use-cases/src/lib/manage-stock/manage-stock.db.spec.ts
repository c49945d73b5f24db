import { randomUUID } from 'node:crypto';
import {
  materialInputSchema,
  materialIssueInputSchema,
  materialIssueSchema,
  materialSchema,
  sheetLotInputSchema,
  stockMovePageSchema,
} from '@brakeven/contract';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import {
  createMaterialIssue,
  listJobMaterial,
  restoreMaterialIssue,
  updateMaterialIssue,
  voidMaterialIssue,
} from './material-issues';
import { createMaterial, getMaterial, listMaterials, updateMaterial } from './materials';
import { createSheetLot, restoreSheetLot, updateSheetLot, voidSheetLot } from './sheet-lots';
import { getStockLedger, listStockMoves } from './stock-moves';

jest.setTimeout(30_000);

let shop: TestShop;
let materialId: string;
let jobId: string;
beforeEach(async () => {
  shop = await createTestShop();
  ({ materialId } = await createMaterial(shop.context(), sheet()));
  jobId = await shop.addJob({ number: '1042', openedOn: '2026-03-01' });
});
afterEach(() => shop.close());

/** 11 gauge steel, 0.1196 in; 7850 kg/m³ by EN 1991. */
const sheet = (change: object = {}) =>
  materialInputSchema.parse({
    name: 'Mild steel 11 ga',
    grade: 'A1011 CS',
    form: 'sheet',
    gauge: '11 ga',
    thicknessMm: '3.03784',
    densityKgM3: '7850',
    recoveryPricePerKg: '0.22',
    ...change,
  });
const lotOf = (change: object) => sheetLotInputSchema.parse({ vendor: 'Millbrook Metals', ...change });
const issueOf = (change: object) =>
  materialIssueInputSchema.parse({ jobId, materialId, kind: 'issue', ...change });
const receive = (change: object) => createSheetLot(shop.context(), { materialId }, lotOf(change));
const issue = (change: object) => createMaterialIssue(shop.context(), issueOf(change));
const MARCH_LOT = { receivedOn: '2026-03-02', weightKg: '100', cost: '180', freight: '20' };

describe('materials', () => {
  it('are kept as given, with no stock and no average at first', async () => {
    const material = materialSchema.parse(await getMaterial(shop.context(), { materialId }));
    expect(material).toMatchObject({
      name: 'Mild steel 11 ga',
      gauge: '11 ga',
      thicknessMm: '3.03784',
      densityKgM3: '7850',
      recoveryPricePerKg: '0.22',
      stockKg: '0',
      stockValue: '0.00',
      averagePerKg: null,
      lastLot: null,
    });
  });

  it('change, but not to a name that is taken, nor to a gauge that is none', async () => {
    await createMaterial(shop.context(), sheet({ name: 'Galvanized 16 ga' }));
    const update = (change: object) => updateMaterial(shop.context(), { materialId }, sheet(change));
    expect(await update({ gauge: null })).toMatchObject({ gauge: null, thicknessMm: '3.03784' });
    await expect(update({ name: 'Galvanized 16 ga' })).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field: 'name' }],
    });
    expect(() => sheet({ gauge: '11 ga', thicknessMm: null })).toThrow(/how thick/);
    await expect(async () => update({ gauge: 'thick' })).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'gauge' }],
    });
    const nowhere = { materialId: randomUUID() };
    await expect(updateMaterial(shop.context(), nowhere, sheet())).rejects.toMatchObject({
      code: 'not_found',
    });
  });

  it('show a lead weights and no money at all', async () => {
    await receive(MARCH_LOT);
    const { issueId } = await issue({ issuedOn: '2026-03-04', weightKg: '10' });
    const lead = shop.context('lead');
    const [material] = await listMaterials(lead);
    expect(material).toMatchObject({ stockKg: '90', lastLot: { number: 'L-1' } });
    const { items: moves } = await listStockMoves(lead, { materialId, show: 'all', limit: 10 });
    const job = await listJobMaterial(lead, { jobId });
    expect(job).toMatchObject({ weightKg: '10', items: [{ issueId }] });
    const money = /amount|cost|freight|price|value|average|total/i;
    for (const answer of [material, ...moves, ...moves.map((move) => move.lot), job, ...job.items])
      expect(Object.keys(answer ?? {}).filter((key) => money.test(key))).toEqual([]);
  });
});

describe('stock', () => {
  it('goes by the moving average, and takes all the value when it is emptied', async () => {
    // 100 kg for 200.00 = 2.00 a kg; 40 out = 80.00; 60 kg at 120.00 + 50 kg for 150.00 = 270.00 ÷ 110 kg.
    await receive(MARCH_LOT);
    const first = await issue({ issuedOn: '2026-03-04', weightKg: '40' });
    expect(materialIssueSchema.parse(first)).toMatchObject({ amount: '80.00', averagePerKg: '2.00' });
    await receive({ receivedOn: '2026-03-09', weightKg: '50', cost: '150' });
    expect(await getMaterial(shop.context(), { materialId })).toMatchObject({
      stockKg: '110',
      stockValue: '270.00',
      averagePerKg: '2.454545',
      lastLot: { number: 'L-2', receivedOn: '2026-03-09', vendor: 'Millbrook Metals' },
    });
    // 10 × 270 ÷ 110 = 24.5454… → 24.55 comes back at the same average; what is left takes the rest.
    await issue({ issuedOn: '2026-03-10', weightKg: '100' });
    await issue({ issuedOn: '2026-03-11', weightKg: '10' });
    const { material, moves } = await getStockLedger(shop.context(), ' mild STEEL 11 ga ');
    expect(
      moves.map(({ kind, amount, balanceKg, balanceAmount }) => [kind, amount, balanceKg, balanceAmount]),
    ).toEqual([
      ['lot', '200.00', '100', '200.00'],
      ['issue', '-80.00', '60', '120.00'],
      ['lot', '150.00', '110', '270.00'],
      ['issue', '-245.45', '10', '24.55'],
      ['issue', '-24.55', '0', '0.00'],
    ]);
    expect(material).toMatchObject({ stockKg: '0', stockValue: '0.00', averagePerKg: '2.455' });
    expect(await listJobMaterial(shop.context(), { jobId })).toMatchObject({
      weightKg: '150',
      total: '350.00',
    });
  });

  it('weighs sheets and blanks by size, thickness and density, exactly', async () => {
    // 10 sheets of 120 × 48 in: 10 × 3048 × 1219.2 × 3.03784 mm³ × 7850 kg/m³ ÷ 10⁹ = 886.1851530454… kg
    const lot = await receive({
      receivedOn: '2026-03-02',
      sheets: 10,
      sheetLengthMm: '3048',
      sheetWidthMm: '1219.2',
      cost: '1500',
      freight: '75.50',
    });
    expect(lot).toMatchObject({ number: 'L-1', weightKg: '886.1851530455', landedCost: '1575.50' });
    const blanks = await issue({
      issuedOn: '2026-03-04',
      pieces: 24,
      blankLengthMm: '500',
      blankWidthMm: '250',
      note: 'Rack shelves',
    });
    // 24 × 500 × 250 × 3.03784 × 7850 ÷ 10⁹ = 71.541132
    expect(blanks).toMatchObject({ weightKg: '71.541132', pieces: 24, note: 'Rack shelves' });
    const sheetOut = await issue({
      issuedOn: '2026-03-04',
      sheets: 1,
      blankLengthMm: '3048',
      blankWidthMm: '1219.2',
    });
    expect(sheetOut.weightKg).toBe('88.6185153046');
  });

  it('cannot be weighed without thickness or density: the weight is asked for', async () => {
    const bar = await createMaterial(
      shop.context(),
      sheet({ name: 'Bar', form: 'bar', gauge: null, thicknessMm: null }),
    );
    const sheets = {
      sheets: 2,
      sheetLengthMm: '3000',
      sheetWidthMm: '50',
      receivedOn: '2026-03-02',
      cost: '9',
    };
    const lot = createSheetLot(shop.context(), { materialId: bar.materialId }, lotOf(sheets));
    await expect(lot).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'weightKg', message: expect.stringContaining('Bar has no thickness') }],
    });
    const nothing = sheetLotInputSchema.safeParse({ receivedOn: '2026-03-02', cost: '9' });
    expect(nothing.error?.issues).toMatchObject([{ path: ['weightKg'] }]);
    const halfASize = sheetLotInputSchema.safeParse({ ...sheets, sheetWidthMm: null });
    expect(halfASize.error?.issues).toMatchObject([{ path: ['sheetWidthMm'] }]);
  });

  it('refuses what it does not cover, and says in pounds which lot is missing', async () => {
    await receive(MARCH_LOT);
    // 115.966451424 kg are 35.2 lb more than 100 kg.
    await expect(issue({ issuedOn: '2026-03-12', weightKg: '115.966451424' })).rejects.toMatchObject({
      code: 'conflict',
      issues: [
        {
          field: 'weightKg',
          code: 'stock_short',
          message: expect.stringMatching(
            /^On Mar 12, 2026 job 1042 takes 35\.2\slb more Mild steel 11 ga .* lot of at least 35\.2\slb/,
          ),
        },
      ],
    });
    expect(await listJobMaterial(shop.context(), { jobId })).toMatchObject({ items: [] });
    // Issued the day before the lot came: nothing was there.
    await expect(issue({ issuedOn: '2026-03-01', weightKg: '1' })).rejects.toMatchObject({
      code: 'conflict',
    });
  });

  it('lets no lot go from which an issue drew, but lets it be corrected and put back', async () => {
    const lot = await receive(MARCH_LOT);
    await issue({ issuedOn: '2026-03-04', weightKg: '60' });
    await expect(voidSheetLot(shop.context(), lot)).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ code: 'stock_short' }],
    });
    const dearer = await updateSheetLot(
      shop.context(),
      lot,
      lotOf({ ...MARCH_LOT, number: 'L-1', cost: '280' }),
    );
    expect(dearer).toMatchObject({ number: 'L-1', landedCost: '300.00' });
    expect(await listJobMaterial(shop.context(), { jobId })).toMatchObject({ total: '180.00' });
    await expect(
      updateSheetLot(shop.context(), dearer, lotOf({ ...MARCH_LOT, weightKg: '50' })),
    ).rejects.toMatchObject({ code: 'conflict', issues: [{ field: 'weightKg' }] });
    const again = updateSheetLot(shop.context(), lot, lotOf(MARCH_LOT));
    await expect(again).rejects.toMatchObject({ message: expect.stringContaining('voided meanwhile') });

    const spare = await receive({ ...MARCH_LOT, number: 'MM-77' });
    await voidSheetLot(shop.context(), spare);
    await voidSheetLot(shop.context(), spare);
    const gone = stockMovePageSchema.parse(
      await listStockMoves(shop.context(), { materialId, show: 'voided', limit: 10 }),
    );
    expect(gone.items.map(({ lot: one, voidedBy }) => [one?.number, voidedBy])).toEqual([
      ['MM-77', 'Test owner'],
      ['L-1', 'Test owner'],
    ]);
    await restoreSheetLot(shop.context(), spare);
    expect(await getMaterial(shop.context(), { materialId })).toMatchObject({ stockKg: '140' });
    // The lot that was corrected cannot come back beside its correction.
    await expect(restoreSheetLot(shop.context(), lot)).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('was corrected'),
    });
  });

  it('revalues what follows when a lot comes late', async () => {
    await receive(MARCH_LOT);
    await issue({ issuedOn: '2026-03-10', weightKg: '100' });
    // 100 kg for 200.00 + 100 kg for 300.00 = 2.50 a kg.
    await receive({ receivedOn: '2026-03-05', weightKg: '100', cost: '300' });
    expect(await listJobMaterial(shop.context(), { jobId })).toMatchObject({ total: '250.00' });
  });

  it('lets no lot change under an issue of a closed month so that value is left without metal', async () => {
    const cheap = await receive({ ...MARCH_LOT, number: 'A', cost: '80' });
    const dear = await receive({ ...MARCH_LOT, number: 'B', cost: '280' });
    const all = await issue({ issuedOn: '2026-03-10', weightKg: '100' });
    expect(all.amount).toBe('200.00');
    await shop.addMonthClose('2026-03-01');
    const atOdds = {
      code: 'conflict',
      issues: [{ code: 'month_closed' }],
      message: expect.stringMatching(
        /^On Mar 10, 2026, in a month that is closed, job 1042 .*Reopen the month/,
      ),
    };
    // 300 less the 200 that stay would leave 100 with no metal; 100 less 200 would leave less than nothing.
    await expect(voidSheetLot(shop.context(), cheap)).rejects.toMatchObject(atOdds);
    await expect(voidSheetLot(shop.context(), dear)).rejects.toMatchObject(atOdds);
    // A price put right late is borne by the metal that is left.
    await updateSheetLot(shop.context(), dear, lotOf({ ...MARCH_LOT, number: 'B', cost: '330' }));
    expect(await getMaterial(shop.context(), { materialId })).toMatchObject({
      stockKg: '100',
      stockValue: '250.00',
    });
  });

  it('takes back no more than the job drew', async () => {
    await receive(MARCH_LOT);
    const drawn = await issue({ issuedOn: '2026-03-04', weightKg: '30' });
    const back = await issue({ kind: 'return', issuedOn: '2026-03-06', weightKg: '12.5' });
    expect(back).toMatchObject({ kind: 'return', amount: '-25.00', weightKg: '12.5' });
    expect(await listJobMaterial(shop.context(), { jobId })).toMatchObject({
      weightKg: '17.5',
      total: '35.00',
    });
    await expect(issue({ kind: 'return', issuedOn: '2026-03-07', weightKg: '18' })).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field: 'weightKg', code: 'over_returned' }],
    });
    await expect(voidMaterialIssue(shop.context(), drawn)).rejects.toMatchObject({
      issues: [{ code: 'over_returned' }],
    });
    // One statement: for a moment the job would otherwise have drawn nothing.
    const less = await updateMaterialIssue(
      shop.context(),
      drawn,
      issueOf({ issuedOn: '2026-03-04', weightKg: '20' }),
    );
    expect(less.amount).toBe('40.00');
    await voidMaterialIssue(shop.context(), back);
    await voidMaterialIssue(shop.context(), less);
    await restoreMaterialIssue(shop.context(), less);
    expect(await listJobMaterial(shop.context(), { jobId })).toMatchObject({
      weightKg: '20',
      total: '40.00',
      items: [{ voidedBy: 'Test owner' }, { voidedAt: null, amount: '40.00' }, { amount: null }],
    });
  });

  it('refuses dates before the job and after today, and rows of nothing', async () => {
    await receive({ ...MARCH_LOT, receivedOn: '2026-02-02' });
    await expect(issue({ issuedOn: '2026-02-27', weightKg: '1' })).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [
        { field: 'issuedOn', code: 'before_job', message: expect.stringContaining('opened on Mar 1') },
      ],
    });
    const march = { now: () => new Date('2026-03-05T12:00:00Z') };
    const tomorrow = createMaterialIssue(
      shop.context('owner', march),
      issueOf({ issuedOn: '2026-03-06', weightKg: '1' }),
    );
    await expect(tomorrow).rejects.toMatchObject({ issues: [{ field: 'issuedOn', code: 'after_today' }] });
    const stranger = { issuedOn: '2026-03-04', weightKg: '1', jobId: randomUUID() };
    await expect(issue(stranger)).rejects.toMatchObject({ issues: [{ field: 'jobId' }] });
    for (const weightKg of ['0', '-3']) {
      const parsed = materialIssueInputSchema.safeParse({
        ...issueOf({ issuedOn: '2026-03-04', weightKg: '1' }),
        weightKg,
      });
      expect(parsed.error?.issues).toMatchObject([{ path: ['weightKg'], message: 'Must be more than 0.' }]);
    }
  });

  it('lets two issues at once not both take the last sheet', async () => {
    await receive(MARCH_LOT);
    const both = await Promise.allSettled(
      [1, 2].map(() => issue({ issuedOn: '2026-03-04', weightKg: '60' })),
    );
    expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    expect(await getMaterial(shop.context(), { materialId })).toMatchObject({ stockKg: '40' });
  });

  it('comes in pages, latest first, each move once', async () => {
    await receive(MARCH_LOT);
    for (const day of ['05', '06', '07', '08']) await issue({ issuedOn: `2026-03-${day}`, weightKg: '1' });
    const pages = [await listStockMoves(shop.context(), { materialId, show: 'all', limit: 2 })];
    for (let cursor = pages[0]?.nextCursor; cursor; cursor = pages.at(-1)?.nextCursor)
      pages.push(await listStockMoves(shop.context(), { materialId, show: 'all', limit: 2, cursor }));
    expect(pages.flatMap(({ items }) => items.map(({ movedOn }) => movedOn.slice(-2)))).toEqual([
      '08',
      '07',
      '06',
      '05',
      '02',
    ]);
    const { items } = await listStockMoves(shop.context(), { materialId, show: 'lot', limit: 2 });
    expect(items).toMatchObject([
      { kind: 'lot', lot: { cost: '180.00', freight: '20.00' }, amount: '200.00' },
    ]);
    const otherList = listStockMoves(shop.context(), {
      materialId,
      show: 'lot',
      limit: 2,
      cursor: pages[0]?.nextCursor ?? '',
    });
    await expect(otherList).rejects.toMatchObject({ issues: [{ field: 'cursor' }] });
  });

  it('is of one shop alone', async () => {
    const lot = await receive(MARCH_LOT);
    const other = await createTestShop();
    try {
      const stranger = other.context();
      await expect(getMaterial(stranger, { materialId })).rejects.toMatchObject({ code: 'not_found' });
      await expect(voidSheetLot(stranger, lot)).rejects.toMatchObject({ code: 'not_found' });
      await expect(createSheetLot(stranger, { materialId }, lotOf(MARCH_LOT))).rejects.toMatchObject({
        code: 'not_found',
      });
    } finally {
      await other.close();
    }
  });
});
