import { type AbstractControl, type FormGroup, type ValidatorFn } from '@angular/forms';
import { type Parsed } from '@brakeven/values';

/** Refuses what a reader of `@brakeven/values` cannot read, in the reader's own words; an empty field passes. */
export function parsedBy(parse: (text: string) => Parsed<unknown>): ValidatorFn {
  return ({ value }) => {
    const text = String(value ?? '').trim();
    if (text === '') return null;
    const parsed = parse(text);
    return parsed.ok ? null : { parsed: parsed.message };
  };
}

/** The words for what is wrong with a field, or null; the server's own words win. */
export function findFieldError(control: AbstractControl): string | null {
  const errors = control.errors;
  if (!errors) return null;
  for (const word of ['server', 'parsed', 'words']) {
    if (typeof errors[word] === 'string') return errors[word];
  }
  if (errors['required']) return 'Fill this in.';
  if (errors['email']) return 'Write an e-mail address, for example mara@ternhollow.example.';
  const minlength = errors['minlength'] as { requiredLength: number } | undefined;
  if (minlength) return `At least ${minlength.requiredLength} characters.`;
  const maxlength = errors['maxlength'] as { requiredLength: number } | undefined;
  if (maxlength) return `At most ${maxlength.requiredLength} characters.`;
  return 'This cannot be taken as it stands.';
}

/** Issue of the server about one field: `rate.wagePerHour`. */
export interface FieldIssue {
  field: string;
  message: string;
}

/** Puts the server's words at the fields they are about; returns those that belong to no field of the form. */
export function showIssues(form: FormGroup, issues: readonly FieldIssue[]): FieldIssue[] {
  return issues.filter(({ field, message }) => {
    const control = form.get(field) ?? form.get(field.split('.').at(-1) ?? '');
    if (!control || control === form) return true;
    control.setErrors({ ...control.errors, server: message });
    control.markAsTouched();
    return false;
  });
}
