import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type FormingMaterialDto, type FormingMaterialInput } from '@brakeven/contract';
import { GAUGE_SYSTEMS, type GaugeSystem } from '@brakeven/forming';
import { parseDensity, parseStress, type UnitSystem } from '@brakeven/values';
import { FormingApi } from '../../api/forming-api';
import { FormDialog } from '../../forms/form-dialog';
import { FormField } from '../../forms/form-field';
import { moreThanNought } from '../../forms/more-than-nought';
import { parsedBy } from '../../forms/parsed-by';
import { textControl } from '../../forms/text-control';
import {
  DENSITY_UNITS,
  STRESS_UNITS,
  toDensityText,
  toKilogramsPerM3,
  toMegapascals,
  toStressText,
} from '../../materials/stock-text';
import { numberWords, toPlainText } from './tool-text';

export interface BendMaterialDialogData {
  /** Null for a new one. */
  material: FormingMaterialDto | null;
  units: UnitSystem;
}

/** Adds a material to bend or changes the figures of one, each with where it comes from. */
@Component({
  selector: 'app-bend-material-dialog',
  imports: [FormDialog, FormField],
  template: `
    @let fields = form.controls;
    <app-form-dialog
      [heading]="data.material ? 'Change ' + data.material.name : 'Add a material to bend'"
      [submitLabel]="data.material ? 'Save' : 'Add material'"
      [form]="form"
      [save]="save"
    >
      <app-form-field class="wide" label="Name" [control]="fields.name" />
      @if (!data.material) {
        <app-form-field
          label="Code"
          hint="in links and commands, such as wear-plate-450"
          [control]="fields.code"
        />
      }
      <app-form-field label="Gauges of" [control]="fields.gaugeSystem" [options]="systems" />
      <app-form-field
        label="Tensile strength, minimum"
        hint="may stay empty"
        [suffix]="stressUnit"
        [control]="fields.tensileMinMpa"
      />
      <app-form-field label="Tensile strength used" [suffix]="stressUnit" [control]="fields.tensileUsedMpa" />
      <app-form-field class="wide" label="Source of the strength" [control]="fields.tensileSource" />
      <app-form-field label="Density" [suffix]="densityUnit" [control]="fields.densityKgM3" />
      <app-form-field
        label="Inside radius ÷ opening"
        hint="0.16 for mild steel"
        [control]="fields.radiusPerOpening"
      />
      <app-form-field class="wide" label="Source of the density" [control]="fields.densitySource" />
      <app-form-field class="wide" label="Source of the radius" [control]="fields.radiusSource" />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BendMaterialDialog {
  protected readonly data = inject<BendMaterialDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(FormingApi);
  protected readonly stressUnit = STRESS_UNITS[this.data.units];
  protected readonly densityUnit = DENSITY_UNITS[this.data.units];
  protected readonly systems = GAUGE_SYSTEMS.map((system) => ({ value: system, label: system }));
  protected readonly form = toMaterialForm(this.data);

  protected readonly save = () => {
    const { material, units } = this.data;
    const value = this.form.getRawValue();
    const known = [material?.tensileMinMpa ?? null, material?.tensileUsedMpa ?? null];
    const input: FormingMaterialInput = {
      name: value.name,
      gaugeSystem: value.gaugeSystem as GaugeSystem,
      tensileMinMpa: toMegapascals(value.tensileMinMpa, units, known),
      tensileUsedMpa: toMegapascals(value.tensileUsedMpa, units, known) ?? '',
      tensileSource: value.tensileSource,
      densityKgM3: toKilogramsPerM3(value.densityKgM3, units, [material?.densityKgM3 ?? null]) ?? '',
      densitySource: value.densitySource,
      radiusPerOpening: toPlainText(value.radiusPerOpening) ?? '',
      radiusSource: value.radiusSource,
    };
    return material
      ? this.api.updateMaterial(material.code, input)
      : this.api.createMaterial({ ...input, code: value.code.trim() });
  };
}

function toMaterialForm({ material, units }: BendMaterialDialogData) {
  const stress = parsedBy(moreThanNought((text) => parseStress(text, STRESS_UNITS[units])));
  const source = [Validators.required, Validators.maxLength(300)];
  return new FormGroup({
    name: textControl(material?.name, Validators.required, Validators.maxLength(200)),
    code: textControl(material?.code, Validators.required),
    gaugeSystem: textControl(material?.gaugeSystem ?? 'steel'),
    tensileMinMpa: textControl(toStressText(material?.tensileMinMpa ?? null, units), stress),
    tensileUsedMpa: textControl(
      toStressText(material?.tensileUsedMpa ?? null, units),
      Validators.required,
      stress,
    ),
    tensileSource: textControl(material?.tensileSource, ...source),
    densityKgM3: textControl(
      toDensityText(material?.densityKgM3 ?? null, units),
      Validators.required,
      parsedBy(moreThanNought((text) => parseDensity(text, DENSITY_UNITS[units]))),
    ),
    densitySource: textControl(material?.densitySource, ...source),
    radiusPerOpening: textControl(
      material?.radiusPerOpening,
      Validators.required,
      numberWords(0.01, 1, 'The inside radius is 0.01 to 1 openings, such as 0.16 for mild steel.'),
    ),
    radiusSource: textControl(material?.radiusSource, ...source),
  });
}
