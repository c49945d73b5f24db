import { AppError, type Endpoint, type Issue } from '@brakeven/contract';
import { type Request } from 'express';
import { type z } from 'zod';

/**
 * Reads params, query and body by the endpoint's schemas.
 * @throws AppError `invalid_input` naming every field that is not as it should be
 */
export function checkInput(
  endpoint: Endpoint,
  request: Request,
  uploadOptions: unknown,
): { params: unknown; query: unknown; body: unknown } {
  const issues: Issue[] = [];
  const read = (schema: z.ZodType | undefined, input: unknown): unknown => {
    if (!schema) return undefined;
    const result = schema.safeParse(input);
    if (result.success) return result.data;
    issues.push(...result.error.issues.map(toIssue));
    return undefined;
  };
  const input = {
    params: read(endpoint.params, request.params),
    query: read(endpoint.query, request.query),
    body: read(endpoint.body, endpoint.upload ? uploadOptions : (request.body ?? {})),
  };
  if (issues.length > 0) {
    throw new AppError('invalid_input', 'Some of what was sent cannot be used as it is.', { issues });
  }
  return input;
}

function toIssue(issue: z.core.$ZodIssue): Issue {
  return { field: issue.path.map(String).join('.'), code: issue.code, message: issue.message };
}
