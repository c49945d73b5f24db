import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { ErrorState } from '@brakeven/ui';
import { toShownProblem } from '../api/problem-text';

/** What went wrong while something was fetched, in the words of the one place that has them, and a way to try again. */
@Component({
  selector: 'app-load-error',
  imports: [ErrorState],
  template: `
    <app-error-state
      [title]="problem().title"
      [text]="problem().text"
      [requestId]="problem().requestId"
      (retried)="retried.emit()"
    />
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LoadError {
  readonly error = input.required<unknown>();
  readonly retried = output();
  protected readonly problem = computed(() => toShownProblem(this.error()));
}
