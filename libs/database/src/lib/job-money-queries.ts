import { sql } from 'kysely';
import { type InvoiceTable, type OutsideServiceTable } from './tables';
import { type ShopTransaction } from './tenancy';

export interface OutsideServiceRow extends Pick<
  OutsideServiceTable,
  'jobId' | 'incurredOn' | 'amount' | 'voidedBy'
> {
  outsideServiceId: string;
  vendor: string;
  description: string;
  voidedAt: Date | null;
}

/** Outside services, latest first, those voided among them: of a job, or the one asked for. */
export function listOutsideServiceRows(
  trx: ShopTransaction,
  of: { jobId: string } | { outsideServiceId: string },
): Promise<OutsideServiceRow[]> {
  const [column, id] =
    'jobId' in of ? (['jobId', of.jobId] as const) : (['outsideServiceId', of.outsideServiceId] as const);
  return trx
    .selectFrom('outsideService')
    .select([
      'outsideServiceId',
      'jobId',
      'incurredOn',
      'vendor',
      'description',
      'amount',
      'voidedAt',
      'voidedBy',
    ])
    .where(column, '=', id)
    .orderBy('incurredOn', 'desc')
    .orderBy('outsideServiceId', 'desc')
    .execute();
}

export interface InvoiceRow extends Pick<
  InvoiceTable,
  'jobId' | 'kind' | 'number' | 'invoicedOn' | 'amount' | 'voidedBy'
> {
  invoiceId: string;
  description: string;
  voidedAt: Date | null;
  job: string;
}

/** Invoices and credit notes, latest first, those voided among them: of a job, of a customer's jobs, or one. */
export async function listInvoiceRows(
  trx: ShopTransaction,
  of: { jobId: string } | { customerId: string } | { invoiceId: string },
): Promise<InvoiceRow[]> {
  const { rows } = await sql<InvoiceRow>`
    select i.invoice_id, i.job_id, j.number as job, i.kind, i.number, i.invoiced_on, i.description, i.amount,
      i.voided_at, i.voided_by
    from invoice i
    join job j on j.shop_id = i.shop_id and j.job_id = i.job_id
    where ${isMeant(of)}
    order by i.invoiced_on desc, i.invoice_id desc`.execute(trx);
  return rows;
}

function isMeant(of: Parameters<typeof listInvoiceRows>[1]) {
  if ('jobId' in of) return sql`i.job_id = ${of.jobId}::uuid`;
  if ('customerId' in of) return sql`j.customer_id = ${of.customerId}::uuid`;
  return sql`i.invoice_id = ${of.invoiceId}::uuid`;
}
