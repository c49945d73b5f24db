import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { type FigureRef } from '@brakeven/contract';
import { formatHours, formatMoney } from '@brakeven/values';
import { SHOP_FORMAT } from '../shop-format';
import { WORKINGS_OPENER } from '../workings-opener';

export type FigureUnit = 'money' | 'hours';

/** A figure that opens: a press shows its workings. Without `ref` it is plain text, without `value` a dash. */
@Component({
  selector: 'app-figure',
  template: `
    @if (ref(); as figure) {
      <button
        type="button"
        class="figure"
        aria-haspopup="dialog"
        title="How this figure was made"
        [attr.aria-label]="label() ? label() + ': ' + text() : null"
        (click)="openWorkings(figure)"
      >
        {{ text() }}
      </button>
    } @else {
      <span>{{ text() }}</span>
    }
  `,
  styleUrl: './figure.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Figure {
  private readonly opener = inject(WORKINGS_OPENER);
  private readonly format = inject(SHOP_FORMAT);

  readonly value = input.required<string | null | undefined>();
  readonly unit = input<FigureUnit>('money');
  readonly ref = input<FigureRef | null>(null);
  /** Read out before the figure where the words around it are not near, as in a grid. */
  readonly label = input('');

  protected readonly text = computed(() => toFigureText(this.value(), this.unit(), this.format().currency));

  protected openWorkings(ref: FigureRef): void {
    this.opener.open(ref);
  }
}

/** A figure's text: money to the cent, hours with their unit, a dash if absent. */
export function toFigureText(value: string | null | undefined, unit: FigureUnit, currency: string): string {
  if (value === null || value === undefined) return '–';
  return unit === 'money' ? formatMoney(value, currency) : `${formatHours(value)}\u00a0h`;
}
