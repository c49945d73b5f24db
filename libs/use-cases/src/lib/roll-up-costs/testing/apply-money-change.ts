import { getClosedThrough, markReopenedDays, type ShopTransaction } from '@brakeven/database';
import { sql } from 'kysely';
import { v7 as newId } from 'uuid';
import { type Change } from './random-changes';
import { type Register } from './random-shop';

/** Which of a list, whatever its length. */
export function at<T>(items: readonly T[], index: number): T | undefined {
  return items[index % Math.max(items.length, 1)];
}

export async function addMove(
  trx: ShopTransaction,
  shopId: string,
  register: Register,
  change: Extract<Change, { kind: 'addLot' | 'addIssue' }>,
): Promise<void> {
  const materialId = at(register.materials, change.material) ?? '';
  const row = { shopId, materialId, weightKg: change.weight };
  if (change.kind === 'addLot') {
    const { day: receivedOn, cost, freight } = change;
    const lotId = newId();
    await trx
      .insertInto('sheetLot')
      .values({ ...row, lotId, number: lotId, receivedOn, cost, freight })
      .execute();
  } else {
    const jobId = at(register.jobs, change.job) ?? '';
    const kind = change.isReturn ? 'return' : 'issue';
    await trx
      .insertInto('materialIssue')
      .values({ ...row, issueId: newId(), jobId, kind, issuedOn: change.day })
      .execute();
  }
}

export async function addAmount(
  trx: ShopTransaction,
  shopId: string,
  register: Register,
  { kind, job, day, amount }: Extract<Change, { kind: 'addOutsideService' | 'addInvoice' | 'addCreditNote' }>,
): Promise<void> {
  const row = { shopId, jobId: at(register.jobs, job) ?? '', amount };
  if (kind === 'addOutsideService') {
    await trx
      .insertInto('outsideService')
      .values({ ...row, incurredOn: day })
      .execute();
  } else {
    const invoice = {
      invoicedOn: day,
      number: newId(),
      kind: kind === 'addInvoice' ? 'invoice' : 'credit-note',
    };
    await trx
      .insertInto('invoice')
      .values({ ...row, ...(invoice as { invoicedOn: string; number: string; kind: 'invoice' }) })
      .execute();
  }
}

const KEY_OF = {
  sheetLot: 'lotId',
  materialIssue: 'issueId',
  outsideService: 'outsideServiceId',
  invoice: 'invoiceId',
} as const;

export async function flipVoided(
  trx: ShopTransaction,
  { table: name, row }: Extract<Change, { kind: 'flipVoided' }>,
): Promise<void> {
  const table = name as 'sheetLot';
  const key = KEY_OF[name as keyof typeof KEY_OF] as 'lotId';
  const rows = await trx.selectFrom(table).select([key, 'voidedAt']).orderBy(key).execute();
  const found = at(rows, row);
  if (!found) return;
  await trx
    .updateTable(table)
    .set({ voidedAt: found.voidedAt === null ? new Date() : null })
    .where(key, '=', found[key])
    .execute();
}

export async function setOvertime(
  trx: ShopTransaction,
  shopId: string,
  { threshold, to, weekStart }: Extract<Change, { kind: 'setOvertime' }>,
): Promise<void> {
  await trx
    .updateTable('shop')
    .set({ overtimeThresholdHours: threshold?.toFixed(2) ?? null, overtimeTo: to, weekStart })
    .where('shopId', '=', shopId)
    .execute();
}

/** Closes the month after the latest closed one, as the shop may: nothing waits for it, and no rate is missing. */
export async function closeMonth(trx: ShopTransaction, shopId: string): Promise<void> {
  const closedThrough = (await getClosedThrough(trx)) ?? '2026-01-31';
  const { rows } = await sql<{ month: string; isReady: boolean }>`
    select m.month,
      not exists (select from dirty_day where worked_on < m.month + interval '1 month')
        and not exists (select from rate_gap where posted_on < m.month + interval '1 month') as is_ready
    from (select ${closedThrough}::date + 1 as month) m`.execute(trx);
  const [next] = rows;
  if (!next?.isReady || next.month > '2026-05-01') return;
  await trx.insertInto('monthClose').values({ shopId, month: next.month, closedBy: 'Test' }).execute();
}

export async function reopenMonth(trx: ShopTransaction): Promise<void> {
  const latest = await trx
    .selectFrom('monthClose')
    .select('monthCloseId')
    .where('reopenedAt', 'is', null)
    .orderBy('month', 'desc')
    .executeTakeFirst();
  if (!latest) return;
  await trx
    .updateTable('monthClose')
    .set({ reopenedAt: new Date(), reopenedBy: 'Test', reopenReason: 'Test' })
    .where('monthCloseId', '=', latest.monthCloseId)
    .execute();
  await markReopenedDays(trx);
}
