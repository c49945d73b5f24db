/** Codes of everything that can be refused; the web app and the CLI map them to words in one place. */
export const ERROR_CODES = [
  'already_imported',
  'already_undone',
  'changed_meanwhile',
  'conflict',
  'database_unreachable',
  'file_refused',
  'forbidden',
  'header_not_found',
  'import_not_found',
  'internal',
  'invalid_input',
  'locked_out',
  'mapping_incomplete',
  'month_refused',
  'not_found',
  'not_signed_in',
  'password_wrong',
  'rate_needed',
  'rollup_running',
  'rows_refused',
  'setup_refused',
  'shop_not_found',
  'sign_in_refused',
  'token_missing',
  'too_many_requests',
  'version_missing',
] as const;
export type ErrorCode = (typeof ERROR_CODES)[number];

/** One thing wrong with one field of the input, or one cell of a file. */
export interface Issue {
  /** Path of the field in the input (`rates.0.validFrom`) or the cell (`Hours!F12`). */
  field: string;
  code: string;
  message: string;
}

/** An expected refusal: has a code, words for the person, and may name fields. Anything else thrown is our bug. */
export class AppError extends Error {
  override readonly name = 'AppError';
  readonly code: ErrorCode;
  readonly issues: readonly Issue[];
  /** What a caller that knows the code may want besides words (the check result of refused rows, say). */
  readonly details: unknown;

  constructor(
    code: ErrorCode,
    message: string,
    options: { issues?: readonly Issue[]; details?: unknown; cause?: unknown } = {},
  ) {
    super(message, { cause: options.cause });
    this.code = code;
    this.issues = options.issues ?? [];
    this.details = options.details;
  }
}
