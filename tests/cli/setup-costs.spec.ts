import { toLocalDate } from '@brakeven/values';
import {
  type SetupData,
  type SetupEstimateLine,
  type SetupIssue,
  writeSetupWorkbook,
} from '@brakeven/workbook';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { SETUP } from '../fixtures/first-week';
import { runJson } from './run-cli';

jest.setTimeout(120_000);

let shop: TestShop;
let folder: string;
beforeAll(async () => {
  shop = await createTestShop();
  folder = await mkdtemp(join(tmpdir(), 'brakeven-costs-'));
});
afterAll(async () => {
  await rm(folder, { recursive: true });
  await shop.close();
});

const march = (day: number) => toLocalDate(`2024-03-${String(day).padStart(2, '0')}`);
const material = '11 ga hot-rolled';
const lot = (number: string, day: number, weightKg: string, cost: string, freight: string) => ({
  ...{ lot: number, material, receivedOn: march(day), vendor: null, weightKg, cost, freight },
  ...{ sheets: null, sheetLengthMm: null, sheetWidthMm: null },
});
const move = (kind: SetupIssue['kind'], day: number, weightKg: string): SetupIssue => ({
  ...{ date: march(day), job: 'J-100', material, kind, weightKg, note: null },
  ...{ sheets: null, pieces: null, blankLengthMm: null, blankWidthMm: null },
});
const estimateLine = (
  line: Pick<SetupEstimateLine, 'kind'> & Partial<SetupEstimateLine>,
): SetupEstimateLine => ({
  ...{ job: 'J-100', estimatedOn: null, operation: null, machine: null, setupHours: null },
  ...{ minutesPerPiece: null, pieces: null, labourRate: null, machineHourRate: null, overheadRate: null },
  ...{ material: null, weightKg: null, pricePerKg: null, description: null, amount: null },
  ...{ scrapAllowancePercent: null, marginPercent: null, ...line },
});
const COATING = { date: march(6), job: 'J-100', vendor: 'Fernside', description: 'Coat', amount: '75.50' };
const INVOICE = { number: '7', date: march(12), job: 'J-100', kind: 'invoice', description: null } as const;

const COSTS: Partial<SetupData> = {
  ...SETUP,
  materials: [
    {
      ...{ name: material, grade: 'A1011', form: 'sheet', thickness: '11 ga', densityKgM3: '7850' },
      ...{ tensileStrengthMpa: null, recoveryPricePerKg: null },
    },
  ],
  sheetLots: [lot('L-1', 1, '100', '180.00', '20.00'), lot('L-2', 6, '50', '150.00', '10.00')],
  issues: [move('issue', 5, '30'), move('issue', 7, '20'), move('return', 8, '4')],
  outsideServices: [COATING, COATING],
  invoices: [
    { ...INVOICE, amount: '900.00' },
    { ...INVOICE, kind: 'credit-note', date: march(20), amount: '45.25' },
  ],
  estimates: [
    estimateLine({
      ...{
        kind: 'operation',
        estimatedOn: march(6),
        operation: 'FORM',
        setupHours: '0.5',
        minutesPerPiece: '10',
      },
      scrapAllowancePercent: '5',
    }),
    estimateLine({ kind: 'material', material, weightKg: '50' }),
    estimateLine({ kind: 'outside', amount: '150.00' }),
  ],
};
const ROWS = { materials: 1, sheetLots: 2, issues: 3, outsideServices: 2, invoices: 2, estimates: 3 };

async function importSetup(data: Partial<SetupData>, ...more: string[]) {
  const path = join(folder, 'setup.xlsx');
  await writeFile(path, await writeSetupWorkbook(data, { units: 'metric' }));
  return runJson('setup', 'import', path, '--shop', shop.shop.name, ...more);
}
const costOf = async (job: string) => (await runJson('jobs', 'cost', job, '--shop', shop.shop.name)).json;

describe('a shop set up from a workbook with all sheets', () => {
  it('refuses an issue that no lot covers, by cell, and writes nothing', async () => {
    const short = { ...COSTS, issues: [move('issue', 5, '30'), move('issue', 7, '500')] };
    for (const more of [['--check'], []]) {
      const { code, json } = await importSetup(short, ...more);
      expect(code).toBe(1);
      expect(json).toMatchObject({ problems: [{ code: 'stock_short', sheet: 'Issues', cell: 'I3' }] });
    }
    const jobs = await runJson<{ jobs: object[] }>('jobs', 'list', '--shop', shop.shop.name);
    expect(jobs.json.jobs).toEqual([]);
  });

  it('is checked, taken in, and found there', async () => {
    expect(await importSetup(COSTS, '--check')).toMatchObject({
      code: 0,
      json: { added: ROWS, problems: [] },
    });
    expect(await importSetup(COSTS)).toMatchObject({ code: 0, json: { added: ROWS, problems: [] } });
    const again = await importSetup(COSTS);
    expect(again).toMatchObject({ code: 0, json: { added: { issues: 0 }, alreadyThere: ROWS } });
  });

  /**
   * By hand: 200 for 100 kg make 2.00; 30 kg are 60.00. 140 + 160 for 120 kg make 2.50: 20 kg are 50.00, and 4 kg
   * come back for 10.00. Estimate: 0.5 h + 12 × 10 min × 1.05 = 2.6 h at (28.50 × 1.22 + 31.125 × 1.25) ÷ 2 =
   * 36.838125, 18.00 and 12.00; 50 kg × 1.05 at 2.50.
   */
  it('costs its job to the cent, beside the estimate', async () => {
    expect(await costOf('J-100')).toMatchObject({
      ...{ labour: '0.00', overtime: '0.00', machine: '0.00', overhead: '0.00' },
      ...{ material: '100.00', outside: '151.00', total: '251.00', invoiced: '854.75', margin: '603.75' },
      marginIsProvisional: true,
      estimate: {
        ...{ hours: '2.6000', labour: '95.78', overtime: '0.00', machine: '46.80', overhead: '31.20' },
        ...{ material: '131.25', outside: '150.00', total: '455.03' },
      },
    });
  });

  /** 460 for 200 kg make 2.30: 69.00. 391 + 160 for 220 kg: 20 kg are 50.09, 4 kg of 500.91 for 200 kg 10.02. */
  it('values again what followed a lot whose papers came late', async () => {
    const late = { sheetLots: [lot('L-3', 4, '100', '260.00', '0')] };
    expect(await importSetup(late)).toMatchObject({ code: 0, json: { added: { sheetLots: 1 } } });
    expect(await costOf('J-100')).toMatchObject({ material: '109.07', estimate: { material: '131.25' } });
  });
});
