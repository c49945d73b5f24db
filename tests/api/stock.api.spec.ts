import { type Material, type MaterialIssue, type SheetLot, type StockMovePage } from '@brakeven/contract';
import { readProblem, startTestApi, type TestApi, type Visitor } from './test-api';

let api: TestApi;
let owner: Visitor;
let jobId: string;
beforeAll(async () => {
  api = await startTestApi();
  owner = await api.signIn('owner');
  jobId = await api.shop.addJob({ number: '1042', openedOn: '2026-03-01' });
});
afterAll(() => api.close());

const STEEL = { name: 'Mild steel 11 ga', form: 'sheet', thicknessMm: '3.03784', densityKgM3: '7850' };

describe('stock over the API', () => {
  let material: Material;
  let lot: SheetLot;

  it('takes a material and a lot, and tells what is in stock', async () => {
    material = (await owner.send('post', '/materials', STEEL)).body as Material;
    expect(material).toMatchObject({ name: STEEL.name, stockKg: '0', averagePerKg: null });
    const received = { receivedOn: '2026-03-02', weightKg: '100', cost: '180', freight: '20' };
    const response = await owner.send('post', `/materials/${material.materialId}/lots`, received);
    expect(response.status).toBe(200);
    lot = response.body as SheetLot;
    expect(lot).toMatchObject({ number: 'L-1', landedCost: '200.00' });
    const { body } = await owner.send('get', `/materials/${material.materialId}`);
    expect(body).toMatchObject({ stockKg: '100', stockValue: '200.00', averagePerKg: '2.00' });
  });

  it('issues it to a job, whose cost has it at once', async () => {
    const issue = {
      jobId,
      materialId: material.materialId,
      kind: 'issue',
      issuedOn: '2026-03-04',
      weightKg: '40',
    };
    const { body } = await owner.send('post', '/material-issues', issue);
    expect(body as MaterialIssue).toMatchObject({ amount: '80.00', weightKg: '40' });
    expect((await owner.send('get', `/jobs/${jobId}`)).body).toMatchObject({
      material: '80.00',
      total: '80.00',
    });
    const moves = (await owner.send('get', `/materials/${material.materialId}/moves?show=issue`))
      .body as StockMovePage;
    expect(moves.items).toMatchObject([{ kind: 'issue', amount: '-80.00', balanceKg: '60' }]);
  });

  it('refuses with the field named what the stock does not cover and what is no lot', async () => {
    const issue = {
      jobId,
      materialId: material.materialId,
      kind: 'issue',
      issuedOn: '2026-03-05',
      weightKg: '61',
    };
    const short = await owner.send('post', '/material-issues', issue);
    expect(short.status).toBe(409);
    expect(readProblem(short)).toMatchObject({
      code: 'conflict',
      issues: [{ field: 'weightKg', code: 'stock_short', message: expect.stringContaining('2.21') }],
    });
    const voided = await owner.send('post', `/sheet-lots/${lot.lotId}/void`);
    expect(voided.status).toBe(409);
    const nothing = await owner.send('post', `/materials/${material.materialId}/lots`, {
      receivedOn: '2026-03-02',
      cost: '0',
    });
    expect(nothing.status).toBe(400);
    expect(
      readProblem(nothing)
        .issues.map(({ field }) => field)
        .sort(),
    ).toEqual(['cost', 'weightKg']);
  });

  it('shows a lead what is there, without money, and lets the lead change nothing', async () => {
    const lead = await api.signIn('lead');
    const { body } = await lead.send('get', '/materials');
    expect(body).toMatchObject([{ name: STEEL.name, stockKg: '60' }]);
    expect(JSON.stringify(body)).not.toMatch(/value|average|price/i);
    const refused = await lead.send('post', `/sheet-lots/${lot.lotId}/void`);
    expect(refused.status).toBe(403);
  });
});

describe('the dated rows of a job over the API', () => {
  it('are refused before the job, taken after it, and voided', async () => {
    const early = { incurredOn: '2026-02-10', vendor: 'Harbor Coating', amount: '50' };
    const refused = await owner.send('post', `/jobs/${jobId}/outside-services`, early);
    expect(refused.status).toBe(400);
    expect(readProblem(refused).issues).toMatchObject([{ field: 'incurredOn', code: 'before_job' }]);
    const { body } = await owner.send('post', `/jobs/${jobId}/outside-services`, {
      ...early,
      incurredOn: '2026-03-10',
    });
    const { outsideServiceId } = body as { outsideServiceId: string };
    const gone = await owner.send('post', `/outside-services/${outsideServiceId}/void`);
    expect(gone.status).toBe(204);
    expect((await owner.send('get', `/jobs/${jobId}/outside-services`)).body).toMatchObject({
      total: '0.00',
      items: [{ voidedBy: expect.any(String) }],
    });
  });

  it('bring a customer what was invoiced less what was credited', async () => {
    const customerId = await api.shop.addCustomer('Harbor Boats');
    const other = await api.shop.addJob({ customerId, openedOn: '2026-03-01', status: 'invoiced' });
    const invoice = { kind: 'invoice', number: '5001', invoicedOn: '2026-03-20', amount: '1200' };
    await owner.send('post', `/jobs/${other}/invoices`, invoice);
    await owner.send('post', `/jobs/${other}/invoices`, {
      ...invoice,
      kind: 'credit-note',
      amount: '150.25',
    });
    expect((await owner.send('get', `/customers/${customerId}`)).body).toMatchObject({
      invoiced: '1049.75',
      margin: '1049.75',
      marginIsProvisional: false,
      invoices: [{ kind: 'credit-note' }, { kind: 'invoice', amount: '1200.00' }],
    });
    expect((await owner.send('get', '/customers/figures')).body).toMatchObject({
      items: [{ name: 'Harbor Boats' }, { name: null, jobs: 1 }],
    });
  });
});
