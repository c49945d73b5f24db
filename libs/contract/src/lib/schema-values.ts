import { z } from 'zod';

/** A day of work, without clock or zone: `2026-03-31`. */
export const localDateSchema = z.iso
  .date('Write a day that there is as YYYY-MM-DD, for example 2026-03-31.')
  .meta({ id: 'LocalDate' });
/** A month of work: `2026-03`. */
export const monthSchema = z
  .string()
  .regex(/^\d{4}-(0[1-9]|1[0-2])$/, 'Write the month as YYYY-MM, for example 2026-03.');
/** An instant in UTC. */
export const instantSchema = z.iso.datetime({ offset: true }).meta({ id: 'Instant' });
export const idSchema = z.uuid('This is no id. Take it from the list that shows it.').meta({ id: 'Id' });

const decimal = (places: number, example: string) =>
  z
    .string()
    .trim()
    .regex(
      new RegExp(`^-?\\d{1,12}(\\.\\d{1,${places}})?$`),
      `Write a number with at most ${places} decimals, for example ${example}.`,
    );

/** An amount of money as text, two decimals, in the shop's currency. */
export const moneySchema = decimal(2, '1234.50').meta({ id: 'Money' });
/** Hours as text, at most four decimals. */
export const hoursSchema = decimal(4, '7.5').meta({ id: 'Hours' });
/** A rate as text, at most six decimals. */
export const rateSchema = decimal(6, '85.00').meta({ id: 'Rate' });
/** Lengths, forces as text. */
export const quantitySchema = decimal(5, '1828.8').meta({ id: 'Quantity' });
/** A weight as text, kilograms; ten decimals hold hundredths of a pound exactly. */
export const weightSchema = decimal(10, '453.59237').meta({ id: 'Weight' });

const notNegative = (schema: z.ZodString) =>
  schema.refine((text) => !text.startsWith('-'), 'Must not be negative.');
export const amountInputSchema = notNegative(decimal(2, '1234.50'));
export const rateInputSchema = notNegative(decimal(6, '85.00'));
export const percentInputSchema = notNegative(decimal(4, '28')).refine(
  (text) => Number(text) <= 1000,
  'At most 1000 percent.',
);
export const quantityInputSchema = notNegative(decimal(5, '1828.8'));

const positive = (schema: z.ZodString) => schema.refine((text) => Number(text) > 0, 'Must be more than 0.');
export const positiveAmountInputSchema = positive(decimal(2, '1234.50'));
export const positiveQuantityInputSchema = positive(decimal(5, '1828.8'));
export const positiveWeightInputSchema = positive(decimal(10, '453.59237'));
export const countInputSchema = z.number().int().min(1, 'At least 1.').max(1_000_000, 'At most a million.');

export const nameInputSchema = z
  .string()
  .trim()
  .min(1, 'Must not be empty.')
  .max(200, 'At most 200 characters.');
export const codeInputSchema = z
  .string()
  .trim()
  .min(1, 'Must not be empty.')
  .max(40, 'At most 40 characters.');
export const emailInputSchema = z
  .string()
  .trim()
  .toLowerCase()
  .max(254)
  .pipe(z.email('Write an e-mail address, for example mara@ternhollow.example.'));

/** Query parameters of a page of a long list: the cursor is what the page before returned. */
export const pageQuerySchema = z.object({
  /** Holds a sort value, of which a name may take 200 characters of four bytes. */
  cursor: z.string().max(1_500).optional(),
  limit: z.coerce.number().int().min(1).max(500).default(100),
});
export const directionSchema = z.enum(['asc', 'desc']);
