import { AppError } from '@brakeven/contract';
import { deleteSessionsOf, findPasswordOf, updatePassword } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { beginAttempt, succeedAttempt } from './attempts';
import { hashPassword, verifyPassword } from './password';

/**
 * Changes the own password and ends one's other sessions.
 *
 * @param options.keepSessionId the session that goes on
 * @throws AppError `password_wrong`; `locked_out` after too many failures; `invalid_input` if nothing would change
 */
export async function changePassword(
  context: ShopContext,
  body: { currentPassword: string; newPassword: string },
  options: { keepSessionId: string | null },
): Promise<void> {
  const { userId } = context.actor;
  const account = userId && (await inShopOf(context, (trx) => findPasswordOf(trx, userId)));
  if (!account) throw new AppError('not_found', 'This account is no longer here.');
  await beginAttempt(context.db, account.email);
  if (!(await verifyPassword(account.passwordHash, body.currentPassword))) {
    throw refusal('password_wrong', 'currentPassword', 'The current password is not right.');
  }
  await succeedAttempt(context.db, account.email);
  if (body.newPassword === body.currentPassword) {
    throw refusal('invalid_input', 'newPassword', 'The new password is the old one. Choose another.');
  }
  const passwordHash = await hashPassword(body.newPassword);
  await inShopOf(context, async (trx) => {
    await updatePassword(trx, userId, passwordHash, false);
    await deleteSessionsOf(trx, userId, options.keepSessionId);
  });
}

function refusal(code: 'password_wrong' | 'invalid_input', field: string, message: string): AppError {
  return new AppError(code, message, { issues: [{ field, code, message }] });
}
