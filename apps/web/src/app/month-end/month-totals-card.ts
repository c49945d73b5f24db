import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type CostCategory, type FigureRef, JOB_COST_CATEGORIES, type MonthTotal } from '@brakeven/contract';
import { EmptyState, Figure } from '@brakeven/ui';
import { D, moneyText, sum, toMoney } from '@brakeven/values';
import { CATEGORY_WORDS } from './month-words';

type Amounts = Pick<MonthTotal, 'amount' | 'toOverhead' | 'late'>;

/** What the books of a month come to by category: cost with its total, what was invoiced, and what machines earned. */
@Component({
  selector: 'app-month-totals-card',
  imports: [EmptyState, Figure],
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
                    @for (cell of toCells(row, row.category); track $index) {
                      <td class="number">
                        <app-figure [value]="cell.value" [ref]="cell.ref" [label]="words[row.category]" />
                      </td>
                    }
                    <td class="number muted">{{ row.lines.toLocaleString('en-US') }}</td>
                  </tr>
                }
                @if (group.total; as total) {
                  <tr class="total">
                    <th scope="row">{{ group.name }}</th>
                    @for (cell of toCells(total, 'cost'); track $index) {
                      <td class="number">
                        <app-figure [value]="cell.value" [ref]="cell.ref" [label]="group.name" />
                      </td>
                    }
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
  styles: `
    tbody th {
      min-width: 130px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MonthTotalsCard {
  readonly totals = input.required<readonly MonthTotal[]>();
  /** The month's first and last day. */
  readonly from = input.required<string>();
  readonly to = input.required<string>();
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

  /** The amount and its two parts as figures that open; a part that is not there is a dash. */
  protected toCells(
    row: Amounts,
    of: CostCategory | 'cost',
  ): { value: string | null; ref: FigureRef | null }[] {
    const figure = { figure: `books.${of}` as const, from: this.from(), to: this.to() };
    const toPart = (value: string, part: 'overhead' | 'late') =>
      D(value).isZero() ? { value: null, ref: null } : { value, ref: { ...figure, part } };
    return [{ value: row.amount, ref: figure }, toPart(row.toOverhead, 'overhead'), toPart(row.late, 'late')];
  }
}

function toTotal(rows: readonly MonthTotal[]): Amounts {
  const add = (of: (row: MonthTotal) => string) => moneyText(sum(rows.map((row) => toMoney(of(row)))));
  return {
    amount: add(({ amount }) => amount),
    toOverhead: add(({ toOverhead }) => toOverhead),
    late: add(({ late }) => late),
  };
}
