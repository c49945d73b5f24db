import { randomUUID } from 'node:crypto';
import { readProblem, startTestApi, type TestApi, type Visitor } from './test-api';

let api: TestApi;
let owner: Visitor;
let bookkeeper: Visitor;
let employeeId: string;
beforeAll(async () => {
  api = await startTestApi();
  [owner, bookkeeper] = [await api.signIn('owner'), await api.signIn('bookkeeper')];
  employeeId = await api.shop.addEmployee({ name: 'Pia Strand' });
  await api.shop.addPayRate({ employeeId, validFrom: '2024-01-01', wagePerHour: '30' });
  await api.shop.addOverheadRate({ validFrom: '2024-01-01', ratePerLabourHour: '10' });
  const ids = { jobId: await api.shop.addJob(), operationId: await api.shop.addOperation() };
  await api.shop.addEntries([{ ...ids, employeeId, workedOn: '2024-03-05', hours: '8' }]);
});
afterAll(() => api.close());

describe('/months', () => {
  it('are closed by the bookkeeper, reopened by the owner only, and say so afterwards', async () => {
    const closed = await bookkeeper.send('post', '/months/2024-03/close');
    expect(closed.body).toMatchObject({
      state: 'closed',
      totals: [{ category: 'labour', amount: '240.00' }, {}],
    });
    expect((await bookkeeper.send('get', '/months')).body).toMatchObject({ closedThrough: '2024-03-31' });
    const body = { reason: 'A week was missing' };
    expect((await bookkeeper.send('post', '/months/2024-03/reopen', body)).status).toBe(403);
    const reopened = await owner.send('post', '/months/2024-03/reopen', body);
    expect(reopened.body).toMatchObject({ state: 'open', totals: closed.body.totals });
    expect((await bookkeeper.send('get', '/months')).body).toMatchObject({
      closedThrough: null,
      closings: [{ month: '2024-03', reopenReason: body.reason }],
    });
  });

  it('refuse what is out of order, what is no month, and a reopening without a reason', async () => {
    const early = readProblem(await bookkeeper.send('post', '/months/2024-04/close'));
    expect(early).toMatchObject({ status: 409, code: 'month_refused', issues: [{ code: 'not_next' }] });
    const nothing = readProblem(await owner.send('post', '/months/2024-03/reopen', { reason: 'Try' }));
    expect(nothing).toMatchObject({ status: 409, code: 'month_refused' });
    const blank = readProblem(await owner.send('post', '/months/2024-03/reopen', { reason: ' ' }));
    expect(blank).toMatchObject({ status: 400, issues: [{ field: 'reason' }] });
    const strange = readProblem(await bookkeeper.send('get', '/months/2024-13'));
    expect(strange).toMatchObject({ status: 400, issues: [{ field: 'month' }] });
    expect((await bookkeeper.send('get', '/months/2019-01')).status).toBe(404);
  });

  it('keep payroll hours, refuse such as no month has, and forget them', async () => {
    const path = `/months/2024-03/payroll-hours/${employeeId}`;
    const saved = await bookkeeper.send('patch', path, { hours: '7.5' });
    expect(saved.body).toMatchObject({ hours: '8.0000', payrollHours: '7.5000', difference: '-0.5000' });
    expect((await bookkeeper.send('get', '/months/2024-03')).body.tieOut).toContainEqual(saved.body);
    for (const hours of ['-1', '745', 'many', 8]) {
      const problem = readProblem(await bookkeeper.send('patch', path, { hours }));
      expect(problem).toMatchObject({ status: 400, issues: [{ field: 'hours' }] });
    }
    const stranger = `/months/2024-03/payroll-hours/${randomUUID()}`;
    expect((await bookkeeper.send('patch', stranger, { hours: '1' })).status).toBe(404);
    const forgotten = await bookkeeper.send('patch', path, { hours: null });
    expect(forgotten.body).toMatchObject({ payrollHours: null, difference: null });
  });

  it('list refused rows until they are reviewed', async () => {
    const importId = await api.shop.addImport({ refused: 1, firstDay: '2024-03-04', lastDay: '2024-03-08' });
    expect(
      (await bookkeeper.send('post', `/timesheets/${importId}/review`, { isReviewed: true })).status,
    ).toBe(204);
    const { checklist } = (await bookkeeper.send('get', '/months/2024-03')).body;
    expect(checklist.refusals).toMatchObject([{ importId, reviewedBy: expect.any(String) }]);
    const missing = await bookkeeper.send('post', `/timesheets/${randomUUID()}/review`, { isReviewed: true });
    expect(readProblem(missing)).toMatchObject({ status: 404, code: 'import_not_found' });
  });

  it('show nothing of machines’ payback to a bookkeeper', async () => {
    const machineId = await api.shop.addMachine({ inServiceOn: '2024-01-01' });
    const rates = { machineHourRate: '10', chargeOutRate: '80', runningCostPerHour: '4' };
    await api.shop.addMachineRate({ machineId, validFrom: '2024-01-01', ...rates });
    const ids = { jobId: await api.shop.addJob(), operationId: await api.shop.addOperation() };
    await api.shop.addEntries([{ ...ids, employeeId, machineId, workedOn: '2024-03-06', hours: '2' }]);
    await owner.send('post', '/rollup', {});
    const categoriesFor = async (visitor: Visitor) =>
      (await visitor.send('get', '/months/2024-03')).body.totals.map(
        ({ category }: { category: string }) => category,
      );
    expect(await categoriesFor(owner)).toEqual(['labour', 'machine', 'overhead', 'earned', 'running']);
    expect(await categoriesFor(bookkeeper)).toEqual(['labour', 'machine', 'overhead']);
  });
});

describe('/machines/:machineId/built-rates', () => {
  const basis = {
    price: '48000',
    salvage: '6000',
    lifeYears: '10',
    interestPercent: '6',
    floorAreaM2: '20',
    spaceCostPerM2Year: '60',
    insurancePerYear: '300',
    upkeepPerYear: '900',
    productiveHoursPerYear: '1600',
    powerKw: '7.5',
    loadPercent: '60',
    tariffPerKwh: '0.14',
    consumablesPerHour: '1.2',
  };
  const body = { validFrom: '2024-05-01', chargeOutRate: '95', runningCostPerHour: '4', basis };

  it('are built, changed, and held against hours really run', async () => {
    const machineId = await api.shop.addMachine({ inServiceOn: '2024-01-01' });
    const path = `/machines/${machineId}/built-rates`;
    const [rate] = (await owner.send('post', path, body)).body.rates;
    expect(rate).toMatchObject({ machineHourRate: '6.97', basis: { price: '48000.00' } });
    const changed = await owner.send('patch', `${path}/${rate.machineRateId}`, {
      ...body,
      basis: { ...basis, productiveHoursPerYear: '1000' },
    });
    expect(changed.body.rates).toMatchObject([{ machineHourRate: '10.05' }]);
    expect((await owner.send('get', `/machines/${machineId}`)).body).toEqual(changed.body);
    const recovery = `/machines/${machineId}/recovery?from=2024-01-01&to=2024-12-31`;
    expect((await owner.send('get', recovery)).body).toMatchObject({ fixedCost: expect.any(String) });
    const backwards = `/machines/${machineId}/recovery?from=2024-02-01&to=2024-01-31`;
    expect(readProblem(await owner.send('get', backwards))).toMatchObject({ issues: [{ field: 'to' }] });
  });

  it.each([
    ['basis.salvage', { salvage: '48000.01' }],
    ['basis.price', { price: '0' }],
    ['basis.lifeYears', { lifeYears: '0' }],
    ['basis.productiveHoursPerYear', { productiveHoursPerYear: '8784.01' }],
    ['basis.productiveHoursPerYear', { productiveHoursPerYear: '0' }],
    ['basis.loadPercent', { loadPercent: '100.5' }],
    ['basis.powerKw', { powerKw: '-1' }],
    ['basis.interestPercent', { interestPercent: 'six' }],
  ])('are refused by the field %s', async (field, change) => {
    const machineId = await api.shop.addMachine();
    const wrong = { ...body, basis: { ...basis, ...change } };
    const problem = readProblem(await owner.send('post', `/machines/${machineId}/built-rates`, wrong));
    expect(problem).toMatchObject({ status: 400, code: 'invalid_input' });
    expect(problem.issues.map((issue) => issue.field)).toContain(field);
  });
});
