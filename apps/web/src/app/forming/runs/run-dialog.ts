import { ChangeDetectionStrategy, Component, computed, effect, inject, untracked } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type PressRun, type PressRunChoices } from '@brakeven/contract';
import { formatHours, formatLocalDate, todayIn, toLocalDate } from '@brakeven/values';
import { startWith } from 'rxjs';
import { PressRunsApi } from '../../api/press-runs-api';
import { FormDialog } from '../../forms/form-dialog';
import { FormField } from '../../forms/form-field';
import { SessionStore } from '../../session/session-store';
import { LoadError } from '../../shell/load-error';
import { type FitFacts } from '../fit/fit-question';
import { toForceBand } from '../forming-words';
import { toOpeningWords } from '../press-tooling';
import { previewForce, toRunForm, toRunInput } from './run-form';

export interface RunDialogData {
  facts: FitFacts;
  /** The run to be corrected; null for a new one. */
  run: PressRun | null;
}

/** Logs or corrects a run: what was bent with what, and the highest force that the gauge showed. */
@Component({
  selector: 'app-run-dialog',
  imports: [FormDialog, FormField, LoadError, ReactiveFormsModule],
  template: `
    @let fields = form.controls;
    <app-form-dialog
      [heading]="run ? 'Correct a press run' : 'Log a press run'"
      [submitLabel]="run ? 'Save' : 'Log the run'"
      [form]="form"
      [save]="save"
    >
      @if (run) {
        <p lead class="muted">
          The run as it was is voided and this one takes its place, with the force computed anew.
        </p>
      }
      @if (choices.error(); as error) {
        <app-load-error lead [error]="error" (retried)="choices.reload()" />
      }
      <app-form-field class="wide" label="Job" [control]="fields.jobId" [options]="jobs()" />
      <app-form-field label="Machine" [control]="fields.machine" [options]="presses" />
      <app-form-field label="Die opening" [control]="fields.dieOpeningId" [options]="openings()" />
      <app-form-field label="Punch" [control]="fields.punchId" [options]="punches()" />
      <app-form-field label="Material" [control]="fields.materialCode" [options]="materials" />
      <app-form-field label="Thickness" hint="10 ga, 3/16, 3 mm" [control]="fields.thickness" />
      <app-form-field label="Bend length" hint="48 in, 1200 mm" [control]="fields.bendLength" />
      <app-form-field label="Strokes" [isNumber]="true" [control]="fields.strokes" />
      <app-form-field label="Pieces" [isNumber]="true" [control]="fields.pieces" />
      <app-form-field
        label="Highest force shown"
        [hint]="facts.units === 'us' ? 'US tons; empty if nobody looked' : 'kN; empty if nobody looked'"
        [control]="fields.highestForce"
      />
      <app-form-field label="Run on" type="date" [control]="fields.runOn" />
      <app-form-field class="wide" label="Time entry" [control]="fields.entryId" [options]="entries()" />
      <app-form-field class="wide" label="Note" hint="may stay empty" [control]="fields.note" />
      <p class="check">
        <label>
          <input type="checkbox" [formControl]="fields.isGood" /> A good run: the next set-up follows it
        </label>
      </p>
      <p class="preview" role="status">
        @if (force(); as words) {
          The rules expect {{ words }}.
        }
      </p>
    </app-form-dialog>
  `,
  styles: `
    .check {
      padding: 6px 0;
    }
    .preview {
      min-height: 22px;
      font-weight: 500;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RunDialog {
  private readonly data = inject<RunDialogData>(MAT_DIALOG_DATA);
  protected readonly facts = this.data.facts;
  protected readonly run = this.data.run;
  private readonly api = inject(PressRunsApi);
  private readonly today = todayIn(inject(SessionStore).shopFormat().timeZone);
  protected readonly form = toRunForm(this.facts, this.today, this.run);
  private readonly value = toSignal(this.form.valueChanges.pipe(startWith(null)));

  private readonly jobId = computed(() => {
    this.value();
    return this.form.controls.jobId.value;
  });
  // Jobs are asked for once: they must not go from the field while the entries of the chosen one are fetched.
  protected readonly choices = rxResource({ stream: () => this.api.getChoices() });
  private readonly ofJob = rxResource({
    params: () => this.jobId() || undefined,
    stream: ({ params }) => this.api.getChoices(params),
  });
  private readonly offeredJobs = computed(() => (this.choices.hasValue() ? this.choices.value().jobs : []));
  private readonly offeredEntries = computed(() => (this.ofJob.hasValue() ? this.ofJob.value().entries : []));
  protected readonly jobs = computed(() => [
    ...(this.run ? [] : [{ value: '', label: '' }]),
    ...this.listJobs().map(({ jobId, number, title }) => ({ value: jobId, label: `${number} ${title}` })),
  ]);
  protected readonly entries = computed(() => [
    { value: '', label: 'none' },
    ...this.offeredEntries().map((entry) => ({
      value: entry.entryId,
      label: `${formatLocalDate(toLocalDate(entry.workedOn))} · ${entry.employee} · ${entry.operation} · ${formatHours(entry.hours)} h`,
    })),
  ]);
  private listJobs(): PressRunChoices['jobs'] {
    const jobs = this.offeredJobs();
    if (!this.run || jobs.some(({ jobId }) => jobId === this.run?.jobId)) return jobs;
    const { jobId, jobNumber, jobTitle } = this.run;
    return [{ jobId, number: jobNumber, title: jobTitle }, ...jobs];
  }

  private readonly press = computed(() => {
    this.value();
    return this.facts.presses.find(({ code }) => code === this.form.controls.machine.value);
  });
  protected readonly presses = this.facts.presses.map(({ code, name }) => ({ value: code, label: name }));
  protected readonly materials = this.facts.materials.map(({ code, name }) => ({ value: code, label: name }));
  protected readonly openings = computed(() =>
    (this.press()?.openings ?? []).map((opening) => ({
      value: opening.code,
      label: toOpeningWords(opening, this.facts.units),
    })),
  );
  protected readonly punches = computed(() => [
    { value: '', label: 'not said' },
    ...(this.press()?.punches ?? []).map(({ code, name }) => ({ value: code, label: name })),
  ]);
  protected readonly force = computed(() => {
    this.value();
    const force = previewForce(this.form, this.facts);
    return force && toForceBand(force.lowKn, force.highKn, this.facts.units);
  });

  constructor() {
    // Tools belong to a machine: another one starts with its own first opening and with no punch.
    effect(() => {
      const [press, { dieOpeningId, punchId }] = [this.press(), this.form.controls];
      untracked(() => {
        if (!press?.openings.some(({ code }) => code === dieOpeningId.value)) {
          dieOpeningId.setValue(press?.openings[0]?.code ?? '');
        }
        if (!press?.punches.some(({ code }) => code === punchId.value)) punchId.setValue('');
      });
    });
    // An entry of another job, or one that was voided, is not offered and cannot stay chosen.
    effect(() => {
      if (!this.ofJob.hasValue()) return;
      const [offered, { entryId }] = [this.offeredEntries(), this.form.controls];
      untracked(() => {
        if (!offered.some((entry) => entry.entryId === entryId.value)) entryId.setValue('');
      });
    });
  }

  protected readonly save = () => {
    const input = toRunInput(this.form, this.facts, this.run);
    return this.run ? this.api.correct(this.run.pressRunId, input) : this.api.create(input);
  };
}
