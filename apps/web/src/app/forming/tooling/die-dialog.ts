import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormArray, FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Die, type DieInput } from '@brakeven/contract';
import { parseLength, type UnitSystem } from '@brakeven/values';
import { FormingApi } from '../../api/forming-api';
import { FormDialog } from '../../forms/form-dialog';
import { FormField } from '../../forms/form-field';
import { moreThanNought } from '../../forms/more-than-nought';
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

export interface DieDialogData {
  machineId: string;
  /** Null for a new one. */
  die: Die | null;
  units: UnitSystem;
}

type Opening = Die['openings'][number];

/** Adds a die of a press or changes it, with all openings of its block. */
@Component({
  selector: 'app-die-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.die ? 'Change ' + data.die.name : 'Add a die'"
      [submitLabel]="data.die ? 'Save' : 'Add die'"
      [form]="form"
      [save]="save"
    >
      <p lead class="muted">
        An opening is measured between the points where the shoulder arcs meet the die’s top.
      </p>
      <app-form-field
        class="wide"
        label="Name"
        hint="as it is called in the shop"
        [control]="form.controls.name"
      />
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
      <div>
        @for (row of form.controls.openings.controls; track row; let index = $index) {
          <fieldset>
            <legend class="visually-hidden">Opening {{ index + 1 }}</legend>
            <app-form-field label="Opening" [suffix]="unit" [control]="row.controls.openingMm" />
            <app-form-field label="Angle" suffix="°" [control]="row.controls.angle" />
            <app-form-field
              label="Shoulder radius"
              [suffix]="unit"
              [control]="row.controls.shoulderRadiusMm"
            />
            @if (form.controls.openings.length > 1) {
              <button
                type="button"
                class="button quiet"
                [attr.aria-label]="'Take opening ' + (index + 1) + ' away'"
                (click)="remove(index)"
              >
                ×
              </button>
            }
          </fieldset>
        }
        <button type="button" class="button" (click)="add()">Add an opening</button>
      </div>
    </app-form-dialog>
  `,
  styles: `
    fieldset {
      display: grid;
      grid-template-columns: 1fr 1fr 1.2fr 40px;
      gap: 0 8px;
      align-items: center;
      margin: 0;
      padding: 0;
      border: 0;
    }
    @media (width < 520px) {
      fieldset {
        grid-template-columns: 1fr 1fr;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DieDialog {
  protected readonly data = inject<DieDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(FormingApi);
  protected readonly unit = LENGTH_UNIT_OF[this.data.units];
  protected readonly limitUnit = LIMIT_UNITS[this.data.units];
  private readonly length = parsedBy((text) => parseLength(text, this.unit));

  protected readonly form = new FormGroup({
    name: textControl(this.data.die?.name, Validators.required, Validators.maxLength(200)),
    lengthMm: textControl(toLengthText(this.data.die?.lengthMm ?? null, this.data.units), this.length),
    forceLimitKnPerM: textControl(
      toLimitText(this.data.die?.forceLimitKnPerM ?? null, this.data.units),
      parsedBy((text) => parseLimit(text, this.data.units)),
    ),
    openings: new FormArray((this.data.die?.openings ?? [null]).map((opening) => this.toRow(opening))),
  });

  protected add(): void {
    this.form.controls.openings.push(this.toRow(null));
    this.form.markAsDirty();
  }

  protected remove(index: number): void {
    this.form.controls.openings.removeAt(index);
    this.form.markAsDirty();
  }

  protected readonly save = () => {
    const { die, units, machineId } = this.data;
    const value = this.form.getRawValue();
    const input: DieInput = {
      name: value.name,
      lengthMm: toMillimetres(value.lengthMm, units, die?.lengthMm ?? null),
      forceLimitKnPerM: toLimitInput(value.forceLimitKnPerM, units, die?.forceLimitKnPerM ?? null),
      openings: value.openings.map((row) => this.toOpening(row)),
    };
    return die ? this.api.updateDie(die.dieId, input) : this.api.createDie(machineId, input);
  };

  private toRow(opening: Opening | null) {
    const { units } = this.data;
    const positive = parsedBy(moreThanNought((text) => parseLength(text, this.unit)));
    return new FormGroup({
      dieOpeningId: textControl(opening?.dieOpeningId),
      openingMm: textControl(toLengthText(opening?.openingMm ?? null, units), Validators.required, positive),
      angle: textControl(opening?.angle, numberWords(1, 179, TOOL_ANGLE_WORDS)),
      shoulderRadiusMm: textControl(toLengthText(opening?.shoulderRadiusMm ?? null, units), this.length),
    });
  }

  private toOpening(
    row: ReturnType<ReturnType<DieDialog['toRow']>['getRawValue']>,
  ): DieInput['openings'][number] {
    const { die, units } = this.data;
    const kept = die?.openings.find(({ dieOpeningId }) => dieOpeningId === row.dieOpeningId) ?? null;
    return {
      ...(kept && { dieOpeningId: kept.dieOpeningId }),
      openingMm: toMillimetres(row.openingMm, units, kept?.openingMm ?? null) ?? '',
      angle: toPlainText(row.angle),
      shoulderRadiusMm: toMillimetres(row.shoulderRadiusMm, units, kept?.shoulderRadiusMm ?? null),
    };
  }
}
