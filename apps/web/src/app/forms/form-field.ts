import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { type FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { startWith, switchMap } from 'rxjs';
import { findFieldError } from './parsed-by';

export interface FieldOption {
  value: string;
  label: string;
}

/** One labelled field of a form with its hint and the words for what is wrong with it. */
@Component({
  selector: 'app-form-field',
  imports: [MatFormFieldModule, MatInputModule, ReactiveFormsModule],
  template: `
    <mat-form-field appearance="outline" subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      @if (options(); as options) {
        <select matNativeControl [formControl]="control()" [required]="isRequired()">
          @for (option of options; track option.value) {
            <option [value]="option.value">{{ option.label }}</option>
          }
        </select>
      } @else {
        <input
          matInput
          [type]="type()"
          [formControl]="control()"
          [required]="isRequired()"
          [attr.inputmode]="isNumber() ? 'decimal' : null"
          [attr.autocomplete]="autocomplete()"
        />
      }
      @if (suffix()) {
        <span matTextSuffix>&nbsp;{{ suffix() }}</span>
      }
      @if (hint()) {
        <mat-hint>{{ hint() }}</mat-hint>
      }
      <mat-error>{{ state().error }}</mat-error>
    </mat-form-field>
  `,
  styles: `
    :host,
    mat-form-field {
      display: block;
      min-width: 0;
    }
    :host {
      padding: 7px 0;
    }
    input {
      height: 24px;
      line-height: 24px;
    }
    [matTextSuffix] {
      white-space: nowrap;
    }
    :host(.wide) {
      grid-column: 1 / -1;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FormField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<string>>();
  readonly type = input<'text' | 'date' | 'email' | 'password'>('text');
  readonly isNumber = input(false);
  readonly suffix = input('');
  readonly hint = input('');
  readonly autocomplete = input('off');
  /** With options the field is a choice. */
  readonly options = input<readonly FieldOption[] | null>(null);

  protected readonly isRequired = computed(() => this.control().hasValidator(Validators.required));
  private readonly changed = toSignal(
    toObservable(this.control).pipe(switchMap((control) => control.events.pipe(startWith(null)))),
  );
  // A new object for every event, so that Material looks again at touched as well as at errors.
  protected readonly state = computed(() => ({
    event: this.changed(),
    error: findFieldError(this.control()),
  }));
}
