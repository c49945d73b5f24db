import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Material } from '@brakeven/contract';
import { MassPipe, RatePipe } from '@brakeven/ui';
import { type UnitSystem } from '@brakeven/values';
import { MaterialsApi } from '../api/materials-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { LENGTH_UNITS } from '../machines/quantity-text';
import { type LotMove, previewLot, toLotForm, toLotInput } from './lot-form';
import { MASS_UNITS } from './stock-text';

export interface LotDialogData {
  material: Material;
  /** Null to receive one. */
  lot: LotMove;
  today: string;
  units: UnitSystem;
}

/** Receives a lot or corrects one; says what it weighs and costs while it is typed. */
@Component({
  selector: 'app-lot-dialog',
  imports: [FormDialog, FormField, MassPipe, RatePipe],
  template: `
    <app-form-dialog
      [heading]="data.lot ? 'Correct lot ' + data.lot.lot?.number : 'Receive ' + data.material.name"
      [submitLabel]="data.lot ? 'Save' : 'Receive lot'"
      [form]="form"
      [save]="save"
    >
      <p lead class="muted">
        @if (data.lot) {
          The lot as it was is voided and this one takes its place; later issues are valued anew, except in
          closed months.
        } @else {
          Say the weight from the scale ticket, or how many sheets of which size.
        }
      </p>
      <app-form-field label="Received on" type="date" [control]="form.controls.receivedOn" />
      <app-form-field
        label="Lot number"
        hint="Left empty it gets the next one"
        [control]="form.controls.number"
      />
      <app-form-field class="wide" label="Vendor" [control]="form.controls.vendor" />
      <app-form-field label="Sheets" [isNumber]="true" [control]="form.controls.sheets" />
      <app-form-field
        label="Weight"
        hint="Left empty it is worked out"
        [suffix]="massUnit"
        [isNumber]="true"
        [control]="form.controls.weightKg"
      />
      <app-form-field
        label="Length of a sheet"
        [suffix]="lengthUnit"
        [isNumber]="true"
        [control]="form.controls.sheetLengthMm"
      />
      <app-form-field
        label="Width of a sheet"
        [suffix]="lengthUnit"
        [isNumber]="true"
        [control]="form.controls.sheetWidthMm"
      />
      <app-form-field label="Cost" [isNumber]="true" [control]="form.controls.cost" />
      <app-form-field label="Freight" [isNumber]="true" [control]="form.controls.freight" />
      <p class="preview" role="status">
        @if (preview(); as shown) {
          {{ shown.weightKg | mass }}{{ shown.isWorkedOut ? ' worked out from the sheets' : '' }}
          @if (shown.landedPerUnit; as landed) {
            · {{ landed | rate }} per {{ massUnit }} with freight
          }
        } @else if (!canWeigh) {
          This material has no thickness or no density: write the weight.
        }
      </p>
    </app-form-dialog>
  `,
  styles: `
    .preview {
      min-height: 22px;
      margin-top: 6px;
      font-weight: 500;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LotDialog {
  protected readonly data = inject<LotDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(MaterialsApi);
  protected readonly massUnit = MASS_UNITS[this.data.units];
  protected readonly lengthUnit = LENGTH_UNITS[this.data.units];
  protected readonly canWeigh =
    this.data.material.thicknessMm !== null && this.data.material.densityKgM3 !== null;

  protected readonly form = toLotForm(this.data.material, this.data.lot, this.data.today, this.data.units);
  private readonly changed = toSignal(this.form.valueChanges);
  protected readonly preview = computed(() => {
    this.changed();
    return previewLot(this.data.material, this.form, this.data.lot, this.data.units);
  });

  protected readonly save = () => {
    const { material, lot, units } = this.data;
    const input = toLotInput(this.form, lot, units);
    return lot ? this.api.correctLot(lot.moveId, input) : this.api.addLot(material.materialId, input);
  };
}
