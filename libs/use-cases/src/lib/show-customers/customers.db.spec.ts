import { randomUUID } from 'node:crypto';
import { customerDetailSchema, customerListSchema, type Figure } from '@brakeven/contract';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { runRollup } from '../roll-up-costs/run-rollup';
import { expectToAddUp, readAll } from '../show-workings/testing/read-workings';
import { getCustomer, listCustomerFigures, renameCustomer } from './customers';

jest.setTimeout(30_000);

let shop: TestShop;
let harbor: string;
let mill: string;
beforeEach(async () => {
  shop = await createTestShop();
  [harbor, mill] = [await shop.addCustomer('Harbor Boats'), await shop.addCustomer('mill Creek Dairy')];
});
afterEach(() => shop.close());

/** A finished job invoiced above its cost, one still open, one invoiced in part; all of outside services. */
async function work(): Promise<void> {
  const job = (number: string, customerId: string | null, status: 'open' | 'finished' | 'invoiced') =>
    shop.addJob({ number, customerId, status, openedOn: '2026-03-01' });
  const finished = await job('1', harbor, 'finished');
  const open = await job('2', harbor, 'open');
  const nobodys = await job('3', null, 'invoiced');
  for (const [jobId, amount] of [
    [finished, '100'],
    [open, '40'],
    [nobodys, '70'],
  ] as const)
    await shop.addOutsideService({ jobId, incurredOn: '2026-03-10', amount });
  await shop.addInvoice({ jobId: finished, number: '5001', invoicedOn: '2026-03-12', amount: '150' });
  await shop.addInvoice({ jobId: open, number: '5002', invoicedOn: '2026-03-14', amount: '15' });
  await runRollup(shop.context(), {});
}

describe('customers', () => {
  it('show what their jobs cost and brought, and last the jobs of nobody', async () => {
    await work();
    const { items, totals } = customerListSchema.parse(await listCustomerFigures(shop.context()));
    expect(items).toEqual([
      {
        customerId: harbor,
        name: 'Harbor Boats',
        jobs: 2,
        openJobs: 1,
        total: '140.00',
        invoiced: '165.00',
        margin: '25.00',
        marginIsProvisional: true,
        // Of the open job 40 − 15; the finished one is invoiced above its cost.
        workInProgress: '25.00',
        lastWorkedOn: null,
      },
      expect.objectContaining({
        name: 'mill Creek Dairy',
        jobs: 0,
        total: '0.00',
        marginIsProvisional: false,
      }),
      expect.objectContaining({
        customerId: null,
        name: null,
        jobs: 1,
        margin: '-70.00',
        workInProgress: '0.00',
      }),
    ]);
    expect(totals).toMatchObject({ jobs: 3, total: '210.00', invoiced: '165.00', margin: '-45.00' });
  });

  it.each(['total', 'invoiced', 'margin', 'workInProgress'] as const)(
    'open their %s, and that of the jobs of nobody, into what adds up to it',
    async (name) => {
      await work();
      const { items, totals } = await listCustomerFigures(shop.context());
      const figure: Figure = `job.${name}`;
      for (const { customerId, name: customer, [name]: shown } of items) {
        const whose = customerId === null ? { without: 'customer' as const } : { customerId };
        const workings = await readAll(shop.context(), { figure, ...whose });
        expectToAddUp(workings);
        expect([workings.amount, workings.title]).toEqual([
          shown,
          expect.stringContaining(customer ?? 'the jobs without a customer'),
        ]);
      }
      expect((await readAll(shop.context(), { figure })).amount).toBe(totals[name]);
    },
  );

  it('list their invoices, latest first', async () => {
    await work();
    const customer = customerDetailSchema.parse(await getCustomer(shop.context(), { customerId: harbor }));
    expect(customer).toMatchObject({ name: 'Harbor Boats', jobs: 2, invoiced: '165.00' });
    expect(customer.invoices).toMatchObject([
      { number: '5002', job: '2', amount: '15.00' },
      { number: '5001', job: '1', amount: '150.00' },
    ]);
    expect(await getCustomer(shop.context(), { customerId: mill })).toMatchObject({ jobs: 0, invoices: [] });
    await expect(getCustomer(shop.context(), { customerId: randomUUID() })).rejects.toMatchObject({
      code: 'not_found',
    });
  });

  it('are renamed, but not to the name of another in any case', async () => {
    const rename = (name: string) => renameCustomer(shop.context(), { customerId: mill }, { name });
    expect(await rename('Mill Creek Dairy')).toMatchObject({ name: 'Mill Creek Dairy' });
    for (const taken of ['Harbor Boats', 'HARBOR boats'])
      await expect(rename(taken)).rejects.toMatchObject({ code: 'conflict', issues: [{ field: 'name' }] });
    const nobody = renameCustomer(shop.context(), { customerId: randomUUID() }, { name: 'Anyone' });
    await expect(nobody).rejects.toMatchObject({ code: 'not_found' });
  });
});
