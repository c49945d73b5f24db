import { Pipe, type PipeTransform } from '@angular/core';
import { formatHours } from '@brakeven/values';

/** Decimal hours: `{{ '7.5000' | hours }}` gives 7.50. Absent gives –. */
@Pipe({ name: 'hours' })
export class HoursPipe implements PipeTransform {
  transform(hours: string | null | undefined): string {
    return hours === null || hours === undefined ? '–' : formatHours(hours);
  }
}
