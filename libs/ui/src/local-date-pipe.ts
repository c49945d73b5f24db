import { Pipe, type PipeTransform } from '@angular/core';
import { type DateStyle, formatLocalDate, toLocalDate } from '@brakeven/values';

/** A day, the same in every time zone: `{{ '2026-03-02' | localDate }}` gives Mar 2, 2026. Absent gives –. */
@Pipe({ name: 'localDate' })
export class LocalDatePipe implements PipeTransform {
  transform(date: string | null | undefined, style: DateStyle = 'medium'): string {
    return date ? formatLocalDate(toLocalDate(date), style) : '–';
  }
}
