import { inject, Pipe, type PipeTransform } from '@angular/core';
import { formatForce, toForce } from '@brakeven/values';
import { SHOP_FORMAT } from './shop-format';

/** A force kept in kilonewtons, in the shop's units: 60 US tons or 533.8 kN. Absent gives –. */
@Pipe({ name: 'force' })
export class ForcePipe implements PipeTransform {
  private readonly format = inject(SHOP_FORMAT);

  transform(kilonewtons: string | null | undefined): string {
    if (kilonewtons === null || kilonewtons === undefined) return '–';
    return formatForce(toForce(kilonewtons, 'kN'), this.format().units);
  }
}
