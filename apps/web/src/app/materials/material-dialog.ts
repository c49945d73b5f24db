import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Material, type MaterialForm, type MaterialInput } from '@brakeven/contract';
import {
  findGaugeSystem,
  findMaterial,
  type FormingMaterial,
  MATERIALS,
  parseThickness,
} from '@brakeven/forming';
import {
  parseDensity,
  parseRate,
  parseStress,
  roundHalfUp,
  stressIn,
  toDensity,
  densityIn,
  type UnitSystem,
} from '@brakeven/values';
import { MaterialsApi } from '../api/materials-api';
import { FormDialog } from '../forms/form-dialog';
import { type FieldOption, FormField } from '../forms/form-field';
import { moreThanNought } from '../forms/more-than-nought';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { LENGTH_UNITS, toLengthText } from '../machines/quantity-text';
import { FORM_OPTIONS } from './material-words';
import {
  DENSITY_UNITS,
  MASS_UNITS,
  STRESS_UNITS,
  toDensityText,
  toKilogramsPerM3,
  toMegapascals,
  toRatePerKg,
  toRatePerUnit,
  toStressText,
} from './stock-text';

export interface MaterialDialogData {
  /** Absent for a new material. */
  material: Material | null;
  units: UnitSystem;
}

const METALS: readonly FieldOption[] = [
  { value: '', label: 'Another: say its density yourself' },
  ...MATERIALS.map(({ code, name }) => ({ value: code, label: name })),
];

/** Adds a material or changes its facts; a metal that is known brings its density and strength. */
@Component({
  selector: 'app-material-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.material ? 'Change ' + data.material.name : 'Add a material'"
      [submitLabel]="data.material ? 'Save' : 'Add material'"
      [form]="form"
      [save]="save"
    >
      @if (data.material) {
        <p lead class="muted">
          Weights that are in the books stay as they were worked out. The next lots and issues take these
          facts.
        </p>
      }
      <app-form-field
        class="wide"
        label="Name"
        hint="As the shop says it, for example Mild steel 11 ga"
        [control]="form.controls.name"
      />
      <app-form-field label="Metal" [options]="metals" [control]="form.controls.metal" />
      <app-form-field label="Form" [options]="forms" [control]="form.controls.form" />
      <app-form-field label="Grade" hint="From the mill certificate" [control]="form.controls.grade" />
      <app-form-field
        label="Thickness"
        hint="Like 11 ga, 3/16 or 4.5 mm"
        [control]="form.controls.thicknessMm"
      />
      <app-form-field
        label="Density"
        hint="To weigh sheets and blanks by size"
        [suffix]="densityUnit"
        [isNumber]="true"
        [control]="form.controls.densityKgM3"
      />
      <app-form-field
        label="Tensile strength"
        [suffix]="stressUnit"
        [isNumber]="true"
        [control]="form.controls.tensileStrengthMpa"
      />
      <app-form-field
        class="wide"
        label="Recovery price"
        hint="What scrap of it fetches; empty is nothing"
        [suffix]="'per ' + massUnit"
        [isNumber]="true"
        [control]="form.controls.recoveryPricePerKg"
      />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MaterialDialog {
  protected readonly data = inject<MaterialDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(MaterialsApi);
  private readonly units = this.data.units;
  private readonly lengthUnit = LENGTH_UNITS[this.units];
  protected readonly metals = METALS;
  protected readonly forms = FORM_OPTIONS;
  protected readonly massUnit = MASS_UNITS[this.units];
  protected readonly densityUnit = DENSITY_UNITS[this.units];
  protected readonly stressUnit = STRESS_UNITS[this.units];

  protected readonly form = this.toForm(this.data.material);

  constructor() {
    const { metal, grade, name, thicknessMm } = this.form.controls;
    metal.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => this.takeMetal());
    // What a gauge is depends on the metal, which the grade or the name may tell.
    for (const control of [grade, name])
      control.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => thicknessMm.updateValueAndValidity());
  }

  protected readonly save = () => {
    const { material } = this.data;
    return material ? this.api.update(material.materialId, this.toInput()) : this.api.create(this.toInput());
  };

  private toForm(material: Material | null) {
    const { units } = this;
    return new FormGroup({
      name: textControl(material?.name, Validators.required, Validators.maxLength(200)),
      metal: textControl(findMetal(material)?.code),
      form: textControl(material?.form ?? 'sheet', Validators.required),
      grade: textControl(material?.grade, Validators.maxLength(100)),
      thicknessMm: textControl(
        this.toThicknessText(material),
        parsedBy((text) => this.readThickness(text)),
      ),
      densityKgM3: textControl(
        toDensityText(material?.densityKgM3 ?? null, units),
        parsedBy(moreThanNought((text) => parseDensity(text, DENSITY_UNITS[units]))),
      ),
      tensileStrengthMpa: textControl(
        toStressText(material?.tensileStrengthMpa ?? null, units),
        parsedBy(moreThanNought((text) => parseStress(text, STRESS_UNITS[units]))),
      ),
      recoveryPricePerKg: textControl(
        material?.recoveryPricePerKg === undefined ? '' : toRatePerUnit(material.recoveryPricePerKg, units),
        parsedBy(parseRate),
      ),
    });
  }

  private toThicknessText(material: Material | null): string {
    if (!material?.thicknessMm) return '';
    return material.gauge ?? `${toLengthText(material.thicknessMm, this.units)} ${this.lengthUnit}`;
  }

  /** A metal brings its facts; what was typed by hand gives way, since it belonged to another metal. */
  private takeMetal(): void {
    const metal = this.metal();
    const { densityKgM3, tensileStrengthMpa, thicknessMm } = this.form.controls;
    if (metal) {
      densityKgM3.setValue(toDensityText(toKgPerM3Text(metal), this.units));
      tensileStrengthMpa.setValue(toStressText(toMpaText(metal), this.units));
    }
    thicknessMm.updateValueAndValidity();
  }

  private metal(): FormingMaterial | undefined {
    return findMaterial(this.form.controls.metal.value);
  }

  private readThickness(text: string) {
    // Asked by the form while it is being made, too.
    const controls = (this.form as FormGroup | undefined)?.controls as typeof this.form.controls | undefined;
    const metal = controls ? this.metal() : findMetal(this.data.material);
    const texts = controls
      ? [controls.grade.value, controls.name.value]
      : [this.data.material?.grade ?? '', this.data.material?.name ?? ''];
    const parsed = parseThickness(text, metal?.gaugeSystem ?? findGaugeSystem(texts), this.lengthUnit);
    if (!parsed.ok || parsed.value.thickness.gt(0)) return parsed;
    return { ok: false as const, code: 'not_positive', message: 'Must be more than 0.' };
  }

  private toInput(): MaterialInput {
    const { material } = this.data;
    const value = this.form.getRawValue();
    const metal = this.metal();
    return {
      name: value.name,
      grade: value.grade,
      form: value.form as MaterialForm,
      ...this.toThickness(value.thicknessMm),
      densityKgM3: toKilogramsPerM3(value.densityKgM3, this.units, [
        material?.densityKgM3 ?? null,
        metal ? toKgPerM3Text(metal) : null,
      ]),
      tensileStrengthMpa: toMegapascals(value.tensileStrengthMpa, this.units, [
        material?.tensileStrengthMpa ?? null,
        metal ? toMpaText(metal) : null,
      ]),
      recoveryPricePerKg: toRatePerKg(
        value.recoveryPricePerKg,
        this.units,
        material?.recoveryPricePerKg ?? null,
      ),
    };
  }

  private toThickness(text: string): Pick<MaterialInput, 'gauge' | 'thicknessMm'> {
    const { material } = this.data;
    if (text.trim() === '') return { gauge: null, thicknessMm: null };
    if (material && text.trim() === this.toThicknessText(material) && material.gauge === null)
      return { gauge: null, thicknessMm: material.thicknessMm };
    const parsed = this.readThickness(text);
    if (!parsed.ok) return { gauge: null, thicknessMm: null };
    const { gauge, thickness } = parsed.value;
    return { gauge: gauge === null ? null : `${gauge} ga`, thicknessMm: roundHalfUp(thickness, 5).toFixed() };
  }
}

/** The metal that a material's grade or name is of, if it is one of those known. */
function findMetal(material: Material | null): FormingMaterial | undefined {
  return material ? (findMaterial(material.grade) ?? findMaterial(material.name)) : undefined;
}

const toKgPerM3Text = ({ densityGPerCm3 }: FormingMaterial): string =>
  densityIn(toDensity(densityGPerCm3, 'g/cm³'), 'kg/m³').toFixed();
const toMpaText = ({ tensileUsed }: FormingMaterial): string =>
  roundHalfUp(stressIn(tensileUsed, 'MPa'), 3).toFixed();
