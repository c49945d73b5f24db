import { ChangeDetectionStrategy, Component } from '@angular/core';
import { FORMING_CAUTIONS } from '@brakeven/forming';

/** What must be said wherever a bend is decided. */
@Component({
  selector: 'app-forming-caution',
  template: `
    @for (caution of cautions; track caution) {
      <p>{{ caution }}</p>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      gap: 2px 18px;
      padding: 8px 14px;
      border-left: 4px solid var(--brass);
      border-radius: var(--radius);
      background: var(--brass-tint);
      color: var(--brass-text);
      font-size: 13.5px;
    }
    p:first-child {
      font-weight: 500;
    }
  `,
  host: { role: 'note', 'aria-label': 'Caution' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FormingCaution {
  protected readonly cautions = FORMING_CAUTIONS;
}
