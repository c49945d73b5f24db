import { type Session } from '@brakeven/contract';
import { type Database, findSessionUserRow } from '@brakeven/database';

/** Somebody signed in: what the screens are told, and whose hours an operator sees. */
export interface SessionUser {
  session: Session;
  employeeId: string | null;
}

/** Who a session belongs to, as the account is now; null if it has been made inactive. */
export async function findSessionUser(
  { db }: { db: Database },
  { shopId, userId }: { shopId: string; userId: string },
): Promise<SessionUser | null> {
  const row = await findSessionUserRow(db, shopId, userId);
  if (!row) return null;
  const { email, role, mustChangePassword, timeZone, currency, units, weekStart } = row;
  const { overtimeThresholdHours, overtimeTo } = row;
  return {
    employeeId: row.employeeId,
    session: {
      user: { userId: row.userId, name: row.userName, email, role, mustChangePassword },
      shop: {
        shopId: row.shopId,
        name: row.shopName,
        timeZone,
        currency,
        units,
        weekStart,
        overtimeThresholdHours,
        overtimeTo,
      },
    },
  };
}
