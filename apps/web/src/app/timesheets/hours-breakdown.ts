import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type TimesheetCheck } from '@brakeven/contract';
import { HoursPipe, LocalDatePipe } from '@brakeven/ui';

/** Hours by employee and by day, with bars, to compare with what the shop expects of its week. */
@Component({
  selector: 'app-hours-breakdown',
  imports: [HoursPipe, LocalDatePipe],
  template: `
    <table class="figures">
      <caption>
        By employee
      </caption>
      <thead>
        <tr>
          <th scope="col">Employee</th>
          <th scope="col" class="number">Entries</th>
          <th scope="col" class="number">Hours</th>
        </tr>
      </thead>
      <tbody>
        @for (one of byEmployee(); track one.employee) {
          <tr>
            <th scope="row">
              {{ one.employee }}
              <span class="bar" aria-hidden="true" [style.inline-size.%]="one.share"></span>
            </th>
            <td class="number">{{ one.entries }}</td>
            <td class="number">{{ one.hours | hours }}</td>
          </tr>
        }
      </tbody>
    </table>
    <table class="figures">
      <caption>
        By day
      </caption>
      <thead>
        <tr>
          <th scope="col">Day</th>
          <th scope="col" class="number">Entries</th>
          <th scope="col" class="number">Hours</th>
        </tr>
      </thead>
      <tbody>
        @for (one of byDay(); track one.workedOn) {
          <tr>
            <th scope="row">
              {{ one.workedOn | localDate: 'weekday' }}
              <span class="bar" aria-hidden="true" [style.inline-size.%]="one.share"></span>
            </th>
            <td class="number">{{ one.entries }}</td>
            <td class="number">{{ one.hours | hours }}</td>
          </tr>
        }
      </tbody>
    </table>
  `,
  styleUrl: './hours-breakdown.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HoursBreakdown {
  readonly check = input.required<Pick<TimesheetCheck, 'byEmployee' | 'byDay'>>();
  protected readonly byEmployee = computed(() => withShares(this.check().byEmployee));
  protected readonly byDay = computed(() => withShares(this.check().byDay));
}

/** Adds the length of each bar in percent of the longest; a bar is a picture, so a plain number will do for it. */
export function withShares<T extends { hours: string }>(items: readonly T[]): (T & { share: number })[] {
  const most = Math.max(0, ...items.map(({ hours }) => Number(hours)));
  return items.map((item) => ({ ...item, share: most > 0 ? (Number(item.hours) / most) * 100 : 0 }));
}
