import { type SetupResult } from '@brakeven/contract';
import { toLocalDate } from '@brakeven/values';
import {
  COATING,
  COSTS,
  EMPTY_LINE,
  FORMING,
  INVOICE,
  ISSUE,
  LOT,
  RETURN,
  ROLLED,
  SHEET_STOCK,
} from './testing/costs-data';
import { createSetupShop, GUARDS, type SetupShop } from './testing/setup-shop';

describe('importSetup with what jobs cost, when something stands in the way', () => {
  let shop: SetupShop;
  beforeAll(async () => {
    shop = await createSetupShop();
  });
  afterAll(() => shop.close());

  const tell = async (data: Parameters<SetupShop['take']>[0]): Promise<string[]> => {
    const error: unknown = await shop.take({ ...COSTS, ...data }).catch((refusal: unknown) => refusal);
    return (error as { details: SetupResult }).details.problems.map(({ message }) => message);
  };
  const BEFORE = toLocalDate('2026-01-31');

  it.each([
    [{ issues: [{ ...ISSUE, job: 'J-9' }] }, ['job_unknown Issues!B2']],
    [{ issues: [{ ...ISSUE, material: 'Tin' }] }, ['material_unknown Issues!C2']],
    [{ sheetLots: [{ ...LOT, material: 'Tin' }], issues: [] }, ['material_unknown Sheet lots!B2']],
    [
      { outsideServices: [{ ...COATING, job: 'J-9' }], invoices: [{ ...INVOICE, job: 'J-9' }] },
      ['job_unknown Outside services!B2', 'job_unknown Invoices!C2'],
    ],
    [{ issues: [{ ...ISSUE, date: BEFORE }] }, ['before_job Issues!A2']],
    [
      { outsideServices: [{ ...COATING, date: BEFORE }], invoices: [{ ...INVOICE, date: BEFORE }] },
      ['before_job Outside services!A2', 'before_job Invoices!B2'],
    ],
    [{ invoices: [{ ...INVOICE, date: toLocalDate('2100-01-01') }] }, ['after_today Invoices!B2']],
    [{ invoices: [INVOICE, { ...INVOICE, job: 'j-1041 ' }] }, ['row_twice Invoices!C3']],
    [
      {
        materials: [{ ...ROLLED, grade: null, name: 'Brass', thickness: '11 ga' }],
        sheetLots: [],
        issues: [],
        estimates: [],
      },
      ['gauge_needs_material Materials!D2'],
    ],
    [{ sheetLots: [{ ...LOT, sheets: null }], issues: [] }, ['weight_missing Sheet lots!H2']],
    [{ issues: [{ ...ISSUE, pieces: null }] }, ['weight_missing Issues!I2']],
    [{ issues: [{ ...ISSUE, sheets: 1 }] }, ['measure_unclear Issues!F2']],
  ])('names the cell: %#', async (data, problems) => {
    expect((await shop.refuse({ ...COSTS, estimates: [], ...data })).sort()).toEqual([...problems].sort());
  });

  it.each([
    [[{ ...FORMING, estimatedOn: null }], ['cell_missing Estimates!B2']],
    [[{ ...FORMING, operation: null }], ['cell_missing Estimates!D2']],
    [[{ ...FORMING, operation: 'BEND' }], ['operation_unknown Estimates!D2']],
    [[{ ...FORMING, machine: 'P9' }], ['machine_unknown Estimates!E2']],
    [[{ ...FORMING, setupHours: null, minutesPerPiece: null }], ['time_missing Estimates!G2']],
    [[{ ...FORMING, amount: '5.00' }], ['cell_out_of_place Estimates!P2']],
    [[{ ...FORMING, operation: 'WELD', machineHourRate: '5.00' }], ['cell_out_of_place Estimates!J2']],
    [
      [{ ...FORMING, estimatedOn: toLocalDate('2020-01-01') }],
      ['rate_missing Estimates!I2', 'rate_missing Estimates!K2', 'rate_missing Estimates!J2'],
    ],
    [[FORMING, { ...SHEET_STOCK, weightKg: null }], ['cell_missing Estimates!M3']],
    [[{ ...SHEET_STOCK, estimatedOn: toLocalDate('2026-02-01') }], ['rate_missing Estimates!N2']],
    [[FORMING, { ...EMPTY_LINE, kind: 'outside' as const }], ['cell_missing Estimates!P3']],
    [[FORMING, { ...FORMING, scrapAllowancePercent: '4.00' }], ['value_differs Estimates!Q3']],
    [[{ ...FORMING, marginPercent: '100.00' }], ['percent_too_large Estimates!R2']],
  ])('names the cell of an estimate: %#', async (estimates, problems) => {
    expect(await shop.refuse({ ...COSTS, estimates })).toEqual(problems);
  });

  it('names the cell of the issue that lacks stock, and what lot is missing', async () => {
    const issues = [ISSUE, { ...ISSUE, pieces: null, weightKg: '300', note: 'All of it' }];
    expect(await shop.refuse({ ...COSTS, issues, estimates: [] })).toEqual(['stock_short Issues!I3']);
    const [message] = await tell({ issues, estimates: [] });
    expect(message).toMatch(
      /Receive the missing lot of at least [\d.]+\slb of 11 ga hot-rolled, dated on or before/,
    );
    const early = {
      ...ISSUE,
      pieces: null,
      sheets: 1,
      blankLengthMm: '508',
      date: toLocalDate('2026-02-02'),
    };
    expect(await shop.refuse({ ...COSTS, issues: [early], estimates: [] })).toEqual([
      'stock_short Issues!E2',
    ]);
  });

  it('names the cell of a return that gives back more than was drawn', async () => {
    const issues = [ISSUE, { ...RETURN, weightKg: '900' }];
    expect(await shop.refuse({ ...COSTS, issues, estimates: [] })).toEqual(['over_returned Issues!I3']);
  });

  it('names what takes the stock from an issue that is there', async () => {
    const own = await createSetupShop();
    const later = { ...ISSUE, date: toLocalDate('2026-03-05'), pieces: null, weightKg: '270' };
    await own.take({ ...COSTS, issues: [later], estimates: [] });
    const backdated = { ...ISSUE, weightKg: '100' };
    expect(await own.refuse({ ...COSTS, issues: [backdated], estimates: [] })).toEqual([
      'stock_short Issues!I2',
    ]);
    expect(
      await own.refuse({ ...COSTS, issues: [], estimates: [], sheetLots: [{ ...LOT, weightKg: '100' }] }),
    ).toEqual(['stock_short Sheet lots!H2']);
    expect(await own.refuse({ jobs: [{ ...GUARDS, openedOn: toLocalDate('2026-03-06') }] })).toEqual([
      'before_job Jobs!E2',
    ]);
    await own.close();
  });
});
