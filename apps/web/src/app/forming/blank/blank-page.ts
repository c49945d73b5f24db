import { ChangeDetectionStrategy, Component, computed, effect, inject, untracked } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { type BlankBend, FORMING_RULES, type SheetLayout } from '@brakeven/forming';
import { MassPipe } from '@brakeven/ui';
import { type UnitSystem } from '@brakeven/values';
import { FormField } from '../../forms/form-field';
import { SessionStore } from '../../session/session-store';
import { keepInAddress, toTextForm } from '../address-form';
import { toAngleWords, toLengthWords, toNumberWords, toPercentWords, toSizeWords } from '../forming-words';
import { FormingStore } from '../forming-store';
import { PrintButton } from '../print-button';
import { showFieldWords } from '../show-field-words';
import { BLANK_DEFAULTS, K_CHOICES, readBlankQuestion } from './blank-question';
import { PartEditor } from './part-editor';
import { toWays } from './profile-drawing';
import { ProfileSketch } from './profile-sketch';

/** The blank of a part: flanges and angles in, flat length, deductions, gauge positions and pieces out. */
@Component({
  selector: 'app-blank-page',
  imports: [FormField, MassPipe, PartEditor, PrintButton, ProfileSketch, ReactiveFormsModule],
  templateUrl: './blank-page.html',
  styleUrl: './blank-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BlankPage {
  private readonly store = inject(FormingStore);
  protected readonly units = inject(SessionStore).shopFormat().units;
  private readonly defaults = BLANK_DEFAULTS[this.units];
  protected readonly form = toTextForm(this.defaults);
  protected readonly texts = keepInAddress(this.form, this.defaults);
  protected readonly question = computed(() => readBlankQuestion(this.texts(), this.store.facts()));
  protected readonly materials = this.store.materialOptions;
  protected readonly kChoices = K_CHOICES;
  protected readonly rules = FORMING_RULES;
  protected readonly ways = computed(() => toWays(this.texts().ways));
  protected readonly shown = computed(() => this.toShown());
  protected readonly partIssues = computed(() =>
    this.question().issues.filter(({ field }) => ['flanges', 'angles'].includes(field)),
  );

  constructor() {
    effect(() => {
      const { issues } = this.question();
      untracked(() => showFieldWords(this.form, issues));
    });
  }

  /** The answer in words and in the shop's units. */
  private toShown() {
    const { answer, material } = this.question();
    if (!answer) return null;
    const { input, blank, k, layouts } = answer;
    const outsideMm = input.flangesMm.reduce((total, flange) => total + flange, 0);
    const length = (millimetres: number) => toLengthWords(millimetres, this.units);
    return {
      flat: length(blank.flatMm),
      outside: `${input.flangesMm.map((flange) => toSizeWords(flange, this.units)).join(' + ')}`,
      outsideSum: length(outsideMm),
      deducted: length(blank.flatMm - outsideMm),
      radius: length(input.radiusMm),
      radiusRatio: toNumberWords(input.radiusMm / input.thicknessMm, 2),
      k: toNumberWords(k.k, 3),
      kWords: k.words,
      kSpread: k.spread && `${toNumberWords(k.spread.min, 3)} to ${toNumberWords(k.spread.max, 3)}`,
      massKg: answer.massKg?.toFixed(6) ?? null,
      words: `${material.name} ${toSizeWords(input.thicknessMm, this.units)}`,
      bends: blank.bends.map((bend, index) => this.toShownBend(bend, index)),
      rules: [...new Set(blank.bends.map((bend) => this.toRule(bend)))],
      layouts: layouts.map((layout) => this.toShownLayout(layout)),
    };
  }

  private toShownBend(bend: BlankBend, index: number) {
    const length = (millimetres: number) => toLengthWords(millimetres, this.units);
    const isSharp = bend.convention === 'virtual-sharp';
    return {
      number: index + 1,
      angle: toAngleWords(bend.insideAngle),
      turned: toAngleWords(bend.turned),
      measured: isSharp ? 'to the sharp corner' : 'to the tangent of the bend',
      rule: this.toRule(bend),
      allowance: length(bend.allowanceMm),
      deduction: length(bend.deductionMm),
      gauge: length(bend.gaugeMm),
      gaugeTurned: length(bend.gaugeTurnedRoundMm),
      line: length(bend.bendLineMm),
    };
  }

  private toRule({ convention }: BlankBend): string {
    return convention === 'virtual-sharp' ? FORMING_RULES.bendDeduction : FORMING_RULES.acuteDeduction;
  }

  private toShownLayout(layout: SheetLayout) {
    const size = (millimetres: number) => toOffcutWords(millimetres, this.units);
    const offcuts = layout.offcuts.map(({ widthMm, lengthMm }) => `${size(widthMm)} × ${size(lengthMm)}`);
    return {
      grain: layout.grain === 'bends-across-grain' ? 'Bends across the grain' : 'Bends along the grain',
      pieces: layout.pieces,
      rows: `${layout.acrossSheet} × ${layout.alongSheet}`,
      yield: toPercentWords(layout.yield),
      offcuts: offcuts.length > 0 ? offcuts.join(', ') : 'none',
    };
  }
}

/** An offcut is cut by a shear: a hundredth of an inch, or a tenth of a millimetre, is near enough. */
function toOffcutWords(millimetres: number, units: UnitSystem): string {
  const step = units === 'us' ? 0.254 : 0.1;
  return toSizeWords(Math.round(millimetres / step) * step, units);
}
