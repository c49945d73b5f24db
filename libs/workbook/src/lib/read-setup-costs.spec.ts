import { type LocalDate } from '@brakeven/values';
import { readFixture } from '../../testing/fixture-file';
import { readSetupWorkbook } from './read-setup-workbook';
import { readSheets } from './read-sheets';
import { type SetupData, type SetupFile } from './setup-data';
import { writeSetupWorkbook } from './write-setup-workbook';

jest.setTimeout(60_000);

const day = (text: string) => text as LocalDate;
const read = async (path: string): Promise<SetupFile> =>
  readSetupWorkbook(await readFixture(path), { units: 'us' });
const toWords = ({ problems }: SetupFile) =>
  problems.map(({ severity, code, sheet, cell }) => `${severity} ${code} ${sheet} ${cell}`);
const bare = (rows: readonly object[]) => rows.map((row) => ({ ...row, row: undefined, cells: undefined }));

describe.each(['ok/setup-costs.xlsx', 'ok/setup-costs-libreoffice.xlsx'])('%s', (path) => {
  let setup: SetupFile;
  beforeAll(async () => (setup = await read(path)));

  it('has nothing wrong with it', () => expect(setup.problems).toEqual([]));

  it('states materials with the units of headers and cells, thicknesses as written', () => {
    const [rolled, plate, rod, shim] = setup.materials;
    expect(rolled).toMatchObject({ grade: 'A1011', form: 'sheet', thickness: '11 GA', densityKgM3: '7850' });
    // 60 ksi of 6.894757 MPa (NIST SP 811, appendix B).
    expect(rolled?.tensileStrengthMpa).toMatch(/^413\.685/);
    expect(rolled?.recoveryPricePerKg).toBe('0.25');
    expect(plate).toMatchObject({ form: 'plate', thickness: '3/16', recoveryPricePerKg: null });
    expect(plate?.densityKgM3).toMatch(/^2767\.990/);
    expect([rod?.thickness, shim?.thickness]).toEqual(['12 mm', '0.0625 in']);
  });

  it('states lots and issues in kilograms and millimetres', () => {
    expect(setup.sheetLots).toMatchObject([
      {
        lot: 'L-1',
        sheets: 12,
        sheetLengthMm: '3048',
        sheetWidthMm: '1219.2',
        weightKg: null,
        freight: null,
      },
      { lot: '118', receivedOn: '2026-02-04', cost: '33.33', vendor: null, sheetLengthMm: null },
    ]);
    // 220.46 lb of 0.45359237 kg, exactly.
    expect(setup.sheetLots[1]?.weightKg).toBe('99.9989738902');
    expect(setup.issues).toMatchObject([
      { kind: 'issue', pieces: 24, blankLengthMm: '470', blankWidthMm: '234.95', weightKg: null },
      { kind: 'return', pieces: null, weightKg: '5.669904625', note: 'Remnant', sheets: null },
    ]);
  });

  it('states outside services and invoices, a credit note above 0', () => {
    expect(setup.outsideServices).toMatchObject([{ job: '2041', vendor: null, amount: '412.01' }]);
    expect(setup.invoices).toMatchObject([
      { number: '7731', kind: 'invoice', amount: '5400.00' },
      { number: '7731', kind: 'credit-note', amount: '120.00' },
    ]);
  });

  it('states the lines of an estimate, set-up hours as a duration', () => {
    expect(setup.estimates).toMatchObject([
      {
        ...{ job: '2041', kind: 'operation', operation: 'FORM', estimatedOn: '2026-01-28' },
        ...{ setupHours: '1.5000', minutesPerPiece: '2.5', labourRate: '36.48', pieces: null },
        ...{ scrapAllowancePercent: '3.00', marginPercent: null },
      },
      // 0.72 a pound ÷ 0.45359237 = 1.587328… a kilogram.
      { kind: 'material', pricePerKg: '1.587328', marginPercent: '18.00', estimatedOn: null },
      { kind: 'outside', description: 'Powder coat', amount: '400.00' },
    ]);
  });
});

describe('cells that cannot be read', () => {
  it.each([
    ['fraction-became-date', 'refused thickness_unreadable Materials B2', 'Spreadsheets turn 3/16 into one'],
    ['gauge-without-ga', 'refused thickness_unclear Materials B2', 'Write 11 ga if it is a gauge'],
    ['invoice-below-zero', 'refused amount_negative Invoices D2', 'credit note as its kind'],
    ['price-per-foot', 'refused unit_unknown Materials B1', 'Use per lb or per kg'],
  ])('not-ok/setup-%s.xlsx', async (name, problem, advice) => {
    const setup = await read(`not-ok/setup-${name}.xlsx`);
    expect(toWords(setup)).toEqual([problem]);
    expect(setup.problems[0]?.message).toContain(advice);
    expect([setup.materials, setup.invoices]).toEqual([[], []]);
  });

  it('are refused where they are 0 and should not be', async () => {
    const setup = await read('not-ok/setup-costs-noughts.xlsx');
    expect(toWords(setup)).toEqual([
      'refused count_unreadable Sheet lots D2',
      'refused length_unreadable Sheet lots E2',
      'refused weight_unreadable Sheet lots F2',
      'refused amount_zero Sheet lots G2',
      'refused count_unreadable Issues D2',
      'refused weight_unreadable Issues E2',
      'refused amount_zero Outside services C2',
      'refused amount_zero Invoices D2',
      'refused count_unreadable Estimates C2',
      'refused amount_zero Estimates D2',
    ]);
    const counts = setup.problems.filter(({ code }) => code === 'count_unreadable');
    expect(counts.filter(({ message }) => !message.includes('a whole number above 0'))).toEqual([]);
  });
});

describe('written sheets', () => {
  const data: Partial<SetupData> = {
    materials: [
      {
        ...{ name: '11 ga hot-rolled', grade: 'A1011', form: 'sheet', thickness: '11 ga' },
        ...{ densityKgM3: '7850', tensileStrengthMpa: '414', recoveryPricePerKg: '0.25' },
      },
      {
        ...{ name: 'Tread plate', grade: null, form: null, thickness: '3/16' },
        ...{ densityKgM3: null, tensileStrengthMpa: null, recoveryPricePerKg: null },
      },
    ],
    sheetLots: [
      {
        ...{
          lot: '0118',
          material: '11 ga hot-rolled',
          receivedOn: day('2026-02-03'),
          vendor: 'Millrace Steel',
        },
        ...{ sheets: 12, sheetLengthMm: '3048', sheetWidthMm: '1219.2', weightKg: '1060.5' },
        ...{ cost: '1684.80', freight: '95.00' },
      },
    ],
    issues: [
      {
        ...{
          date: day('2026-02-05'),
          job: '2041',
          material: '11 ga hot-rolled',
          kind: 'return',
          note: 'Rest',
        },
        ...{ sheets: 2, pieces: 24, blankLengthMm: '469.9', blankWidthMm: '234.95', weightKg: '12.5' },
      },
    ],
    punches: [
      {
        ...{ machine: 'P2', punch: 'Sharp', noseRadiusMm: '0', angle: '88.5' },
        ...{ lengthMm: '835', forceLimitKnPerM: '600' },
      },
    ],
    dies: [
      {
        ...{ machine: 'P2', die: 'Block', openingMm: '25.4', angle: null, shoulderRadiusMm: '2.5' },
        ...{ lengthMm: null, forceLimitKnPerM: '583.756' },
      },
    ],
    outsideServices: [
      {
        date: day('2026-02-19'),
        job: '2041',
        vendor: 'Fernside',
        description: 'Powder coat',
        amount: '412.00',
      },
    ],
    invoices: [
      {
        ...{ number: '7731', date: day('2026-03-02'), job: '2041', kind: 'credit-note' },
        ...{ description: null, amount: '120.00' },
      },
    ],
    estimates: [
      {
        ...{
          job: '2041',
          estimatedOn: day('2026-01-28'),
          kind: 'operation',
          operation: 'FORM',
          machine: 'P2',
        },
        ...{ setupHours: '0.7500', minutesPerPiece: '2.5', pieces: 24, labourRate: '36.48' },
        ...{ machineHourRate: '34.00', overheadRate: '18.00', material: null, weightKg: null },
        ...{ pricePerKg: null, description: null, amount: null },
        ...{ scrapAllowancePercent: '3.00', marginPercent: '18.00' },
      },
    ],
  };

  // Weights, lengths and densities go through the shop's unit; what comes back differs by less than is kept.
  const toKept = (setup: Partial<SetupData>) =>
    JSON.parse(
      JSON.stringify(setup, (key, value) =>
        typeof value === 'string' && /(?:Kg|Mm|Mpa|KgM3|PerM)$/.test(key)
          ? Number(value).toFixed(key === 'pricePerKg' ? 6 : 3)
          : (value as unknown),
      ),
    ) as unknown;

  it.each(['us', 'metric'] as const)('come back as they were written (%s units)', async (units) => {
    const bytes = await writeSetupWorkbook(data, { units });
    const setup = readSetupWorkbook(await readSheets({ name: 'setup.xlsx', bytes }), { units });
    expect(setup.problems).toEqual([]);
    const back = Object.fromEntries(
      (Object.keys(data) as (keyof SetupData)[]).map((list) => [list, bare(setup[list])]),
    );
    expect(toKept(back)).toEqual(toKept(data));
  });
});
