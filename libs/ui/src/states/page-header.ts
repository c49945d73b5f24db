import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** A page's head: a line above, the title, text below (content), actions at the right (`actions` attribute). */
@Component({
  selector: 'app-page-header',
  template: `
    <div class="words">
      @if (kicker()) {
        <p class="kicker">{{ kicker() }}</p>
      }
      <h1>{{ title() }}<ng-content select="[title]" /></h1>
      <div class="lead"><ng-content /></div>
    </div>
    <div class="actions"><ng-content select="[actions]" /></div>
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      align-items: flex-start;
      justify-content: space-between;
      gap: 12px 24px;
      margin-bottom: 18px;
    }
    .words {
      flex: 1 1 320px;
      min-width: 0;
    }
    .kicker {
      color: var(--ink-muted);
    }
    .lead {
      margin-top: 4px;
      max-width: 88ch;
      color: var(--ink-muted);
      font-size: 15px;
    }
    .lead:empty,
    .actions:empty {
      display: none;
    }
    .actions {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PageHeader {
  readonly title = input('');
  readonly kicker = input('');
}
