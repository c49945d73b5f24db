import { ChangeDetectionStrategy, Component, input } from '@angular/core';

export type Tone = 'plain' | 'blue' | 'good' | 'plan' | 'loss';

/** A word on a tint; the word says it, the colour only helps. */
@Component({
  selector: 'app-status-tag',
  template: '{{ word() }}',
  styles: `
    :host {
      display: inline-block;
      padding: 0 7px;
      border-radius: 4px;
      background: var(--line);
      color: var(--ink);
      font-size: 12.5px;
      line-height: 20px;
      white-space: nowrap;
    }
    :host([data-tone='blue']) {
      background: var(--layout-blue-tint);
      color: var(--layout-blue-strong);
    }
    :host([data-tone='good']) {
      background: var(--patina-tint);
      color: var(--patina-text);
    }
    :host([data-tone='plan']) {
      background: var(--brass-tint);
      color: var(--brass-text);
    }
    :host([data-tone='loss']) {
      background: var(--rust-tint);
      color: var(--rust-text);
    }
  `,
  host: { '[attr.data-tone]': 'tone()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StatusTag {
  readonly word = input.required<string>();
  readonly tone = input<Tone>('plain');
}
