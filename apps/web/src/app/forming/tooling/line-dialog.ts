import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { FormingApi } from '../../api/forming-api';
import { FormDialog } from '../../forms/form-dialog';
import { FormField } from '../../forms/form-field';
import { textControl } from '../../forms/text-control';
import { numberWords, toPlainText } from './tool-text';

/** Changes the share of a rating that the shop keeps below. */
@Component({
  selector: 'app-line-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog heading="The shop’s line" [form]="form" [save]="save">
      <p lead class="muted">
        Bends that take more of the rating than this are marked, and so are runs. The rating plates still
        decide.
      </p>
      <app-form-field label="Share of the rating" suffix="%" [control]="form.controls.forceLinePercent" />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LineDialog {
  private readonly data = inject<{ forceLinePercent: string }>(MAT_DIALOG_DATA);
  private readonly api = inject(FormingApi);

  protected readonly form = new FormGroup({
    forceLinePercent: textControl(
      this.data.forceLinePercent,
      Validators.required,
      numberWords(1, 100, 'The line is 1 to 100 percent of the rating, such as 80.'),
    ),
  });

  protected readonly save = () => {
    const { forceLinePercent } = this.form.getRawValue();
    return this.api.updateForceLine({ forceLinePercent: toPlainText(forceLinePercent) ?? '' });
  };
}
