import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';

/** Something could not be shown: what happened, what is safe, and a way to try again. */
@Component({
  selector: 'app-error-state',
  template: `
    <p class="title">{{ title() }}</p>
    <p class="text">{{ text() }}</p>
    @if (requestId(); as id) {
      <p class="text">
        Number for the server’s log: <code>{{ id }}</code>
      </p>
    }
    @if (canRetry()) {
      <button type="button" class="button" (click)="retried.emit()">Try again</button>
    }
    <ng-content />
  `,
  styles: `
    :host {
      display: grid;
      justify-items: start;
      gap: 8px;
      padding: 16px 18px;
      border: 1px solid var(--rust);
      border-left-width: 4px;
      border-radius: var(--radius);
      background: var(--sheet);
    }
    .title {
      color: var(--rust-text);
      font-weight: 500;
    }
    .text {
      max-width: 72ch;
      overflow-wrap: anywhere;
    }
    .button {
      margin-top: 4px;
    }
  `,
  host: { role: 'alert' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ErrorState {
  readonly title = input.required<string>();
  readonly text = input('');
  readonly requestId = input<string | undefined>();
  readonly canRetry = input(true);
  readonly retried = output();
}
