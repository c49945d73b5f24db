import { AppError, LIMITS } from '@brakeven/contract';
import { countAttempt, type Database, forgetAttempts } from '@brakeven/database';
import { createHash } from 'node:crypto';

const RULE = { failuresMax: LIMITS.signInFailuresMax, lockMinutes: LIMITS.lockMinutes };

/**
 * Counts an attempt on an address before its password is looked at.
 * @throws AppError `locked_out` after too many failures, whether or not the address has an account
 */
export async function beginAttempt(db: Database, email: string): Promise<void> {
  if (await countAttempt(db, toKey(email), RULE)) {
    throw new AppError(
      'locked_out',
      `Too many attempts with this e-mail address. Wait ${LIMITS.lockMinutes} minutes, then try again.`,
    );
  }
}

/** Takes the count back, because the password was right. */
export function succeedAttempt(db: Database, email: string): Promise<void> {
  return forgetAttempts(db, toKey(email), RULE);
}

function toKey(email: string): string {
  return createHash('sha256').update(email).digest('hex');
}
