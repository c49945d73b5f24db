import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The product's own mark: a bent sheet, and the line of even through it. */
@Component({
  selector: 'app-mark',
  template: `
    <svg viewBox="0 0 28 22" width="28" height="22" aria-hidden="true">
      <path class="sheet" d="M3 3 14 19 25 3" />
      <path class="even" d="M2 10h24" />
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
    }
    path {
      fill: none;
      stroke-linejoin: round;
      stroke-linecap: round;
    }
    .sheet {
      stroke: currentcolor;
      stroke-width: 3.2;
    }
    .even {
      stroke: #d9a441;
      stroke-width: 1.5;
      stroke-dasharray: 2.5 2.5;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Mark {}
