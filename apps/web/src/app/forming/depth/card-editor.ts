import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  output,
  signal,
} from '@angular/core';
import { FormArray, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { type DepthCard, type DepthCardInput } from '@brakeven/contract';
import { parseAngle } from '@brakeven/forming';
import { TrialBendsApi } from '../../api/trial-bends-api';
import { type ShownProblem, toShownProblem } from '../../api/problem-text';
import { FormField } from '../../forms/form-field';
import { textControl } from '../../forms/text-control';
import { FieldReader } from '../field-reader';
import { readWith, toMmText } from '../field-validator';
import { findMaterialOf } from '../fit/fit-question';
import { toSizeWords } from '../forming-words';
import { FormingStore } from '../forming-store';
import { type PressTooling, toOpeningWords } from '../press-tooling';

type CardSheet = DepthCardInput['sheets'][number];

const SHEETS_MAX = 30;

/** Says which sheets and angles stand on the card of a press. */
@Component({
  selector: 'app-card-editor',
  imports: [FormField, ReactiveFormsModule],
  template: `
    <section class="card" aria-labelledby="editor-heading">
      <h2 id="editor-heading">Sheets and angles of the card</h2>
      <form [formGroup]="form()" (ngSubmit)="save()" novalidate>
        <app-form-field
          label="Inside angles"
          hint="with commas between, such as 60, 90, 120, 135"
          [control]="form().controls.angles"
        />
        @for (row of form().controls.sheets.controls; track row; let index = $index) {
          <fieldset>
            <legend class="visually-hidden">Sheet {{ index + 1 }}</legend>
            <app-form-field label="Material" [control]="row.controls.materialCode" [options]="materials()" />
            <app-form-field label="Thickness" [control]="row.controls.thickness" />
            <app-form-field label="Punch" [control]="row.controls.punchId" [options]="punches()" />
            <app-form-field label="Opening" [control]="row.controls.dieOpeningId" [options]="openings()" />
            <button
              type="button"
              class="button quiet"
              [attr.aria-label]="'Take sheet ' + (index + 1) + ' off the card'"
              (click)="form().controls.sheets.removeAt(index)"
            >
              ×
            </button>
          </fieldset>
        }
        @if (problem(); as problem) {
          <p class="problem" role="alert">
            <strong>{{ problem.title }}.</strong> {{ problem.text }}
          </p>
        }
        <div class="actions">
          @if (form().controls.sheets.length < sheetsMax) {
            <button type="button" class="button" [disabled]="!canAdd()" (click)="add()">Add a sheet</button>
          }
          <button type="submit" class="button primary" [disabled]="isSaving()">Save the card</button>
          @if (!canAdd()) {
            <span class="muted">This press has no punch or no die yet.</span>
          }
        </div>
      </form>
    </section>
  `,
  styles: `
    fieldset {
      display: grid;
      grid-template-columns: 2fr 1fr 2fr 2fr 40px;
      gap: 0 10px;
      align-items: center;
      margin: 0;
      padding: 0;
      border: 0;
    }
    @media (width < 900px) {
      fieldset {
        grid-template-columns: 1fr 1fr;
        margin-bottom: 10px;
        border-bottom: 1px solid var(--line);
      }
    }
    .actions {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
      align-items: center;
      margin-top: 10px;
    }
    .problem {
      margin-top: 8px;
      color: var(--rust-text);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CardEditor {
  private readonly store = inject(FormingStore);
  private readonly api = inject(TrialBendsApi);
  readonly press = input.required<PressTooling>();
  readonly card = input.required<DepthCard>();
  readonly saved = output<DepthCard>();

  protected readonly sheetsMax = SHEETS_MAX;
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<ShownProblem | null>(null);
  protected readonly materials = this.store.materialOptions;
  protected readonly punches = computed(() =>
    this.press().punches.map(({ code, name }) => ({ value: code, label: name })),
  );
  protected readonly openings = computed(() =>
    this.press().openings.map((opening) => ({
      value: opening.code,
      label: toOpeningWords(opening, this.store.facts().units),
    })),
  );
  protected readonly canAdd = computed(() => this.punches().length > 0 && this.openings().length > 0);
  protected readonly form = linkedSignal(() => {
    const { angles, sheets } = this.card();
    const units = this.store.facts().units;
    return new FormGroup({
      angles: textControl(angles.join(', '), Validators.required, ({ value }) => {
        const read = readAngles(String(value));
        return typeof read === 'string' ? { words: read } : null;
      }),
      sheets: new FormArray(
        sheets.map((sheet) => this.toRow(sheet, toSizeWords(Number(sheet.thicknessMm), units))),
      ),
    });
  });

  protected add(): void {
    const rows = this.form().controls.sheets;
    const last = rows.controls.at(-1)?.getRawValue();
    const sheet = last ?? {
      materialCode: this.materials()[0]?.value ?? '',
      punchId: this.punches()[0]?.value ?? '',
      dieOpeningId: this.openings()[0]?.value ?? '',
    };
    rows.push(this.toRow(sheet, ''));
  }

  protected save(): void {
    const form = this.form();
    form.markAllAsTouched();
    const angles = readAngles(form.controls.angles.value);
    if (form.invalid || this.isSaving() || typeof angles === 'string') return;
    this.isSaving.set(true);
    const sheets: CardSheet[] = form.controls.sheets.getRawValue().map(({ thickness, ...sheet }) => ({
      ...sheet,
      thicknessMm: toMmText(this.readThickness(this.reader(), thickness, sheet.materialCode)),
    }));
    this.api.updateCard(this.press().machineId, { angles, sheets }).subscribe({
      next: (card) => this.saved.emit(card),
      error: (error: unknown) => {
        this.isSaving.set(false);
        this.problem.set(toShownProblem(error));
      },
    });
  }

  private toRow(sheet: Omit<CardSheet, 'thicknessMm'>, thickness: string) {
    const materialCode = textControl(sheet.materialCode);
    return new FormGroup({
      materialCode,
      thickness: textControl(
        thickness,
        Validators.required,
        readWith(
          () => this.reader(),
          (reader, text) => this.readThickness(reader, text, materialCode.value),
        ),
      ),
      punchId: textControl(sheet.punchId),
      dieOpeningId: textControl(sheet.dieOpeningId),
    });
  }

  private readThickness(reader: FieldReader, text: string, code: string): number {
    return reader.thickness('', text, findMaterialOf(code, this.store.materials())).mm;
  }

  private reader(): FieldReader {
    const { units, gauges } = this.store.facts();
    return new FieldReader(units, gauges);
  }
}

/** The angles of a list, or the words for what is wrong with it. */
function readAngles(text: string): number[] | string {
  const parts = text.split(/[,;]/).map((part) => part.trim());
  const angles = parts.filter(Boolean).map((part) => {
    const read = parseAngle(part);
    return read.ok && read.value >= 20 && read.value <= 175 ? read.value : NaN;
  });
  if (angles.length > 0 && angles.length <= 12 && !angles.some(Number.isNaN)) return angles;
  return 'Write 1 to 12 inside angles of 20 to 175 degrees with commas between, such as 60, 90, 120.';
}
