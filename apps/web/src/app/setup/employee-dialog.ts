import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Employee } from '@brakeven/contract';
import { parsePercent, parseRate } from '@brakeven/values';
import { PeopleApi } from '../api/people-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { toPercentText, toRateText } from '../rates/to-rate-text';

export interface EmployeeDialogData {
  /** Absent for somebody new. */
  employee: Employee | null;
  today: string;
}

const ACTIVE_OPTIONS = [
  { value: 'yes', label: 'Works here' },
  { value: 'no', label: 'Has left' },
];

/** Adds an employee with a first rate, or changes number and name. */
@Component({
  selector: 'app-employee-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.employee ? 'Change ' + data.employee.name : 'Add an employee'"
      [submitLabel]="data.employee ? 'Save' : 'Add employee'"
      [form]="form"
      [save]="save"
    >
      <app-form-field label="Number" hint="As timesheets write it" [control]="form.controls.number" />
      <app-form-field label="Name" [control]="form.controls.name" />
      @if (data.employee) {
        <app-form-field
          class="wide"
          label="Status"
          hint="Hours and costs of somebody who has left stay as they are"
          [options]="activeOptions"
          [control]="form.controls.isActive"
        />
      } @else {
        <app-form-field
          class="wide"
          label="First rate from"
          type="date"
          hint="Hours before that day are refused"
          [control]="form.controls.validFrom"
        />
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
      }
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EmployeeDialog {
  protected readonly data = inject<EmployeeDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(PeopleApi);
  private readonly isNew = this.data.employee === null;
  protected readonly activeOptions = ACTIVE_OPTIONS;

  protected readonly form = new FormGroup({
    number: textControl(this.data.employee?.number, Validators.required, Validators.maxLength(40)),
    name: textControl(this.data.employee?.name, Validators.required, Validators.maxLength(200)),
    isActive: textControl(this.data.employee?.isActive === false ? 'no' : 'yes'),
    validFrom: textControl(this.data.today, ...this.ifNew(Validators.required)),
    wagePerHour: textControl('', ...this.ifNew(Validators.required, parsedBy(parseRate))),
    burdenPercent: textControl('', ...this.ifNew(Validators.required, parsedBy(parsePercent))),
  });

  protected readonly save = () => {
    const { employee } = this.data;
    const { number, name, isActive, validFrom, wagePerHour, burdenPercent } = this.form.getRawValue();
    if (employee)
      return this.api.updateEmployee(employee.employeeId, { number, name, isActive: isActive === 'yes' });
    const rate = {
      validFrom,
      wagePerHour: toRateText(wagePerHour),
      burdenPercent: toPercentText(burdenPercent),
    };
    return this.api.createEmployee({ number, name, rate });
  };

  private ifNew<T>(...validators: T[]): T[] {
    return this.isNew ? validators : [];
  }
}
