import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type ShopGauge } from '@brakeven/contract';
import { parseLength, type UnitSystem } from '@brakeven/values';
import { FormingApi } from '../../api/forming-api';
import { FormDialog } from '../../forms/form-dialog';
import { FormField } from '../../forms/form-field';
import { moreThanNought } from '../../forms/more-than-nought';
import { parsedBy } from '../../forms/parsed-by';
import { textControl } from '../../forms/text-control';
import { toLengthText, toMillimetres } from '../../machines/quantity-text';
import { LENGTH_UNIT_OF } from '../forming-words';

export interface GaugeDialogData {
  gauge: Pick<ShopGauge, 'system' | 'gauge' | 'thicknessMm' | 'source'>;
  units: UnitSystem;
}

/** Says how thick a gauge is in this shop. */
@Component({
  selector: 'app-gauge-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog [heading]="data.gauge.gauge + ' ga, ' + data.gauge.system" [form]="form" [save]="save">
      <app-form-field label="Thickness" [suffix]="unit" [control]="form.controls.thicknessMm" />
      <app-form-field
        class="wide"
        label="Where that comes from"
        hint="such as the supplier’s chart"
        [control]="form.controls.source"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class GaugeDialog {
  protected readonly data = inject<GaugeDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(FormingApi);
  protected readonly unit = LENGTH_UNIT_OF[this.data.units];

  protected readonly form = new FormGroup({
    thicknessMm: textControl(
      toLengthText(this.data.gauge.thicknessMm, this.data.units),
      Validators.required,
      parsedBy(moreThanNought((text) => parseLength(text, this.unit))),
    ),
    source: textControl(this.data.gauge.source, Validators.required, Validators.maxLength(300)),
  });

  protected readonly save = () => {
    const { system, gauge, thicknessMm: kept } = this.data.gauge;
    const { thicknessMm, source } = this.form.getRawValue();
    const input = { thicknessMm: toMillimetres(thicknessMm, this.data.units, kept) ?? '', source };
    return this.api.updateGauge(system, gauge, input);
  };
}
