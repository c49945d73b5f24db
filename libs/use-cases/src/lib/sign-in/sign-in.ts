import { AppError, type Session } from '@brakeven/contract';
import {
  type AccountRow,
  type Database,
  inShop,
  listAccountsByEmail,
  markSignedIn,
} from '@brakeven/database';
import { beginAttempt, succeedAttempt } from './attempts';
import { findSessionUser } from './find-session-user';
import { verifyNothing, verifyPassword } from './password';

/**
 * Signs in with e-mail address and password. One address may have an account in several shops; the password
 * decides which is meant.
 *
 * @throws AppError `sign_in_refused`, the same and after a like time whether or not there is such an account;
 *   `locked_out` after too many failures
 */
export async function signIn(
  { db }: { db: Database },
  input: { email: string; password: string },
): Promise<Session> {
  const email = input.email.trim().toLowerCase();
  await beginAttempt(db, email);
  const account = await findMatchingAccount(db, email, input.password);
  const signedIn = account && (await findSessionUser({ db }, account));
  if (!account || !signedIn) {
    throw new AppError('sign_in_refused', 'E-mail or password is not right.');
  }
  await succeedAttempt(db, email);
  await inShop(db, account.shopId, { userId: account.userId, name: account.name }, (trx) =>
    markSignedIn(trx, account.userId),
  );
  return signedIn.session;
}

async function findMatchingAccount(
  db: Database,
  email: string,
  password: string,
): Promise<AccountRow | null> {
  const accounts = await listAccountsByEmail(db, email);
  if (accounts.length === 0) await verifyNothing(password);
  for (const account of accounts) {
    if ((await verifyPassword(account.passwordHash, password)) && account.isActive) return account;
  }
  return null;
}
