import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type MachineRate } from '@brakeven/contract';
import { EmptyState, LocalDatePipe, RatePipe, StatusTag } from '@brakeven/ui';
import { stateRates } from '../rates/current-rate';

/** The machine's rates from each day on; which one holds today is said in a word. */
@Component({
  selector: 'app-machine-rates-card',
  imports: [EmptyState, LocalDatePipe, RatePipe, RouterLink, StatusTag],
  template: `
    <section class="card" aria-labelledby="rates-heading">
      <div class="head">
        <h2 id="rates-heading">Hourly rates</h2>
        @if (canEdit()) {
          <span class="ways">
            <a class="button" [routerLink]="['/machines', machineId(), 'rate']">Build a machine-hour rate</a>
            <button type="button" class="button" (click)="added.emit()">Add rates from a day on</button>
          </span>
        }
      </div>
      @if (stated().length === 0) {
        <app-empty-state
          title="No rates yet"
          text="Without rates hours on this machine cost and earn nothing that could be counted; they are listed as missing, never as zero."
        />
      } @else {
        <div class="scroll-x">
          <table class="figures">
            <thead>
              <tr>
                <th scope="col">From</th>
                <th scope="col"><span class="visually-hidden">Holds today</span></th>
                <th scope="col" class="number">Machine-hour rate</th>
                <th scope="col" class="number">Charge-out rate</th>
                <th scope="col" class="number">Running cost</th>
                @if (canEdit()) {
                  <th scope="col"><span class="visually-hidden">Actions</span></th>
                }
              </tr>
            </thead>
            <tbody>
              @for (rate of stated(); track rate.machineRateId) {
                <tr [class.past]="rate.state === 'earlier'">
                  <th scope="row" class="date">{{ rate.validFrom | localDate }}</th>
                  <td>
                    @if (rate.state !== 'earlier') {
                      <app-status-tag
                        [word]="rate.state"
                        [tone]="rate.state === 'current' ? 'good' : 'plan'"
                      />
                    }
                  </td>
                  <td class="number">
                    @if (rate.basis) {
                      <a
                        class="built"
                        [routerLink]="['/machines', machineId(), 'rate']"
                        [queryParams]="{ rate: rate.machineRateId }"
                        [attr.aria-label]="'How the rate from ' + (rate.validFrom | localDate) + ' was built'"
                        >built</a
                      >
                    }
                    {{ rate.machineHourRate | rate }}
                  </td>
                  <td class="number">{{ rate.chargeOutRate | rate }}</td>
                  <td class="number">{{ rate.runningCostPerHour | rate }}</td>
                  @if (canEdit()) {
                    <td class="actions">
                      <button
                        type="button"
                        class="button quiet"
                        [attr.aria-label]="'Correct the rates from ' + (rate.validFrom | localDate)"
                        (click)="edited.emit(rate)"
                      >
                        Correct
                      </button>
                      <button
                        type="button"
                        class="button quiet"
                        [attr.aria-label]="'Take out the rates from ' + (rate.validFrom | localDate)"
                        (click)="deleted.emit(rate)"
                      >
                        Take out
                      </button>
                    </td>
                  }
                </tr>
              }
            </tbody>
          </table>
        </div>
      }
    </section>
  `,
  styleUrl: '../rates/dated-card.scss',
  styles: `
    .ways {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
    }
    .built {
      margin-right: 8px;
      font-size: 12.5px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MachineRatesCard {
  readonly machineId = input.required<string>();
  readonly rates = input.required<readonly MachineRate[]>();
  readonly today = input.required<string>();
  readonly canEdit = input(false);
  readonly added = output();
  readonly edited = output<MachineRate>();
  readonly deleted = output<MachineRate>();

  protected readonly stated = computed(() => stateRates(this.rates(), this.today()));
}
