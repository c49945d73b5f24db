import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { TrialBendsApi } from '../../api/trial-bends-api';
import { FormDialog } from '../../forms/form-dialog';
import { FormField } from '../../forms/form-field';
import { textControl } from '../../forms/text-control';
import { FieldReader } from '../field-reader';
import { readWith, toMmText } from '../field-validator';
import { findMaterialOf } from '../fit/fit-question';
import { type TrialDialogData } from './trial-dialog';

/** Takes trial bends copied from a sheet, all or none; each length says its unit in the header. */
@Component({
  selector: 'app-paste-dialog',
  imports: [FormDialog, FormField, ReactiveFormsModule],
  template: `
    <app-form-dialog heading="Paste trial bends" submitLabel="Note all of them" [form]="form" [save]="save">
      <div lead class="muted">
        <p>
          Copy rows with their header from a sheet: depth and angle, and if you have them thickness, width,
          full length (yes or no), bent by and bent on. Each length says its unit in the header. All rows go
          in, or none does.
        </p>
        <pre>{{ example }}</pre>
      </div>
      <p class="wide">
        <label for="pasted">Rows with their header</label>
        <textarea
          id="pasted"
          class="field"
          rows="9"
          spellcheck="false"
          [formControl]="form.controls.text"
          [attr.aria-invalid]="form.controls.text.touched && form.controls.text.invalid"
        ></textarea>
        @if (form.controls.text.touched && form.controls.text.hasError('required')) {
          <span class="error">Paste at least the header and one row.</span>
        }
        @if (form.controls.text.getError('server'); as words) {
          <span class="error">{{ words }}</span>
        }
      </p>
      <app-form-field
        class="wide"
        label="Thickness of rows without one"
        hint="may stay empty if there is such a column"
        [control]="form.controls.thicknessMm"
      />
    </app-form-dialog>
  `,
  styles: `
    pre {
      margin: 8px 0;
      padding: 8px 10px;
      overflow-x: auto;
      border-radius: 4px;
      background: var(--sheet-sunken);
    }
    textarea {
      display: block;
      width: 100%;
      margin-top: 4px;
      font-family: ui-monospace, monospace;
    }
    .error {
      color: var(--rust-text);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PasteDialog {
  private readonly data = inject<TrialDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(TrialBendsApi);
  private readonly units = this.data.facts.units;
  private readonly material = findMaterialOf(this.data.setup.materialCode, this.data.facts.materials);
  protected readonly example =
    this.units === 'us'
      ? 'Depth (in), Angle\n0.301, 118.5\n0.412, 91.0\n0.455, 82.5'
      : 'Depth (mm), Angle\n7.65, 118.5\n10.46, 91.0\n11.56, 82.5';

  protected readonly form = new FormGroup({
    text: textControl('', Validators.required),
    thicknessMm: textControl(
      this.data.thickness,
      readWith(
        () => this.reader(),
        (reader, text) => reader.thickness('', text, this.material),
      ),
    ),
  });

  protected readonly save = () => {
    const { text, thicknessMm } = this.form.getRawValue();
    const typed = thicknessMm.trim();
    return this.api.paste({
      ...this.data.setup,
      text,
      thicknessMm: typed === '' ? null : toMmText(this.reader().thickness('', typed, this.material).mm),
    });
  };

  private reader(): FieldReader {
    return new FieldReader(this.units, this.data.facts.gauges);
  }
}
