import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import {
  findLongestBend,
  findOpeningNeeded,
  findThickestSheet,
  type FitInput,
  type FitLimit,
  type FitRow,
} from '@brakeven/forming';
import { SHOP_FORMAT } from '@brakeven/ui';
import { toLengthWords, toPercentWords, toSizeWords } from '../forming-words';

/** The question turned round: how long, how thick, and which opening it would take to stay under the shop's line. */
@Component({
  selector: 'app-fit-limits',
  template: `
    <section class="card" aria-labelledby="limits-heading">
      <h2 id="limits-heading">The other way round, under {{ line() }} of the rating</h2>
      <dl>
        @for (limit of limits(); track limit.question) {
          <div>
            <dt>{{ limit.question }}</dt>
            <dd>{{ limit.answer }}</dd>
            <dd class="words">{{ limit.words }}</dd>
          </div>
        }
      </dl>
    </section>
  `,
  styles: `
    dl {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(min(210px, 100%), 1fr));
      gap: 12px 20px;
    }
    dt,
    .words {
      color: var(--ink-muted);
      font-size: 12.5px;
    }
    dd:not(.words) {
      font-size: 17px;
      font-weight: 500;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FitLimits {
  private readonly format = inject(SHOP_FORMAT);
  readonly input = input.required<FitInput>();
  readonly row = input.required<FitRow>();

  protected readonly line = computed(() => toPercentWords(this.input().lineShare));
  protected readonly limits = computed(() => {
    const [fit, { opening }] = [this.input(), this.row()];
    const { units } = this.format();
    const on = `on ${toSizeWords(opening.openingMm, units)}`;
    return [
      this.toShown(`Longest bend in this sheet ${on}`, findLongestBend(fit, opening)),
      this.toShown(`Thickest sheet at this length ${on}`, findThickestSheet(fit, opening)),
      this.toShown('Opening it would take, owned or not', findOpeningNeeded(fit)),
    ];
  });

  private toShown(question: string, limit: FitLimit) {
    const answer = limit.found ? toLengthWords(limit.valueMm, this.format().units) : '–';
    return { question, answer, words: limit.words };
  }
}
