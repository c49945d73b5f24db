import { type AppError } from '@brakeven/contract';
import { randomUUID } from 'node:crypto';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { listAuditEvents } from '../audit/list-audit-events';
import { signIn } from '../sign-in/sign-in';
import { createUser, listUsers, resetUserPassword, updateUser } from './users';

let shop: TestShop;
beforeEach(async () => {
  shop = await createTestShop();
});
afterEach(() => shop.close());

const add = (role: 'owner' | 'operator', email = `${randomUUID()}@ternhollow.example`) =>
  createUser(shop.context(), { name: `A ${role}`, email, role, employeeId: null });

describe('users', () => {
  it('are added with a readable temporary password that has to be changed', async () => {
    const { user, temporaryPassword } = await add('operator');
    expect(temporaryPassword).toMatch(/^([2-9a-hjkmnp-z]{5}-){3}[2-9a-hjkmnp-z]{5}$/);
    expect(user).toMatchObject({ role: 'operator', isActive: true, mustChangePassword: true });
    expect(await listUsers(shop.context())).toEqual([user]);
  });

  it('cannot share an e-mail address in one shop', async () => {
    const { user } = await add('operator');
    await expect(add('owner', user.email)).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field: 'email', code: 'taken' }],
    });
    expect(await listUsers(shop.context())).toHaveLength(1);
  });

  it('are linked to employees of the same shop only', async () => {
    const other = await createTestShop();
    const stranger = await other.addEmployee();
    await other.close();
    const { user } = await add('operator');
    const link = (employeeId: string) => updateUser(shop.context(), user, { employeeId });
    await expect(link(stranger)).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'employeeId' }],
    });
    const employeeId = await shop.addEmployee();
    expect(await link(employeeId)).toMatchObject({ employeeId });
  });

  it.each([
    [{ role: 'lead' as const }, 'role'],
    [{ isActive: false }, 'isActive'],
  ])('keep a last active owner: %j is refused', async (change, field) => {
    const { user } = await add('owner');
    await add('operator');
    await expect(updateUser(shop.context(), user, change)).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field, code: 'last_owner' }],
    });
  });

  it('keep a last active owner when two demote each other at once', async () => {
    const owners = [(await add('owner')).user, (await add('owner')).user];
    const results = await Promise.allSettled(
      owners.map((user) => updateUser(shop.context(), user, { role: 'lead' })),
    );
    expect(results.map((result) => result.status).sort()).toEqual(['fulfilled', 'rejected']);
    const left = (await listUsers(shop.context())).filter(({ role }) => role === 'owner');
    expect(left).toHaveLength(1);
  });

  it('get a new temporary password in place of the old one', async () => {
    const { user, temporaryPassword } = await add('operator');
    const reset = await resetUserPassword(shop.context(), user);
    expect(reset.temporaryPassword).not.toBe(temporaryPassword);
    const refused = signIn(shop, { email: user.email, password: temporaryPassword });
    await expect(refused).rejects.toMatchObject({ code: 'sign_in_refused' });
    const session = await signIn(shop, { email: user.email, password: reset.temporaryPassword });
    expect(session.user).toMatchObject({ userId: user.userId, mustChangePassword: true });
  });

  it('are not found under the id of nobody', async () => {
    const nobody = { userId: randomUUID() };
    const codeOf = (error: AppError) => error.code;
    expect(await updateUser(shop.context(), nobody, { name: 'X' }).catch(codeOf)).toBe('not_found');
    expect(await resetUserPassword(shop.context(), nobody).catch(codeOf)).toBe('not_found');
  });

  it('leave a trail of who changed what, without any password', async () => {
    const { user } = await add('operator');
    await updateUser(shop.context(), user, { role: 'lead' });
    await resetUserPassword(shop.context(), user);
    const { items } = await listAuditEvents(shop.context(), { limit: 50 });
    const changes = items.filter(({ subjectId }) => subjectId === user.userId);
    expect(changes.map(({ action }) => action)).toEqual(['changed', 'changed', 'added']);
    expect(changes[1]).toMatchObject({
      actor: 'Test owner',
      subjectKind: 'user_account',
      before: { role: 'operator' },
      after: { role: 'lead' },
    });
    expect(JSON.stringify(items)).not.toContain('argon2');
  });
});

describe('the audit trail', () => {
  it('comes page by page, each event once', async () => {
    for (let n = 0; n < 5; n += 1) await shop.addCustomer(`Customer ${n}`);
    const names: unknown[] = [];
    let cursor: string | undefined;
    do {
      const page = await listAuditEvents(shop.context(), { limit: 2, cursor });
      expect(page.items.length).toBeLessThanOrEqual(2);
      names.push(...page.items.map(({ after }) => after?.['name']));
      cursor = page.nextCursor ?? undefined;
    } while (cursor);
    // Two events within one millisecond may stand in either order.
    expect(names.sort()).toEqual(
      [0, 1, 2, 3, 4]
        .map((n) => `Customer ${n}`)
        .concat(shop.shop.name)
        .sort(),
    );
  });

  it('refuses a cursor that no page gave', async () => {
    const work = listAuditEvents(shop.context(), { limit: 2, cursor: 'x' });
    await expect(work).rejects.toMatchObject({ code: 'invalid_input', issues: [{ field: 'cursor' }] });
  });
});
