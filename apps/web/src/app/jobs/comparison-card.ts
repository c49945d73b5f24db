import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { type Figure as FigureName, type FigureRef, type JobDetail } from '@brakeven/contract';
import { Figure, LocalDatePipe, SHOP_FORMAT } from '@brakeven/ui';
import { toCategoryWord } from './line-columns';
import { MoneyWords } from './money-words';
import { toVarianceWords } from './variance-words';

/** A job's cost beside its estimate, category by category, with what the difference is made of. */
@Component({
  selector: 'app-comparison-card',
  imports: [Figure, LocalDatePipe, MoneyWords],
  template: `
    @if (job().comparison; as comparison) {
      <h2>Against the estimate{{ job().marginIsProvisional ? ', so far' : '' }}</h2>
      <p class="muted lead">
        Estimated on {{ comparison.estimatedOn | localDate }}. Price is what an hour or a weight cost more or
        less than estimated, amount is how much more or less of it was used; the two make the difference.
      </p>
      <div class="scroll-x" tabindex="0" role="region" aria-label="Against the estimate">
        <table class="figures">
          <thead>
            <tr>
              <th scope="col">Category</th>
              <th scope="col" class="number">Estimate</th>
              <th scope="col" class="number">Cost</th>
              <th scope="col" class="number">Difference</th>
              <th scope="col" class="number">of price</th>
              <th scope="col" class="number">of amount</th>
              <th scope="col">Why</th>
            </tr>
          </thead>
          <tbody>
            @for (row of rows(); track row.word) {
              <tr>
                <th scope="row">{{ row.word }}</th>
                <td class="number">
                  <app-figure
                    [value]="row.estimate"
                    [ref]="row.estimateRef"
                    [label]="row.word + ' estimated'"
                  />
                </td>
                <td class="number">
                  <app-figure [value]="row.actual" [ref]="row.actualRef" [label]="row.word + ' cost'" />
                </td>
                @for (amount of [row.variance, row.ratePart, row.quantityPart]; track $index) {
                  <td class="number">
                    <app-money-words [amount]="amount" [ref]="row.varianceRef" [label]="row.word" />
                  </td>
                }
                <td class="why">{{ row.words }}</td>
              </tr>
            }
          </tbody>
          <tfoot class="total">
            <tr>
              <th scope="row">Total</th>
              <td class="number">
                <app-figure [value]="comparison.total.estimate" [ref]="ref('estimate.total')" />
              </td>
              <td class="number">
                <app-figure [value]="comparison.total.actual" [ref]="ref('job.total')" />
              </td>
              @let total = comparison.total;
              @for (amount of [total.variance, total.ratePart, total.quantityPart]; track $index) {
                <td class="number">
                  <app-money-words [amount]="amount" [ref]="ref('estimate.variance')" label="Total" />
                </td>
              }
              <td></td>
            </tr>
          </tfoot>
        </table>
      </div>
    }
  `,
  styles: `
    .why {
      min-width: 210px;
    }
    .lead {
      margin-bottom: 8px;
      max-width: 88ch;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ComparisonCard {
  private readonly format = inject(SHOP_FORMAT);

  readonly job = input.required<JobDetail>();

  protected readonly rows = computed(() =>
    (this.job().comparison?.categories ?? []).map((one) => ({
      ...one,
      word: toCategoryWord(one.category),
      words: toVarianceWords(one, this.format()),
      // Overtime is never estimated, so that there is nothing to open.
      estimate: one.category === 'overtime' ? null : one.estimate,
      estimateRef: one.category === 'overtime' ? null : this.ref(`estimate.${one.category}`),
      actualRef: this.ref(`job.${one.category}`),
      varianceRef: { ...this.ref('estimate.variance'), category: one.category },
    })),
  );

  protected ref(figure: FigureName): FigureRef {
    return { figure, jobId: this.job().jobId };
  }
}
