import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { formatMonth } from '@brakeven/values';
import { MonthsApi } from '../api/months-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { textControl } from '../forms/text-control';

/** Asks why a closed month is to be reopened, and reopens it. Closes with the month as it is then. */
@Component({
  selector: 'app-reopen-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog [heading]="'Reopen ' + name" submitLabel="Reopen" [form]="form" [save]="save">
      <p lead class="muted">
        Late lines that stand in later months go back to their own days in {{ name }}, and rates as they are
        now price it again. Who reopened it and why is kept.
      </p>
      <app-form-field
        class="wide"
        label="Reason"
        hint="For example: a week of timesheets was missing"
        [control]="form.controls.reason"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ReopenDialog {
  private readonly month = inject<string>(MAT_DIALOG_DATA);
  private readonly api = inject(MonthsApi);
  protected readonly name = formatMonth(this.month);
  protected readonly form = new FormGroup({
    reason: textControl('', Validators.required, Validators.pattern(/\S/), Validators.maxLength(500)),
  });
  protected readonly save = () => this.api.reopen(this.month, this.form.getRawValue().reason.trim());
}
