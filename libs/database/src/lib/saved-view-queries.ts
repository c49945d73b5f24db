import { sql } from 'kysely';
import { inReadingOrder } from './keyset';
import { type ShopTransaction } from './tenancy';

/** A view as it is kept; what is in `state` is the page's own. */
export interface SavedViewRow {
  savedViewId: string;
  name: string;
  state: unknown;
  savedAt: Date;
}

const COLUMNS = ['savedViewId', 'name', 'state', 'savedAt'] as const;

/** Somebody's views of a page by name. */
export function listSavedViewRows(
  trx: ShopTransaction,
  userId: string,
  page: string,
): Promise<SavedViewRow[]> {
  return trx
    .selectFrom('savedView')
    .select(COLUMNS)
    .where('userId', '=', userId)
    .where('page', '=', page)
    .orderBy(inReadingOrder(sql`name`))
    .execute();
}

/** Keeps a view under its name, in place of the one of that name. */
export function upsertSavedView(
  trx: ShopTransaction,
  row: { shopId: string; userId: string; page: string; name: string; state: string },
): Promise<SavedViewRow> {
  return trx
    .insertInto('savedView')
    .values(row)
    .onConflict((conflict) =>
      conflict
        .columns(['shopId', 'userId', 'page', 'name'])
        .doUpdateSet({ state: row.state, savedAt: sql`now()` }),
    )
    .returning(COLUMNS)
    .executeTakeFirstOrThrow();
}

/** Takes the mark of the default from all of somebody's views of a page. */
export async function clearDefaultView(trx: ShopTransaction, userId: string, page: string): Promise<void> {
  await trx
    .updateTable('savedView')
    .set({ state: sql`state || '{"isDefault": false}'::jsonb` })
    .where('userId', '=', userId)
    .where('page', '=', page)
    .execute();
}

/** Removes one of somebody's views; tells whether it was there. */
export async function deleteSavedViewRow(
  trx: ShopTransaction,
  userId: string,
  savedViewId: string,
): Promise<boolean> {
  const result = await trx
    .deleteFrom('savedView')
    .where('userId', '=', userId)
    .where('savedViewId', '=', savedViewId)
    .executeTakeFirst();
  return result.numDeletedRows > 0n;
}
