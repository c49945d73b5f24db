import { AppError, type User, type UserCreate, type UserCreated, type UserPatch } from '@brakeven/contract';
import {
  deleteSessionsOf,
  findUserRow,
  insertUser,
  listUserRows,
  lockActiveOwners,
  type ShopTransaction,
  updatePassword,
  updateUserRow,
} from '@brakeven/database';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';
import { refusingConflicts } from '../refuse-conflict';
import { hashPassword, newTemporaryPassword } from '../sign-in/password';

const CONFLICTS = {
  user_account_shop_id_email_key: {
    field: 'email',
    message: 'Somebody in this shop already has this e-mail address.',
  },
  user_account_shop_id_employee_id_fkey: { field: 'employeeId', message: 'There is no such employee.' },
};

/** All users of the shop, by name. */
export async function listUsers(context: ShopContext): Promise<User[]> {
  const rows = await inShopOf(context, listUserRows);
  return rows.map(toUser);
}

/**
 * Adds a user with a temporary password, which is told once and has to be changed at the first sign-in.
 * @throws AppError `conflict` (e-mail address taken), `invalid_input` (no such employee)
 */
export async function createUser(context: ShopContext, body: UserCreate): Promise<UserCreated> {
  const userId = newId();
  const temporaryPassword = newTemporaryPassword();
  const passwordHash = await hashPassword(temporaryPassword);
  const { shopId } = context.shop;
  const user = await refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await insertUser(trx, { shopId, userId, ...body, passwordHash, mustChangePassword: true });
      return getUser(trx, userId);
    }),
  );
  return { user, temporaryPassword };
}

/**
 * Changes name, role, employee or whether the user may sign in; a deactivated user is out at once.
 * @throws AppError `not_found`; `conflict` if the shop would be left without an active owner
 */
export async function updateUser(
  context: ShopContext,
  { userId }: { userId: string },
  body: UserPatch,
): Promise<User> {
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      const owners = await lockActiveOwners(trx);
      const before = await getUser(trx, userId);
      const after = { ...before, ...withoutUndefined(body) };
      assertOwnerStays(owners, before, after);
      const { name, role, employeeId, isActive } = after;
      await updateUserRow(trx, userId, { name, role, employeeId, isActive });
      if (!isActive) await deleteSessionsOf(trx, userId, null);
      return getUser(trx, userId);
    }),
  );
}

/**
 * Gives a user a new temporary password and ends the user's sessions.
 * @throws AppError `not_found`
 */
export async function resetUserPassword(
  context: ShopContext,
  { userId }: { userId: string },
): Promise<UserCreated> {
  const temporaryPassword = newTemporaryPassword();
  const passwordHash = await hashPassword(temporaryPassword);
  const user = await inShopOf(context, async (trx) => {
    await getUser(trx, userId);
    await updatePassword(trx, userId, passwordHash, true);
    await deleteSessionsOf(trx, userId, null);
    return getUser(trx, userId);
  });
  return { user, temporaryPassword };
}

function assertOwnerStays(owners: readonly string[], before: User, after: User): void {
  const isOwner = ({ role, isActive }: User) => role === 'owner' && isActive;
  if (!isOwner(before) || isOwner(after) || owners.some((id) => id !== before.userId)) return;
  const field = after.isActive ? 'role' : 'isActive';
  const message = 'This is the only active owner. Make somebody else an owner first.';
  throw new AppError('conflict', message, { issues: [{ field, code: 'last_owner', message }] });
}

async function getUser(trx: ShopTransaction, userId: string): Promise<User> {
  const row = await findUserRow(trx, userId);
  if (!row) throw new AppError('not_found', 'There is no such user.');
  return toUser(row);
}

function toUser(row: Awaited<ReturnType<typeof listUserRows>>[number]): User {
  return { ...row, lastSignInAt: row.lastSignInAt?.toISOString() ?? null };
}

function withoutUndefined<T extends object>(patch: T): { [K in keyof T]?: Exclude<T[K], undefined> } {
  return Object.fromEntries(Object.entries(patch).filter(([, value]) => value !== undefined)) as {
    [K in keyof T]?: Exclude<T[K], undefined>;
  };
}
