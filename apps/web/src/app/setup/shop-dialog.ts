import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type OvertimeTo, type Shop } from '@brakeven/contract';
import { type UnitSystem } from '@brakeven/values';
import { ShopApi } from '../api/shop-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { OVERTIME_CAUTION, OVERTIME_OPTIONS, parseThreshold, toThresholdText } from './overtime-words';
import { listTimeZones, UNIT_OPTIONS, WEEKDAYS } from './shop-words';

/** Changes the shop's settings; week and threshold decide what counts as overtime. */
@Component({
  selector: 'app-shop-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog heading="Change the shop’s settings" [form]="form" [save]="save">
      <app-form-field class="wide" label="Name" [control]="form.controls.name" />
      <app-form-field
        class="wide"
        label="Time zone"
        hint="Decides which day it is: nothing later than today is booked"
        [options]="timeZones"
        [control]="form.controls.timeZone"
      />
      <app-form-field
        label="Currency"
        hint="Three letters; amounts are not converted"
        [control]="form.controls.currency"
      />
      <app-form-field label="Week begins on" [options]="weekdays" [control]="form.controls.weekStart" />
      <app-form-field label="Units" [options]="units" [control]="form.controls.units" />
      <app-form-field
        label="Overtime above"
        suffix="h a week"
        hint="Empty: no overtime is computed"
        [isNumber]="true"
        [control]="form.controls.overtimeThresholdHours"
      />
      <app-form-field
        label="Overtime premium goes to"
        hint="Overhead of the shop, or the week’s jobs by hours"
        [options]="overtimeTargets"
        [control]="form.controls.overtimeTo"
      />
      <p class="muted">{{ caution }} Weeks in closed months keep the overtime that was posted.</p>
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShopDialog {
  private readonly shop = inject<Shop>(MAT_DIALOG_DATA);
  private readonly api = inject(ShopApi);
  protected readonly timeZones = listTimeZones(this.shop.timeZone).map((zone) => ({
    value: zone,
    label: zone,
  }));
  protected readonly weekdays = WEEKDAYS.map((label, day) => ({ value: String(day), label }));
  protected readonly units = UNIT_OPTIONS;
  protected readonly overtimeTargets = OVERTIME_OPTIONS;
  protected readonly caution = OVERTIME_CAUTION;

  protected readonly form = new FormGroup({
    name: textControl(this.shop.name, Validators.required, Validators.maxLength(200)),
    timeZone: textControl(this.shop.timeZone, Validators.required),
    currency: textControl(
      this.shop.currency,
      Validators.required,
      Validators.minLength(3),
      Validators.maxLength(3),
    ),
    weekStart: textControl(String(this.shop.weekStart)),
    units: textControl(this.shop.units),
    overtimeThresholdHours: textControl(
      toThresholdText(this.shop.overtimeThresholdHours),
      parsedBy(parseThreshold),
    ),
    overtimeTo: textControl(this.shop.overtimeTo),
  });

  protected readonly save = () => {
    const { units, weekStart, overtimeThresholdHours, overtimeTo, ...value } = this.form.getRawValue();
    const threshold = parseThreshold(overtimeThresholdHours);
    return this.api.updateShop({
      ...value,
      units: units as UnitSystem,
      weekStart: Number(weekStart),
      overtimeThresholdHours: threshold.ok ? threshold.value : null,
      overtimeTo: overtimeTo as OvertimeTo,
    });
  };
}
