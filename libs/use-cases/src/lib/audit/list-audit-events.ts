import { AppError, type AuditEvent } from '@brakeven/contract';
import { listAuditRows } from '@brakeven/database';
import { validate as isId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';

/**
 * Who changed what, latest first, page by page; the cursor is what the page before returned.
 * @throws AppError `invalid_input` for a cursor that no page returned
 */
export async function listAuditEvents(
  context: ShopContext,
  { cursor, limit }: { cursor?: string; limit: number },
): Promise<{ items: AuditEvent[]; nextCursor: string | null }> {
  if (cursor !== undefined && !isId(cursor)) {
    const message = 'This is not where a page ended. Start again from the first page.';
    throw new AppError('invalid_input', message, {
      issues: [{ field: 'cursor', code: 'invalid_cursor', message }],
    });
  }
  const rows = await inShopOf(context, (trx) => listAuditRows(trx, limit + 1, cursor));
  const items = rows.slice(0, limit).map((row) => ({ ...row, at: row.at.toISOString() }));
  return { items, nextCursor: rows.length > limit ? (items.at(-1)?.eventId ?? null) : null };
}
