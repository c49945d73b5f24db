import { type ShopTransaction } from './tenancy';

/** Events of the audit trail, latest first, older than the one named; ids are made in the order of time. */
export function listAuditRows(trx: ShopTransaction, limit: number, beforeEventId?: string) {
  return trx
    .selectFrom('auditEvent')
    .select(['eventId', 'at', 'actor', 'action', 'subjectKind', 'subjectId', 'before', 'after'])
    .$if(beforeEventId !== undefined, (query) => query.where('eventId', '<', beforeEventId ?? ''))
    .orderBy('eventId', 'desc')
    .limit(limit)
    .execute();
}
