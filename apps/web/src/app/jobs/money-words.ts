import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { type FigureRef } from '@brakeven/contract';
import { SHOP_FORMAT, WORKINGS_OPENER } from '@brakeven/ui';
import { D, formatMoney } from '@brakeven/values';

/**
 * A difference in money with its sign: what cost more leads with a plus, what cost less with a minus. A press shows
 * its workings.
 */
@Component({
  selector: 'app-money-words',
  template: `
    <button
      type="button"
      class="figure"
      aria-haspopup="dialog"
      title="How this figure was made"
      [attr.aria-label]="label() + ': ' + text()"
      (click)="openWorkings()"
    >
      {{ text() }}
    </button>
  `,
  styles: `
    .figure {
      padding: 0;
      border: 0;
      border-bottom: 1.5px dotted currentcolor;
      background: none;
      color: inherit;
      font: inherit;
      cursor: pointer;
    }
    :host(.more) {
      color: var(--rust-text);
    }
  `,
  host: { '[class.more]': 'isMore()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MoneyWords {
  private readonly opener = inject(WORKINGS_OPENER);
  private readonly format = inject(SHOP_FORMAT);

  readonly amount = input.required<string>();
  readonly ref = input.required<FigureRef>();
  /** Read out before the amount: what differs. */
  readonly label = input.required<string>();

  protected readonly isMore = computed(() => D(this.amount()).gt(0));
  protected readonly text = computed(() => {
    const text = formatMoney(this.amount(), this.format().currency);
    return this.isMore() ? `+${text}` : text;
  });

  protected openWorkings(): void {
    this.opener.open(this.ref());
  }
}
