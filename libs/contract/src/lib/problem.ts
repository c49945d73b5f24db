import { z } from 'zod';
import { ERROR_CODES } from './app-error';

/** The body of every refusal: RFC 9457 problem details with our code and, for input, the fields. */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string(),
  code: z.enum(ERROR_CODES),
  requestId: z.string().optional(),
  issues: z.array(z.object({ field: z.string(), code: z.string(), message: z.string() })),
  details: z.unknown().optional(),
});
export type Problem = z.infer<typeof problemSchema>;
