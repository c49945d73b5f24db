import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';

/** What can be done with a tool of the rack. */
@Component({
  selector: 'app-tool-actions',
  template: `
    <button
      type="button"
      class="button quiet"
      [attr.aria-label]="'Change ' + name()"
      (click)="changed.emit()"
    >
      Change
    </button>
    <button
      type="button"
      class="button quiet"
      [attr.aria-label]="'Take out ' + name()"
      (click)="takenOut.emit()"
    >
      Take out
    </button>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ToolActions {
  readonly name = input.required<string>();
  readonly changed = output<void>();
  readonly takenOut = output<void>();
}
