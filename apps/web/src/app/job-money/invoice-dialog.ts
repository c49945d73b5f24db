import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Invoice, type InvoiceInput, type InvoiceKind } from '@brakeven/contract';
import { moneyText, parseMoney } from '@brakeven/values';
import { JobMoneyApi } from '../api/job-money-api';
import { FormDialog } from '../forms/form-dialog';
import { type FieldOption, FormField } from '../forms/form-field';
import { moreThanNought } from '../forms/more-than-nought';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';

export interface InvoiceDialogData {
  jobId: string;
  /** Null for a new one. */
  invoice: Invoice | null;
  kind: InvoiceKind;
  today: string;
}

const KINDS: readonly FieldOption[] = [
  { value: 'invoice', label: 'Invoice' },
  { value: 'credit-note', label: 'Credit note' },
];

/** Adds an invoice or a credit note to a job, or corrects one. */
@Component({
  selector: 'app-invoice-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.invoice ? 'Correct ' + data.invoice.number : 'Add an invoice or credit note'"
      [submitLabel]="data.invoice ? 'Save' : 'Add'"
      [form]="form"
      [save]="save"
    >
      @if (data.invoice) {
        <p lead class="muted">The row as it was is voided and this one takes its place.</p>
      }
      <app-form-field label="Kind" [options]="kinds" [control]="form.controls.kind" />
      <app-form-field label="Number" [control]="form.controls.number" />
      <app-form-field label="Date" type="date" [control]="form.controls.invoicedOn" />
      <app-form-field
        label="Amount"
        hint="Above 0, for a credit note too"
        [isNumber]="true"
        [control]="form.controls.amount"
      />
      <app-form-field class="wide" label="Description" [control]="form.controls.description" />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class InvoiceDialog {
  protected readonly data = inject<InvoiceDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(JobMoneyApi);
  protected readonly kinds = KINDS;

  protected readonly form = new FormGroup({
    kind: textControl(this.data.invoice?.kind ?? this.data.kind, Validators.required),
    number: textControl(this.data.invoice?.number, Validators.required, Validators.maxLength(40)),
    invoicedOn: textControl(this.data.invoice?.invoicedOn ?? this.data.today, Validators.required),
    amount: textControl(this.data.invoice?.amount, Validators.required, parsedBy(moreThanNought(parseMoney))),
    description: textControl(this.data.invoice?.description, Validators.maxLength(300)),
  });

  protected readonly save = () => {
    const { jobId, invoice } = this.data;
    const input = this.toInput();
    return invoice ? this.api.correctInvoice(invoice.invoiceId, input) : this.api.addInvoice(jobId, input);
  };

  private toInput(): InvoiceInput {
    const value = this.form.getRawValue();
    const amount = parseMoney(value.amount);
    return {
      ...value,
      kind: value.kind as InvoiceKind,
      amount: amount.ok ? moneyText(amount.value) : value.amount,
    };
  }
}
