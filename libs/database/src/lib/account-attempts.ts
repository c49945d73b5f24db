import { sql } from 'kysely';
import { type Database } from './connect';

/** How many failures lock an address, and for how long. */
export interface LockRule {
  failuresMax: number;
  lockMinutes: number;
}

/**
 * Counts a sign-in attempt as a failure before the password is looked at, so that many at once cannot outrun the
 * lock; {@link forgetAttempts} takes it back on success. The lock ends `lockMinutes` after the last failure that
 * counted, failures further apart than that are forgotten.
 *
 * @returns whether the address is locked
 */
export async function countAttempt(db: Database, emailSha256: string, rule: LockRule): Promise<boolean> {
  const { rows } = await sql<{ isLocked: boolean }>`
    insert into sign_in_attempt as a (email_sha256, failures, failed_at)
    values (${emailSha256}, 1, now())
    on conflict (email_sha256) do update set
      failures = case when a.failed_at < now() - make_interval(mins => ${rule.lockMinutes}::int) then 1
                      else least(a.failures, ${rule.failuresMax}::int) + 1 end,
      failed_at = case when a.failures >= ${rule.failuresMax}::int
                        and a.failed_at >= now() - make_interval(mins => ${rule.lockMinutes}::int)
                       then a.failed_at else now() end
    returning failures > ${rule.failuresMax}::int as is_locked`.execute(db);
  return rows[0]?.isLocked ?? false;
}

/** Forgets the failures of an address after a success, and those of others that have become too old to count. */
export async function forgetAttempts(db: Database, emailSha256: string, rule: LockRule): Promise<void> {
  await sql`
    delete from sign_in_attempt
    where email_sha256 = ${emailSha256} or failed_at < now() - make_interval(mins => ${rule.lockMinutes}::int)`.execute(
    db,
  );
}
