import { type SetupResult, type SetupSheet } from '@brakeven/contract';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { toLocalDate } from '@brakeven/values';
import { createReader, type SetupData, writeSetupWorkbook } from '@brakeven/workbook';
import { type UploadedFile } from '../../import-timesheet/upload';
import { checkSetup, importSetup } from '../import-setup';

// Each test makes a shop of its own on a real database, next to other suites.
jest.setTimeout(30_000);

export const JANUARY = toLocalDate('2026-01-01');
export const FEBRUARY = toLocalDate('2026-02-01');

export const DANA = {
  number: '12',
  name: 'Dana Quill',
  rateFrom: JANUARY,
  wagePerHour: '28.50',
  burdenPercent: '28.00',
};
export const PRICE = {
  machine: 'P2',
  date: JANUARY,
  kind: 'price',
  description: 'Press',
  amount: '41500.00',
} as const;
export const PRESS_RATE = {
  machine: 'P2',
  validFrom: FEBRUARY,
  machineHourRate: '34.00',
  chargeOutRate: '95.00',
  runningCostPerHour: '6.50',
};
export const GUARDS = {
  number: 'J-1041',
  customer: 'Harbor Lane Conveyors',
  title: 'Conveyor guards',
  quantity: 24,
  openedOn: FEBRUARY,
  dueOn: null,
  quotedPrice: '5400.00',
  isBillable: true,
  status: 'open' as const,
};
export const DATA = {
  people: [
    DANA,
    { ...DANA, rateFrom: FEBRUARY, wagePerHour: '29.25' },
    { number: '14', name: 'Ivo Marsh', rateFrom: JANUARY, wagePerHour: '24.00', burdenPercent: '0.00' },
  ],
  customers: [{ name: 'Harbor Lane Conveyors' }],
  operations: [
    { code: 'FORM', name: 'Forming', machine: 'P2' },
    { code: 'WELD', name: 'Welding', machine: null },
  ],
  machines: [
    {
      code: 'P2',
      name: 'Press 2',
      kind: 'Press brake',
      inServiceOn: FEBRUARY,
      ratedForceKn: '533.786592',
      bedLengthMm: '1828.8',
    },
  ],
  machineCosts: [
    PRICE,
    { machine: 'P2', date: JANUARY, kind: 'rigging', description: 'Crane', amount: '900.00' },
    { machine: 'P2', date: JANUARY, kind: 'rigging', description: 'Crane', amount: '1100.00' },
  ],
  machineRates: [PRESS_RATE],
  overhead: [{ validFrom: JANUARY, ratePerLabourHour: '18.00' }],
  jobs: [GUARDS],
} satisfies Partial<SetupData>;
export const COUNTS = {
  people: 3,
  customers: 1,
  operations: 2,
  machines: 1,
  machineCosts: 3,
  machineRates: 1,
  overhead: 1,
  jobs: 1,
  punches: 0,
  dies: 0,
  materials: 0,
  sheetLots: 0,
  issues: 0,
  outsideServices: 0,
  invoices: 0,
  estimates: 0,
};
export const NONE = Object.fromEntries(Object.keys(COUNTS).map((sheet) => [sheet, 0])) as Record<
  SetupSheet,
  number
>;

/** Sheets that state nothing. */
export const NOTHING: SetupData = {
  people: [],
  customers: [],
  operations: [],
  machines: [],
  machineCosts: [],
  machineRates: [],
  overhead: [],
  jobs: [],
  punches: [],
  dies: [],
  materials: [],
  sheetLots: [],
  issues: [],
  outsideServices: [],
  invoices: [],
  estimates: [],
};

/** An empty shop to be set up; what a workbook leaves out of the usual data is replaced. */
export interface SetupShop extends TestShop {
  tools: { reader: ReturnType<typeof createReader> };
  toFile(data?: Partial<SetupData>): Promise<UploadedFile>;
  take(data?: Partial<SetupData>): Promise<SetupResult>;
  check(data?: Partial<SetupData>): Promise<SetupResult>;
  /** Imports what must be refused, sees that nothing was written, and gives 'code sheet!cell' of each problem. */
  refuse(data: Partial<SetupData>): Promise<string[]>;
  countEvents(): Promise<number>;
}

export async function createSetupShop(): Promise<SetupShop> {
  const shop = await createTestShop();
  const tools = { reader: createReader() };
  const countEvents = async () =>
    (await shop.inShop((trx) => trx.selectFrom('auditEvent').select('eventId').execute())).length;
  const take = async (data?: Partial<SetupData>) =>
    importSetup(shop.context(), await toFile(data), {}, tools);
  return {
    ...shop,
    tools,
    toFile,
    take,
    check: async (data) => checkSetup(shop.context(), await toFile(data), {}, tools),
    countEvents,
    refuse: async (data) => {
      const before = await countEvents();
      const error = await take(data).catch((refusal: unknown) => refusal);
      expect(error).toMatchObject({ code: 'setup_refused' });
      expect(await countEvents()).toBe(before);
      const { problems } = (error as { details: SetupResult }).details;
      return problems.map(({ code, sheet, cell }) => `${code} ${sheet}!${cell}`);
    },
  };
}

async function toFile(data: Partial<SetupData> = {}): Promise<UploadedFile> {
  const bytes = await writeSetupWorkbook({ ...DATA, ...data }, { units: 'us' });
  return { name: 'set-up.xlsx', bytes: new Uint8Array(bytes) };
}
