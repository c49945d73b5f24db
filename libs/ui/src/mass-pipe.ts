import { inject, Pipe, type PipeTransform } from '@angular/core';
import { formatMass, toMass } from '@brakeven/values';
import { SHOP_FORMAT } from './shop-format';

/** A weight kept in kilograms, in the shop's units: 886.19 kg or 1,953.7 lb. Absent gives –. */
@Pipe({ name: 'mass' })
export class MassPipe implements PipeTransform {
  private readonly format = inject(SHOP_FORMAT);

  transform(kilograms: string | null | undefined): string {
    if (kilograms === null || kilograms === undefined) return '–';
    return formatMass(toMass(kilograms, 'kg'), this.format().units);
  }
}
