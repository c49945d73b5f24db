import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { JOB_COST_CATEGORIES, type MonthTotal } from '@brakeven/contract';
import { EmptyState, MoneyPipe } from '@brakeven/ui';
import { D, moneyText, sum, toMoney } from '@brakeven/values';
import { CATEGORY_WORDS } from './month-words';

/** What the books of a month come to by category: cost with its total, what was invoiced, and what machines earned. */
@Component({
  selector: 'app-month-totals-card',
  imports: [EmptyState, MoneyPipe],
  template: `
    <section class="card" aria-labelledby="totals-heading">
      <h2 id="totals-heading">In the books of the month</h2>
      @if (totals().length === 0) {
        <app-empty-state
          title="Nothing posted"
          text="Costs stand here once hours, material or outside services are rolled up."
        />
      } @else {
        <div class="scroll-x" tabindex="0" role="region" aria-label="Totals by category">
          <table class="figures">
            <thead>
              <tr>
                <th scope="col">Category</th>
                <th scope="col" class="number">Amount</th>
                <th scope="col" class="number">of it to overhead</th>
                <th scope="col" class="number">of it late</th>
                <th scope="col" class="number">Lines</th>
              </tr>
            </thead>
            @for (group of groups(); track group.name) {
              <tbody>
                @for (row of group.rows; track row.category) {
                  <tr>
                    <th scope="row">{{ words[row.category] }}</th>
                    <td class="number">{{ row.amount | money }}</td>
                    <td class="number">{{ isZero(row.toOverhead) ? '–' : (row.toOverhead | money) }}</td>
                    <td class="number">{{ isZero(row.late) ? '–' : (row.late | money) }}</td>
                    <td class="number muted">{{ row.lines.toLocaleString('en-US') }}</td>
                  </tr>
                }
                @if (group.total; as total) {
                  <tr class="total">
                    <th scope="row">{{ group.name }}</th>
                    <td class="number">{{ total.amount | money }}</td>
                    <td class="number">{{ total.toOverhead | money }}</td>
                    <td class="number">{{ total.late | money }}</td>
                    <td class="number"></td>
                  </tr>
                }
              </tbody>
            }
          </table>
        </div>
      }
    </section>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MonthTotalsCard {
  readonly totals = input.required<readonly MonthTotal[]>();
  protected readonly words = CATEGORY_WORDS;
  protected readonly groups = computed(() => {
    const costs: readonly string[] = JOB_COST_CATEGORIES;
    const cost = this.totals().filter(({ category }) => costs.includes(category));
    const other = this.totals().filter(({ category }) => !costs.includes(category));
    return [
      { name: 'Cost of the month', rows: cost, total: cost.length > 0 ? toTotal(cost) : null },
      { name: 'Beside the cost', rows: other, total: null },
    ];
  });

  protected isZero(amount: string): boolean {
    return D(amount).isZero();
  }
}

function toTotal(rows: readonly MonthTotal[]): Pick<MonthTotal, 'amount' | 'toOverhead' | 'late'> {
  const add = (of: (row: MonthTotal) => string) => moneyText(sum(rows.map((row) => toMoney(of(row)))));
  return {
    amount: add(({ amount }) => amount),
    toOverhead: add(({ toOverhead }) => toOverhead),
    late: add(({ late }) => late),
  };
}
