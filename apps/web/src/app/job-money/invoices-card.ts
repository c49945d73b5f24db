import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { type Invoice, type InvoiceList } from '@brakeven/contract';
import { todayIn } from '@brakeven/values';
import { JobMoneyApi } from '../api/job-money-api';
import { SessionStore } from '../session/session-store';
import { type DatedRows } from './dated-rows';
import { DatedRowsCard } from './dated-rows-card';
import { type InvoiceDialogData } from './invoice-dialog';
import { openRowDialog } from './open-row-dialog';

/** What was invoiced for a job and credited again, dated, with the sum that counts as its income. */
@Component({
  selector: 'app-invoices-card',
  imports: [DatedRowsCard],
  template: `<app-dated-rows-card [rows]="rows()" (changed)="changed.emit()" />`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class InvoicesCard {
  private readonly api = inject(JobMoneyApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);

  readonly jobId = input.required<string>();
  readonly changed = output();

  protected readonly rows = computed((): DatedRows<Invoice, InvoiceList> => {
    const jobId = this.jobId();
    return {
      heading: 'Invoices',
      empty: [
        'Nothing invoiced yet.',
        'Invoices and credit notes of the job stand here; together they are its income.',
      ],
      totalLabel: 'Invoiced',
      columns: [
        { heading: 'Number', cell: (invoice) => ({ text: toName(invoice) }) },
        { heading: 'Description', cell: ({ description }) => ({ text: description }) },
        {
          heading: 'Amount',
          isNumber: true,
          cell: (invoice) => ({ amount: toSigned(invoice) }),
          total: ({ total }) => ({
            amount: total,
            ref: { figure: 'job.invoiced', jobId },
            label: 'Invoiced',
          }),
        },
      ],
      canEdit: this.session.can('jobs.edit'),
      actions: [{ label: 'Add an invoice', run: () => this.edit(null) }],
      load: () => this.api.listInvoices(jobId),
      idOf: ({ invoiceId }) => invoiceId,
      dateOf: ({ invoicedOn }) => invoicedOn,
      nameOf: toName,
      correct: (invoice) => this.edit(invoice),
      void: ({ invoiceId }) => this.api.voidInvoice(invoiceId),
      restore: ({ invoiceId }) => this.api.restoreInvoice(invoiceId),
    };
  });

  private edit(invoice: Invoice | null) {
    const today = todayIn(this.session.shopFormat().timeZone);
    return openRowDialog<InvoiceDialogData, Invoice>(
      this.dialog,
      async () => (await import('./invoice-dialog')).InvoiceDialog,
      {
        data: { jobId: this.jobId(), invoice, kind: 'invoice', today },
        width: '520px',
        tell: (saved) => `${toName(saved)} ${invoice ? 'corrected' : 'added'}.`,
      },
    );
  }
}

function toName({ kind, number }: Invoice): string {
  return `${kind === 'credit-note' ? 'Credit note' : 'Invoice'} ${number}`;
}

/** A credit note counts against the invoices. */
function toSigned({ kind, amount }: Invoice): string {
  return kind === 'credit-note' ? `-${amount}` : amount;
}
