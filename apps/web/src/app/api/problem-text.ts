import { HttpErrorResponse } from '@angular/common/http';
import { type ErrorCode, type Issue, type Problem } from '@brakeven/contract';

/** A refusal or failure as the screens show it. */
export interface ShownProblem {
  code: ErrorCode | 'offline';
  /** What happened. */
  title: string;
  /** What is safe and what to do. */
  text: string;
  issues: readonly Issue[];
  details: unknown;
  requestId: string | undefined;
}

const OFFLINE = {
  title: 'The server cannot be reached',
  text: 'Nothing was changed. Check the network, then try again.',
};

const TITLES: Readonly<Record<ErrorCode, string>> = {
  already_imported: 'This file is already imported',
  already_undone: 'This import was already undone',
  changed_meanwhile: 'Somebody else changed this meanwhile',
  conflict: 'This does not fit what is there',
  database_unreachable: 'The database cannot be reached',
  file_refused: 'This file cannot be read',
  forbidden: 'Your role may not do this',
  header_not_found: 'No header row was found',
  import_not_found: 'There is no such import',
  internal: 'Something went wrong on our side',
  invalid_input: 'Please check what you entered',
  locked_out: 'Sign-in is locked for a while',
  mapping_incomplete: 'Some columns are still missing',
  month_refused: 'The month stays as it is',
  not_found: 'This is not here, or no longer',
  not_signed_in: 'You are signed out',
  password_wrong: 'The current password is not right',
  rate_needed: 'A rate is needed here',
  rollup_running: 'Costs are being rolled up right now',
  rows_refused: 'Some rows cannot go in as they are',
  setup_refused: 'The set-up workbook has problems',
  shop_not_found: 'There is no such shop',
  sign_in_refused: 'E-mail or password is not right',
  token_missing: 'This page has grown old',
  too_many_requests: 'Too many attempts',
  version_missing: 'This page has grown old',
};

/** Own words where the server's detail would not help the person at the screen. */
const TEXTS: Partial<Record<ErrorCode, string>> = {
  internal:
    'Nothing was changed. Try again; if it stays, tell whoever looks after the server the number below.',
  database_unreachable: 'Nothing was changed. Try again in a minute.',
  token_missing: 'Nothing was changed. Load the page again and repeat the last step.',
  version_missing: 'Nothing was changed. Load the page again and repeat the last step.',
};

/** Turns whatever a request threw into words; the one place where codes become text. */
export function toShownProblem(error: unknown): ShownProblem {
  const body = error instanceof HttpErrorResponse ? (error.error as unknown) : null;
  if (isProblem(body)) {
    return {
      code: body.code,
      title: TITLES[body.code],
      text: TEXTS[body.code] ?? body.detail,
      issues: body.issues,
      details: body.details,
      requestId: body.requestId,
    };
  }
  const isOffline = error instanceof HttpErrorResponse && [0, 502, 503, 504].includes(error.status);
  const words = isOffline ? OFFLINE : { title: TITLES.internal, text: 'Nothing was changed. Try again.' };
  const code = isOffline ? 'offline' : 'internal';
  return { code, ...words, issues: [], details: undefined, requestId: undefined };
}

/** One sentence for a short message: what happened and what to do. */
export function toProblemSentence(error: unknown): string {
  const { title, text } = toShownProblem(error);
  return `${title}. ${text}`;
}

/** The message that belongs to one field of a form, if any. */
export function findIssue(problem: ShownProblem | null, field: string): string | undefined {
  return problem?.issues.find((issue) => issue.field === field)?.message;
}

function isProblem(body: unknown): body is Problem {
  if (typeof body !== 'object' || body === null) return false;
  const { code, issues } = body as Partial<Problem>;
  return typeof code === 'string' && code in TITLES && Array.isArray(issues);
}
