import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** Nothing here yet: why, and what to do next (content: a button or a link). */
@Component({
  selector: 'app-empty-state',
  template: `
    <p class="title">{{ title() }}</p>
    <p class="text">{{ text() }}</p>
    <div class="next"><ng-content /></div>
  `,
  styles: `
    :host {
      display: grid;
      justify-items: center;
      gap: 6px;
      padding: 36px 20px;
      text-align: center;
    }
    .title {
      font-size: 16px;
      font-weight: 500;
    }
    .text {
      max-width: 52ch;
      color: var(--ink-muted);
    }
    .next {
      display: flex;
      flex-wrap: wrap;
      justify-content: center;
      gap: 8px;
      margin-top: 10px;
    }
    .next:empty {
      display: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EmptyState {
  readonly title = input.required<string>();
  readonly text = input('');
}
