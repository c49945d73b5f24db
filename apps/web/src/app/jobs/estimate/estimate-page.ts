import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  linkedSignal,
  signal,
  untracked,
} from '@angular/core';
import { rxResource, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { type Estimate, type EstimateChoices, type EstimateInput, type FigureRef } from '@brakeven/contract';
import { ErrorState, Figure, LoadingSkeleton, PageHeader, SHOP_FORMAT } from '@brakeven/ui';
import { isLocalDate, moneyText, todayIn } from '@brakeven/values';
import { filter, forkJoin, startWith, switchMap } from 'rxjs';
import { ANY_VERSION, EstimatesApi, type VersionedEstimate } from '../../api/estimates-api';
import { JobsApi } from '../../api/jobs-api';
import { toShownProblem } from '../../api/problem-text';
import { confirm } from '../../forms/confirm-dialog';
import { FormField } from '../../forms/form-field';
import { guardUnsaved } from '../../forms/guard-unsaved';
import { type Leavable } from '../../forms/leave-guard';
import { Notifier } from '../../shell/notifier';
import { previewEstimate, toMarginText } from './estimate-cost';
import {
  type EstimateForm,
  type LineForm,
  type LineKind,
  readEstimate,
  readLine,
  toEstimateForm,
  toLineForm,
} from './estimate-form';
import { EstimateLines } from './estimate-lines';
import { type CopiedEstimate, type LikeJobDialogData } from './like-job-dialog';

const SECTIONS: readonly { kind: LineKind; heading: string }[] = [
  { kind: 'operation', heading: 'Operations' },
  { kind: 'material', heading: 'Material' },
  { kind: 'outside', heading: 'Outside work' },
];

const BUILD_UP = [
  { category: 'labour', word: 'Labour' },
  { category: 'machine', word: 'Machine' },
  { category: 'overhead', word: 'Overhead' },
  { category: 'material', word: 'Material' },
  { category: 'outside', word: 'Outside work' },
] as const;

/** The estimate of a job: typed like a sheet, costed as it is typed, saved whole. */
@Component({
  selector: 'app-estimate-page',
  imports: [
    ErrorState,
    EstimateLines,
    Figure,
    FormField,
    LoadingSkeleton,
    PageHeader,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './estimate-page.html',
  styleUrl: './estimate-page.scss',
  host: {
    '(keydown.control.s)': 'saveByKey($event)',
    '(keydown.meta.s)': 'saveByKey($event)',
  },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EstimatePage implements Leavable {
  private readonly api = inject(EstimatesApi);
  private readonly jobsApi = inject(JobsApi);
  private readonly notifier = inject(Notifier);
  private readonly dialog = inject(MatDialog);
  private readonly format = inject(SHOP_FORMAT);

  /** From the address. */
  readonly jobId = input.required<string>();

  private readonly answer = rxResource({
    params: () => this.jobId(),
    stream: ({ params: jobId }) =>
      forkJoin({ job: this.jobsApi.getJob(jobId), saved: this.api.getEstimate(jobId) }),
  });
  protected readonly job = computed(() => (this.answer.hasValue() ? this.answer.value().job : null));
  protected readonly sections = SECTIONS;
  protected readonly buildUp = BUILD_UP;
  protected readonly isSaving = signal(false);
  protected readonly issues = signal<readonly string[]>([]);
  /** Somebody else saved the estimate while it was open here. */
  protected readonly isOutdated = signal(false);
  protected readonly isSaved = signal(false);
  protected readonly quotedPrice = signal<string | null>(null);

  private readonly today = computed(() => todayIn(this.format().timeZone));
  protected readonly form = signal<EstimateForm>(toEstimateForm(null, this.today(), this.units));
  /** Counts changes of the form, so that what is computed from it follows. */
  private readonly change = toSignal(
    toObservable(this.form).pipe(switchMap((form) => form.valueChanges.pipe(startWith(null)))),
  );
  private readonly version = signal(0);
  /** Of the estimate that the form began with. */
  private savedVersion = '';
  protected readonly isDirty = computed(() => (this.watch(), this.form().dirty));
  private readonly estimatedOn = computed(() => (this.watch(), this.form().getRawValue().estimatedOn));
  private readonly choicesOf = rxResource({
    params: () => (isLocalDate(this.estimatedOn()) ? this.estimatedOn() : this.today()),
    stream: ({ params: on }) => this.api.getChoices(on),
  });
  /** Those of the day before stay until those of another day are there. */
  protected readonly choices = linkedSignal<EstimateChoices | undefined, EstimateChoices | null>({
    source: () => (this.choicesOf.hasValue() ? this.choicesOf.value() : undefined),
    computation: (loaded, before) => loaded ?? before?.value ?? null,
  });
  protected readonly problem = computed(() => {
    // Once there are choices, what is typed stays on the page whatever fails.
    const error = this.answer.error() ?? (this.choices() ? undefined : this.choicesOf.error());
    return error ? toShownProblem(error) : null;
  });
  protected readonly lines = computed(() => (this.watch(), [...this.form().controls.lines.controls]));
  protected readonly preview = computed(() => {
    const { scrapAllowancePercent, marginPercent } = this.form().controls;
    const lines = this.lines().map((line) => readLine(line, this.units));
    return previewEstimate(lines, scrapAllowancePercent.value, marginPercent.value);
  });
  protected readonly costs = computed(
    () => new Map(this.lines().map((line, at) => [line, this.preview().lines[at] ?? null])),
  );
  protected readonly price = computed(() => {
    const { price } = this.preview();
    return price && moneyText(price);
  });
  protected readonly quotedMargin = computed(() =>
    toMarginText(this.quotedPrice(), this.preview().cost.total),
  );

  readonly canLeave = guardUnsaved(
    () => this.form().dirty,
    'What you changed in this estimate is not saved.',
  );

  constructor() {
    effect(() => {
      if (!this.answer.hasValue()) return;
      const { job, saved } = this.answer.value();
      untracked(() => {
        this.quotedPrice.set(job.quotedPrice ?? null);
        this.showSaved(saved);
      });
    });
  }

  private get units() {
    return this.format().units;
  }

  protected linesOf(kind: LineKind): LineForm[] {
    return this.lines().filter((line) => line.controls.kind.value === kind);
  }

  protected add(kind: LineKind): void {
    const { labourRate, overheadRate } = this.choices() ?? {};
    const rates = { labourRate: labourRate ?? '', overheadRate: overheadRate ?? '' };
    const pieces = this.job()?.quantity?.toString() ?? '';
    const texts = kind === 'operation' ? { ...rates, pieces } : {};
    this.form().controls.lines.push(toLineForm(kind, texts, this.units));
    this.touch();
  }

  protected remove(line: LineForm): void {
    const { lines } = this.form().controls;
    const at = lines.controls.indexOf(line);
    lines.removeAt(at);
    this.touch();
    this.notifier.say('Line removed.', () => {
      lines.insert(Math.min(at, lines.length), line);
      this.touch();
    });
  }

  /** Trades places with the next line of the same kind. */
  protected move({ line, by }: { line: LineForm; by: -1 | 1 }): void {
    const { lines } = this.form().controls;
    const sameKind = this.linesOf(line.controls.kind.value as LineKind);
    const other = sameKind[sameKind.indexOf(line) + by];
    if (!other) return;
    const [from, to] = [lines.controls.indexOf(line), lines.controls.indexOf(other)];
    lines.setControl(from, other);
    lines.setControl(to, line);
    this.touch();
  }

  /** Saves what is in the form, over what somebody else has saved meanwhile if that is said. */
  protected save(version = this.savedVersion): void {
    const form = this.form();
    form.markAllAsTouched();
    const input = readEstimate(form, this.units);
    this.version.update((count) => count + 1);
    if (!input || this.isSaving()) {
      this.issues.set(input ? [] : ['Something cannot be read yet: it is marked in the lines above.']);
      return;
    }
    if (input.lines.length === 0) {
      this.issues.set(['An estimate needs at least one line.']);
      return;
    }
    this.isSaving.set(true);
    this.issues.set([]);
    this.api.saveEstimate(this.jobId(), input, version).subscribe({
      next: (saved) => {
        this.isSaving.set(false);
        this.notifier.say('Estimate saved.');
        this.showSaved(saved);
      },
      error: (error: unknown) => {
        this.isSaving.set(false);
        const { code, text, issues } = toShownProblem(error);
        this.isOutdated.set(code === 'changed_meanwhile');
        this.issues.set([text, ...issues.map(({ field, message }) => `${toPlace(field)}${message}`)]);
      },
    });
  }

  protected saveOver(): void {
    this.save(ANY_VERSION);
  }

  /** Shows what somebody else saved; what was typed can be had back. */
  protected showTheirs(): void {
    const typed = this.form();
    this.api.getEstimate(this.jobId()).subscribe({
      next: (saved) => {
        this.showSaved(saved);
        this.notifier.say('This is the estimate as it is saved now.', () => this.form.set(typed));
      },
      error: (error: unknown) => this.notifier.warn(toShownProblem(error).text),
    });
  }

  protected saveByKey(event: Event): void {
    event.preventDefault();
    this.save();
  }

  protected async copy(): Promise<void> {
    const { LikeJobDialog } = await import('./like-job-dialog');
    const data: LikeJobDialogData = {
      jobId: this.jobId(),
      quantity: this.job()?.quantity ?? null,
      on: this.today(),
    };
    this.dialog
      .open<unknown, LikeJobDialogData, CopiedEstimate>(LikeJobDialog, { data, width: '620px' })
      .afterClosed()
      .pipe(filter((copied) => copied !== undefined))
      .subscribe((copied) => this.takeCopy(copied));
  }

  /** The price becomes the quoted one of the job at once; that can be taken back. */
  protected usePrice(): void {
    const [price, before] = [this.price(), this.quotedPrice()];
    if (!price) return;
    this.quote(price, () =>
      this.notifier.say(
        'The price is the quoted price of the job now.',
        before === null ? undefined : () => this.quote(before, () => undefined),
      ),
    );
  }

  protected removeEstimate(): void {
    confirm(this.dialog, {
      title: 'Remove this estimate?',
      text: [
        'The job keeps its costs and its quoted price. An estimate that is removed cannot be brought back.',
      ],
      action: 'Remove estimate',
    })
      .pipe(
        filter((isConfirmed) => isConfirmed),
        switchMap(() => this.api.deleteEstimate(this.jobId(), this.savedVersion)),
      )
      .subscribe({
        next: (version) => {
          this.showSaved({ estimate: null, version });
          this.notifier.say('Estimate removed.');
        },
        error: (error: unknown) => this.notifier.warn(toShownProblem(error).text),
      });
  }

  protected ref(figure: 'estimate.total' | 'estimate.price'): FigureRef | null {
    return this.isSaved() && !this.isDirty() ? { figure, jobId: this.jobId() } : null;
  }

  protected categoryRef(category: (typeof BUILD_UP)[number]['category']): FigureRef | null {
    return this.isSaved() && !this.isDirty() ? { figure: `estimate.${category}`, jobId: this.jobId() } : null;
  }

  protected quotedRef(): FigureRef {
    return { figure: 'job.quotedPrice', jobId: this.jobId() };
  }

  protected reload(): void {
    this.answer.reload();
    this.choicesOf.reload();
  }

  private quote(price: string, then: () => void): void {
    this.api.quotePrice(this.jobId(), price).subscribe({
      next: () => {
        this.quotedPrice.set(price);
        then();
      },
      error: (error: unknown) => this.notifier.warn(toShownProblem(error).text),
    });
  }

  private takeCopy({ from, draft }: CopiedEstimate): void {
    const before = this.form();
    const wasSaved = this.isSaved();
    this.show(draft, wasSaved);
    this.touch();
    const scaled = draft.scaled
      ? `, scaled from ${draft.scaled.from} to ${draft.scaled.to} pieces`
      : ', not scaled';
    const kept = draft.ratesKept.length > 0 ? ` Kept as they were: ${draft.ratesKept.join(', ')}.` : '';
    this.notifier.say(`Copied from job ${from.number}${scaled}. Not saved yet.${kept}`, () =>
      this.form.set(before),
    );
  }

  private showSaved({ estimate, version }: VersionedEstimate): void {
    this.savedVersion = version;
    this.show(estimate, estimate !== null);
  }

  private show(estimate: EstimateInput | Estimate | null, isSaved: boolean): void {
    this.issues.set([]);
    this.isOutdated.set(false);
    this.isSaved.set(isSaved);
    this.form.set(toEstimateForm(estimate, this.today(), this.units));
  }

  /** Something other than typing has changed the form. */
  private touch(): void {
    this.form().markAsDirty();
    this.version.update((count) => count + 1);
  }

  private watch(): void {
    this.change();
    this.version();
  }
}

/** 'Line 2: ' for a problem of the second line as it was sent. */
function toPlace(field: string): string {
  const line = /^lines\.(\d+)\./.exec(field)?.[1];
  return line === undefined ? '' : `Line ${Number(line) + 1}: `;
}
