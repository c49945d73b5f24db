import { ChangeDetectionStrategy, Component, computed, effect, inject, untracked } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { computeBendFit, FIT_NOTES, type FitRow } from '@brakeven/forming';
import { EmptyState } from '@brakeven/ui';
import { FormField } from '../../forms/form-field';
import { SessionStore } from '../../session/session-store';
import { keepInAddress, toTextForm } from '../address-form';
import { toAngleWords, toPercentWords, toSizeWords } from '../forming-words';
import { FormingStore } from '../forming-store';
import { PrintButton } from '../print-button';
import { findFirstPress, shoulderRadiusMm } from '../press-tooling';
import { showFieldWords } from '../show-field-words';
import { type DrawnBend } from './bend-drawing';
import { BendSketch } from './bend-sketch';
import { FitLimits } from './fit-limits';
import { COMMON_OPENINGS, FIT_DEFAULTS, type FitTexts, readFitQuestion } from './fit-question';
import { FitTable } from './fit-table';
import { toFitSentence } from './fit-verdict';
import { ForceWorkings } from './force-workings';

/** Will it fit: what is to be bent beside every opening owned, and what each asks of the press. */
@Component({
  selector: 'app-fit-page',
  imports: [
    BendSketch,
    EmptyState,
    FitLimits,
    FitTable,
    ForceWorkings,
    FormField,
    PrintButton,
    ReactiveFormsModule,
  ],
  templateUrl: './fit-page.html',
  styleUrl: './fit-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FitPage {
  private readonly store = inject(FormingStore);
  protected readonly units = inject(SessionStore).shopFormat().units;
  protected readonly notes = [FIT_NOTES.offCentre, FIT_NOTES.segmentedPunch, FIT_NOTES.narrowDie];

  private readonly first = findFirstPress(this.store.presses());
  private readonly defaults: FitTexts = {
    ...FIT_DEFAULTS[this.units],
    machine: this.first?.code ?? '',
    punch: this.first?.punches[0]?.code ?? '',
    openings: this.first?.openings.length ? '' : COMMON_OPENINGS[this.units],
  };
  protected readonly form = toTextForm(this.defaults);
  private readonly texts = keepInAddress(this.form, this.defaults, ['machine']);
  protected readonly question = computed(() => readFitQuestion(this.texts(), this.store.facts()));
  protected readonly fit = computed(() => {
    const { input } = this.question();
    return input && computeBendFit(input);
  });
  protected readonly lineShare = this.store.lineShare;
  protected readonly materials = this.store.materialOptions;
  protected readonly presses = computed(() => [
    ...this.store.presses().map(({ code, name }) => ({ value: code, label: name })),
    { value: '', label: 'another press' },
  ]);
  protected readonly punches = computed(() =>
    (this.question().press?.punches ?? []).map(({ code, name }) => ({ value: code, label: name })),
  );
  protected readonly sentence = computed(() => {
    const fit = this.fit();
    return fit ? toFitSentence(fit, this.question().press?.name ?? null, this.units) : '';
  });
  /** The opening looked at: the one chosen, else the best, else the widest. */
  protected readonly chosen = computed(() => {
    const fit = this.fit();
    const code = this.texts().opening;
    return (
      fit?.rows.find((row) => row.opening.code === code) ??
      fit?.rows.find((row) => row.opening.code === fit.best) ??
      fit?.rows.at(-1) ??
      null
    );
  });
  protected readonly drawn = computed(() => {
    const row = this.chosen();
    return row && this.toDrawn(row);
  });
  protected readonly words = computed(() => this.toWords());

  constructor() {
    effect(() => {
      const { issues } = this.question();
      untracked(() => showFieldWords(this.form, issues));
    });
    // Punches belong to a press: another press starts with its own first one.
    effect(() => {
      const { press, punch } = this.question();
      untracked(() => {
        if (press && punch && this.form.controls.punch.value !== punch.code) {
          this.form.controls.punch.setValue(punch.code);
        }
      });
    });
  }

  protected choose(code: string): void {
    this.form.controls.opening.setValue(code);
  }

  protected compareCommon(): void {
    this.form.controls.openings.setValue(COMMON_OPENINGS[this.units]);
  }

  private toDrawn(row: FitRow): DrawnBend | null {
    const { input, openings } = this.question();
    const opening = openings.find(({ code }) => code === row.opening.code);
    if (!input || !opening || row.force === null) return null;
    return {
      bend: {
        openingMm: opening.openingMm,
        shoulderRadiusMm: shoulderRadiusMm(opening),
        insideRadiusMm: row.insideRadiusMm,
        thicknessMm: input.thicknessMm,
      },
      insideAngle: input.insideAngle,
      punchRadiusMm: input.punch?.noseRadiusMm ?? Math.min(1, row.insideRadiusMm),
      punchAngle: input.punch?.angle ?? null,
      dieAngle: opening.dieAngle,
      flangeMm: input.flangeMm,
    };
  }

  /** What was asked, in a line; a print carries it instead of the fields. */
  private toWords(): string {
    const { input, material, press } = this.question();
    if (!input) return '';
    const rated = press ? ` · ${press.name}` : '';
    const flange =
      input.flangeMm === null ? '' : ` · shortest flange ${toSizeWords(input.flangeMm, this.units)}`;
    return `${material.name} ${toSizeWords(input.thicknessMm, this.units)} · ${toSizeWords(input.lengthMm, this.units)} long · ${toAngleWords(input.insideAngle)} inside (turned ${toAngleWords(180 - input.insideAngle)})${flange}${rated} · kept under ${toPercentWords(input.lineShare)} of the rating`;
  }
}
