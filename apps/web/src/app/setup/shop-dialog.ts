import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Shop } from '@brakeven/contract';
import { type UnitSystem } from '@brakeven/values';
import { ShopApi } from '../api/shop-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { textControl } from '../forms/text-control';
import { listTimeZones, UNIT_OPTIONS, WEEKDAYS } from './shop-words';

/** Changes the shop's settings. */
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
      <app-form-field class="wide" label="Units" [options]="units" [control]="form.controls.units" />
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
  });

  protected readonly save = () => {
    const { units, weekStart, ...value } = this.form.getRawValue();
    return this.api.updateShop({ ...value, units: units as UnitSystem, weekStart: Number(weekStart) });
  };
}
