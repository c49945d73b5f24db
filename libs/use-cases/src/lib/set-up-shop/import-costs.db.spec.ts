import { computeFlatWeight } from '@brakeven/costing';
import { D, toLength, toLocalDate } from '@brakeven/values';
import {
  COATING,
  COSTS,
  FORMING,
  INVOICE,
  ISSUE,
  LOT,
  RETURN,
  ROLLED,
  SHEET_STOCK,
} from './testing/costs-data';
import { createSetupShop, NONE, type SetupShop } from './testing/setup-shop';

// 11 ga of steel is 0.1196 in (Manufacturers' Standard Gauge), 3.03784 mm.
const weigh = (pieces: number, length: string, width: string) =>
  computeFlatWeight({
    pieces,
    length: toLength(length, 'mm'),
    width: toLength(width, 'mm'),
    thickness: toLength('0.1196', 'in'),
    densityKgPerM3: D('7850'),
  }).toFixed();

const COUNTS = {
  ...{ materials: 1, sheetLots: 1, issues: 2, outsideServices: 2, invoices: 2, estimates: 3 },
};

describe('importSetup with what jobs cost', () => {
  let shop: SetupShop;
  beforeEach(async () => {
    shop = await createSetupShop();
  });
  afterEach(() => shop.close());

  const listMoves = () =>
    shop.inShop((trx) =>
      trx.selectFrom('stockMove').select(['weightKg', 'amount', 'balanceKg']).orderBy('movedOn').execute(),
    );
  const listLines = () =>
    shop.inShop((trx) =>
      trx
        .selectFrom('estimateLine')
        .select(['kind', 'pieces', 'labourRate', 'machineHourRate', 'overheadRate', 'pricePerKg', 'amount'])
        .orderBy('position')
        .execute(),
    );

  it('writes stock, services, invoices and an estimate, and rolls their costs up', async () => {
    const result = await shop.take(COSTS);
    expect(result.problems).toEqual([]);
    expect(result.added).toMatchObject(COUNTS);
    const [material] = await shop.inShop((trx) => trx.selectFrom('material').selectAll().execute());
    expect(material).toMatchObject({ gauge: '11 ga', thicknessMm: '3.03784', densityKgM3: '7850.000' });

    // All of the landed cost by the weight of what was drawn, half-up to the cent; the return at the same average.
    const [lot, issue, back] = await listMoves();
    const [lotKg, issueKg] = [weigh(4, '3048', '1219.2'), weigh(24, '508', '254')];
    expect(D(lot?.weightKg ?? '0').toFixed()).toBe(lotKg);
    expect(D(issue?.weightKg ?? '0').toFixed()).toBe(`-${issueKg}`);
    expect(issue?.amount).toBe(D(600).times(issueKg).div(lotKg).toDecimalPlaces(2).negated().toFixed(2));
    expect(back?.weightKg).toBe('10.0000000000');

    const lines = await shop.inShop((trx) =>
      trx
        .selectFrom('costLine')
        .select(['category', (e) => e.fn.sum<string>('amount').as('amount')])
        .groupBy('category')
        .orderBy('category')
        .execute(),
    );
    const materialCost = D(issue?.amount ?? '0')
      .plus(back?.amount ?? '0')
      .negated()
      .toFixed(2);
    expect(lines).toEqual([
      { category: 'invoiced', amount: '5280.00' },
      { category: 'material', amount: materialCost },
      { category: 'outside', amount: '824.00' },
    ]);
  });

  it('completes an estimate with the rates of its day, the quantity of the job and the average of the stock', async () => {
    await shop.take(COSTS);
    const [head] = await shop.inShop((trx) => trx.selectFrom('estimate').selectAll().execute());
    expect(head).toMatchObject({
      ...{ estimatedOn: '2026-02-10', scrapAllowancePercent: '3.0000', marginPercent: '18.0000' },
    });
    const [operation, material, outside] = await listLines();
    // (29.25 × 1.28 + 24.00 × 1.00) ÷ 2 = 30.72.
    expect(operation).toMatchObject({
      ...{ pieces: 24, labourRate: '30.720000', machineHourRate: '34.000000', overheadRate: '18.000000' },
    });
    const moves = await listMoves();
    const value = moves.reduce((sum, { amount }) => sum.plus(amount), D(0));
    const average = value.div(moves.at(-1)?.balanceKg ?? '1').toDecimalPlaces(6);
    expect(material?.pricePerKg).toBe(average.toFixed(6));
    expect(outside).toMatchObject({ kind: 'outside', amount: '400.00' });
  });

  it('finds all there the second time and writes nothing, whatever rates have come since', async () => {
    await shop.take(COSTS);
    await shop.take({ overhead: [{ validFrom: toLocalDate('2026-02-09'), ratePerLabourHour: '99.00' }] });
    const before = await shop.countEvents();
    const again = await shop.take(COSTS);
    expect([again.added, again.changed]).toEqual([NONE, NONE]);
    expect(again.alreadyThere).toMatchObject(COUNTS);
    expect(await shop.countEvents()).toBe(before);
  });

  it('adds a third service like two that are there, and keeps weights when the material changes', async () => {
    await shop.take(COSTS);
    const moves = await listMoves();
    const result = await shop.take({
      ...COSTS,
      materials: [{ ...ROLLED, thickness: '0.125 in' }],
      outsideServices: [...COSTS.outsideServices, COATING],
    });
    expect(result.added).toEqual({ ...NONE, outsideServices: 1 });
    expect(result.changed).toEqual({ ...NONE, materials: 1 });
    expect(await listMoves()).toEqual(moves);
    const [material] = await shop.inShop((trx) => trx.selectFrom('material').selectAll().execute());
    expect(material).toMatchObject({ gauge: null, thicknessMm: '3.17500' });
  });

  it('voids and replaces a lot and an invoice that cost otherwise, and changes words in place', async () => {
    await shop.take(COSTS);
    const result = await shop.take({
      ...COSTS,
      sheetLots: [{ ...LOT, lot: 'l-1', cost: '620.00', vendor: 'Millrace' }],
      issues: [{ ...ISSUE, note: 'From the left rack' }, RETURN],
      invoices: [{ ...INVOICE, amount: '5500.00' }],
    });
    expect(result.added).toEqual(NONE);
    expect(result.changed).toEqual({ ...NONE, sheetLots: 1, issues: 1, invoices: 1 });
    const lots = await shop.inShop((trx) =>
      trx.selectFrom('sheetLot').select(['number', 'cost', 'voidedBy']).orderBy('lotId').execute(),
    );
    expect(lots).toEqual([
      { number: 'L-1', cost: '540.00', voidedBy: 'Test owner' },
      { number: 'L-1', cost: '620.00', voidedBy: null },
    ]);
    const issues = await shop.inShop((trx) => trx.selectFrom('materialIssue').selectAll().execute());
    expect(issues.map(({ note, voidedAt }) => [note, voidedAt]).sort()).toEqual([
      ['From the left rack', null],
      ['Remnant', null],
    ]);
    const invoiced = await shop.inShop((trx) =>
      trx
        .selectFrom('jobDay')
        .select('amount')
        .where('category', '=', 'invoiced')
        .orderBy('postedOn')
        .execute(),
    );
    expect(invoiced.map(({ amount }) => amount)).toEqual(['5500.00', '-120.00']);
  });

  it('replaces an estimate that differs whole', async () => {
    await shop.take(COSTS);
    const result = await shop.take({ ...COSTS, estimates: [SHEET_STOCK, { ...FORMING, pieces: 30 }] });
    expect(result.changed).toEqual({ ...NONE, estimates: 2 });
    expect((await listLines()).map(({ kind, pieces }) => [kind, pieces])).toEqual([
      ['material', null],
      ['operation', 30],
    ]);
    const before = await shop.countEvents();
    expect(
      (await shop.take({ ...COSTS, estimates: [SHEET_STOCK, { ...FORMING, pieces: 30 }] })).changed,
    ).toEqual(NONE);
    expect(await shop.countEvents()).toBe(before);
  });

  it('takes rows dated in a closed month, and posts them late', async () => {
    await shop.take(COSTS);
    await shop.inShop((trx) =>
      trx
        .insertInto('monthClose')
        .values({ shopId: shop.shop.shopId, month: '2026-02-01', closedBy: 'Test' })
        .execute(),
    );
    await shop.take({
      ...COSTS,
      outsideServices: [...COSTS.outsideServices, { ...COATING, amount: '50.00' }],
      issues: [...COSTS.issues, { ...ISSUE, pieces: 4 }],
    });
    const late = await shop.inShop((trx) =>
      trx
        .selectFrom('costLine')
        .select(['category', 'workedOn', 'postedOn'])
        .where('postedOn', '>=', '2026-03-01')
        .where('category', '<>', 'invoiced')
        .orderBy('category')
        .execute(),
    );
    expect(late).toEqual([
      { category: 'material', workedOn: '2026-02-05', postedOn: '2026-03-01' },
      { category: 'outside', workedOn: '2026-02-19', postedOn: '2026-03-01' },
    ]);
  });

  it('weighs whole sheets as those of the last lot', async () => {
    await shop.take({
      ...COSTS,
      issues: [{ ...ISSUE, pieces: null, blankLengthMm: null, blankWidthMm: null, sheets: 4 }],
    });
    const moves = await listMoves();
    expect(moves.at(-1)).toMatchObject({ amount: '-600.00', balanceKg: '0.0000000000' });
  });
});
