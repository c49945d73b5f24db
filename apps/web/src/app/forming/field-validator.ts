import { type ValidatorFn } from '@angular/forms';
import { type FieldReader } from './field-reader';

/** Refuses what a reader of fields cannot take, in its words; an empty field passes. */
export function readWith(
  toReader: () => FieldReader,
  read: (reader: FieldReader, text: string) => unknown,
): ValidatorFn {
  return ({ value }) => {
    const text = String(value ?? '').trim();
    if (text === '') return null;
    const reader = toReader();
    read(reader, text);
    const [issue] = reader.issues;
    return issue ? { words: issue.message } : null;
  };
}

/** Millimetres as the server takes them: five decimals at most. */
export function toMmText(millimetres: number): string {
  return String(Number(millimetres.toFixed(5)));
}
