import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { provideRouter } from '@angular/router';
import { type Invoice, type MaterialIssue, type OutsideService, type Role } from '@brakeven/contract';
import { WORKINGS_OPENER } from '@brakeven/ui';
import { EMPTY, firstValueFrom, of, throwError } from 'rxjs';
import { JobMoneyApi } from '../api/job-money-api';
import { MaterialsApi } from '../api/materials-api';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { provideSession } from '../testing/fake-session';
import { render } from '../testing/rendered';
import { InvoicesCard, MaterialIssuesCard, OutsideServicesCard } from '.';
import { InvoiceDialog } from './invoice-dialog';
import { OutsideServiceDialog } from './outside-service-dialog';

const LIVE = { jobId: 'job', voidedAt: null, voidedBy: null };
const VOIDED = { ...LIVE, voidedAt: '2026-03-20T12:00:00Z', voidedBy: 'Mara Oduya' };
const coat: OutsideService = {
  ...LIVE,
  outsideServiceId: 's1',
  incurredOn: '2026-03-10',
  vendor: 'Harbor Coating',
  description: 'Powder coat',
  amount: '240.50',
};
const invoice: Invoice = {
  ...LIVE,
  invoiceId: 'i1',
  kind: 'invoice',
  number: '5001',
  invoicedOn: '2026-03-20',
  description: '',
  amount: '1200.00',
};
const credit: Invoice = { ...invoice, invoiceId: 'i2', kind: 'credit-note', number: 'C-3', amount: '150.25' };
const issue: MaterialIssue = {
  ...LIVE,
  issueId: 'm1',
  materialId: 'steel',
  material: 'Mild steel 11 ga',
  kind: 'issue',
  issuedOn: '2026-03-04',
  sheets: null,
  pieces: 24,
  blankLengthMm: '508',
  blankWidthMm: '254',
  weightKg: '45.359237',
  averagePerKg: '2.204623',
  amount: '100.00',
  note: null,
};
const returned: MaterialIssue = {
  ...issue,
  issueId: 'm2',
  kind: 'return',
  pieces: null,
  weightKg: '4.5359237',
  amount: '-10.00',
};

const money = {
  listServices: jest.fn(),
  addService: jest.fn(),
  correctService: jest.fn(),
  voidService: jest.fn(),
  restoreService: jest.fn(),
  listInvoices: jest.fn(),
  addInvoice: jest.fn(),
  correctInvoice: jest.fn(),
  voidInvoice: jest.fn(),
};
const materials = { listOfJob: jest.fn() };
const opener = { open: jest.fn() };

const signIn = (role: Role) =>
  TestBed.configureTestingModule({
    providers: [
      provideRouter([]),
      provideSession(role),
      { provide: JobMoneyApi, useValue: money },
      { provide: MaterialsApi, useValue: materials },
      { provide: RollupStore, useValue: { refresh: jest.fn() } },
      { provide: WORKINGS_OPENER, useValue: opener },
    ],
  });

beforeEach(() => {
  jest.resetAllMocks();
  money.listServices.mockReturnValue(
    of({
      items: [coat, { ...coat, ...VOIDED, outsideServiceId: 's0', vendor: 'Millrace Coating' }],
      total: '240.50',
    }),
  );
  money.listInvoices.mockReturnValue(of({ items: [credit, invoice], total: '1049.75' }));
  materials.listOfJob.mockReturnValue(
    of({ items: [returned, issue], weightKg: '40.8233133', total: '90.00' }),
  );
});

describe('outside services on a job', () => {
  it('are listed with the total of those that count, which opens', async () => {
    signIn('owner');
    const card = await render(OutsideServicesCard, { jobId: 'job' });
    expect(card.textsOf('tbody tr')).toEqual([
      'Mar 10, 2026 Harbor Coating Powder coat $240.50 Correct Void',
      'Mar 10, 2026 Millrace Coating voided Powder coat $240.50 Restore',
    ]);
    await card.press('Outside services: $240.50');
    expect(opener.open).toHaveBeenCalledWith({ figure: 'job.outside', jobId: 'job' });
  });

  it('are voided at one press and put back on undo, and the page is told each time', async () => {
    money.voidService.mockReturnValue(of(undefined));
    money.restoreService.mockReturnValue(of(undefined));
    const changed = jest.fn();
    signIn('owner');
    const card = await render(OutsideServicesCard, { jobId: 'job' }, { changed });
    await card.press('Void Harbor Coating, Powder coat');
    expect(money.voidService).toHaveBeenCalledWith('s1');
    expect(changed).toHaveBeenCalledTimes(1);
    TestBed.inject(Notifier).notice()?.action?.run();
    expect(money.restoreService).toHaveBeenCalledWith('s1');
    expect(changed).toHaveBeenCalledTimes(2);
  });

  it('stay when the server refuses, in its words', async () => {
    const error = { code: 'invalid_input', detail: 'Job 1042 was opened on Mar 15, 2026.', issues: [] };
    money.restoreService.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 400, error })));
    const changed = jest.fn();
    signIn('owner');
    const card = await render(OutsideServicesCard, { jobId: 'job' }, { changed });
    await card.press('Restore Millrace Coating, Powder coat');
    expect(TestBed.inject(Notifier).notice()?.text).toContain('opened on Mar 15, 2026');
    expect(changed).not.toHaveBeenCalled();
  });

  it('say what belongs there while there are none, and what went wrong', async () => {
    money.listServices.mockReturnValue(of({ items: [], total: '0.00' }));
    signIn('owner');
    expect((await render(OutsideServicesCard, { jobId: 'job' })).text).toContain(
      'What others do for the job',
    );
    money.listServices.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 0 })));
    expect((await render(OutsideServicesCard, { jobId: 'job' })).text).toContain('cannot be reached');
  });
});

describe('invoices of a job', () => {
  it('are listed with credit notes against them', async () => {
    signIn('bookkeeper');
    const card = await render(InvoicesCard, { jobId: 'job' });
    expect(card.textsOf('tbody tr')).toEqual([
      'Mar 20, 2026 Credit note C-3 −$150.25 Correct Void',
      'Mar 20, 2026 Invoice 5001 $1,200.00 Correct Void',
    ]);
    expect(card.text).toContain('Invoiced $1,049.75');
    expect(card.find('Void Credit note C-3')).toBeTruthy();
  });
});

describe('material of a job', () => {
  it('is listed in the shop’s units, what came back against it', async () => {
    signIn('owner');
    const card = await render(MaterialIssuesCard, { jobId: 'job' });
    expect(card.textsOf('tbody tr')).toEqual([
      'Mar 4, 2026 Mild steel 11 ga returned −10 lb −$10.00 Correct Void',
      'Mar 4, 2026 Mild steel 11 ga 24 pieces, 20 in × 10 in 100 lb $100.00 Correct Void',
    ]);
    expect(card.textsOf('tfoot')).toEqual(['Total 90 lb $90.00']);
    await card.press('Issue of Mild steel 11 ga: $100.00');
    expect(opener.open).toHaveBeenCalledWith({ figure: 'stock.issue', issueId: 'm1' });
  });

  it('shows a lead weights alone', async () => {
    const { amount: _amount, averagePerKg: _average, ...facts } = issue;
    materials.listOfJob.mockReturnValue(of({ items: [facts], weightKg: '45.359237' }));
    signIn('lead');
    const card = await render(MaterialIssuesCard, { jobId: 'job' });
    expect(card.text).toContain('100 lb');
    expect(card.text).not.toContain('$');
    expect(card.all('button')).toHaveLength(0);
  });
});

describe('dialogs of a job’s dated rows', () => {
  const open = async (type: typeof InvoiceDialog | typeof OutsideServiceDialog, data: object) => {
    signIn('owner');
    TestBed.overrideProvider(MAT_DIALOG_DATA, { useValue: data });
    TestBed.overrideProvider(MatDialogRef, {
      useValue: { backdropClick: () => EMPTY, keydownEvents: () => EMPTY },
    });
    const page = await render<InvoiceDialog | OutsideServiceDialog>(type);
    return page.fixture.componentInstance as unknown as {
      form: {
        patchValue(value: object): void;
        invalid: boolean;
        get(name: string): { errors: unknown } | null;
      };
      save: () => ReturnType<typeof money.addInvoice>;
    };
  };

  it('send an amount as it is meant, and refuse one of nothing', async () => {
    money.addInvoice.mockReturnValue(of(invoice));
    const dialog = await open(InvoiceDialog, {
      jobId: 'job',
      invoice: null,
      kind: 'invoice',
      today: '2026-03-20',
    });
    dialog.form.patchValue({ number: '5001', amount: '-5' });
    expect(dialog.form.get('amount')?.errors).toEqual({ parsed: 'Must be more than 0.' });
    dialog.form.patchValue({ amount: '$1,200' });
    expect(dialog.form.invalid).toBe(false);
    await firstValueFrom(dialog.save());
    expect(money.addInvoice).toHaveBeenCalledWith('job', {
      kind: 'invoice',
      number: '5001',
      invoicedOn: '2026-03-20',
      description: '',
      amount: '1200.00',
    });
  });

  it('correct a row with its own figures', async () => {
    money.correctService.mockReturnValue(of(coat));
    const dialog = await open(OutsideServiceDialog, { jobId: 'job', service: coat, today: '2026-04-01' });
    dialog.form.patchValue({ amount: '260' });
    await firstValueFrom(dialog.save());
    expect(money.correctService).toHaveBeenCalledWith('s1', {
      incurredOn: '2026-03-10',
      vendor: 'Harbor Coating',
      description: 'Powder coat',
      amount: '260.00',
    });
  });
});
