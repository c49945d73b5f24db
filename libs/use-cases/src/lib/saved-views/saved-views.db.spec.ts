import { type SavedViewInput } from '@brakeven/contract';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { v7 as newId } from 'uuid';
import { type ShopContext } from '../context';
import { deleteSavedView, listSavedViews, saveView } from './saved-views';

describe('saved views', () => {
  let shop: TestShop;
  let mara: ShopContext;
  let wen: ShopContext;
  const view = (name: string, change: Partial<SavedViewInput> = {}): SavedViewInput => ({
    page: 'jobs',
    name,
    isDefault: false,
    state: { columns: ['number', 'margin'], sort: 'margin', direction: 'asc', filter: { status: 'open' } },
    ...change,
  });
  const names = async (context: ShopContext) =>
    (await listSavedViews(context, { page: 'jobs' })).map(
      ({ name, isDefault }) => `${name}${isDefault ? '*' : ''}`,
    );

  async function signedIn(name: string): Promise<ShopContext> {
    const userId = newId();
    const row = { shopId: shop.shop.shopId, userId, name, email: `${userId}@ternhollow.example` };
    await shop.inShop((trx) =>
      trx
        .insertInto('userAccount')
        .values({ ...row, role: 'owner', passwordHash: 'none' })
        .execute(),
    );
    const context = shop.context();
    return { ...context, actor: { ...context.actor, userId, name } };
  }

  beforeAll(async () => {
    shop = await createTestShop();
    [mara, wen] = [await signedIn('Mara'), await signedIn('Wen')];
  });
  afterAll(() => shop.close());

  it('belong to who keeps them, and one of a name takes the place of the other', async () => {
    const saved = await saveView(mara, view('Losing jobs'));
    expect(saved.state).toEqual(view('').state);
    await saveView(mara, view('Losing jobs', { state: { ...view('').state, sort: null } }));
    expect(await listSavedViews(mara, { page: 'jobs' })).toMatchObject([
      { savedViewId: saved.savedViewId, name: 'Losing jobs', state: { sort: null } },
    ]);
    expect(await names(wen)).toEqual([]);
    await expect(deleteSavedView(wen, saved)).rejects.toMatchObject({ code: 'not_found' });
  });

  it('have one default at most', async () => {
    await saveView(mara, view('Bank', { isDefault: true }));
    await saveView(wen, view('Mine', { isDefault: true }));
    await saveView(mara, view('Week', { isDefault: true }));
    expect(await names(mara)).toEqual(['Bank', 'Losing jobs', 'Week*']);
    expect(await names(wen)).toEqual(['Mine*']);
  });

  it('are removed by who keeps them, and refused to who has no account', async () => {
    const [bank] = await listSavedViews(mara, { page: 'jobs' });
    await deleteSavedView(mara, { savedViewId: bank?.savedViewId ?? '' });
    expect(await names(mara)).toEqual(['Losing jobs', 'Week*']);
    await expect(saveView(shop.context(), view('x'))).rejects.toMatchObject({ code: 'forbidden' });
  });
});
