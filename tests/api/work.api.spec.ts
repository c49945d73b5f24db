import { createReader, importSetup, importTimesheet } from '@brakeven/use-cases';
import { writeSetupWorkbook, writeTimesheetWorkbook } from '@brakeven/workbook';
import { randomUUID } from 'node:crypto';
import { COST_OF_J100, PAYBACK_OF_PB2, SETUP, WEEK } from '../fixtures/first-week';
import { readProblem, startTestApi, type TestApi, type Visitor } from './test-api';

let api: TestApi;
let owner: Visitor;
beforeAll(async () => {
  api = await startTestApi();
  owner = await api.signIn('owner');
  const context = api.shop.context();
  const tools = { reader: createReader() };
  const setup = await writeSetupWorkbook(SETUP, { units: 'us' });
  await importSetup(context, { name: 'set-up.xlsx', bytes: setup }, {}, tools);
  const week = await writeTimesheetWorkbook({ title: 'Week 10', rows: WEEK });
  await importTimesheet(context, { name: 'week.xlsx', bytes: week }, {}, tools);
});
afterAll(() => api.close());

const job = {
  number: 'J-300',
  customer: 'New Customer',
  title: 'Hopper chutes',
  quantity: 4,
  openedOn: '2024-03-01',
  dueOn: null,
  quotedPrice: '1250.00',
  isBillable: true,
  status: 'open',
};

async function findJob(number: string) {
  const { items } = (await owner.send('get', `/jobs?search=${number}`)).body;
  return items[0] as { jobId: string };
}

describe('/jobs', () => {
  it('come with their figures, a page at a time, and totals over all of them', async () => {
    const first = (await owner.send('get', '/jobs?limit=1&sort=number&direction=asc')).body;
    expect(first.items).toMatchObject([{ number: 'J-100', total: COST_OF_J100.total }]);
    expect(first.totals).toMatchObject({ jobs: 2, hours: '9.0833' });
    const next = (
      await owner.send('get', `/jobs?limit=1&sort=number&direction=asc&cursor=${first.nextCursor}`)
    ).body;
    expect(next.items).toMatchObject([{ number: 'J-200' }]);
    expect(next.nextCursor).toBeNull();
  });

  it('open into their lines, each with the cell that it came from', async () => {
    const { jobId } = await findJob('J-100');
    const detail = (await owner.send('get', `/jobs/${jobId}`)).body;
    expect(detail).toMatchObject({ labour: '270.51', machine: '135.00', overhead: '93.00' });
    const { items } = (await owner.send('get', `/jobs/${jobId}/lines?category=labour`)).body;
    const amounts = items.map((line: { amount: string }) => line.amount).sort();
    expect(amounts).toEqual(['260.78', '9.73']);
    expect(items[0].source).toMatchObject({
      fileName: 'week.xlsx',
      cell: expect.stringMatching(/^[A-Z]+\d+$/),
    });
  });

  it('are added, with a customer who is new, and changed', async () => {
    const added = await owner.send('post', '/jobs', job);
    expect(added.body).toMatchObject({ ...job, hours: '0.0000', total: '0.00' });
    const customers = (await owner.send('get', '/customers')).body;
    expect(customers.map(({ name }: { name: string }) => name)).toContain('New Customer');
    const changed = await owner.send('patch', `/jobs/${added.body.jobId}`, { ...job, status: 'finished' });
    expect(changed.body.status).toBe('finished');
    expect((await owner.send('get', `/jobs/${added.body.jobId}`)).body.status).toBe('finished');
  });

  it('refuse what does not fit, by field', async () => {
    const taken = readProblem(await owner.send('post', '/jobs', { ...job, number: 'J-100' }));
    expect(taken).toMatchObject({ status: 409, code: 'conflict', issues: [{ field: 'number' }] });
    const wrong = readProblem(await owner.send('post', '/jobs', { ...job, number: 'J-9', quantity: 0 }));
    expect(wrong).toMatchObject({ code: 'invalid_input', issues: [{ field: 'quantity' }] });
    const cursor = readProblem(await owner.send('get', '/jobs?cursor=nonsense'));
    expect(cursor).toMatchObject({ status: 400, code: 'invalid_input' });
    expect(readProblem(await owner.send('get', `/jobs/${randomUUID()}`)).code).toBe('not_found');
    expect(readProblem(await owner.send('get', '/jobs?limit=501')).issues[0]?.field).toBe('limit');
  });
});

describe('/entries', () => {
  it('are found by filter, with totals and choices', async () => {
    const { items } = (await owner.send('get', '/entries?search=Ola')).body;
    expect(items).toHaveLength(2);
    const totals = (await owner.send('get', '/entries/totals?from=2024-03-04&to=2024-03-04')).body;
    expect(totals).toMatchObject({ entries: 2, hours: '7.7500' });
    const choices = (await owner.send('get', '/entries/choices')).body;
    expect(choices.operations.length).toBeGreaterThanOrEqual(2);
    const wrong = readProblem(await owner.send('get', '/entries?from=yesterday'));
    expect(wrong).toMatchObject({ code: 'invalid_input', issues: [{ field: 'from' }] });
  });

  it('are voided and restored, and the costs follow with the next rollup', async () => {
    const { items } = (await owner.send('get', '/entries?search=J-200')).body;
    const path = `/entries/${items[0].entryId}`;
    expect((await owner.send('post', `${path}/void`)).status).toBe(204);
    expect((await owner.send('get', '/entries?search=J-200')).body.items).toEqual([]);
    expect((await owner.send('get', '/rollup')).body).toMatchObject({ daysWaiting: 1, entriesWaiting: 1 });
    const rolled = await owner.send('post', '/rollup');
    expect(rolled.body).toMatchObject({ shop: api.shop.shop.name, days: 1 });
    const { jobId } = await findJob('J-200');
    expect((await owner.send('get', `/jobs/${jobId}`)).body.total).toBe('0.00');
    expect((await owner.send('post', `${path}/restore`)).status).toBe(204);
    await owner.send('post', '/rollup');
    expect((await owner.send('get', `/jobs/${jobId}`)).body.labour).toBe('51.87');
    expect((await owner.send('get', '/rollup')).body).toMatchObject({
      daysWaiting: 0,
      through: '2024-03-05',
    });
    const nobody = await owner.send('post', `/entries/${randomUUID()}/void`);
    expect(readProblem(nobody).code).toBe('not_found');
  });
});

describe('payback', () => {
  it('is answered for a machine, and its figures open into lines that add up', async () => {
    const [press] = (await owner.send('get', '/machines')).body;
    const payback = (await owner.send('get', `/machines/${press.machineId}/payback`)).body;
    const { machine: _code, ...figures } = PAYBACK_OF_PB2;
    expect(payback).toMatchObject(figures);
    const query = `?figure=payback.earned&machineId=${press.machineId}`;
    const workings = (await owner.send('get', `/workings/payback${query}`)).body;
    expect(workings).toMatchObject({ amount: PAYBACK_OF_PB2.earned, lines: [{ amount: '716.25' }] });
    const none = await owner.send('get', `/machines/${randomUUID()}/payback`);
    expect(readProblem(none).code).toBe('not_found');
  });
});

describe('workings of jobs', () => {
  it('show rule, inputs and lines, hours without money beside them', async () => {
    const { jobId } = await findJob('J-100');
    const total = (await owner.send('get', `/workings/jobs?figure=job.labour&jobId=${jobId}`)).body;
    expect(total).toMatchObject({ amount: '270.51', lineCount: 2, unit: 'money' });
    const lead = await api.signIn('lead');
    const hours = (await lead.send('get', `/workings/job-hours?figure=job.hours&jobId=${jobId}`)).body;
    expect(hours).toMatchObject({ amount: '7.7500', lineCount: 2, unit: 'hours' });
    const wrong = readProblem(await owner.send('get', '/workings/jobs?figure=job.colour'));
    expect(wrong).toMatchObject({ code: 'invalid_input', issues: [{ field: 'figure' }] });
  });
});
