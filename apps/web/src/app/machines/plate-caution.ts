import { ChangeDetectionStrategy, Component } from '@angular/core';

/** What no register replaces. */
@Component({
  selector: 'app-plate-caution',
  template: `
    <strong>The rating plates decide.</strong> Never ask more force of a press or its tooling than the lower
    of their plates allows, whatever stands here. Guarding and lockout rules of your place apply.
  `,
  styles: `
    :host {
      display: block;
      padding: 10px 14px;
      border-left: 4px solid var(--brass);
      border-radius: var(--radius);
      background: var(--brass-tint);
      color: var(--brass-text);
      font-size: 13.5px;
    }
  `,
  host: { role: 'note' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlateCaution {}
