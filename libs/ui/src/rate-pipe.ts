import { inject, Pipe, type PipeTransform } from '@angular/core';
import { formatRate } from '@brakeven/values';
import { SHOP_FORMAT } from './shop-format';

/** A rate per hour as money, all its decimals: `{{ '85' | rate }}` gives $85.00. Absent gives –. */
@Pipe({ name: 'rate' })
export class RatePipe implements PipeTransform {
  private readonly format = inject(SHOP_FORMAT);

  transform(rate: string | null | undefined): string {
    return rate === null || rate === undefined ? '–' : formatRate(rate, this.format().currency);
  }
}
