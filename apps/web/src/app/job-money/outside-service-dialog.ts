import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type OutsideService, type OutsideServiceInput } from '@brakeven/contract';
import { moneyText, parseMoney } from '@brakeven/values';
import { JobMoneyApi } from '../api/job-money-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { moreThanNought } from '../forms/more-than-nought';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';

export interface OutsideServiceDialogData {
  jobId: string;
  /** Null for a new one. */
  service: OutsideService | null;
  today: string;
}

/** Adds an outside service to a job, or corrects one. */
@Component({
  selector: 'app-outside-service-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.service ? 'Correct an outside service' : 'Add an outside service'"
      [submitLabel]="data.service ? 'Save' : 'Add'"
      [form]="form"
      [save]="save"
    >
      @if (data.service) {
        <p lead class="muted">The row as it was is voided and this one takes its place.</p>
      }
      <app-form-field label="Date" type="date" [control]="form.controls.incurredOn" />
      <app-form-field label="Amount" [isNumber]="true" [control]="form.controls.amount" />
      <app-form-field class="wide" label="Vendor" [control]="form.controls.vendor" />
      <app-form-field
        class="wide"
        label="Description"
        hint="For example powder coating"
        [control]="form.controls.description"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OutsideServiceDialog {
  protected readonly data = inject<OutsideServiceDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(JobMoneyApi);

  protected readonly form = new FormGroup({
    incurredOn: textControl(this.data.service?.incurredOn ?? this.data.today, Validators.required),
    amount: textControl(this.data.service?.amount, Validators.required, parsedBy(moreThanNought(parseMoney))),
    vendor: textControl(this.data.service?.vendor, Validators.maxLength(300)),
    description: textControl(this.data.service?.description, Validators.maxLength(300)),
  });

  protected readonly save = () => {
    const { jobId, service } = this.data;
    const input = this.toInput();
    return service
      ? this.api.correctService(service.outsideServiceId, input)
      : this.api.addService(jobId, input);
  };

  private toInput(): OutsideServiceInput {
    const value = this.form.getRawValue();
    const amount = parseMoney(value.amount);
    return { ...value, amount: amount.ok ? moneyText(amount.value) : value.amount };
  }
}
