import { inject, Pipe, type PipeTransform } from '@angular/core';
import { formatLength, toLength } from '@brakeven/values';
import { SHOP_FORMAT } from './shop-format';

/** A length kept in millimetres, in the shop's units: 72 in or 1,828.8 mm. Absent gives –. */
@Pipe({ name: 'length' })
export class LengthPipe implements PipeTransform {
  private readonly format = inject(SHOP_FORMAT);

  transform(millimetres: string | null | undefined): string {
    if (millimetres === null || millimetres === undefined) return '–';
    return formatLength(toLength(millimetres, 'mm'), this.format().units);
  }
}
