import { FormControl, FormGroup, Validators } from '@angular/forms';
import { type Job, type JobInput, type JobStatus } from '@brakeven/contract';
import { accepted, isLocalDate, moneyText, type Parsed, parseMoney, refused } from '@brakeven/values';
import { parsedBy } from '../forms/parsed-by';

const text = (value: string | null | undefined, ...validators: ReturnType<typeof parsedBy>[]) =>
  new FormControl(value ?? '', { nonNullable: true, validators });

/** The fields of a job as they are typed. */
export function toJobForm(job: Job | null) {
  return new FormGroup({
    number: text(job?.number, Validators.required, Validators.maxLength(40)),
    title: text(job?.title, Validators.required, Validators.maxLength(200)),
    customer: text(job?.customer, Validators.maxLength(200)),
    quantity: text(job?.quantity?.toString(), parsedBy(parsePieces)),
    openedOn: text(job?.openedOn),
    dueOn: text(job?.dueOn),
    quotedPrice: text(job?.quotedPrice, parsedBy(parseMoney)),
    status: text(job?.status ?? 'open', Validators.required),
    isBillable: new FormControl(job?.isBillable ?? true, { nonNullable: true }),
  });
}

export type JobForm = ReturnType<typeof toJobForm>;

/** What the server takes: empty fields become null, never 0. */
export function toJobInput(form: JobForm): JobInput {
  const value = form.getRawValue();
  const price = parseMoney(value.quotedPrice);
  const pieces = parsePieces(value.quantity);
  return {
    number: value.number.trim(),
    title: value.title.trim(),
    customer: value.customer.trim() || null,
    quantity: pieces.ok ? pieces.value : null,
    openedOn: isLocalDate(value.openedOn) ? value.openedOn : null,
    dueOn: isLocalDate(value.dueOn) ? value.dueOn : null,
    quotedPrice: price.ok ? moneyText(price.value) : null,
    isBillable: value.isBillable,
    status: value.status as JobStatus,
  };
}

/** Reads a whole number of pieces from 1 to a million. Code: `not_pieces`. */
export function parsePieces(pieces: string): Parsed<number> {
  const plain = pieces.trim().replaceAll(',', '');
  const count = /^\d{1,7}$/.test(plain) ? Number(plain) : 0;
  if (count >= 1 && count <= 1_000_000) return accepted(count);
  return refused('not_pieces', `'${pieces}' is not a number of pieces. Write a whole number such as 24.`);
}
