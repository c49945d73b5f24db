import { type FormGroup } from '@angular/forms';

/** What is wrong with one field, in words that name what is accepted. */
export interface FieldWords {
  field: string;
  message: string;
}

/**
 * Puts words at the fields they are about and takes old ones away. Results are computed with every keystroke, so a
 * field says at once what is wrong with it; nothing has to be sent first.
 */
export function showFieldWords(form: FormGroup, issues: readonly FieldWords[]): void {
  for (const [name, control] of Object.entries(form.controls)) {
    const message = issues.find((issue) => issue.field === name)?.message ?? null;
    if (message === (control.errors?.['words'] ?? null)) continue;
    control.setErrors(message === null ? null : { words: message });
    if (message !== null) control.markAsTouched();
  }
}
