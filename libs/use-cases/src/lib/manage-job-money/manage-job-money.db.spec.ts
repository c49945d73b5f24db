import { randomUUID } from 'node:crypto';
import {
  invoiceInputSchema,
  invoiceListSchema,
  outsideServiceInputSchema,
  outsideServiceListSchema,
} from '@brakeven/contract';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { updateJob } from '../show-jobs/change-job';
import { getJobCost } from '../show-jobs/job-costs';
import { createInvoice, listInvoices, restoreInvoice, updateInvoice, voidInvoice } from './invoices';
import {
  createOutsideService,
  listOutsideServices,
  restoreOutsideService,
  updateOutsideService,
  voidOutsideService,
} from './outside-services';

jest.setTimeout(30_000);

let shop: TestShop;
let jobId: string;
beforeEach(async () => {
  shop = await createTestShop();
  jobId = await shop.addJob({ number: '1042', openedOn: '2026-03-01' });
});
afterEach(() => shop.close());

const service = (change: object = {}) =>
  outsideServiceInputSchema.parse({
    incurredOn: '2026-03-10',
    vendor: 'Harbor Coating',
    description: 'Powder coat, grey',
    amount: '240.50',
    ...change,
  });
const invoice = (change: object = {}) =>
  invoiceInputSchema.parse({
    kind: 'invoice',
    number: '5001',
    invoicedOn: '2026-03-20',
    amount: '1200',
    ...change,
  });

describe('outside services', () => {
  it('are added, corrected, voided and put back; the total is of those that count', async () => {
    const added = await createOutsideService(shop.context(), { jobId }, service());
    expect(added).toMatchObject({ jobId, vendor: 'Harbor Coating', amount: '240.50', voidedAt: null });
    await createOutsideService(
      shop.context(),
      { jobId },
      service({ incurredOn: '2026-03-05', amount: '99.99' }),
    );
    const corrected = await updateOutsideService(shop.context(), added, service({ amount: '260' }));
    await expect(updateOutsideService(shop.context(), added, service())).rejects.toMatchObject({
      code: 'conflict',
    });
    const list = outsideServiceListSchema.parse(await listOutsideServices(shop.context(), { jobId }));
    expect(list.total).toBe('359.99');
    expect(list.items.map(({ amount, voidedBy }) => [amount, voidedBy])).toEqual([
      ['260.00', null],
      ['240.50', 'Test owner'],
      ['99.99', null],
    ]);
    await expect(restoreOutsideService(shop.context(), added)).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('was corrected'),
    });
    await voidOutsideService(shop.context(), corrected);
    expect(await listOutsideServices(shop.context(), { jobId })).toMatchObject({ total: '99.99' });
    await restoreOutsideService(shop.context(), corrected);
    expect(await listOutsideServices(shop.context(), { jobId })).toMatchObject({ total: '359.99' });
  });

  it('are in the costs at once, and out of them once voided', async () => {
    const added = await createOutsideService(shop.context(), { jobId }, service());
    expect(await getJobCost(shop.context(), '1042')).toMatchObject({ outside: '240.50', total: '240.50' });
    await voidOutsideService(shop.context(), added);
    expect(await getJobCost(shop.context(), '1042')).toMatchObject({ outside: '0.00', total: '0.00' });
  });

  it('hold the opening of their job: it is not moved past them', async () => {
    await createOutsideService(shop.context(), { jobId }, service());
    const job = {
      number: '1042',
      customer: null,
      title: 'Rack shelves',
      quantity: null,
      dueOn: null,
      quotedPrice: null,
      isBillable: true,
      status: 'open',
    } as const;
    const open = (openedOn: string) => updateJob(shop.context(), { jobId }, { ...job, openedOn });
    await expect(open('2026-03-11')).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'openedOn', message: expect.stringContaining('has rows dated Mar 10, 2026') }],
    });
    expect(await open('2026-03-10')).toMatchObject({ openedOn: '2026-03-10' });
  });

  it('are not dated before the job, nor after today, nor without an amount', async () => {
    const early = createOutsideService(shop.context(), { jobId }, service({ incurredOn: '2026-02-28' }));
    await expect(early).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [
        { field: 'incurredOn', message: expect.stringContaining('an outside service cannot be dated') },
      ],
    });
    const context = shop.context('owner', { now: () => new Date('2026-03-09T18:00:00Z') });
    await expect(createOutsideService(context, { jobId }, service())).rejects.toMatchObject({
      issues: [{ field: 'incurredOn', code: 'after_today' }],
    });
    for (const amount of ['0', '0.00', '-5', 'much']) expect(() => service({ amount })).toThrow();
    const nowhere = { jobId: randomUUID() };
    await expect(createOutsideService(shop.context(), nowhere, service())).rejects.toMatchObject({
      code: 'not_found',
    });
    await expect(listOutsideServices(shop.context(), nowhere)).rejects.toMatchObject({ code: 'not_found' });
  });
});

describe('invoices and credit notes', () => {
  it('add up, credit notes against invoices', async () => {
    await createInvoice(shop.context(), { jobId }, invoice());
    await createInvoice(
      shop.context(),
      { jobId },
      invoice({ kind: 'credit-note', number: '5001', invoicedOn: '2026-03-25', amount: '150.25' }),
    );
    const list = invoiceListSchema.parse(await listInvoices(shop.context(), { jobId }));
    expect(list).toMatchObject({
      total: '1049.75',
      items: [
        { kind: 'credit-note', amount: '150.25' },
        { kind: 'invoice', amount: '1200.00' },
      ],
    });
  });

  it('have a number once on a job, which a correction keeps', async () => {
    const first = await createInvoice(shop.context(), { jobId }, invoice());
    const twice = createInvoice(shop.context(), { jobId }, invoice());
    await expect(twice).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field: 'number', code: 'taken' }],
    });
    const otherJob = { jobId: await shop.addJob() };
    expect(await createInvoice(shop.context(), otherJob, invoice())).toMatchObject({ number: '5001' });
    const corrected = await updateInvoice(shop.context(), first, invoice({ amount: '1300' }));
    expect(corrected).toMatchObject({ number: '5001', amount: '1300.00' });
    await expect(restoreInvoice(shop.context(), first)).rejects.toMatchObject({ code: 'conflict' });
    await voidInvoice(shop.context(), corrected);
    expect(await listInvoices(shop.context(), { jobId })).toMatchObject({ total: '0.00' });
    await restoreInvoice(shop.context(), corrected);
    expect(await listInvoices(shop.context(), { jobId })).toMatchObject({ total: '1300.00' });
  });

  it('are not dated before the job, and belong to one shop', async () => {
    await expect(
      createInvoice(shop.context(), { jobId }, invoice({ invoicedOn: '2026-02-01' })),
    ).rejects.toMatchObject({ issues: [{ field: 'invoicedOn', code: 'before_job' }] });
    const mine = await createInvoice(shop.context(), { jobId }, invoice());
    const other = await createTestShop();
    try {
      await expect(voidInvoice(other.context(), mine)).rejects.toMatchObject({ code: 'not_found' });
      await expect(updateInvoice(other.context(), mine, invoice())).rejects.toMatchObject({
        code: 'not_found',
      });
    } finally {
      await other.close();
    }
  });
});
