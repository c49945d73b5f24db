import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Machine, type MachineInput } from '@brakeven/contract';
import { parseForce, parseLength, type UnitSystem } from '@brakeven/values';
import { MachinesApi } from '../api/machines-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import {
  FORCE_UNITS,
  LENGTH_UNITS,
  toForceText,
  toKilonewtons,
  toLengthText,
  toMillimetres,
} from './quantity-text';

export interface MachineDialogData {
  /** Absent for a new machine. */
  machine: Machine | null;
  units: UnitSystem;
}

/** Adds a machine or changes its facts. */
@Component({
  selector: 'app-machine-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.machine ? 'Change ' + data.machine.name : 'Add a machine'"
      [submitLabel]="data.machine ? 'Save' : 'Add machine'"
      [form]="form"
      [save]="save"
    >
      <app-form-field
        label="Code"
        hint="As timesheets write it, for example P2"
        [control]="form.controls.code"
      />
      <app-form-field label="Name" [control]="form.controls.name" />
      <app-form-field
        class="wide"
        label="Kind"
        hint="For example hydraulic press brake"
        [control]="form.controls.kind"
      />
      <app-form-field
        class="wide"
        label="In service from"
        type="date"
        hint="Only days from then on count towards its payback"
        [control]="form.controls.inServiceOn"
      />
      <app-form-field
        label="Rated force"
        hint="From the rating plate"
        [suffix]="forceUnit"
        [isNumber]="true"
        [control]="form.controls.ratedForceKn"
      />
      <app-form-field
        label="Bed length"
        [suffix]="lengthUnit"
        [isNumber]="true"
        [control]="form.controls.bedLengthMm"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MachineDialog {
  protected readonly data = inject<MachineDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(MachinesApi);
  protected readonly forceUnit = this.data.units === 'us' ? 'US tons' : 'kN';
  protected readonly lengthUnit = LENGTH_UNITS[this.data.units];

  protected readonly form = new FormGroup({
    code: textControl(this.data.machine?.code, Validators.required, Validators.maxLength(40)),
    name: textControl(this.data.machine?.name, Validators.required, Validators.maxLength(200)),
    kind: textControl(this.data.machine?.kind, Validators.required, Validators.maxLength(200)),
    inServiceOn: textControl(this.data.machine?.inServiceOn),
    ratedForceKn: textControl(
      toForceText(this.data.machine?.ratedForceKn ?? null, this.data.units),
      parsedBy((value) => parseForce(value, FORCE_UNITS[this.data.units])),
    ),
    bedLengthMm: textControl(
      toLengthText(this.data.machine?.bedLengthMm ?? null, this.data.units),
      parsedBy((value) => parseLength(value, LENGTH_UNITS[this.data.units])),
    ),
  });

  protected readonly save = () => {
    const { machine } = this.data;
    return machine ? this.api.update(machine.machineId, this.toInput()) : this.api.create(this.toInput());
  };

  private toInput(): MachineInput {
    const { machine, units } = this.data;
    const value = this.form.getRawValue();
    return {
      code: value.code,
      name: value.name,
      kind: value.kind,
      inServiceOn: value.inServiceOn || null,
      ratedForceKn: toKilonewtons(value.ratedForceKn, units, machine?.ratedForceKn ?? null),
      bedLengthMm: toMillimetres(value.bedLengthMm, units, machine?.bedLengthMm ?? null),
    };
  }
}
