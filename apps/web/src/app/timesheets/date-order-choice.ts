import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { type UnreadDates } from '@brakeven/contract';
import { LocalDatePipe } from '@brakeven/ui';
import { type DateFormat } from '@brakeven/values';
import { count } from './timesheet-words';

/** The orders of day and month that would read every text date of the sheet, one press each. */
@Component({
  selector: 'app-date-order-choice',
  imports: [LocalDatePipe],
  template: `
    <p class="muted">
      {{ dates() }} written as text, first in {{ unread().cells[0] }}.
      @if (unread().offers.length > 1) {
        More than one order reads them all: look at what the first would be.
      }
    </p>
    @for (offer of unread().offers; track offer.dateFormat) {
      <div class="offer">
        <button
          type="button"
          class="chip"
          [disabled]="isDisabled()"
          [attr.aria-describedby]="'order-' + $index"
          (click)="chosen.emit(offer.dateFormat)"
        >
          Text dates are written {{ offer.dateFormat }}
        </button>
        <span class="muted" [id]="'order-' + $index">{{ offer.text }} is {{ offer.date | localDate }}</span>
      </div>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 8px;
    }

    .offer {
      display: grid;
      gap: 2px;
      justify-items: start;
    }

    .muted {
      font-size: 12.5px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DateOrderChoice {
  readonly unread = input.required<UnreadDates>();
  readonly isDisabled = input(false);
  readonly chosen = output<DateFormat>();

  protected readonly dates = computed(() => count(this.unread().cells.length, 'date'));
}
