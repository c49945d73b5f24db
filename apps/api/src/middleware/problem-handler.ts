import { AppError, type ErrorCode, type Problem } from '@brakeven/contract';
import { findUnstorableValue, isUnreachable } from '@brakeven/use-cases';
import { type ErrorRequestHandler } from 'express';
import { STATUS_CODES } from 'node:http';

/** The HTTP status of each code, in the one place that knows it. */
export const STATUS_BY_CODE: Readonly<Record<ErrorCode, number>> = {
  already_imported: 409,
  already_undone: 409,
  changed_meanwhile: 412,
  conflict: 409,
  database_unreachable: 503,
  file_refused: 422,
  forbidden: 403,
  header_not_found: 422,
  import_not_found: 404,
  internal: 500,
  invalid_input: 400,
  locked_out: 429,
  mapping_incomplete: 422,
  month_refused: 409,
  not_found: 404,
  not_signed_in: 401,
  password_wrong: 422,
  rate_needed: 409,
  rollup_running: 409,
  rows_refused: 422,
  setup_refused: 422,
  shop_not_found: 404,
  sign_in_refused: 401,
  token_missing: 403,
  too_many_requests: 429,
  version_missing: 428,
};

/** The last handler: whatever was thrown becomes problem details (RFC 9457), and what nobody expected a log entry. */
export const handleProblem: ErrorRequestHandler = (error: unknown, request, response, next) => {
  const refusal = toAppError(error);
  const status = STATUS_BY_CODE[refusal.code];
  if (status >= 500) request.log.error({ err: error }, refusal.code);
  else request.log.debug({ code: refusal.code, detail: refusal.message }, 'refused');
  if (response.headersSent) {
    next(error);
    return;
  }
  const problem: Problem = {
    type: 'about:blank',
    title: STATUS_CODES[status] ?? 'Error',
    status,
    detail: refusal.message,
    code: refusal.code,
    requestId: String(request.id),
    issues: [...refusal.issues],
    ...(refusal.details === undefined ? {} : { details: refusal.details }),
  };
  response
    .status(status)
    .set('Cache-Control', 'no-store')
    .type('application/problem+json')
    .send(JSON.stringify(problem));
};

function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  if (isUnreachable(error)) {
    const message = 'The database cannot be reached. Nothing was changed. Try again in a minute.';
    return new AppError('database_unreachable', message, { cause: error });
  }
  const unstorable = findUnstorableValue(error);
  if (unstorable) return new AppError('invalid_input', unstorable, { cause: error });
  return (
    findBadRequest(error) ?? new AppError('internal', 'Something went wrong on our side.', { cause: error })
  );
}

/** What Express and its body parser refuse by themselves: a broken address, JSON that is none, a body too large. */
function findBadRequest(error: unknown): AppError | null {
  if (!(error instanceof Error)) return null;
  const { status, type } = error as { status?: number; type?: string };
  if (status === undefined || status < 400 || status >= 500) return null;
  const message =
    type === 'entity.too.large' ? 'More was sent than can be taken.' : 'What was sent cannot be read.';
  return new AppError('invalid_input', message, { cause: error });
}
