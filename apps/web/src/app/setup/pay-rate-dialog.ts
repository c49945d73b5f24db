import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Employee, type PayRate } from '@brakeven/contract';
import { parsePercent, parseRate } from '@brakeven/values';
import { PeopleApi } from '../api/people-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { toPercentText, toRateText } from '../rates/to-rate-text';

export interface PayRateDialogData {
  employee: Employee;
  /** The rate to correct; absent for a new one. */
  rate: PayRate | null;
  /** What to begin a new one with. */
  current: PayRate | undefined;
  today: string;
}

/** Adds a pay rate from a day on, or corrects one. */
@Component({
  selector: 'app-pay-rate-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="(data.rate ? 'Correct the rate of ' : 'New rate for ') + data.employee.name"
      [submitLabel]="data.rate ? 'Save' : 'Add rate'"
      [form]="form"
      [save]="save"
    >
      <p lead class="muted">
        {{
          data.rate
            ? 'Costs of every day on which this rate holds are worked out anew.'
            : 'Earlier rates stay and keep costing earlier days.'
        }}
      </p>
      <app-form-field class="wide" label="From" type="date" [control]="form.controls.validFrom" />
      <app-form-field
        label="Wage"
        suffix="per hour"
        [isNumber]="true"
        [control]="form.controls.wagePerHour"
      />
      <app-form-field
        label="Burden"
        suffix="%"
        hint="Payroll tax, insurance, leave on top of the wage"
        [isNumber]="true"
        [control]="form.controls.burdenPercent"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PayRateDialog {
  protected readonly data = inject<PayRateDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(PeopleApi);
  private readonly start = this.data.rate ?? this.data.current;

  protected readonly form = new FormGroup({
    validFrom: textControl(this.data.rate?.validFrom ?? this.data.today, Validators.required),
    wagePerHour: textControl(this.start?.wagePerHour, Validators.required, parsedBy(parseRate)),
    burdenPercent: textControl(this.start?.burdenPercent, Validators.required, parsedBy(parsePercent)),
  });

  protected readonly save = () => {
    const { employee, rate } = this.data;
    const value = this.form.getRawValue();
    const input = {
      validFrom: value.validFrom,
      wagePerHour: toRateText(value.wagePerHour),
      burdenPercent: toPercentText(value.burdenPercent),
    };
    return rate
      ? this.api.updatePayRate(employee.employeeId, rate.payRateId, input)
      : this.api.addPayRate(employee.employeeId, input);
  };
}
