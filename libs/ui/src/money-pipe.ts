import { inject, Pipe, type PipeTransform } from '@angular/core';
import { formatMoney } from '@brakeven/values';
import { SHOP_FORMAT } from './shop-format';

/** Money in the shop's currency, always to the cent: `{{ '1234.5' | money }}` gives $1,234.50. Absent gives –. */
@Pipe({ name: 'money' })
export class MoneyPipe implements PipeTransform {
  private readonly format = inject(SHOP_FORMAT);

  transform(amount: string | null | undefined): string {
    return amount === null || amount === undefined ? '–' : formatMoney(amount, this.format().currency);
  }
}
