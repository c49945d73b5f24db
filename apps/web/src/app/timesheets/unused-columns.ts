import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { type TimesheetCheck } from '@brakeven/contract';

/** Columns of the sheet that nothing is read from, each with a way to say what it is. */
@Component({
  selector: 'app-unused-columns',
  template: `
    <ul [class.known]="check().mappingFrom === 'remembered'">
      @for (item of check().unusedColumns; track item.column) {
        <li>
          <span>{{ item.message }}</span>
          <button
            type="button"
            class="button quiet"
            [attr.aria-label]="'Say what column ' + item.column + ' is'"
            (click)="asked.emit(item.column)"
          >
            Say what it is
          </button>
        </li>
      }
    </ul>
  `,
  styleUrl: './unused-columns.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UnusedColumns {
  readonly check = input.required<Pick<TimesheetCheck, 'unusedColumns' | 'mappingFrom'>>();
  /** The column that the user wants to say something about. */
  readonly asked = output<string>();
}
