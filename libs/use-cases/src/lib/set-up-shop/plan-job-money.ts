import { type RegisterRow } from '@brakeven/database';
import { type SetupFile } from '@brakeven/workbook';
import { v7 as newId } from 'uuid';
import { groupBy } from '../group-by';
import { normaliseName } from '../import-timesheet/near-matches';
import { checkJobDate } from './dated-rows';
import { type SetupDraft } from './setup-draft';
import { toStoredNumber } from './stored-number';
import { listStated } from './table-plan';

/**
 * Outside services. All that they say makes them what they are, so none changes; two that say the same are two, and
 * rows are counted off against what is stored.
 */
export function planOutsideServices(draft: SetupDraft, rows: SetupFile['outsideServices']): void {
  const table = draft.tables.outsideService;
  const stored = groupBy(table.listRows(), ({ values }) => toServiceKey(values));
  for (const row of rows) {
    const values = toService(draft, row);
    if (values === null) continue;
    const isThere = stored.get(toServiceKey(values))?.pop() !== undefined;
    draft.count('outsideServices', isThere ? 'alreadyThere' : table.add({ id: newId(), values }).verdict);
  }
}

function toService(
  draft: SetupDraft,
  row: SetupFile['outsideServices'][number],
): RegisterRow['values'] | null {
  const jobId = draft.findJob('outsideServices', row, row.job);
  const money = { list: 'outsideServices', column: 'amount', form: 'money' } as const;
  const amount = toStoredNumber(draft, row, money, row.amount);
  if (jobId === undefined || amount === null) return null;
  const dated = {
    list: 'outsideServices',
    column: 'date',
    table: 'outside_service',
    date: row.date,
  } as const;
  if (!checkJobDate(draft, row, jobId, dated)) return null;
  return {
    jobId,
    incurredOn: row.date,
    vendor: row.vendor ?? '',
    description: row.description ?? '',
    amount,
  };
}

function toServiceKey({ jobId, incurredOn, vendor, description, amount }: RegisterRow['values']): string {
  const words = [vendor, description].map((text) => normaliseName(String(text)));
  return [jobId, incurredOn, amount, ...words].join('|');
}

/** What a job is paid; the rest of an invoice is words. */
const COSTING = ['invoicedOn', 'amount'] as const;

/**
 * Invoices and credit notes, by job, kind and number. One of another date or amount than the shop has is voided, and
 * another takes its place.
 */
export function planInvoices(draft: SetupDraft, rows: SetupFile['invoices']): void {
  const table = draft.tables.invoice;
  for (const row of rows) {
    const jobId = draft.findJob('invoices', row, row.job);
    const money = { list: 'invoices', column: 'amount', form: 'money' } as const;
    const amount = toStoredNumber(draft, row, money, row.amount);
    if (jobId === undefined || amount === null) continue;
    const dated = { list: 'invoices', column: 'date', table: 'invoice', date: row.date } as const;
    if (!checkJobDate(draft, row, jobId, dated)) continue;
    const key = [jobId, row.kind, row.number].join('|');
    if (table.hasStated(key)) {
      const what = row.kind === 'invoice' ? 'Invoice' : 'Credit note';
      draft.refuseTwice('invoices', row, 'number', `${what} ${row.number} of job ${row.job}`);
      continue;
    }
    const before = table.find(key);
    const stated = listStated({ invoicedOn: row.date, description: row.description, amount });
    const values = { jobId, kind: row.kind, number: row.number, description: '', ...stated };
    const { verdict } = before ? table.restate(before, stated, COSTING) : table.add({ id: newId(), values });
    draft.count('invoices', verdict);
  }
}
