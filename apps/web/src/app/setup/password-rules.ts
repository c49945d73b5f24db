import { type AbstractControl, type ValidatorFn } from '@angular/forms';

/** The same text as in the other field. */
export function matches(other: AbstractControl<string>): ValidatorFn {
  return ({ value }) =>
    value === other.value ? null : { words: 'This is not the same as the new password.' };
}

/** Another text than in the other field. */
export function differsFrom(other: AbstractControl<string>): ValidatorFn {
  return ({ value }) =>
    value !== '' && value === other.value ? { words: 'Choose another than the present one.' } : null;
}
