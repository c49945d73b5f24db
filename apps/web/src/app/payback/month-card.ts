import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type FigureRef, type Payback } from '@brakeven/contract';
import { Figure, RatePipe } from '@brakeven/ui';
import { toMonthRef } from './payback-refs';
import { toMonthHeading } from './verdict';

/** How the month's net was made: earned, operator, running. */
@Component({
  selector: 'app-month-card',
  imports: [Figure, RatePipe, RouterLink],
  template: `
    <h2>{{ heading() }}</h2>
    <table class="figures">
      <tbody>
        <tr>
          <th scope="row">
            Earned,
            <app-figure [value]="month().billableHours" unit="hours" [ref]="ref('payback.billableHours')" />
            @if (month().chargeOutRate; as rate) {
              × <a [routerLink]="['/machines', machineId()]" title="To its rates">{{ rate | rate }}</a>
            } @else {
              at changing rates
            }
          </th>
          <td class="number"><app-figure [value]="month().earned" [ref]="ref('payback.earned')" /></td>
        </tr>
        <tr>
          <th scope="row">Operator, loaded</th>
          <td class="number">
            <app-figure [value]="negate(month().operatorLabour)" [ref]="ref('payback.operatorLabour')" />
          </td>
        </tr>
        <tr>
          <th scope="row">Power, tooling, upkeep</th>
          <td class="number">
            <app-figure [value]="negate(month().running)" [ref]="ref('payback.running')" />
          </td>
        </tr>
        <tr class="total">
          <th scope="row">Net to payback</th>
          <td class="number"><app-figure [value]="month().net" [ref]="ref('payback.earnedBack')" /></td>
        </tr>
      </tbody>
    </table>
    <p class="muted">
      <app-figure [value]="month().hours" unit="hours" [ref]="ref('payback.hours')" /> on the machine,
      <app-figure [value]="month().billableHours" unit="hours" [ref]="ref('payback.billableHours')" /> of them
      billable.
    </p>
  `,
  styles: `
    :host {
      display: block;
    }
    p {
      margin-top: 10px;
      font-size: 13px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MonthCard {
  readonly machineId = input.required<string>();
  readonly month = input.required<NonNullable<Payback['month']>>();
  readonly asOf = input.required<string>();

  protected readonly heading = computed(() => toMonthHeading(this.month().month, this.asOf()));

  protected ref(figure: FigureRef['figure']): FigureRef {
    return toMonthRef(figure, this.machineId(), this.month().month);
  }

  protected negate(amount: string): string {
    return amount.startsWith('-') ? amount.slice(1) : `-${amount}`;
  }
}
