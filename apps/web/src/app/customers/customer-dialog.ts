import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type CustomerDetail } from '@brakeven/contract';
import { CustomersApi } from '../api/customers-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { textControl } from '../forms/text-control';

/** Renames a customer, on all of its jobs at once. */
@Component({
  selector: 'app-customer-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog [heading]="'Rename ' + customer.name" submitLabel="Rename" [form]="form" [save]="save">
      <app-form-field
        class="wide"
        label="Name"
        hint="On all of its jobs at once"
        [control]="form.controls.name"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CustomerDialog {
  protected readonly customer = inject<CustomerDetail>(MAT_DIALOG_DATA);
  private readonly api = inject(CustomersApi);

  protected readonly form = new FormGroup({
    name: textControl(this.customer.name, Validators.required, Validators.maxLength(200)),
  });

  protected readonly save = () => this.api.rename(this.customer.customerId, this.form.getRawValue());
}
