import { FormControl, type ValidatorFn } from '@angular/forms';

/** A field that always holds text; what it means is read when the form is saved. */
export function textControl(
  value: string | null | undefined,
  ...validators: ValidatorFn[]
): FormControl<string> {
  return new FormControl(value ?? '', { nonNullable: true, validators });
}
