import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Machine, type Operation } from '@brakeven/contract';
import { ShopApi } from '../api/shop-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { textControl } from '../forms/text-control';

export interface OperationDialogData {
  /** Absent for a new one. */
  operation: Operation | null;
  machines: readonly Machine[];
}

/** Adds an operation or changes one. */
@Component({
  selector: 'app-operation-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.operation ? 'Change ' + data.operation.name : 'Add an operation'"
      [submitLabel]="data.operation ? 'Save' : 'Add operation'"
      [form]="form"
      [save]="save"
    >
      <app-form-field label="Code" hint="As timesheets write it" [control]="form.controls.code" />
      <app-form-field label="Name" [control]="form.controls.name" />
      <app-form-field
        class="wide"
        label="Machine if the timesheet names none"
        hint="Its hours then count as that machine’s, also those already booked"
        [options]="machines"
        [control]="form.controls.defaultMachineId"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OperationDialog {
  protected readonly data = inject<OperationDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(ShopApi);
  protected readonly machines = [
    { value: '', label: 'None' },
    ...this.data.machines.map(({ machineId, code, name }) => ({
      value: machineId,
      label: `${code} ${name}`,
    })),
  ];

  protected readonly form = new FormGroup({
    code: textControl(this.data.operation?.code, Validators.required, Validators.maxLength(40)),
    name: textControl(this.data.operation?.name, Validators.required, Validators.maxLength(200)),
    defaultMachineId: textControl(this.data.operation?.defaultMachineId),
  });

  protected readonly save = () => {
    const { operation } = this.data;
    const { code, name, defaultMachineId } = this.form.getRawValue();
    const input = { code, name, defaultMachineId: defaultMachineId || null };
    return operation
      ? this.api.updateOperation(operation.operationId, input)
      : this.api.createOperation(input);
  };
}
