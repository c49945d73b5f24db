import { type AppError, LIMITS, type Role } from '@brakeven/contract';
import { randomUUID } from 'node:crypto';
import { sql } from 'kysely';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { createUser, updateUser } from '../manage-users/users';
import { changePassword } from './change-password';
import { findSessionUser } from './find-session-user';
import { signIn } from './sign-in';

let shop: TestShop;
beforeAll(async () => {
  shop = await createTestShop();
});
afterAll(() => shop.close());

const newEmail = () => `${randomUUID()}@ternhollow.example`;

async function addAccount(at: TestShop = shop, email = newEmail(), role: Role = 'bookkeeper') {
  const body = { name: 'Ines Okafor', email, role, employeeId: null };
  const { user, temporaryPassword } = await createUser(at.context(), body);
  const context = at.context(role);
  context.actor.userId = user.userId;
  return { email, user, context, password: temporaryPassword };
}

const codeOf = (work: Promise<unknown>) =>
  work.then(
    () => 'no refusal',
    (error: AppError) => `${error.code}: ${error.message}`,
  );

describe('signing in', () => {
  it('answers who it is, in which shop, and notes when', async () => {
    const { email, user, password } = await addAccount();
    const session = await signIn(shop, { email: ` ${email.toUpperCase()} `, password });
    expect(session.user).toEqual({
      userId: user.userId,
      name: 'Ines Okafor',
      email,
      role: 'bookkeeper',
      mustChangePassword: true,
    });
    expect(session.shop).toEqual(shop.shop);
    const row = await shop.inShop((trx) =>
      trx
        .selectFrom('userAccount')
        .select(['lastSignInAt', 'passwordHash'])
        .where('userId', '=', user.userId)
        .executeTakeFirstOrThrow(),
    );
    expect(row.lastSignInAt?.getTime()).toBeGreaterThan(Date.now() - 60_000);
    expect(row.passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });

  it('refuses a wrong password and an unknown address in the same words', async () => {
    const { email } = await addAccount();
    const wrong = await codeOf(signIn(shop, { email, password: 'not the password' }));
    const unknown = await codeOf(signIn(shop, { email: newEmail(), password: 'not the password' }));
    expect(wrong).toBe('sign_in_refused: E-mail or password is not right.');
    expect(unknown).toBe(wrong);
  });

  it('takes a like time whether or not there is an account', async () => {
    const { email } = await addAccount();
    const timeOf = async (address: string) => {
      const from = performance.now();
      await codeOf(signIn(shop, { email: address, password: 'not the password' }));
      return performance.now() - from;
    };
    await timeOf(newEmail());
    const known: number[] = [];
    const unknown: number[] = [];
    for (let n = 0; n < 5; n += 1) {
      known.push(await timeOf(email));
      unknown.push(await timeOf(newEmail()));
    }
    // Without a hash to look at, an unknown address would be answered in a small part of the time.
    expect(Math.min(...unknown)).toBeGreaterThan(Math.min(...known) / 2);
  });

  it('lets nobody in whose account is inactive, and tells nothing about it', async () => {
    const { email, user, password } = await addAccount();
    await updateUser(shop.context(), { userId: user.userId }, { isActive: false });
    expect(await codeOf(signIn(shop, { email, password }))).toMatch(/^sign_in_refused/);
    expect(await findSessionUser(shop, { shopId: shop.shop.shopId, userId: user.userId })).toBeNull();
  });

  it('decides by the password when one address has accounts in two shops', async () => {
    const other = await createTestShop();
    try {
      const email = newEmail();
      const here = await addAccount(shop, email);
      const there = await addAccount(other, email, 'lead');
      expect((await signIn(shop, here)).shop.shopId).toBe(shop.shop.shopId);
      expect((await signIn(shop, there)).shop.shopId).toBe(other.shop.shopId);
    } finally {
      await other.close();
    }
  });

  it('finds no account of another shop by its id', async () => {
    const { user } = await addAccount();
    expect(await findSessionUser(shop, { shopId: randomUUID(), userId: user.userId })).toBeNull();
  });
});

describe('the lock after repeated failures', () => {
  const failOften = async (email: string, times: number) => {
    for (let n = 0; n < times; n += 1) await codeOf(signIn(shop, { email, password: 'wrong' }));
  };

  it.each([
    ['an account', async () => (await addAccount()).email],
    ['no account', async () => newEmail()],
  ])('shuts an address with %s in the same words', async (_, toEmail) => {
    const email = await toEmail();
    await failOften(email, LIMITS.signInFailuresMax);
    expect(await codeOf(signIn(shop, { email, password: 'wrong' }))).toBe(
      'locked_out: Too many attempts with this e-mail address. Wait 15 minutes, then try again.',
    );
  });

  it('keeps out the right password too, and ends when its time is over', async () => {
    const { email, password } = await addAccount();
    await failOften(email, LIMITS.signInFailuresMax);
    expect(await codeOf(signIn(shop, { email, password }))).toMatch(/^locked_out/);
    await sql`update sign_in_attempt set failed_at = failed_at - interval '16 minutes'
      where email_sha256 = encode(sha256(${email}::bytea), 'hex')`.execute(shop.db);
    expect((await signIn(shop, { email, password })).user.email).toBe(email);
  });

  it('counts anew after a success', async () => {
    const { email, password } = await addAccount();
    await failOften(email, LIMITS.signInFailuresMax - 1);
    await signIn(shop, { email, password });
    await failOften(email, LIMITS.signInFailuresMax - 1);
    expect((await signIn(shop, { email, password })).user.email).toBe(email);
  });

  it('cannot be outrun by many attempts at once', async () => {
    const { email } = await addAccount();
    const attempts = Array.from({ length: 20 }, () => codeOf(signIn(shop, { email, password: 'wrong' })));
    const looked = (await Promise.all(attempts)).filter((answer) => answer.startsWith('sign_in_refused'));
    expect(looked).toHaveLength(LIMITS.signInFailuresMax);
  });
});

describe('changing the own password', () => {
  it('takes the new one, refuses the old one and ends the other sessions', async () => {
    const { email, user, context, password } = await addAccount();
    const sid = () => `test-${randomUUID()}`;
    const [kept, ended] = [sid(), sid()];
    for (const id of [kept, ended])
      await sql`insert into session (sid, sess, expire)
        values (${id}, ${JSON.stringify({ userId: user.userId })}, now() + interval '1 hour')`.execute(
        shop.db,
      );
    const change = { currentPassword: password, newPassword: 'a much longer password' };
    await changePassword(context, change, { keepSessionId: kept });
    const { rows } = await sql<{ sid: string }>`
      select sid from session where sess ->> 'userId' = ${user.userId}`.execute(shop.db);
    expect(rows).toEqual([{ sid: kept }]);
    expect(await codeOf(signIn(shop, { email, password }))).toMatch(/^sign_in_refused/);
    const { user: signedIn } = await signIn(shop, { email, password: change.newPassword });
    expect(signedIn.mustChangePassword).toBe(false);
  });

  it('refuses a wrong current password, and locks after repeated failures', async () => {
    const { context } = await addAccount();
    const change = { currentPassword: 'wrong', newPassword: 'a much longer password' };
    const attempt = () => codeOf(changePassword(context, change, { keepSessionId: null }));
    expect(await attempt()).toBe('password_wrong: The current password is not right.');
    for (let n = 1; n < LIMITS.signInFailuresMax; n += 1) await attempt();
    expect(await attempt()).toMatch(/^locked_out/);
  });

  it('refuses the old password as the new one', async () => {
    const { context, password } = await addAccount();
    const change = { currentPassword: password, newPassword: password };
    expect(await codeOf(changePassword(context, change, { keepSessionId: null }))).toMatch(/^invalid_input/);
  });
});
