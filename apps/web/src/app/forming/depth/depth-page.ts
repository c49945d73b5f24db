import { ChangeDetectionStrategy, Component, computed, effect, inject, untracked } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatDialog } from '@angular/material/dialog';
import { ActivatedRoute, RouterLink } from '@angular/router';
import { type TrialBendDto } from '@brakeven/contract';
import { type BendSetup, findAngle, findDepth, FORMING_RULES } from '@brakeven/forming';
import { Chart, type ChartPalette, EmptyState, LoadingSkeleton } from '@brakeven/ui';
import { type Observable } from 'rxjs';
import { toProblemSentence } from '../../api/problem-text';
import { TrialBendsApi } from '../../api/trial-bends-api';
import { FormField } from '../../forms/form-field';
import { SessionStore } from '../../session/session-store';
import { LoadError } from '../../shell/load-error';
import { Notifier } from '../../shell/notifier';
import { keepInAddress, toTextForm } from '../address-form';
import { toAngleWords, toLengthWords, toNumberWords, toSizeWords } from '../forming-words';
import { FormingStore } from '../forming-store';
import { toOpeningWords } from '../press-tooling';
import { PrintButton } from '../print-button';
import { showFieldWords } from '../show-field-words';
import { type ChartBend, toDepthChartOption } from './depth-chart-option';
import { isGuess, refit, traceCurve } from './depth-curve';
import { readDepthQuestion } from './depth-question';
import { SETUP_TEXTS, toDepthDefaults } from './depth-defaults';
import { PasteDialog } from './paste-dialog';
import { TrialDialog, type TrialDialogData } from './trial-dialog';
import { TrialTable } from './trial-table';

/** Ram depth for the angle: trial bends of a set-up, the curve fitted to them, and answers both ways. */
@Component({
  selector: 'app-depth-page',
  imports: [
    Chart,
    EmptyState,
    FormField,
    LoadError,
    LoadingSkeleton,
    PrintButton,
    ReactiveFormsModule,
    RouterLink,
    TrialTable,
  ],
  templateUrl: './depth-page.html',
  styleUrl: './depth-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DepthPage {
  private readonly store = inject(FormingStore);
  private readonly session = inject(SessionStore);
  private readonly api = inject(TrialBendsApi);
  private readonly dialog = inject(MatDialog);
  private readonly notifier = inject(Notifier);
  protected readonly units = this.session.shopFormat().units;
  protected readonly rules = FORMING_RULES;

  private readonly latest = inject(ActivatedRoute).snapshot.data['latest'] as TrialBendDto | null;
  private readonly defaults = toDepthDefaults(this.store.presses(), this.latest, this.units);
  protected readonly form = toTextForm(this.defaults);
  private readonly texts = keepInAddress(this.form, this.defaults, SETUP_TEXTS);
  protected readonly question = computed(() => readDepthQuestion(this.texts(), this.store.facts()));
  protected readonly canLog = computed(() => this.session.can('press-runs.log'));
  protected readonly materials = this.store.materialOptions;
  protected readonly presses = computed(() =>
    this.store.presses().map(({ code, name }) => ({ value: code, label: name })),
  );
  protected readonly punches = computed(() =>
    (this.question().press?.punches ?? []).map(({ code, name }) => ({ value: code, label: name })),
  );
  protected readonly openings = computed(() =>
    (this.question().press?.openings ?? []).map((opening) => ({
      value: opening.code,
      label: toOpeningWords(opening, this.units),
    })),
  );

  /** The tools and material that trial bends are looked up by; undefined while some tool is missing. */
  private readonly setup = computed(
    () => {
      const { press, punch, opening, material } = this.question();
      if (!press || !punch || !opening) return undefined;
      return {
        machineId: press.machineId,
        punchId: punch.code,
        dieOpeningId: opening.code,
        materialCode: material.code,
      };
    },
    { equal: (a, b) => JSON.stringify(a) === JSON.stringify(b) },
  );
  protected readonly hasTools = computed(() => this.setup() !== undefined);
  protected readonly trials = rxResource({
    params: () => this.setup(),
    stream: ({ params: { dieOpeningId: _, ...filter } }) => this.api.list(filter),
  });
  protected readonly fit = rxResource({
    params: () => this.setup(),
    stream: ({ params }) => this.api.getFit(params),
  });
  protected readonly error = computed(() => this.trials.error() ?? this.fit.error());
  protected readonly isLoaded = computed(() => this.trials.hasValue() && this.fit.hasValue());
  protected readonly served = computed(() => (this.fit.hasValue() ? this.fit.value() : null));
  private readonly listed = computed(() => (this.trials.hasValue() ? this.trials.value().items : []));
  /** Bends on this opening, and those on others that were fitted with them. */
  protected readonly shownTrials = computed(() => {
    const fitted = new Set(this.served()?.bends.map(({ trialBendId }) => trialBendId));
    const { dieOpeningId } = this.setup() ?? {};
    return this.listed().filter(
      (trial) => trial.dieOpeningId === dieOpeningId || fitted.has(trial.trialBendId),
    );
  });

  private readonly curveFit = computed(() => {
    const fit = this.served();
    const { radiusPerOpening } = this.question().material;
    return fit && refit(fit, this.listed(), radiusPerOpening);
  });
  private readonly bendSetup = computed<BendSetup | null>(() => {
    const { punch, opening, thicknessMm } = this.question();
    if (!punch || !opening || opening.shoulderRadiusMm === null || Number.isNaN(thicknessMm)) return null;
    return {
      openingMm: opening.openingMm,
      thicknessMm,
      punchRadiusMm: punch.noseRadiusMm,
      shoulderRadiusMm: opening.shoulderRadiusMm,
    };
  });
  private readonly depth = computed(() => {
    const [fit, setup, { insideAngle }] = [this.curveFit(), this.bendSetup(), this.question()];
    return fit && setup && !Number.isNaN(insideAngle) ? findDepth(fit, setup, insideAngle) : null;
  });
  private readonly angle = computed(() => {
    const [fit, setup, { readingMm }] = [this.curveFit(), this.bendSetup(), this.question()];
    return fit && setup && readingMm !== null ? findAngle(fit, setup, readingMm) : null;
  });
  protected readonly isGuess = computed(() => isGuess(this.depth()) || isGuess(this.angle()));
  protected readonly depthWords = computed(() => this.toDepthWords());
  protected readonly angleWords = computed(() => this.toAngleAnswer());
  protected readonly facts = computed(() => this.toFacts());
  protected readonly chart = computed(() => this.toChart());

  constructor() {
    effect(() => {
      const { issues } = this.question();
      untracked(() => showFieldWords(this.form, issues));
    });
    // Tools belong to a press: another press starts with its own first ones.
    effect(() => {
      const { punch, opening } = this.question();
      untracked(() => {
        const { controls } = this.form;
        if (punch && controls.punch.value !== punch.code) controls.punch.setValue(punch.code);
        if (opening && controls.opening.value !== opening.code) controls.opening.setValue(opening.code);
      });
    });
  }

  protected addTrial(): void {
    const setup = this.setup();
    if (!setup) return;
    const data: TrialDialogData = { setup, thickness: this.texts().thickness, facts: this.store.facts() };
    this.take(
      this.dialog.open(TrialDialog, { data, width: '560px' }).afterClosed(),
      'The trial bend is noted.',
    );
  }

  protected pasteTrials(): void {
    const setup = this.setup();
    if (!setup) return;
    const data: TrialDialogData = { setup, thickness: this.texts().thickness, facts: this.store.facts() };
    this.take(
      this.dialog.open(PasteDialog, { data, width: '680px' }).afterClosed(),
      'The trial bends are noted.',
    );
  }

  protected void(trial: TrialBendDto): void {
    this.api.void(trial.trialBendId).subscribe({
      next: () => {
        this.reload();
        this.notifier.say('The trial bend is voided; the fit goes without it.', () => this.restore(trial));
      },
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  protected reload(): void {
    this.trials.reload();
    this.fit.reload();
  }

  private restore({ trialBendId }: TrialBendDto): void {
    this.api.restore(trialBendId).subscribe({
      next: () => this.reload(),
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private take(closed: Observable<unknown>, done: string): void {
    closed.subscribe((answer) => {
      if (!answer) return;
      this.reload();
      this.notifier.say(done);
    });
  }

  private toDepthWords() {
    const [answer, { insideAngle }] = [this.depth(), this.question()];
    if (!answer) return null;
    if (!answer.ok) return { title: `No depth for ${toAngleWords(insideAngle)}`, text: answer.message };
    const { depthMm, lowMm, highMm, bandAngle } = answer.value;
    const length = (millimetres: number) => toLengthWords(millimetres, this.units);
    return {
      title: `${length(depthMm)} for ${toAngleWords(insideAngle)}`,
      text: `Expect ±${toNumberWords(bandAngle, 1)}°: 9 of 10 single bends to ${toAngleWords(insideAngle)} would need ${length(Math.min(lowMm, highMm))} to ${length(Math.max(lowMm, highMm))}.`,
    };
  }

  private toAngleAnswer() {
    const [answer, { readingMm }] = [this.angle(), this.question()];
    if (!answer || readingMm === null) return null;
    const at = toLengthWords(readingMm, this.units);
    if (!answer.ok) return { title: `No angle at ${at}`, text: answer.message };
    const { insideAngle, low, high } = answer.value;
    return {
      title: `${toAngleWords(insideAngle)} at ${at}`,
      text: `9 of 10 single bends come out between ${toAngleWords(low)} and ${toAngleWords(high)}.`,
    };
  }

  private toFacts() {
    const served = this.served();
    if (!served?.fit) return null;
    const { fit, correction, from, bends } = served;
    const degrees = (value: number) => `${toNumberWords(value, 2)}°`;
    return {
      from: from === 'opening' ? 'on this opening' : 'on all openings with this punch and material',
      count: bends.length,
      outliers: bends.filter(({ isOutlier }) => isOutlier).length,
      springback: `${degrees(fit.springback)} ± ${degrees(fit.springbackError)}`,
      datum: `${toLengthWords(fit.datumMm, this.units)} ± ${toLengthWords(fit.datumErrorMm, this.units)}`,
      rms: degrees(fit.rmsAngle),
      loo: fit.looAngle === null ? '–' : degrees(fit.looAngle),
      notes: fit.notes,
      correction: correction && toLengthWords(correction.shiftMm, this.units),
    };
  }

  private toChartBend(bend: { trialBendId: string; isOutlier?: boolean }): ChartBend[] {
    const trial = this.listed().find(({ trialBendId }) => trialBendId === bend.trialBendId);
    if (!trial) return [];
    const kind = trial.isFullLength ? 'full length' : 'measured';
    return [
      {
        depthMm: Number(trial.depthMm),
        insideAngle: Number(trial.measuredAngle),
        kind: bend.isOutlier ? 'outlier' : kind,
      },
    ];
  }

  private toChart() {
    const [fit, setup, served, answer] = [this.curveFit(), this.bendSetup(), this.served(), this.depth()];
    if (!fit || !setup || !served) return null;
    const curve = traceCurve(fit, setup);
    if (curve.length === 0) return null;
    const bends = [...served.bends, ...(served.correction ? [served.correction] : [])].flatMap((bend) =>
      this.toChartBend(bend),
    );
    const asked = answer?.ok
      ? { depthMm: answer.value.depthMm, insideAngle: this.question().insideAngle }
      : null;
    const facts = { curve, bends, answer: asked, units: this.units };
    const every = curve.filter((_, index) => index % 6 === 0);
    return {
      summary: `Inside angle over the reading of the ram for ${toSizeWords(setup.thicknessMm, this.units)} sheet on ${toSizeWords(setup.openingMm, this.units)}: ${toAngleWords(curve[0]?.insideAngle ?? 0)} to ${toAngleWords(curve.at(-1)?.insideAngle ?? 0)}.`,
      build: (palette: ChartPalette) => toDepthChartOption(facts, palette),
      table: {
        headers: ['Reading of the ram', 'Inside angle', '9 of 10 between'],
        rows: every.map((point) => [
          toLengthWords(point.depthMm, this.units),
          toAngleWords(point.insideAngle),
          `${toAngleWords(point.low)} and ${toAngleWords(point.high)}`,
        ]),
      },
    };
  }
}
