import { randomUUID } from 'node:crypto';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { listUsers } from '../manage-users/users';
import { signIn } from '../sign-in/sign-in';
import { createShop } from './create-shop';
import { listShops, openShop } from './open-shop';
import { getShop, updateShop } from './shop-settings';

let shop: TestShop;
beforeAll(async () => {
  shop = await createTestShop();
});
afterAll(() => shop.close());

const newShop = (name = `Shop ${randomUUID()}`) => ({
  name,
  timeZone: 'America/Chicago',
  currency: 'USD',
  units: 'us' as const,
  owner: { email: `${randomUUID()}@ternhollow.example`, name: 'Mara Lindqvist' },
});

describe('a new shop', () => {
  it('opens by its name, with an owner who signs in with the temporary password', async () => {
    const input = newShop();
    const created = await createShop(shop.ownerDb, input, 'Test');
    const context = await openShop(shop.db, input.name, 'Test');
    expect(context.shop).toEqual(created.shop);
    expect(await listShops(shop.ownerDb)).toContainEqual(created.shop);
    expect(await listUsers(context)).toMatchObject([
      { userId: created.ownerUserId, role: 'owner', email: input.owner.email, mustChangePassword: true },
    ]);
    const password = created.temporaryPassword;
    expect(password.length).toBeGreaterThanOrEqual(16);
    expect((await signIn(shop, { email: input.owner.email, password })).shop).toEqual(created.shop);
  });

  it('is refused a name that is taken, and then leaves no account behind', async () => {
    const input = newShop(shop.shop.name);
    await expect(createShop(shop.ownerDb, input, 'Test')).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field: 'name', code: 'taken' }],
    });
    expect(await listUsers(shop.context())).toEqual([]);
  });

  it.each([
    [{ timeZone: 'Mars/Olympus' }, 'timeZone'],
    [{ timeZone: '+05:00' }, 'timeZone'],
    [{ currency: 'XYZ' }, 'currency'],
  ])('is refused with %j', async (wrong, field) => {
    const work = createShop(shop.ownerDb, { ...newShop(), ...wrong }, 'Test');
    await expect(work).rejects.toMatchObject({ code: 'invalid_input', issues: [{ field }] });
  });

  it('cannot be made by the application, nor listed', async () => {
    expect(await listShops(shop.db)).toEqual([]);
    await expect(openShop(shop.db, 'No such shop', 'Test')).rejects.toMatchObject({ code: 'shop_not_found' });
  });
});

describe('the settings of a shop', () => {
  it('change one by one', async () => {
    const changed = await updateShop(shop.context(), { weekStart: 0, timeZone: 'Europe/Berlin' });
    expect(changed).toEqual({ ...shop.shop, weekStart: 0, timeZone: 'Europe/Berlin' });
    expect(await getShop(shop.context())).toEqual(changed);
    expect(await updateShop(shop.context(), {})).toEqual(changed);
  });

  it('say from which hours on overtime counts, and where it goes', async () => {
    expect(await getShop(shop.context())).toMatchObject({
      overtimeThresholdHours: '40.00',
      overtimeTo: 'overhead',
    });
    const spread = { overtimeThresholdHours: '37.50', overtimeTo: 'jobs' as const };
    expect(await updateShop(shop.context(), spread)).toMatchObject(spread);
    expect(await updateShop(shop.context(), { overtimeThresholdHours: null })).toMatchObject({
      overtimeThresholdHours: null,
      overtimeTo: 'jobs',
    });
  });

  it('have the days costed anew whose overtime they may change', async () => {
    const own = await createTestShop();
    try {
      const employeeId = await own.addEmployee();
      const [jobId, operationId] = [await own.addJob(), await own.addOperation()];
      const entry = { employeeId, jobId, operationId, workedOn: '2026-03-02', hours: '8' };
      await own.addEntries([entry]);
      const listDirty = () =>
        own.inShop((trx) => trx.selectFrom('dirtyDay').select('workedOn').orderBy('workedOn').execute());
      await own.inShop((trx) => trx.deleteFrom('dirtyDay').execute());
      await updateShop(own.context(), { currency: 'CAD' });
      expect(await listDirty()).toEqual([]);
      await updateShop(own.context(), { overtimeThresholdHours: '35' });
      expect(await listDirty()).toEqual([{ workedOn: '2026-03-02' }]);
    } finally {
      await own.close();
    }
  });

  it('refuse the name of another shop', async () => {
    const other = await createTestShop();
    await other.close();
    const work = updateShop(shop.context(), { name: other.shop.name });
    await expect(work).rejects.toMatchObject({ code: 'conflict', issues: [{ field: 'name' }] });
  });
});
