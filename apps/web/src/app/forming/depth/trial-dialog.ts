import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type TrialBendInput } from '@brakeven/contract';
import { todayIn } from '@brakeven/values';
import { TrialBendsApi } from '../../api/trial-bends-api';
import { FormDialog } from '../../forms/form-dialog';
import { FormField } from '../../forms/form-field';
import { textControl } from '../../forms/text-control';
import { SessionStore } from '../../session/session-store';
import { FieldReader } from '../field-reader';
import { findMaterialOf } from '../fit/fit-question';
import { readWith, toMmText } from '../field-validator';
import { LENGTH_UNIT_OF } from '../forming-words';
import { type DepthFacts, readDepth } from './depth-question';

export interface TrialDialogData {
  setup: Pick<TrialBendInput, 'machineId' | 'punchId' | 'dieOpeningId' | 'materialCode'>;
  /** As typed on the page. */
  thickness: string;
  facts: DepthFacts;
}

/** Notes one trial bend of the set-up on the page. */
@Component({
  selector: 'app-trial-dialog',
  imports: [FormDialog, FormField, ReactiveFormsModule],
  template: `
    <app-form-dialog heading="Note a trial bend" submitLabel="Note it" [form]="form" [save]="save">
      <p lead class="muted">
        The reading’s zero is the machine’s own; only that it grows as the ram goes down matters. The angle is
        the inside angle, measured on the strip after it sprang back.
      </p>
      <app-form-field label="Reading of the ram" [suffix]="unit" [control]="form.controls.depthMm" />
      <app-form-field label="Angle measured" suffix="°" [control]="form.controls.measuredAngle" />
      <app-form-field label="Thickness measured" [control]="form.controls.thicknessMm" />
      <app-form-field
        label="Width of the strip"
        hint="may stay empty"
        [suffix]="unit"
        [control]="form.controls.stripWidthMm"
      />
      <app-form-field label="Bent by" [control]="form.controls.bentBy" />
      <app-form-field label="Bent on" type="date" [control]="form.controls.bentOn" />
      <p class="check">
        <label>
          <input type="checkbox" [formControl]="form.controls.isFullLength" />
          Over the full length of the work: moves the datum of narrow strips
        </label>
      </p>
    </app-form-dialog>
  `,
  styles: `
    .check {
      padding: 8px 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TrialDialog {
  private readonly data = inject<TrialDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(TrialBendsApi);
  private readonly session = inject(SessionStore);
  private readonly units = this.data.facts.units;
  private readonly material = findMaterialOf(this.data.setup.materialCode, this.data.facts.materials);
  protected readonly unit = LENGTH_UNIT_OF[this.units];

  protected readonly form = new FormGroup({
    depthMm: textControl(
      '',
      Validators.required,
      this.reads((reader, text) => readDepth(reader, '', text, this.units)),
    ),
    measuredAngle: textControl(
      '',
      Validators.required,
      this.reads((reader, text) => reader.angle('', text)),
    ),
    thicknessMm: textControl(
      this.data.thickness,
      Validators.required,
      this.reads((reader, text) => reader.thickness('', text, this.material).mm),
    ),
    stripWidthMm: textControl(
      '',
      this.reads((reader, text) => reader.lengthMm('', text, 'lengthMm')),
    ),
    bentBy: textControl(this.session.user()?.name, Validators.required, Validators.maxLength(200)),
    bentOn: textControl(todayIn(this.session.shopFormat().timeZone), Validators.required),
    isFullLength: new FormControl(false, { nonNullable: true }),
  });

  protected readonly save = () => {
    const value = this.form.getRawValue();
    const reader = this.reader();
    const width = value.stripWidthMm.trim();
    return this.api.create({
      ...this.data.setup,
      thicknessMm: toMmText(reader.thickness('', value.thicknessMm, this.material).mm),
      stripWidthMm: width === '' ? null : toMmText(reader.lengthMm('', width, 'lengthMm')),
      depthMm: toMmText(readDepth(reader, '', value.depthMm, this.units)),
      measuredAngle: String(Number(reader.angle('', value.measuredAngle).toFixed(4))),
      isFullLength: value.isFullLength,
      bentBy: value.bentBy,
      bentOn: value.bentOn,
    });
  };

  private reads(read: (reader: FieldReader, text: string) => unknown) {
    return readWith(() => this.reader(), read);
  }

  private reader(): FieldReader {
    return new FieldReader(this.units, this.data.facts.gauges);
  }
}
