import { AppError, hasPermission, type Permission } from '@brakeven/contract';
import { type Database, findSessionUser, type SessionUser, type ShopContext } from '@brakeven/use-cases';
import { type Request, type Response } from 'express';
import { type CsrfTokens } from './csrf-tokens';

/**
 * Who asks, and whether they may: the one place where permissions are checked. The account is looked at on every
 * request, so a role that was changed or an account that was made inactive counts at once.
 *
 * @param permission `null`: open to everybody
 * @throws AppError `not_signed_in`, `forbidden`
 */
export async function authorize(
  { db, tokens }: { db: Database; tokens: CsrfTokens },
  request: Request,
  response: Response,
  permission: Permission | null,
): Promise<{ context: ShopContext; signedIn: SessionUser } | undefined> {
  if (permission === null) return undefined;
  const { userId, shopId } = request.session;
  const signedIn = userId && shopId ? await findSessionUser({ db }, { userId, shopId }) : null;
  if (!signedIn) {
    await endSession(request);
    tokens.issue(request, response);
    throw new AppError('not_signed_in', 'Sign in first.');
  }
  const { user, shop } = signedIn.session;
  response.locals['userId'] = user.userId;
  if (user.mustChangePassword && permission !== 'session.own') {
    throw new AppError('forbidden', 'Change your temporary password first.');
  }
  if (!hasPermission(user.role, permission)) {
    throw new AppError('forbidden', 'Your role may not do this. Ask an owner of the shop.');
  }
  const { userId: actorId, name, role } = user;
  const actor = { userId: actorId, name, role, employeeId: signedIn.employeeId };
  return { context: { db, shop, actor }, signedIn };
}

async function endSession(request: Request): Promise<void> {
  if (!request.session.userId) return;
  await new Promise<void>((resolve, reject) => {
    request.session.regenerate((error: unknown) => (error ? reject(error) : resolve()));
  });
}
