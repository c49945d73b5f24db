import { AppError, type Invoice, type invoiceInputSchema, type InvoiceList } from '@brakeven/contract';
import { type InvoiceRow, listInvoiceRows, type ShopTransaction } from '@brakeven/database';
import { type Money, moneyText, sum, toMoney } from '@brakeven/values';
import { type z } from 'zod';
import { changeDatedRows } from '../change-dated-rows';
import { inShopOf, type ShopContext } from '../context';
import { getJobRow } from '../show-jobs/get-job';

type InvoiceValues = z.output<typeof invoiceInputSchema>;

const changes = changeDatedRows({
  table: 'invoice',
  idField: 'invoiceId',
  dateField: 'invoicedOn',
  fields: { 'before-job': 'invoicedOn' },
  conflicts: {
    invoice_number: { field: 'number', message: 'This number is on the job already.' },
  },
  noun: 'invoice',
  getParent: getInvoiceRow,
  toValues: async (trx, { jobId }: { jobId: string }, body: InvoiceValues) => {
    await getJobRow(trx, { jobId });
    return { jobId, ...body };
  },
  toItem: (context, invoiceId) =>
    inShopOf(context, async (trx) => toInvoice(await getInvoiceRow(trx, invoiceId))),
});

/** Adds an invoice or a credit note to a job; refuses a number that is taken, and a date before the job's or after today. */
export const createInvoice = changes.create;

/** Corrects an invoice or a credit note; as `createInvoice`, and refuses one voided meanwhile. */
export const updateInvoice = changes.correct;

/** Voids an invoice or a credit note. */
export const voidInvoice = changes.void;

/** Takes back the voiding of an invoice or a credit note; refuses one whose number is taken by now. */
export const restoreInvoice = changes.restore;

/**
 * Invoices and credit notes of a job, latest first, those voided among them; the total is of those that count.
 * @throws AppError `not_found` (job)
 */
export function listInvoices(context: ShopContext, { jobId }: { jobId: string }): Promise<InvoiceList> {
  return inShopOf(context, async (trx) => {
    await getJobRow(trx, { jobId });
    const rows = await listInvoiceRows(trx, { jobId });
    const live = rows.filter(({ voidedAt }) => voidedAt === null);
    return { items: rows.map(toInvoice), total: moneyText(sum(live.map(toSignedAmount))) };
  });
}

/** An invoice as it is sent. */
export function toInvoice(row: InvoiceRow): Invoice {
  const { invoiceId, jobId, kind, number, invoicedOn, description, voidedBy } = row;
  return {
    invoiceId,
    jobId,
    kind,
    number,
    invoicedOn,
    description,
    amount: moneyText(toMoney(row.amount)),
    voidedAt: row.voidedAt?.toISOString() ?? null,
    voidedBy,
  };
}

function toSignedAmount({ kind, amount }: InvoiceRow): Money {
  const money = toMoney(amount);
  return kind === 'credit-note' ? toMoney(money.negated()) : money;
}

async function getInvoiceRow(trx: ShopTransaction, invoiceId: string): Promise<InvoiceRow> {
  const [row] = await listInvoiceRows(trx, { invoiceId });
  if (row) return row;
  throw new AppError('not_found', 'There is no such invoice. Load the page again.');
}
