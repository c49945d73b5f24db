import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type MonthLateLine } from '@brakeven/contract';
import { LocalDatePipe, MoneyPipe } from '@brakeven/ui';
import { D, moneyText, sum, toMoney } from '@brakeven/values';
import { CATEGORY_WORDS } from './month-words';

/** Late lines: those that stand in this month for work of a closed one, or those of this month that stand later. */
@Component({
  selector: 'app-late-lines-card',
  imports: [LocalDatePipe, MoneyPipe, RouterLink],
  template: `
    <section class="card" [attr.aria-labelledby]="kind() + '-heading'">
      <h2 [id]="kind() + '-heading'">{{ heading() }}</h2>
      <p class="muted">{{ text() }}</p>
      <div class="scroll-x" tabindex="0" role="region" [attr.aria-label]="heading()">
        <table class="figures">
          <thead>
            <tr>
              <th scope="col">Of</th>
              <th scope="col">Posted on</th>
              <th scope="col">Category</th>
              <th scope="col">What</th>
              <th scope="col">Job</th>
              <th scope="col" class="number">Amount</th>
            </tr>
          </thead>
          <tbody>
            @for (line of lines(); track line.lineId) {
              <tr>
                <td class="date">{{ line.workedOn | localDate }}</td>
                <td class="date">{{ line.postedOn | localDate }}</td>
                <td>{{ words[line.category] }}</td>
                <td>
                  {{ line.label }}
                  @if (line.isReversal) {
                    <span class="muted">· taken back</span>
                  }
                </td>
                <td>
                  @if (line.jobId) {
                    <a [routerLink]="['/jobs', line.jobId]">{{ line.job }}</a>
                  } @else {
                    <span class="muted">overhead</span>
                  }
                </td>
                <td class="number">{{ line.amount | money }}</td>
              </tr>
            }
          </tbody>
          <tfoot>
            <tr class="total">
              <th scope="row" colspan="5">
                @if (count() > lines().length) {
                  First {{ lines().length }} of {{ count().toLocaleString('en-US') }} lines
                } @else {
                  Total
                }
              </th>
              <td class="number">{{ total() | money }}</td>
            </tr>
          </tfoot>
        </table>
      </div>
    </section>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LateLinesCard {
  readonly kind = input.required<'late-in' | 'late-out'>();
  readonly lines = input.required<readonly MonthLateLine[]>();
  readonly count = input.required<number>();
  protected readonly words = CATEGORY_WORDS;
  protected readonly heading = computed(() =>
    this.kind() === 'late-in' ? 'Late for an earlier month' : 'Of this month, posted later',
  );
  protected readonly text = computed(() =>
    this.kind() === 'late-in'
      ? 'These came after their month was closed. They stand in this month, at the rates of their own day.'
      : 'These came after this month was closed. They stand where they are posted and leave this month as it was.',
  );
  protected readonly total = computed(() =>
    moneyText(sum(this.lines().map(({ amount }) => toMoney(D(amount))))),
  );
}
