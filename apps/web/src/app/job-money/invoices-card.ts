import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { type FigureRef, type Invoice } from '@brakeven/contract';
import { Figure, LoadingSkeleton, LocalDatePipe, MoneyPipe, StatusTag } from '@brakeven/ui';
import { todayIn } from '@brakeven/values';
import { JobMoneyApi } from '../api/job-money-api';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { type InvoiceDialogData } from './invoice-dialog';
import { RowChanges } from './row-changes';

/** What was invoiced for a job and credited again, dated, with the sum that counts as its income. */
@Component({
  selector: 'app-invoices-card',
  imports: [Figure, LoadError, LoadingSkeleton, LocalDatePipe, MoneyPipe, StatusTag],
  providers: [RowChanges],
  templateUrl: './invoices-card.html',
  styleUrl: './voided-row.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class InvoicesCard {
  private readonly api = inject(JobMoneyApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly changes = inject(RowChanges);

  readonly jobId = input.required<string>();
  readonly changed = output();

  protected readonly list = rxResource({
    params: () => this.jobId(),
    stream: ({ params }) => this.api.listInvoices(params),
  });
  protected readonly canEdit = computed(() => this.session.can('jobs.edit'));
  protected readonly totalRef = computed<FigureRef>(() => ({ figure: 'job.invoiced', jobId: this.jobId() }));
  protected readonly nameOf = toName;

  constructor() {
    this.changes.changed.pipe(takeUntilDestroyed()).subscribe(() => {
      this.list.reload();
      this.changed.emit();
    });
  }

  protected signed({ kind, amount }: Invoice): string {
    return kind === 'credit-note' ? `-${amount}` : amount;
  }

  protected async edit(invoice: Invoice | null): Promise<void> {
    const { InvoiceDialog } = await import('./invoice-dialog');
    const today = todayIn(this.session.shopFormat().timeZone);
    const data: InvoiceDialogData = { jobId: this.jobId(), invoice, kind: 'invoice', today };
    this.dialog
      .open<unknown, InvoiceDialogData, Invoice>(InvoiceDialog, { data, width: '520px' })
      .afterClosed()
      .subscribe((saved) => {
        if (saved) this.changes.tell(`${toName(saved)} ${invoice ? 'corrected' : 'added'}.`);
      });
  }

  protected voidRow(invoice: Invoice): void {
    const { invoiceId } = invoice;
    this.changes.void(toName(invoice), this.api.voidInvoice(invoiceId), () =>
      this.api.restoreInvoice(invoiceId),
    );
  }

  protected restore(invoice: Invoice): void {
    this.changes.restore(toName(invoice), this.api.restoreInvoice(invoice.invoiceId));
  }
}

function toName({ kind, number }: Invoice): string {
  return `${kind === 'credit-note' ? 'Credit note' : 'Invoice'} ${number}`;
}
