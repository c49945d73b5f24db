import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type OverheadRate } from '@brakeven/contract';
import { parseRate } from '@brakeven/values';
import { PeopleApi } from '../api/people-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { toRateText } from '../rates/to-rate-text';

export interface OverheadRateDialogData {
  /** The rate to correct; absent for a new one. */
  rate: OverheadRate | null;
  today: string;
}

/** Adds an overhead rate from a day on, or corrects one. */
@Component({
  selector: 'app-overhead-rate-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.rate ? 'Correct the overhead rate' : 'New overhead rate'"
      [submitLabel]="data.rate ? 'Save' : 'Add rate'"
      [form]="form"
      [save]="save"
    >
      <p lead class="muted">
        Rent, office, insurance and the like, spread over the hours worked on jobs. Every entry on a job
        carries its share.
      </p>
      <app-form-field class="wide" label="From" type="date" [control]="form.controls.validFrom" />
      <app-form-field
        class="wide"
        label="Rate"
        suffix="per labour hour"
        [isNumber]="true"
        [control]="form.controls.ratePerLabourHour"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OverheadRateDialog {
  protected readonly data = inject<OverheadRateDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(PeopleApi);

  protected readonly form = new FormGroup({
    validFrom: textControl(this.data.rate?.validFrom ?? this.data.today, Validators.required),
    ratePerLabourHour: textControl(
      this.data.rate?.ratePerLabourHour,
      Validators.required,
      parsedBy(parseRate),
    ),
  });

  protected readonly save = () => {
    const { rate } = this.data;
    const value = this.form.getRawValue();
    const input = { validFrom: value.validFrom, ratePerLabourHour: toRateText(value.ratePerLabourHour) };
    return rate ? this.api.updateOverheadRate(rate.overheadRateId, input) : this.api.addOverheadRate(input);
  };
}
