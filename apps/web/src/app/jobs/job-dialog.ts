import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { type Job } from '@brakeven/contract';
import { catchError, of } from 'rxjs';
import { JobsApi } from '../api/jobs-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { toJobForm, toJobInput } from './job-form';
import { JOB_STATUS_ORDER, toStatusWord } from './job-status';

/** Adds a job, or changes the one it is given. */
@Component({
  selector: 'app-job-dialog',
  imports: [FormDialog, FormField, MatFormFieldModule, MatInputModule, ReactiveFormsModule],
  template: `
    <app-form-dialog
      [heading]="job ? 'Job ' + job.number : 'New job'"
      [submitLabel]="job ? 'Save' : 'Add job'"
      [form]="form"
      [save]="save"
    >
      <div class="fields">
        <app-form-field label="Number" [control]="form.controls.number" />
        <app-form-field label="Status" [control]="form.controls.status" [options]="statuses" />
        <app-form-field class="wide" label="Title" [control]="form.controls.title" />
        <mat-form-field class="wide" appearance="outline" subscriptSizing="dynamic">
          <mat-label>Customer</mat-label>
          <input matInput [formControl]="form.controls.customer" list="customers" autocomplete="off" />
          <mat-hint>A new name adds the customer.</mat-hint>
        </mat-form-field>
        <datalist id="customers">
          @for (customer of customers(); track customer.customerId) {
            <option [value]="customer.name"></option>
          }
        </datalist>
        <app-form-field label="Opened" type="date" [control]="form.controls.openedOn" />
        <app-form-field label="Due" type="date" [control]="form.controls.dueOn" />
        <app-form-field label="Pieces" [isNumber]="true" [control]="form.controls.quantity" />
        <app-form-field label="Quoted price" [isNumber]="true" [control]="form.controls.quotedPrice" />
        <label class="wide check">
          <input type="checkbox" [formControl]="form.controls.isBillable" />
          <span>Billable: its hours on a machine earn the charge-out rate</span>
        </label>
      </div>
    </app-form-dialog>
  `,
  styles: `
    .fields {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(200px, 1fr));
      gap: 0 14px;
    }
    .wide {
      grid-column: 1 / -1;
    }
    mat-form-field {
      margin: 7px 0;
    }
    .check {
      display: flex;
      gap: 10px;
      align-items: center;
      min-height: 36px;
      color: var(--ink);
    }
    input[type='checkbox'] {
      width: 18px;
      height: 18px;
      accent-color: var(--layout-blue);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class JobDialog {
  private readonly api = inject(JobsApi);
  protected readonly job = inject<Job | null>(MAT_DIALOG_DATA);

  protected readonly form = toJobForm(this.job);
  protected readonly statuses = JOB_STATUS_ORDER.map((status) => ({
    value: status,
    label: toStatusWord(status),
  }));
  // Without the list the name can still be typed.
  protected readonly customers = toSignal(this.api.listCustomers().pipe(catchError(() => of([]))), {
    initialValue: [],
  });
  protected readonly save = () => {
    const input = toJobInput(this.form);
    return this.job ? this.api.updateJob(this.job.jobId, input) : this.api.createJob(input);
  };
}
