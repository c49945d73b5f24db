import { TestBed } from '@angular/core/testing';
import { By } from '@angular/platform-browser';
import { provideRouter } from '@angular/router';
import { type Customer, type CustomerDetail, type Job } from '@brakeven/contract';
import { Grid, WORKINGS_OPENER } from '@brakeven/ui';
import { NEVER, of } from 'rxjs';
import { CustomersApi } from '../api/customers-api';
import { JobsApi } from '../api/jobs-api';
import { RollupStore } from '../shell/rollup-store';
import { provideSession } from '../testing/fake-session';
import { render } from '../testing/rendered';
import { CUSTOMER_JOB_COLUMNS } from './customer-job-columns';
import { CustomerPage } from './customer-page';
import { CustomersPage } from './customers-page';

const harbor: Customer = {
  customerId: 'c1',
  name: 'Harbor Boats',
  jobs: 2,
  openJobs: 1,
  total: '140.00',
  invoiced: '165.00',
  margin: '25.00',
  marginIsProvisional: true,
  workInProgress: '25.00',
  lastWorkedOn: '2026-03-10',
};
const nobody: Customer = {
  ...harbor,
  customerId: null,
  name: null,
  jobs: 1,
  openJobs: 0,
  margin: '-70.00',
  marginIsProvisional: false,
  lastWorkedOn: null,
};
const { customerId: _id, name: _name, ...figures } = harbor;
const invoice = {
  invoiceId: 'i1',
  jobId: 'j1',
  job: '1042',
  kind: 'credit-note',
  number: 'C-3',
  invoicedOn: '2026-03-20',
  description: 'Late',
  amount: '15.00',
  voidedAt: null,
  voidedBy: null,
} as const;
const detail: CustomerDetail = { ...harbor, customerId: 'c1', name: 'Harbor Boats', invoices: [invoice] };

const api = { list: jest.fn(), get: jest.fn() };
const jobs = { listJobs: jest.fn() };
const opener = { open: jest.fn() };

beforeEach(() => {
  jest.resetAllMocks();
  jobs.listJobs.mockReturnValue(NEVER);
  TestBed.configureTestingModule({
    providers: [
      provideRouter([]),
      provideSession('owner'),
      { provide: CustomersApi, useValue: api },
      { provide: JobsApi, useValue: jobs },
      { provide: RollupStore, useValue: { rolledUp: NEVER } },
      { provide: WORKINGS_OPENER, useValue: opener },
    ],
  });
});

describe('CustomersPage', () => {
  it('shows each customer’s figures, says which margins are provisional, and the jobs of nobody', async () => {
    api.list.mockReturnValue(
      of({ items: [harbor, nobody], totals: { ...figures, jobs: 3, margin: '-45.00' } }),
    );
    const page = await render(CustomersPage);
    expect(page.text).toContain('Margin of all jobs −$45.00');
    expect(page.textsOf('tbody tr')).toEqual([
      'Harbor Boats 2 (1 open) $140.00 $165.00 so far $25.00 $25.00 Mar 10, 2026',
      'Jobs without a customer 1 $140.00 $165.00 −$70.00 $25.00 –',
    ]);
    expect(page.find('Harbor Boats').getAttribute('href')).toBe('/c1');
  });

  it('opens the workings of each sum, those of all jobs and of jobs of nobody too', async () => {
    api.list.mockReturnValue(
      of({ items: [harbor, nobody], totals: { ...figures, jobs: 3, total: '280.00' } }),
    );
    const page = await render(CustomersPage);
    await page.press('Margin, Harbor Boats: $25.00');
    await page.press('Invoiced, Jobs without a customer: $165.00');
    await page.press('Cost of all: $280.00');
    expect(opener.open.mock.calls).toEqual([
      [{ figure: 'job.margin', customerId: 'c1' }],
      [{ figure: 'job.invoiced', without: 'customer' }],
      [{ figure: 'job.total' }],
    ]);
  });

  it('says where customers come from while there are none', async () => {
    api.list.mockReturnValue(of({ items: [], totals: { ...figures, jobs: 0 } }));
    expect((await render(CustomersPage)).text).toContain('added with the first job that names it');
  });
});

describe('CustomerPage', () => {
  it('shows figures and invoices, and asks for the customer’s own jobs in the order chosen', async () => {
    api.get.mockReturnValue(of(detail));
    const page = await render(CustomerPage, { customerId: 'c1' });
    expect(page.text).toContain('Margin provisional $25.00 Invoiced $165.00 Cost $140.00');
    expect(page.textsOf('tbody tr')).toEqual(['Mar 20, 2026 Credit note C-3 1042 Late −$15.00']);
    await page.press('$140.00');
    expect(opener.open).toHaveBeenCalledWith({ figure: 'job.total', customerId: 'c1' });
    const grid = page.fixture.debugElement.query(By.directive(Grid)).componentInstance as Grid<Job>;
    grid.source()?.load({ cursor: undefined, limit: 50, sort: 'margin', direction: 'asc' });
    expect(jobs.listJobs).toHaveBeenLastCalledWith(
      expect.objectContaining({ customerId: 'c1', sort: 'margin', direction: 'asc' }),
    );
  });
});

describe('the columns of a customer’s jobs', () => {
  it('open their figures, and mark a margin that is provisional', () => {
    const margin = CUSTOMER_JOB_COLUMNS.find(({ id }) => id === 'margin');
    const job = { jobId: 'j1', margin: '5.00', marginIsProvisional: true } as Job;
    expect(margin?.figure?.(job)).toEqual({ figure: 'job.margin', jobId: 'j1' });
    expect(margin?.note?.(job)).toMatchObject({ text: 'so far' });
    expect(margin?.note?.({ ...job, marginIsProvisional: false })).toBeNull();
    expect(margin?.note?.({ ...job, marginIsProvisional: false, isToInvoice: true })).toMatchObject({
      text: 'to invoice',
    });
  });
});
