import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type ViewState } from '@brakeven/contract';
import { SavedViewsApi } from '../api/saved-views-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { textControl } from '../forms/text-control';

export interface SaveViewDialogData {
  /** Name of the own view that is shown, to be replaced. */
  name: string;
  isDefault: boolean;
  state: ViewState;
}

/** Keeps columns, order and filter of the jobs under a name. */
@Component({
  selector: 'app-save-view-dialog',
  imports: [FormDialog, FormField, ReactiveFormsModule],
  template: `
    <app-form-dialog heading="Save this view" submitLabel="Save view" [form]="form" [save]="save">
      <p lead class="muted">
        Columns, order and filter as they stand. A view of yours with the same name is replaced; nobody else
        sees it.
      </p>
      <app-form-field class="wide" label="Name" [control]="form.controls.name" />
      <label class="check">
        <input type="checkbox" [formControl]="form.controls.isDefault" />
        <span>Open Jobs with this view</span>
      </label>
    </app-form-dialog>
  `,
  styles: `
    .check {
      display: flex;
      gap: 10px;
      align-items: center;
      min-height: 36px;
    }
    input[type='checkbox'] {
      width: 18px;
      height: 18px;
      accent-color: var(--layout-blue);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SaveViewDialog {
  private readonly api = inject(SavedViewsApi);
  private readonly data = inject<SaveViewDialogData>(MAT_DIALOG_DATA);

  protected readonly form = new FormGroup({
    name: textControl(this.data.name, Validators.required, Validators.maxLength(60)),
    isDefault: new FormControl(this.data.isDefault, { nonNullable: true }),
  });
  protected readonly save = () => {
    const { name, isDefault } = this.form.getRawValue();
    return this.api.saveView({ page: 'jobs', name: name.trim(), isDefault, state: this.data.state });
  };
}
