import { readFixture } from '../../testing/fixture-file';
import { readSetupWorkbook } from './read-setup-workbook';
import { readSheets } from './read-sheets';
import { type SetupData, type SetupFile } from './setup-data';
import { writeSetupTemplate, writeSetupWorkbook } from './write-setup-workbook';
import { type LocalDate } from '@brakeven/values';

jest.setTimeout(60_000);

/** The lists without the places they came from. */
function toData({ problems: _problems, ...lists }: SetupFile): SetupData {
  const bare = Object.entries(lists).map(([list, rows]) => [
    list,
    rows.map(({ row: _row, cells: _cells, ...values }) => values),
  ]);
  return Object.fromEntries(bare) as SetupData;
}

async function readBytes(bytes: Uint8Array, units: 'us' | 'metric' = 'us'): Promise<SetupFile> {
  return readSetupWorkbook(await readSheets({ name: 'setup.xlsx', bytes }), { units });
}

/** The sheets that read-setup-costs.spec.ts is about. */
const NO_COSTS = {
  punches: [],
  dies: [],
  materials: [],
  sheetLots: [],
  issues: [],
  outsideServices: [],
  invoices: [],
  estimates: [],
};
const HARBOR = 'Harbor Lane Conveyors';
const day = (text: string) => text as LocalDate;

describe('a filled set-up workbook', () => {
  it.each(['ok/setup-full.xlsx', 'ok/setup-full-libreoffice.xlsx'])(
    '%s: columns in any order, units from headers and cells',
    async (path) => {
      const setup = readSetupWorkbook(await readFixture(path), { units: 'us' });
      expect(toData(setup)).toEqual({
        ...NO_COSTS,
        people: [
          // 0.28 in a cell formatted as percent means 28 %.
          {
            number: '101',
            name: 'Mara Quill',
            rateFrom: '2026-01-01',
            wagePerHour: '28.50',
            burdenPercent: '28.00',
          },
          {
            number: '101',
            name: 'Mara Quill',
            rateFrom: '2026-03-02',
            wagePerHour: '30.00',
            burdenPercent: '28.125',
          },
          { number: 'O-1', name: 'Office', rateFrom: null, wagePerHour: null, burdenPercent: null },
        ],
        customers: [{ name: HARBOR }],
        operations: [
          { code: 'FORM', name: 'Forming', machine: 'P2' },
          { code: 'WELD', name: 'Welding', machine: null },
        ],
        machines: [
          {
            code: 'P1',
            name: 'Press 1',
            kind: 'Press brake',
            inServiceOn: '1988-05-02',
            // 25 US tons-force of 8.896443230521 kN (NIST SP 811, appendix B).
            ratedForceKn: '222.411080763025',
            bedLengthMm: '1250',
          },
          {
            code: 'P2',
            name: 'Press 2',
            kind: 'Press brake',
            inServiceOn: '2026-02-02',
            ratedForceKn: '533.8',
            bedLengthMm: '1828.8',
          },
        ],
        machineCosts: [
          { machine: 'P2', date: '2026-01-19', kind: 'price', description: 'The press', amount: '48250.00' },
          { machine: 'P2', date: '2026-01-20', kind: 'freight', description: null, amount: '483.33' },
        ],
        machineRates: [
          {
            machine: 'P2',
            validFrom: '2026-02-02',
            machineHourRate: '34.00',
            chargeOutRate: '95.00',
            runningCostPerHour: '6.125',
          },
        ],
        overhead: [{ validFrom: '2026-01-01', ratePerLabourHour: '18.00' }],
        jobs: [
          {
            number: '2041',
            customer: HARBOR,
            title: 'Conveyor guards',
            quantity: 24,
            openedOn: '2026-02-03',
            dueOn: null,
            quotedPrice: '5400.00',
            isBillable: true,
            status: 'open',
          },
          {
            number: '2042',
            customer: null,
            title: null,
            quantity: null,
            openedOn: null,
            dueOn: null,
            quotedPrice: null,
            isBillable: false,
            status: 'finished',
          },
        ],
      });
      expect(setup.people[1]).toMatchObject({ row: 4, cells: { number: 'D4', wagePerHour: 'B4' } });
    },
  );

  it('passes over what is not part of it, saying so', async () => {
    const { problems } = readSetupWorkbook(await readFixture('ok/setup-full.xlsx'), { units: 'us' });
    expect(problems.map(({ code, severity, sheet, cell }) => [code, severity, sheet, cell])).toEqual([
      ['column_unknown', 'warning', ' people ', 'F2'],
      ['sheet_unknown', 'warning', 'Ideas', 'A1'],
    ]);
  });

  it('refuses each row that cannot be read whole, by cell', async () => {
    const setup = readSetupWorkbook(await readFixture('not-ok/setup-problems.xlsx'), { units: 'us' });
    expect(
      setup.problems.map(({ severity, code, sheet, cell }) => `${severity} ${code} ${sheet} ${cell}`),
    ).toEqual([
      'refused amount_negative People D2',
      'refused date_unreadable People C3',
      'refused amount_unreadable People D3',
      'refused cell_missing People E3',
      'refused cell_missing People B4',
      'warning percent_small People E5',
      'refused row_twice People A6',
      'refused column_missing Customers A1',
      'refused unit_unknown Machines C1',
      'refused choice_unknown Machine costs C2',
      'refused cell_error Machine costs D3',
      'refused cell_missing Machine costs B3',
      'warning column_unknown Jobs E1',
      'refused yes_no_unreadable Jobs B2',
      'refused count_unreadable Jobs C2',
      'refused choice_unknown Jobs D2',
      'refused count_unreadable Jobs C3',
      'refused cell_missing Jobs B3',
    ]);
    expect(toData(setup)).toMatchObject({
      people: [{ number: '104' }],
      customers: [],
      machines: [],
      jobs: [],
    });
  });
});

describe('written set-up workbooks', () => {
  const data: Partial<SetupData> = {
    people: [
      {
        number: '0101',
        name: 'Mara Quill',
        rateFrom: day('2026-01-01'),
        wagePerHour: '28.123456',
        burdenPercent: '28.125',
      },
      { number: 'O-1', name: 'Office', rateFrom: null, wagePerHour: null, burdenPercent: null },
    ],
    customers: [{ name: HARBOR }],
    operations: [{ code: 'FORM', name: 'Forming', machine: 'P2' }],
    machines: [
      {
        code: 'P2',
        name: 'Press 2',
        kind: 'Press brake',
        inServiceOn: day('2026-02-02'),
        ratedForceKn: '533.78659383126',
        bedLengthMm: '1828.8',
      },
      { code: 'S1', name: 'Saw', kind: null, inServiceOn: null, ratedForceKn: null, bedLengthMm: null },
    ],
    machineCosts: [
      { machine: 'P2', date: day('2026-01-19'), kind: 'price', description: 'The press', amount: '48250.00' },
    ],
    machineRates: [
      {
        machine: 'P2',
        validFrom: day('2026-02-02'),
        machineHourRate: '34.00',
        chargeOutRate: '95.00',
        runningCostPerHour: '6.125',
      },
    ],
    overhead: [{ validFrom: day('2026-01-01'), ratePerLabourHour: '18.00' }],
    jobs: [
      {
        number: '2041',
        customer: HARBOR,
        title: 'Conveyor guards',
        quantity: 24,
        openedOn: day('2026-02-03'),
        dueOn: null,
        quotedPrice: '5400.10',
        isBillable: true,
        status: 'invoiced',
      },
    ],
  };

  it.each(['us', 'metric'] as const)('come back as they were written (%s units)', async (units) => {
    const setup = await readBytes(await writeSetupWorkbook(data, { units }), units);
    expect(setup.problems).toEqual([]);
    expect(toData(setup)).toEqual({ ...NO_COSTS, ...data });
  });

  it('an untouched template states nothing and has nothing wrong with it', async () => {
    const setup = await readBytes(await writeSetupTemplate());
    expect(setup.problems).toEqual([]);
    expect(Object.values(toData(setup)).flat()).toEqual([]);
  });

  it('the template explains every column, with the units it asks for', async () => {
    const bytes = await writeSetupTemplate({ units: 'metric' });
    const { sheets } = await readSheets({ name: 'template.xlsx', bytes });
    expect(sheets.map(({ name }) => name)).toEqual([
      'How to fill this in',
      'People',
      'Customers',
      'Operations',
      'Machines',
      'Machine costs',
      'Machine rates',
      'Overhead',
      'Jobs',
      'Punches',
      'Dies',
      'Materials',
      'Sheet lots',
      'Issues',
      'Outside services',
      'Invoices',
      'Estimates',
    ]);
    const explained = new Set(sheets[0]?.rows.flatMap(({ cells }) => cells.map(({ text }) => text)));
    const headers = sheets.slice(1).flatMap(({ rows }) => rows[0]?.cells.map(({ text }) => text) ?? []);
    expect(headers).toEqual(
      expect.arrayContaining([
        ...['Burden %', 'Rated force (kN)', 'Bed length (mm)', 'Billable', 'Density (kg/m³)'],
        ...['Recovery price per kg', 'Price per kg', 'Weight (kg)', 'Thickness or gauge (mm)'],
      ]),
    );
    // 60 US tons, 72 in and 0.2836 lb/in³, to four digits.
    for (const example of ['533.8', '1829', '7850']) expect(explained).toContain(example);
    for (const header of headers) {
      expect([...explained].some((text) => text === header || text === `${header} (optional)`)).toBe(true);
    }
  });
});

it('takes columns without a unit in the units of the shop', async () => {
  const bytes = await writeSetupTemplate();
  const file = await readSheets({ name: 'setup.xlsx', bytes });
  const machines = file.sheets.map((sheet) =>
    sheet.name === 'Machines'
      ? {
          ...sheet,
          rows: [
            textRow(1, ['Code', 'Name', 'Rated force', 'Bed length']),
            textRow(2, ['P2', 'Press 2', '60', '72']),
          ],
        }
      : sheet,
  );
  const read = (units: 'us' | 'metric') =>
    readSetupWorkbook({ ...file, sheets: machines }, { units }).machines[0];
  expect(read('us')).toMatchObject({ ratedForceKn: '533.78659383126', bedLengthMm: '1828.8' });
  expect(read('metric')).toMatchObject({ ratedForceKn: '60', bedLengthMm: '72' });
});

function textRow(row: number, texts: readonly string[]) {
  const cells = texts.map((text, index) => ({
    address: `${'ABCD'[index]}${row}`,
    kind: 'text' as const,
    value: text,
    text,
    hasFormula: false,
  }));
  return { row, cells };
}
