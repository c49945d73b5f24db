import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type MachineRate, type MachineRateInput } from '@brakeven/contract';
import { parseRate } from '@brakeven/values';
import { MachinesApi } from '../api/machines-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { toRateText } from '../rates/to-rate-text';

export interface MachineRateDialogData {
  machineId: string;
  /** The rate to correct; absent for new ones. */
  rate: MachineRate | null;
  /** What to begin new ones with: the rates that hold today. */
  current: MachineRate | null;
  today: string;
}

/** Adds a machine's rates from a day on, or corrects them. */
@Component({
  selector: 'app-machine-rate-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.rate ? 'Correct rates' : 'Add rates from a day on'"
      [submitLabel]="data.rate ? 'Save' : 'Add rates'"
      [form]="form"
      [save]="save"
    >
      <p lead class="muted">
        @if (data.rate) {
          Costs of every day on which these rates hold are worked out anew.
        } @else {
          Earlier rates stay as they are and keep costing earlier days.
        }
      </p>
      <app-form-field class="wide" label="From" type="date" [control]="form.controls.validFrom" />
      <app-form-field
        class="wide"
        label="Machine-hour rate"
        suffix="per hour"
        hint="What an hour costs the job: depreciation, space, upkeep"
        [isNumber]="true"
        [control]="form.controls.machineHourRate"
      />
      <app-form-field
        class="wide"
        label="Charge-out rate"
        suffix="per hour"
        hint="What an hour earns on billable jobs"
        [isNumber]="true"
        [control]="form.controls.chargeOutRate"
      />
      <app-form-field
        class="wide"
        label="Running cost"
        suffix="per hour"
        hint="Power, consumables, upkeep, without the operator"
        [isNumber]="true"
        [control]="form.controls.runningCostPerHour"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MachineRateDialog {
  protected readonly data = inject<MachineRateDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(MachinesApi);
  private readonly start = this.data.rate ?? this.data.current;

  protected readonly form = new FormGroup({
    validFrom: textControl(this.data.rate?.validFrom ?? this.data.today, Validators.required),
    machineHourRate: textControl(this.start?.machineHourRate, Validators.required, parsedBy(parseRate)),
    chargeOutRate: textControl(this.start?.chargeOutRate, Validators.required, parsedBy(parseRate)),
    runningCostPerHour: textControl(this.start?.runningCostPerHour, Validators.required, parsedBy(parseRate)),
  });

  protected readonly save = () => {
    const { machineId, rate } = this.data;
    const input = this.toInput();
    return rate
      ? this.api.updateRate(machineId, rate.machineRateId, input)
      : this.api.addRate(machineId, input);
  };

  private toInput(): MachineRateInput {
    const value = this.form.getRawValue();
    return {
      validFrom: value.validFrom,
      machineHourRate: toRateText(value.machineHourRate),
      chargeOutRate: toRateText(value.chargeOutRate),
      runningCostPerHour: toRateText(value.runningCostPerHour),
    };
  }
}
