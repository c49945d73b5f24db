import { type AbstractControl, type FormGroup, type ValidationErrors } from '@angular/forms';

/** What is wrong with one field, in words that name what is accepted. */
export interface FieldWords {
  field: string;
  message: string;
}

/** What is wrong with each field now; kept here because a field asks its validators again whenever it is drawn anew. */
const WORDS = new WeakMap<AbstractControl, string>();

/** Keeps a field refused as long as something is known to be wrong with it. */
export function keepsWords(control: AbstractControl): ValidationErrors | null {
  const words = WORDS.get(control);
  return words === undefined ? null : { words };
}

/**
 * Puts words at the fields they are about and takes old ones away. Results are computed with every keystroke, so a
 * field says at once what is wrong with it; nothing has to be sent first.
 */
export function showFieldWords(form: FormGroup, issues: readonly FieldWords[]): void {
  for (const [name, control] of Object.entries(form.controls)) {
    const message = issues.find((issue) => issue.field === name)?.message;
    if (message === WORDS.get(control)) continue;
    if (message === undefined) WORDS.delete(control);
    else WORDS.set(control, message);
    control.setErrors(keepsWords(control));
    if (message !== undefined) control.markAsTouched();
  }
}
