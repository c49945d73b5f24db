import { InvalidArgumentError } from 'commander';
import { type z } from 'zod';

/** Reads an argument or option by a schema of the contract; what does not fit is wrong usage. */
export function readBy<S extends z.ZodType<unknown, string>>(schema: S): (text: string) => z.output<S> {
  return (text) => {
    const result = schema.safeParse(text);
    if (result.success) return result.data;
    throw new InvalidArgumentError(result.error.issues.map((issue) => issue.message).join(' '));
  };
}
