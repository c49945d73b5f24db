import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Job, type Material } from '@brakeven/contract';
import { MassPipe } from '@brakeven/ui';
import { catchError, map, of, startWith } from 'rxjs';
import { JobsApi } from '../api/jobs-api';
import { MaterialsApi } from '../api/materials-api';
import { FormDialog } from '../forms/form-dialog';
import { type FieldOption, FormField } from '../forms/form-field';
import { LENGTH_UNITS, toLengthText } from '../machines/quantity-text';
import { type IssueStart, type Measure, previewIssueWeight, toIssueForm, toIssueInput } from './issue-form';
import { MASS_UNITS } from './stock-text';

const JOBS_MAX = 500;
const KINDS: readonly FieldOption[] = [
  { value: 'issue', label: 'Out of stock, to the job' },
  { value: 'return', label: 'Back into stock, from the job' },
];
const MEASURE_OPTIONS: readonly FieldOption[] = [
  { value: 'pieces', label: 'Pieces × blank size' },
  { value: 'sheets', label: 'Whole sheets' },
  { value: 'weight', label: 'Weight' },
];

/** Issues material to a job or takes it back, from either page; says what it weighs while it is typed. */
@Component({
  selector: 'app-issue-dialog',
  imports: [FormDialog, FormField, MassPipe],
  template: `
    <app-form-dialog
      [heading]="heading"
      [submitLabel]="start.issue ? 'Save' : 'Enter'"
      [form]="form"
      [save]="save"
    >
      <p lead class="muted">
        @if (start.issue) {
          The row as it was is voided and this one takes its place.
        } @else {
          The job bears it at the average of the stock on that day; a return comes back at that day’s average.
        }
      </p>
      <app-form-field
        class="wide"
        label="Material"
        [options]="materialOptions()"
        [control]="form.controls.materialId"
      />
      <app-form-field class="wide" label="Job" [options]="jobOptions()" [control]="form.controls.jobId" />
      <app-form-field label="Direction" [options]="kinds" [control]="form.controls.kind" />
      <app-form-field label="Date" type="date" [control]="form.controls.issuedOn" />
      <app-form-field label="Measured by" [options]="measures" [control]="form.controls.measure" />
      @if (measure() === 'weight') {
        <app-form-field
          label="Weight"
          [suffix]="massUnit"
          [isNumber]="true"
          [control]="form.controls.weightKg"
        />
      } @else {
        <app-form-field
          [label]="measure() === 'sheets' ? 'Sheets' : 'Pieces'"
          [isNumber]="true"
          [control]="form.controls.count"
        />
        <app-form-field
          label="Length"
          [suffix]="lengthUnit"
          [isNumber]="true"
          [control]="form.controls.blankLengthMm"
        />
        <app-form-field
          label="Width"
          [suffix]="lengthUnit"
          [isNumber]="true"
          [control]="form.controls.blankWidthMm"
        />
      }
      <app-form-field class="wide" label="Note" [control]="form.controls.note" />
      <p class="preview" role="status">
        @if (weight(); as kilograms) {
          {{ kilograms | mass }}
        }
        @if (material(); as chosen) {
          <span class="muted">{{ chosen.stockKg | mass }} in stock now</span>
          @if (measure() !== 'weight' && (chosen.thicknessMm === null || chosen.densityKgM3 === null)) {
            <span>It has no thickness or no density: measure it by weight.</span>
          }
        }
      </p>
    </app-form-dialog>
  `,
  styles: `
    .preview {
      display: flex;
      flex-wrap: wrap;
      gap: 2px 14px;
      min-height: 22px;
      margin-top: 6px;
      font-weight: 500;

      .muted {
        font-weight: 400;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class IssueDialog {
  protected readonly start = inject<IssueStart>(MAT_DIALOG_DATA);
  private readonly api = inject(MaterialsApi);
  protected readonly kinds = KINDS;
  protected readonly measures = MEASURE_OPTIONS;
  protected readonly massUnit = MASS_UNITS[this.start.units];
  protected readonly lengthUnit = LENGTH_UNITS[this.start.units];
  protected readonly heading = toHeading(this.start);

  protected readonly form = toIssueForm(this.start);
  private readonly value = toSignal(
    this.form.valueChanges.pipe(
      startWith(null),
      map(() => this.form.getRawValue()),
    ),
    { initialValue: this.form.getRawValue() },
  );
  protected readonly measure = computed(() => this.value().measure as Measure);

  private readonly materials = toSignal(this.api.list().pipe(catchError(() => of([]))), { initialValue: [] });
  private readonly jobs = toSignal(
    inject(JobsApi)
      .listJobs({ limit: JOBS_MAX, sort: 'number', direction: 'desc' })
      .pipe(
        map(({ items }) => items),
        catchError(() => of([])),
      ),
    { initialValue: [] },
  );
  protected readonly material = computed(() =>
    this.materials().find(({ materialId }) => materialId === this.value().materialId),
  );
  protected readonly materialOptions = computed(() => toMaterialOptions(this.materials(), this.start));
  protected readonly jobOptions = computed(() => toJobOptions(this.jobs(), this.start));
  protected readonly weight = computed(() => {
    this.value();
    return previewIssueWeight(this.form, this.material(), this.start);
  });

  constructor() {
    this.form.controls.measure.valueChanges
      .pipe(takeUntilDestroyed())
      .subscribe((measure) => this.offerSheetSize(measure as Measure));
  }

  protected readonly save = () => {
    const { issue } = this.start;
    const input = toIssueInput(this.form, this.start);
    return issue ? this.api.correctIssue(issue.issueId, input) : this.api.addIssue(input);
  };

  /** A whole sheet is most likely as large as those of the last lot. */
  private offerSheetSize(measure: Measure): void {
    const { blankLengthMm, blankWidthMm } = this.form.controls;
    const lastLot = this.material()?.lastLot;
    if (measure !== 'sheets' || !lastLot || blankLengthMm.value !== '' || blankWidthMm.value !== '') return;
    blankLengthMm.setValue(toLengthText(lastLot.sheetLengthMm, this.start.units));
    blankWidthMm.setValue(toLengthText(lastLot.sheetWidthMm, this.start.units));
  }
}

function toHeading({ issue, kind }: IssueStart): string {
  if (issue) return issue.kind === 'return' ? 'Correct a return' : 'Correct an issue';
  return kind === 'return' ? 'Take material back' : 'Issue material to a job';
}

function toMaterialOptions(materials: readonly Material[], { materialId }: IssueStart): FieldOption[] {
  const options = materials.map((one) => ({ value: one.materialId, label: one.name }));
  return materialId === '' ? [{ value: '', label: 'Choose one' }, ...options] : options;
}

/** Work under way first; a job that is over may still get or give back material. */
function toJobOptions(jobs: readonly Job[], { jobId }: IssueStart): FieldOption[] {
  const sorted = [...jobs].sort((a, b) => Number(b.status === 'open') - Number(a.status === 'open'));
  const options = sorted.map((job) => ({
    value: job.jobId,
    label: `${job.number} ${job.title}${job.status === 'open' ? '' : ` (${job.status})`}`,
  }));
  return jobId === '' ? [{ value: '', label: 'Choose one' }, ...options] : options;
}
