import { AppError, type Issue } from '@brakeven/contract';
import { findConstraintViolation } from '@brakeven/database';

/** For each constraint that a piece of work may break, the field that broke it and words for it. */
export type ConflictIssues = Readonly<Record<string, Pick<Issue, 'field' | 'message'>>>;

/**
 * Runs work that writes, and turns the constraints it may break into refusals.
 *
 * @throws AppError `conflict` for something that is there already, `invalid_input` for a reference to nothing;
 *   any other error as it came
 */
export async function refusingConflicts<T>(issues: ConflictIssues, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    const violation = findConstraintViolation(error);
    const issue = violation && issues[violation.constraint];
    if (!violation || !issue) throw error;
    const isTaken = violation.kind === 'unique';
    throw new AppError(isTaken ? 'conflict' : 'invalid_input', issue.message, {
      issues: [{ ...issue, code: isTaken ? 'taken' : 'unknown' }],
      cause: error,
    });
  }
}
