import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { inShopOf, todayOf } from './context';

describe('a shop’s context', () => {
  let mine: TestShop;
  let other: TestShop;

  beforeAll(async () => {
    mine = await createTestShop();
    other = await createTestShop();
  });
  afterAll(() => Promise.all([mine.close(), other.close()]));

  it('sees the rows of its own shop only', async () => {
    const employeeId = await mine.addEmployee();
    await other.addEmployee();
    const seen = await inShopOf(mine.context(), (trx) =>
      trx.selectFrom('employee').select('employeeId').execute(),
    );
    expect(seen).toEqual([{ employeeId }]);
  });

  it('writes nothing when the work fails', async () => {
    const work = inShopOf(mine.context(), async (trx) => {
      await trx.insertInto('customer').values({ shopId: mine.shop.shopId, name: 'Halfway' }).execute();
      throw new Error('stopped');
    });
    await expect(work).rejects.toThrow('stopped');
    const customers = await mine.inShop((trx) => trx.selectFrom('customer').select('name').execute());
    expect(customers).toEqual([]);
  });

  it('signs changes with the actor’s name', async () => {
    await inShopOf(mine.context('lead'), (trx) =>
      trx.insertInto('customer').values({ shopId: mine.shop.shopId, name: 'Signed' }).execute(),
    );
    const events = await mine.inShop((trx) =>
      trx.selectFrom('auditEvent').select('actor').where('subjectKind', '=', 'customer').execute(),
    );
    expect(events).toEqual([{ actor: 'Test lead' }]);
  });

  it('takes today from the shop’s own zone', () => {
    const now = () => new Date('2026-03-02T03:00:00Z');
    expect(todayOf(mine.context('owner', { now }))).toBe('2026-03-01');
  });
});
