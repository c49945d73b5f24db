import { sql } from 'kysely';
import { type Insertable, type Updateable } from 'kysely';
import { type Database } from './connect';
import { type UserAccountTable } from './tables';
import { type ShopTransaction } from './tenancy';

const USER_COLUMNS = [
  'userId',
  'name',
  'email',
  'role',
  'employeeId',
  'isActive',
  'mustChangePassword',
  'lastSignInAt',
] as const;

export interface AccountRow {
  shopId: string;
  userId: string;
  name: string;
  isActive: boolean;
  passwordHash: string;
}

/** Accounts with an e-mail address, in whatever shop, the one last used first. */
export function listAccountsByEmail(db: Database, email: string): Promise<AccountRow[]> {
  return db.transaction().execute(async (trx) => {
    await sql`select set_config('app.sign_in_email', ${email}, true)`.execute(trx);
    return trx
      .selectFrom('userAccount')
      .select(['shopId', 'userId', 'name', 'isActive', 'passwordHash'])
      .where('email', '=', email)
      .orderBy('lastSignInAt', (order) => order.desc().nullsLast())
      .orderBy('createdAt')
      .execute();
  });
}

export interface SessionUserRow {
  userId: string;
  userName: string;
  email: string;
  role: UserAccountTable['role'];
  employeeId: string | null;
  mustChangePassword: boolean;
  shopId: string;
  shopName: string;
  timeZone: string;
  currency: string;
  units: 'us' | 'metric';
  weekStart: number;
  overtimeThresholdHours: string | null;
  overtimeTo: 'overhead' | 'jobs';
}

/** The active account of a session with its shop, in one round trip; null once it is inactive. */
export async function findSessionUserRow(
  db: Database,
  shopId: string,
  userId: string,
): Promise<SessionUserRow | null> {
  const { rows } = await sql<SessionUserRow>`select * from find_session_user(${shopId}, ${userId})`.execute(
    db,
  );
  return rows[0] ?? null;
}

/** Notes that somebody has signed in. */
export async function markSignedIn(trx: ShopTransaction, userId: string): Promise<void> {
  await trx
    .updateTable('userAccount')
    .set({ lastSignInAt: sql`now()` })
    .where('userId', '=', userId)
    .execute();
}

/** The hash of an account's password, with the address that its attempts are counted by. */
export function findPasswordOf(
  trx: ShopTransaction,
  userId: string,
): Promise<{ email: string; passwordHash: string } | undefined> {
  return trx
    .selectFrom('userAccount')
    .select(['email', 'passwordHash'])
    .where('userId', '=', userId)
    .executeTakeFirst();
}

/** Sets a password; a temporary one has to be changed at the next sign-in. */
export async function updatePassword(
  trx: ShopTransaction,
  userId: string,
  passwordHash: string,
  mustChangePassword: boolean,
): Promise<void> {
  await trx
    .updateTable('userAccount')
    .set({ passwordHash, mustChangePassword, passwordChangedAt: sql`now()` })
    .where('userId', '=', userId)
    .execute();
}

/** Ends the sessions of an account, except the one named. */
export async function deleteSessionsOf(
  trx: ShopTransaction,
  userId: string,
  exceptSessionId: string | null,
): Promise<void> {
  await sql`delete from session where sess ->> 'userId' = ${userId} and sid is distinct from ${exceptSessionId}`.execute(
    trx,
  );
}

/** All accounts of the shop by name. */
export function listUserRows(trx: ShopTransaction) {
  return trx.selectFrom('userAccount').select(USER_COLUMNS).orderBy('name').orderBy('email').execute();
}

/** One account of the shop. */
export function findUserRow(trx: ShopTransaction, userId: string) {
  return trx.selectFrom('userAccount').select(USER_COLUMNS).where('userId', '=', userId).executeTakeFirst();
}

/** Adds an account. */
export async function insertUser(trx: ShopTransaction, row: Insertable<UserAccountTable>): Promise<void> {
  await trx.insertInto('userAccount').values(row).execute();
}

/** Changes an account. */
export async function updateUserRow(
  trx: ShopTransaction,
  userId: string,
  change: Updateable<UserAccountTable>,
): Promise<void> {
  await trx.updateTable('userAccount').set(change).where('userId', '=', userId).execute();
}

/**
 * Ids of the active owners, locked until the transaction ends, so that two owners who demote each other at the
 * same moment go one after the other.
 */
export async function lockActiveOwners(trx: ShopTransaction): Promise<string[]> {
  const rows = await trx
    .selectFrom('userAccount')
    .select('userId')
    .where('role', '=', 'owner')
    .where('isActive', '=', true)
    .orderBy('userId')
    .forUpdate()
    .execute();
  return rows.map((row) => row.userId);
}
