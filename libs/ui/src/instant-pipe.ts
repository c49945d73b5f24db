import { inject, Pipe, type PipeTransform } from '@angular/core';
import { SHOP_FORMAT } from './shop-format';

/** A moment on the clock where the shop is: `{{ createdAt | instant }}` gives Nov 26, 2026, 4:05 PM. Absent gives –. */
@Pipe({ name: 'instant' })
export class InstantPipe implements PipeTransform {
  private readonly format = inject(SHOP_FORMAT);

  transform(instant: string | null | undefined): string {
    if (!instant) return '–';
    const { timeZone } = this.format();
    const format = new Intl.DateTimeFormat('en-US', { dateStyle: 'medium', timeStyle: 'short', timeZone });
    return format.format(new Date(instant));
  }
}
