import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { SHOP_FORMAT } from '@brakeven/ui';
import { D, formatMoney } from '@brakeven/values';

/** A difference in money with its sign: what cost more leads with a plus, what cost less with a minus. */
@Component({
  selector: 'app-money-words',
  template: '{{ text() }}',
  host: { '[class.more]': 'isMore()' },
  styles: `
    :host.more {
      color: var(--rust-text);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MoneyWords {
  private readonly format = inject(SHOP_FORMAT);

  readonly amount = input.required<string>();

  protected readonly isMore = computed(() => D(this.amount()).gt(0));
  protected readonly text = computed(() => {
    const text = formatMoney(this.amount(), this.format().currency);
    return this.isMore() ? `+${text}` : text;
  });
}
