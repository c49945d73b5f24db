import {
  AppError,
  type SavedView,
  type SavedViewInput,
  type ViewPage,
  viewStateSchema,
} from '@brakeven/contract';
import {
  clearDefaultView,
  deleteSavedViewRow,
  listSavedViewRows,
  type SavedViewRow,
  upsertSavedView,
} from '@brakeven/database';
import { z } from 'zod';
import { inShopOf, type ShopContext } from '../context';

const keptStateSchema = viewStateSchema.extend({ isDefault: z.boolean() });

/**
 * The actor's own views of a page by name; one that cannot be read any more is left out.
 * @throws AppError `forbidden` to who has no account
 */
export async function listSavedViews(
  context: ShopContext,
  { page }: { page: ViewPage },
): Promise<SavedView[]> {
  const userId = userOf(context);
  const rows = await inShopOf(context, (trx) => listSavedViewRows(trx, userId, page));
  return rows.flatMap((row) => toSavedView(row) ?? []);
}

/**
 * Keeps a view under its name, in place of the actor's own one of that name; as the default, it is the only one.
 * @throws AppError `forbidden` to who has no account
 */
export async function saveView(context: ShopContext, body: SavedViewInput): Promise<SavedView> {
  const userId = userOf(context);
  const { page, name, isDefault, state } = body;
  const row = await inShopOf(context, async (trx) => {
    if (isDefault) await clearDefaultView(trx, userId, page);
    const kept = JSON.stringify({ ...state, isDefault });
    return upsertSavedView(trx, { shopId: context.shop.shopId, userId, page, name, state: kept });
  });
  const saved = toSavedView(row);
  if (!saved) throw new Error('A view was saved that cannot be read.');
  return saved;
}

/**
 * Removes one of the actor's own views.
 * @throws AppError `not_found`, `forbidden` to who has no account
 */
export async function deleteSavedView(
  context: ShopContext,
  { savedViewId }: { savedViewId: string },
): Promise<void> {
  const userId = userOf(context);
  const wasThere = await inShopOf(context, (trx) => deleteSavedViewRow(trx, userId, savedViewId));
  if (!wasThere) throw new AppError('not_found', 'There is no such view of yours. Load the page again.');
}

function userOf({ actor }: ShopContext): string {
  if (actor.userId === null) throw new AppError('forbidden', 'Views are kept for people who sign in.');
  return actor.userId;
}

function toSavedView({ savedViewId, name, state, savedAt }: SavedViewRow): SavedView | null {
  const kept = keptStateSchema.safeParse(state);
  if (!kept.success) return null;
  const { isDefault, ...rest } = kept.data;
  return { savedViewId, name, isDefault, state: rest, savedAt: savedAt.toISOString() };
}
