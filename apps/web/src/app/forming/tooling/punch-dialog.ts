import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Punch, type PunchInput } from '@brakeven/contract';
import { parseLength, type UnitSystem } from '@brakeven/values';
import { FormingApi } from '../../api/forming-api';
import { FormDialog } from '../../forms/form-dialog';
import { FormField } from '../../forms/form-field';
import { parsedBy } from '../../forms/parsed-by';
import { textControl } from '../../forms/text-control';
import { toLengthText, toMillimetres } from '../../machines/quantity-text';
import { LENGTH_UNIT_OF } from '../forming-words';
import {
  LIMIT_UNITS,
  numberWords,
  parseLimit,
  toLimitInput,
  toLimitText,
  toPlainText,
  TOOL_ANGLE_WORDS,
} from './tool-text';

export interface PunchDialogData {
  machineId: string;
  /** Null for a new one. */
  punch: Punch | null;
  units: UnitSystem;
}

/** Adds a punch of a press or changes it. */
@Component({
  selector: 'app-punch-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.punch ? 'Change ' + data.punch.name : 'Add a punch'"
      [submitLabel]="data.punch ? 'Save' : 'Add punch'"
      [form]="form"
      [save]="save"
    >
      <app-form-field
        class="wide"
        label="Name"
        hint="as it is called in the shop"
        [control]="form.controls.name"
      />
      <app-form-field label="Nose radius" [suffix]="unit" [control]="form.controls.noseRadiusMm" />
      <app-form-field label="Angle" suffix="°" hint="may stay empty" [control]="form.controls.angle" />
      <app-form-field
        label="Length"
        hint="may stay empty"
        [suffix]="unit"
        [control]="form.controls.lengthMm"
      />
      <app-form-field
        label="Force limit"
        hint="from its plate; empty if unknown"
        [suffix]="limitUnit"
        [control]="form.controls.forceLimitKnPerM"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PunchDialog {
  protected readonly data = inject<PunchDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(FormingApi);
  protected readonly unit = LENGTH_UNIT_OF[this.data.units];
  protected readonly limitUnit = LIMIT_UNITS[this.data.units];
  private readonly length = parsedBy((text) => parseLength(text, this.unit));

  protected readonly form = new FormGroup({
    name: textControl(this.data.punch?.name, Validators.required, Validators.maxLength(200)),
    noseRadiusMm: textControl(
      toLengthText(this.data.punch?.noseRadiusMm ?? null, this.data.units),
      Validators.required,
      this.length,
    ),
    angle: textControl(this.data.punch?.angle, numberWords(1, 179, TOOL_ANGLE_WORDS)),
    lengthMm: textControl(toLengthText(this.data.punch?.lengthMm ?? null, this.data.units), this.length),
    forceLimitKnPerM: textControl(
      toLimitText(this.data.punch?.forceLimitKnPerM ?? null, this.data.units),
      parsedBy((text) => parseLimit(text, this.data.units)),
    ),
  });

  protected readonly save = () => {
    const value = this.form.getRawValue();
    const { punch, units, machineId } = this.data;
    const input: PunchInput = {
      name: value.name,
      noseRadiusMm: toMillimetres(value.noseRadiusMm, units, punch?.noseRadiusMm ?? null) ?? '',
      angle: toPlainText(value.angle),
      lengthMm: toMillimetres(value.lengthMm, units, punch?.lengthMm ?? null),
      forceLimitKnPerM: toLimitInput(value.forceLimitKnPerM, units, punch?.forceLimitKnPerM ?? null),
    };
    return punch ? this.api.updatePunch(punch.punchId, input) : this.api.createPunch(machineId, input);
  };
}
