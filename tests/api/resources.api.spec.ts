import { randomUUID } from 'node:crypto';
import { readProblem, startTestApi, type TestApi, type Visitor } from './test-api';

let api: TestApi;
let owner: Visitor;
beforeAll(async () => {
  api = await startTestApi();
  owner = await api.signIn('owner');
});
afterAll(() => api.close());

const rate = { validFrom: '2026-01-05', wagePerHour: '28.50', burdenPercent: '22' };

/** Sends and expects a refusal of the input that names the field. */
async function expectInvalid(method: 'post' | 'patch', path: string, body: object, field: string) {
  const problem = readProblem(await owner.send(method, path, body));
  expect(problem).toMatchObject({ status: 400, code: 'invalid_input' });
  expect(problem.issues.map((issue) => issue.field)).toContain(field);
}

async function expectConflict(method: 'post' | 'patch', path: string, body: object, field: string) {
  const problem = readProblem(await owner.send(method, path, body));
  expect(problem).toMatchObject({ status: 409, code: 'conflict', issues: [{ field }] });
}

async function expectNotFound(method: 'get' | 'post' | 'patch' | 'delete', path: string, body?: object) {
  const problem = readProblem(await owner.send(method, path, body));
  expect(problem).toMatchObject({ status: 404, code: 'not_found' });
}

describe('/shop', () => {
  it('is read by everybody, changed by the owner, and says so afterwards', async () => {
    const changed = await owner.send('patch', '/shop', { weekStart: 0, units: 'metric' });
    expect(changed.body).toEqual({ ...api.shop.shop, weekStart: 0, units: 'metric' });
    const operator = await api.signIn('operator');
    expect((await operator.send('get', '/shop')).body).toEqual(changed.body);
  });

  it('refuses what it cannot use, by field', async () => {
    await expectInvalid('patch', '/shop', { currency: 'dollars' }, 'currency');
    await expectInvalid('patch', '/shop', { timeZone: 'Mars/Olympus' }, 'timeZone');
    await expectInvalid('patch', '/shop', { weekStart: 7 }, 'weekStart');
    await expectInvalid('patch', '/shop', { name: ' ' }, 'name');
  });
});

describe('/users', () => {
  it('are added, listed and changed', async () => {
    const body = { name: 'Teo Brandt', email: `${randomUUID()}@ternhollow.example`, role: 'lead' };
    const { user, temporaryPassword } = (await owner.send('post', '/users', body)).body;
    expect((await owner.send('get', '/users')).body).toContainEqual(user);
    const renamed = await owner.send('patch', `/users/${user.userId}`, { name: 'Teo B.' });
    expect(renamed.body).toEqual({ ...user, name: 'Teo B.' });
    const reset = (await owner.send('post', `/users/${user.userId}/password`)).body;
    expect(reset.temporaryPassword).not.toBe(temporaryPassword);
    const visitor = await api.visit();
    await visitor.signIn(user.email, reset.temporaryPassword);
  });

  it('refuse a taken address, no address, an unknown role and nobody', async () => {
    const { email } = api.accounts.lead;
    const body = { name: 'X', email, role: 'lead' };
    await expectConflict('post', '/users', body, 'email');
    await expectInvalid('post', '/users', { ...body, email: 'no address' }, 'email');
    await expectInvalid('post', '/users', { ...body, role: 'king' }, 'role');
    await expectNotFound('patch', `/users/${randomUUID()}`, { name: 'X' });
    await expectInvalid('patch', '/users/17', { name: 'X' }, 'userId');
  });

  it('keep the last active owner', async () => {
    const { userId } = api.accounts.owner;
    await expectConflict('patch', `/users/${userId}`, { role: 'lead' }, 'role');
    await expectConflict('patch', `/users/${userId}`, { isActive: false }, 'isActive');
    expect((await owner.send('get', '/session')).body.user.role).toBe('owner');
  });
});

describe('/employees', () => {
  it('are added with a rate, changed, given rates and lose them', async () => {
    const added = (await owner.send('post', '/employees', { number: '7', name: 'Pia Strand', rate })).body;
    expect(added.rates).toMatchObject([{ ...rate, burdenPercent: '22.00' }]);
    const path = `/employees/${added.employeeId}`;
    expect((await owner.send('patch', path, { name: 'Pia S.' })).body.name).toBe('Pia S.');
    const raised = await owner.send('post', `${path}/rates`, { ...rate, validFrom: '2026-03-01' });
    expect(raised.body.rates).toHaveLength(2);
    const [latest] = raised.body.rates;
    const ratePath = `${path}/rates/${latest.payRateId}`;
    const corrected = { ...rate, validFrom: '2026-03-02' };
    expect((await owner.send('patch', ratePath, corrected)).body.rates[0].validFrom).toBe('2026-03-02');
    const left = await owner.send('delete', ratePath);
    expect(left.body.rates).toEqual(added.rates);
    expect((await owner.send('get', '/employees')).body).toContainEqual(left.body);
  });

  it('refuse what does not fit, by field', async () => {
    const body = { number: '8', name: 'Ola Nyström', rate };
    await owner.send('post', '/employees', body);
    await expectConflict('post', '/employees', body, 'number');
    await expectInvalid('post', '/employees', { ...body, number: '' }, 'number');
    const badRate = (change: object) => ({ ...body, number: '9', rate: { ...rate, ...change } });
    await expectInvalid('post', '/employees', badRate({ wagePerHour: '-1' }), 'rate.wagePerHour');
    await expectInvalid('post', '/employees', badRate({ wagePerHour: 28.5 }), 'rate.wagePerHour');
    await expectInvalid('post', '/employees', badRate({ wagePerHour: 'x' }), 'rate.wagePerHour');
    await expectInvalid('post', '/employees', badRate({ validFrom: '2026-02-30' }), 'rate.validFrom');
    await expectNotFound('patch', `/employees/${randomUUID()}`, { name: 'X' });
  });

  it('refuse numbers and texts that cannot be kept, and keep nothing of them', async () => {
    const tooLarge = { number: '10', name: 'X', rate: { ...rate, wagePerHour: '999999999999' } };
    const problem = readProblem(await owner.send('post', '/employees', tooLarge));
    expect(problem).toMatchObject({ code: 'invalid_input', detail: 'A number is too large to be kept.' });
    const zeroByte = readProblem(
      await owner.send('post', '/employees', { ...tooLarge, name: 'A\u0000B', rate }),
    );
    expect(zeroByte.code).toBe('invalid_input');
    const { body } = await owner.send('get', '/employees');
    expect(body.map(({ number }: { number: string }) => number)).not.toContain('10');
  });

  it('keep a rate that entries need', async () => {
    const added = (await owner.send('post', '/employees', { number: '11', name: 'Kim Aas', rate })).body;
    await addEntry(added.employeeId);
    const path = `/employees/${added.employeeId}/rates/${added.rates[0].payRateId}`;
    const problem = readProblem(await owner.send('delete', path));
    expect(problem).toMatchObject({ status: 409, code: 'rate_needed' });
  });

  it('have spellings that are forgotten on request', async () => {
    const employeeId = await api.shop.addEmployee();
    const aliasId = randomUUID();
    await api.shop.inShop((trx) =>
      trx
        .insertInto('nameAlias')
        .values({
          shopId: api.shop.shop.shopId,
          aliasId,
          kind: 'employee',
          spelling: 'Kimm',
          employeeId,
          jobId: null,
          operationId: null,
          machineId: null,
        })
        .execute(),
    );
    expect((await owner.send('delete', `/aliases/${aliasId}`)).status).toBe(204);
    await expectNotFound('delete', `/aliases/${aliasId}`);
  });
});

async function addEntry(employeeId: string): Promise<void> {
  await api.shop.addEntries([
    {
      workedOn: '2026-02-03',
      employeeId,
      jobId: await api.shop.addJob(),
      operationId: await api.shop.addOperation(),
      machineId: null,
      hours: '8',
      goodPieces: null,
      scrapPieces: null,
      note: null,
      importId: null,
      sourceRow: null,
      sourceCell: null,
      voidedBy: null,
    },
  ]);
}

describe('/overhead-rates and /operations', () => {
  it('overhead rates are added, corrected and taken out', async () => {
    const body = { validFrom: '2026-01-01', ratePerLabourHour: '12.5' };
    const added = (await owner.send('post', '/overhead-rates', body)).body;
    await expectConflict('post', '/overhead-rates', body, 'validFrom');
    await expectInvalid('post', '/overhead-rates', { ...body, ratePerLabourHour: '' }, 'ratePerLabourHour');
    const path = `/overhead-rates/${added.overheadRateId}`;
    const corrected = await owner.send('patch', path, { ...body, ratePerLabourHour: '13' });
    expect((await owner.send('get', '/overhead-rates')).body).toEqual([corrected.body]);
    expect((await owner.send('delete', path)).status).toBe(204);
    await expectNotFound('delete', path);
  });

  it('operations are added and changed', async () => {
    const body = { code: 'FORM', name: 'Form', defaultMachineId: await api.shop.addMachine() };
    const added = (await owner.send('post', '/operations', body)).body;
    await expectConflict('post', '/operations', body, 'code');
    await expectInvalid(
      'post',
      '/operations',
      { ...body, code: 'F2', defaultMachineId: randomUUID() },
      'defaultMachineId',
    );
    const path = `/operations/${added.operationId}`;
    const changed = await owner.send('patch', path, { code: 'FORM', name: 'Forming' });
    expect(changed.body).toEqual({ ...added, name: 'Forming', defaultMachineId: null, defaultMachine: null });
    expect((await owner.send('get', '/operations')).body).toContainEqual(changed.body);
    await expectNotFound('patch', `/operations/${randomUUID()}`, body);
  });
});

describe('/machines', () => {
  const press = {
    code: 'PB9',
    name: 'Press 9',
    kind: 'Press brake',
    inServiceOn: '2026-03-02',
    ratedForceKn: '533.7865',
    bedLengthMm: '1828.8',
  };
  const price = { incurredOn: '2026-02-01', kind: 'price', amount: '48000.00' };
  const rates = {
    validFrom: '2026-03-01',
    machineHourRate: '18',
    chargeOutRate: '95.5',
    runningCostPerHour: '4.125',
  };

  it('are added with costs and rates, corrected and read back', async () => {
    const { machineId } = (await owner.send('post', '/machines', press)).body;
    const path = `/machines/${machineId}`;
    const priced = (await owner.send('post', `${path}/cost-items`, price)).body;
    expect(priced.outlay).toBe('48000.00');
    const itemPath = `${path}/cost-items/${priced.costItems[0].machineCostItemId}`;
    const dearer = await owner.send('patch', itemPath, { ...price, amount: '48500' });
    expect(dearer.body.outlay).toBe('48500.00');
    const rated = (await owner.send('post', `${path}/rates`, rates)).body;
    const ratePath = `${path}/rates/${rated.rates[0].machineRateId}`;
    const moved = await owner.send('patch', ratePath, { ...rates, validFrom: '2026-03-02' });
    expect(moved.body.rates).toMatchObject([{ validFrom: '2026-03-02', chargeOutRate: '95.50' }]);
    const renamed = await owner.send('patch', path, { ...press, name: 'Press nine' });
    expect((await owner.send('get', path)).body).toEqual(renamed.body);
    expect((await owner.send('delete', itemPath)).body.costItems).toEqual([]);
    expect((await owner.send('delete', ratePath)).body.rates).toEqual([]);
    expect((await owner.send('get', '/machines')).body.map((one: typeof press) => one.code)).toContain('PB9');
  });

  it('refuse what does not fit, by field', async () => {
    const { machineId } = (await owner.send('post', '/machines', { ...press, code: 'PB8' })).body;
    const path = `/machines/${machineId}`;
    await expectConflict('post', '/machines', { ...press, code: 'PB8' }, 'code');
    await expectInvalid('post', '/machines', { ...press, code: 'PB7', ratedForceKn: '0' }, 'ratedForceKn');
    await expectInvalid('patch', path, { ...press, inServiceOn: 'soon' }, 'inServiceOn');
    await expectInvalid('post', `${path}/cost-items`, { ...price, amount: '10.005' }, 'amount');
    await expectInvalid('post', `${path}/cost-items`, { ...price, kind: 'gift' }, 'kind');
    await owner.send('post', `${path}/rates`, rates);
    await expectConflict('post', `${path}/rates`, rates, 'validFrom');
    await expectNotFound('get', `/machines/${randomUUID()}`);
    await expectNotFound('delete', `${path}/rates/${randomUUID()}`);
  });
});

describe('/audit', () => {
  it('tells the owner who changed what, page by page', async () => {
    const page = (await owner.send('get', '/audit?limit=2')).body;
    expect(page.items).toHaveLength(2);
    const next = (await owner.send('get', `/audit?limit=2&cursor=${page.nextCursor}`)).body;
    expect(next.items[0].eventId).not.toBe(page.items[1].eventId);
    const all = (await owner.send('get', '/audit?limit=200')).body.items;
    const renaming = all.find(
      (event: { action: string; subjectKind: string }) =>
        event.action === 'changed' && event.subjectKind === 'employee',
    );
    expect(renaming).toMatchObject({
      actor: 'The owner',
      before: { name: 'Pia Strand' },
      after: { name: 'Pia S.' },
    });
    const problem = readProblem(await owner.send('get', '/audit?cursor=x'));
    expect(problem.issues[0]?.field).toBe('cursor');
  });
});
