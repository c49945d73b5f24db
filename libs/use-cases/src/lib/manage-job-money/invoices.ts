import { AppError, type Invoice, type invoiceInputSchema, type InvoiceList } from '@brakeven/contract';
import { type InvoiceRow, listInvoiceRows, type ShopTransaction } from '@brakeven/database';
import { type Money, moneyText, sum, toMoney } from '@brakeven/values';
import { type z } from 'zod';
import {
  addDatedRow,
  type ChangeTools,
  correctDatedRow,
  type DatedRows,
  setVoided,
} from '../change-dated-rows';
import { inShopOf, type ShopContext } from '../context';
import { getJobRow } from '../show-jobs/get-job';

type InvoiceValues = z.output<typeof invoiceInputSchema>;

const INVOICES: DatedRows<'invoice'> = {
  table: 'invoice',
  dateField: 'invoicedOn',
  fields: { 'before-job': 'invoicedOn' },
  conflicts: {
    invoice_number: { field: 'number', message: 'This number is on the job already.' },
  },
  noun: 'invoice',
};

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

/**
 * Adds an invoice or a credit note to a job.
 * @throws AppError `not_found` (job), `conflict` (number taken), `invalid_input` (dated before the job or after today)
 */
export async function createInvoice(
  context: ShopContext,
  { jobId }: { jobId: string },
  body: InvoiceValues,
  tools: ChangeTools = {},
): Promise<Invoice> {
  const toValues = async (trx: ShopTransaction) => {
    await getJobRow(trx, { jobId });
    return { jobId, ...body };
  };
  return readInvoice(context, await addDatedRow(context, INVOICES, toValues, tools));
}

/**
 * Corrects an invoice or a credit note: it is voided and another takes its place.
 * @throws AppError `not_found`, `conflict` (number taken, voided meanwhile), `invalid_input`
 */
export async function updateInvoice(
  context: ShopContext,
  { invoiceId }: { invoiceId: string },
  body: InvoiceValues,
  tools: ChangeTools = {},
): Promise<Invoice> {
  const toValues = async (trx: ShopTransaction) => {
    const { jobId } = await getInvoiceRow(trx, invoiceId);
    return { jobId, ...body };
  };
  return readInvoice(context, await correctDatedRow(context, INVOICES, invoiceId, toValues, tools));
}

/**
 * Voids an invoice or a credit note.
 * @throws AppError `not_found`
 */
export function voidInvoice(
  context: ShopContext,
  { invoiceId }: { invoiceId: string },
  tools: ChangeTools = {},
): Promise<void> {
  return setVoided(context, INVOICES, { id: invoiceId, isVoided: true }, tools);
}

/**
 * Takes back the voiding of an invoice or a credit note.
 * @throws AppError `not_found`, `conflict` (number taken by now), `invalid_input`
 */
export function restoreInvoice(
  context: ShopContext,
  { invoiceId }: { invoiceId: string },
  tools: ChangeTools = {},
): Promise<void> {
  return setVoided(context, INVOICES, { id: invoiceId, isVoided: false }, tools);
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

function readInvoice(context: ShopContext, invoiceId: string): Promise<Invoice> {
  return inShopOf(context, async (trx) => toInvoice(await getInvoiceRow(trx, invoiceId)));
}

async function getInvoiceRow(trx: ShopTransaction, invoiceId: string): Promise<InvoiceRow> {
  const [row] = await listInvoiceRows(trx, { invoiceId });
  if (row) return row;
  throw new AppError('not_found', 'There is no such invoice. Load the page again.');
}
