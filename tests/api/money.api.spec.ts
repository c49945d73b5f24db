import { type Endpoint, ENDPOINTS, FIGURES, hasPermission, type Role } from '@brakeven/contract';
import { importSetup, importTimesheet, createReader } from '@brakeven/use-cases';
import { writeSetupWorkbook, writeTimesheetWorkbook } from '@brakeven/workbook';
import { SETUP, WEEK } from '../fixtures/first-week';
import { startTestApi, type TestApi, type Visitor } from './test-api';

/** Names that only money goes by; `machine` and `material` are names elsewhere, and `amount` may be hours. */
const MONEY_NAMES = [
  'wagePerHour',
  'burdenPercent',
  'ratePerLabourHour',
  'machineHourRate',
  'chargeOutRate',
  'runningCostPerHour',
  'labour',
  'overhead',
  'total',
  'quotedPrice',
  'outlay',
  'costItems',
  'earned',
  'running',
  'runningCost',
  'earnedBack',
  'remaining',
  'overtime',
  'outside',
  'invoiced',
  'margin',
  'workInProgress',
  'variance',
];
/** What is no money whatever its decimals: hours of a setting, and quantities that say their unit. */
const QUANTITY_NAME = /^(overtimeThresholdHours|radiusPerOpening|\w+(Mm|Mpa|Kn|KnPerM))$/;
/** Money and rates are the only texts that are a number with two, three, five or six decimals. */
const MONEY_TEXT = /^-?\d+\.(\d{2}|\d{3}|\d{5,6})$/;

let api: TestApi;
beforeAll(async () => {
  api = await startTestApi();
  const context = api.shop.context();
  const tools = { reader: createReader() };
  const toFile = (name: string, bytes: Uint8Array) => ({ name, bytes });
  await importSetup(context, toFile('s.xlsx', await writeSetupWorkbook(SETUP, { units: 'us' })), {}, tools);
  await addMoneyOnJob();
  await addTools();
  const week = await writeTimesheetWorkbook({ title: 'Week 10', rows: WEEK });
  await importTimesheet(context, toFile('w.xlsx', week), {}, tools);
});
afterAll(() => api.close());

/** Everything that a role can read, each endpoint with the ids and figures of what is there. */
async function readEverything(role: Role): Promise<{ name: string; answer: unknown }[]> {
  const visitor = await api.signIn(role);
  const ids = await findIds();
  const answers = [];
  for (const [name, definition] of Object.entries<Endpoint>(ENDPOINTS)) {
    if (!isReadable(definition, role)) continue;
    for (const query of listQueries(name, definition, ids)) {
      const path = definition.path.replace(/:(\w+)/g, (_, id: string) => ids[id] ?? 'no such id');
      answers.push(await read(visitor, name, path + query));
    }
  }
  return answers;
}

async function read(visitor: Visitor, name: string, path: string) {
  const response = await visitor.send('get', path);
  expect([path, response.status]).toEqual([path, 200]);
  return { name: `${name} ${path}`, answer: response.body as unknown };
}

function isReadable({ method, permission, response }: Endpoint, role: Role): boolean {
  const isJson = response !== null && typeof response !== 'string';
  return method === 'get' && isJson && permission !== null && hasPermission(role, permission);
}

function listQueries(name: string, { query }: Endpoint, ids: Record<string, string>): string[] {
  const workings: Record<string, [(figure: string) => boolean, string[]]> = {
    getJobWorkings: [(figure) => figure.startsWith('job.'), ['jobId']],
    getJobHoursWorkings: [(figure) => ['job.hours', 'job.machineHours'].includes(figure), ['jobId']],
    getPaybackWorkings: [(figure) => figure.startsWith('payback.'), ['machineId', 'costItemId']],
    getOvertimeWorkings: [(figure) => figure.startsWith('overtime.'), ['employeeId', 'from']],
    getBooksWorkings: [(figure) => figure.startsWith('books.'), []],
    getHoursWorkings: [(figure) => READABLE_HOURS.includes(figure), ['employeeId', 'from', 'to']],
    getStockWorkings: [(figure) => figure.startsWith('stock.'), ['materialId', 'issueId']],
    getEstimateWorkings: [(figure) => figure.startsWith('estimate.'), ['jobId']],
  };
  const found = workings[name];
  if (found) {
    const [isMeant, names] = found;
    const given: Record<string, string> = { ...ASKED, ...ids };
    const of = new URLSearchParams(names.map((one) => [one, given[one] ?? ''])).toString();
    return FIGURES.filter(isMeant).map((figure) => `?figure=${figure}&${of}`);
  }
  // One query that holds what any of them may ask for; each takes its own part.
  const isAsked = query !== undefined && !query.safeParse({}).success;
  return [isAsked ? `?${new URLSearchParams({ ...ids, ...ASKED }).toString()}` : ''];
}

/** Payroll hours, and so their difference, are there once somebody has entered them. */
const READABLE_HOURS = ['hours.timesheets', 'hours.overtime', 'hours.costed'];

const ASKED = {
  row: '5',
  page: 'jobs',
  rates: 'today',
  from: '2024-03-01',
  to: '2024-03-31',
  on: '2024-03-31',
  month: '2024-03',
};

async function findIds(): Promise<Record<string, string>> {
  return api.shop.inShop(async (trx) => {
    const machine = await trx.selectFrom('machine').select('machineId').executeTakeFirstOrThrow();
    const job = await trx
      .selectFrom('job')
      .select('jobId')
      .where('number', '=', 'J-100')
      .executeTakeFirstOrThrow();
    const sheet = await trx
      .selectFrom('timesheetImport')
      .select(['importId', 'sheet'])
      .executeTakeFirstOrThrow();
    const item = await trx
      .selectFrom('machineCostItem')
      .select('machineCostItemId as costItemId')
      .executeTakeFirstOrThrow();
    const employee = await trx.selectFrom('employee').select('employeeId').executeTakeFirstOrThrow();
    const issue = await trx
      .selectFrom('materialIssue')
      .select(['materialId', 'issueId'])
      .executeTakeFirstOrThrow();
    const customer = await trx.selectFrom('customer').select('customerId').executeTakeFirstOrThrow();
    const punch = await trx.selectFrom('punch').select(['machineId', 'punchId']).executeTakeFirstOrThrow();
    const opening = await trx.selectFrom('dieOpening').select('dieOpeningId').executeTakeFirstOrThrow();
    const rows = {
      ...machine,
      ...job,
      ...sheet,
      ...item,
      ...employee,
      ...issue,
      ...customer,
      ...punch,
      ...opening,
      materialCode: 'mild-steel',
      fromJobId: job.jobId,
    };
    return { ...rows, from: '2024-03-04', month: '2024-03' };
  });
}

/** Material, a service and an invoice, so that there is something that must not be sent. */
async function addMoneyOnJob(): Promise<void> {
  const { shop } = api;
  const { jobId } = await shop.inShop((trx) =>
    trx.selectFrom('job').select('jobId').where('number', '=', 'J-100').executeTakeFirstOrThrow(),
  );
  const materialId = await shop.addMaterial({ name: '11 ga mild steel' });
  await shop.addLot({ materialId, receivedOn: '2024-03-01', weightKg: '100', cost: '130.05', freight: '0' });
  await shop.addIssue({ materialId, jobId, issuedOn: '2024-03-05', weightKg: '25.5' });
  await shop.addOutsideService({ jobId, incurredOn: '2024-03-06', vendor: 'Prairie Coat', amount: '75.25' });
  await shop.addInvoice({ jobId, invoicedOn: '2024-03-08', amount: '900.00' });
  const { shopId } = shop.shop;
  await shop.inShop(async (trx) => {
    await trx.insertInto('estimate').values({ shopId, jobId, estimatedOn: '2024-03-01' }).execute();
    const coat = { kind: 'outside' as const, description: 'Powder coat', amount: '80.10' };
    await trx
      .insertInto('estimateLine')
      .values({ shopId, jobId, position: 1, ...coat })
      .execute();
  });
}

/** A punch and a die on the machine, so that questions of forming have something to ask about. */
async function addTools(): Promise<void> {
  const { shop } = api;
  await shop.inShop(async (trx) => {
    const { machineId } = await trx.selectFrom('machine').select('machineId').executeTakeFirstOrThrow();
    const tool = { shopId: shop.shop.shopId, machineId, name: 'Straight' };
    await trx
      .insertInto('punch')
      .values({ ...tool, noseRadiusMm: '1.6' })
      .execute();
    const { dieId } = await trx.insertInto('die').values(tool).returning('dieId').executeTakeFirstOrThrow();
    await trx
      .insertInto('dieOpening')
      .values({ shopId: tool.shopId, dieId, openingMm: '25.4', shoulderRadiusMm: '3' })
      .execute();
  });
}

/** Paths of whatever looks like money in an answer. */
function findMoney(value: unknown, path = ''): string[] {
  if (typeof value === 'string') return MONEY_TEXT.test(value) ? [`${path} = ${value}`] : [];
  if (typeof value !== 'object' || value === null) return [];
  const entries = Object.entries(value).filter(([key]) => !QUANTITY_NAME.test(key));
  return entries.flatMap(([key, inner]) =>
    MONEY_NAMES.includes(key) ? [`${path}.${key}`] : findMoney(inner, `${path}.${key}`),
  );
}

describe.each<Role>(['lead', 'operator'])('what the %s is sent', (role) => {
  it('holds no wage and no money, whatever is asked for', async () => {
    const answers = await readEverything(role);
    expect(answers.length).toBeGreaterThan(5);
    const found = answers.flatMap(({ name, answer }) =>
      findMoney(answer).map((where) => `${name}: ${where}`),
    );
    expect(found).toEqual([]);
  });
});

describe('what the owner is sent', () => {
  it('is found to hold money by the same search, so that the search is worth something', async () => {
    const answers = await readEverything('owner');
    const names = answers
      .filter(({ answer }) => findMoney(answer).length > 0)
      .map(({ name }) => name.split(' ')[0]);
    for (const name of [
      'listEmployees',
      'listOverheadRates',
      'listMachines',
      'getMachine',
      'listJobs',
      'getJob',
      'listJobLines',
      'getPayback',
      'getJobWorkings',
      'getPaybackWorkings',
      'getStockWorkings',
    ])
      expect(names).toContain(name);
  });

  it('is costs of jobs for the bookkeeper too, but no payback and no machine', async () => {
    const answers = await readEverything('bookkeeper');
    const names = answers.map(({ name }) => name.split(' ')[0]);
    expect(names).toEqual(expect.arrayContaining(['listJobs', 'listEmployees', 'getJobWorkings']));
    expect(names).not.toContain('getPayback');
    expect(names).not.toContain('listMachines');
  });
});

describe('an operator', () => {
  it('sees the own hours and nobody else’s', async () => {
    const pia = await api.shop.inShop((trx) =>
      trx.selectFrom('employee').select('employeeId').where('number', '=', '101').executeTakeFirstOrThrow(),
    );
    const { email } = await api.addAccount('operator', pia);
    const visitor = await (await api.visit()).signIn(email);
    const { items } = (await visitor.send('get', '/entries')).body;
    expect(items).toMatchObject([{ employee: 'Pia Strand', hours: '7.5000' }]);
    expect((await visitor.send('get', '/entries/totals')).body).toMatchObject({
      entries: 1,
      hours: '7.5000',
    });
    const choices = (await visitor.send('get', '/entries/choices')).body;
    expect(choices.employees).toMatchObject([{ id: pia.employeeId }]);
    const others = (await visitor.send('get', `/entries?search=${encodeURIComponent('Ola')}`)).body;
    expect(others.items).toEqual([]);
  });

  it('without an employee sees none', async () => {
    const visitor = await api.signIn('operator');
    expect((await visitor.send('get', '/entries')).body.items).toEqual([]);
    expect((await visitor.send('get', '/entries/totals')).body.entries).toBe(0);
  });
});
