import {
  AppError,
  type CustomerDetail,
  type CustomerFigures,
  type CustomerInput,
  type CustomerList,
} from '@brakeven/contract';
import {
  type CustomerFiguresRow,
  findCustomerNamesake,
  listCustomerFigureRows,
  listInvoiceRows,
  type ShopTransaction,
  updateCustomerName,
} from '@brakeven/database';
import { moneyText, sum, toMoney } from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { toInvoice } from '../manage-job-money/invoices';
import { refusingConflicts } from '../refuse-conflict';

const TAKEN = { field: 'name', message: 'Another customer has this name.' };

/** Customers by name with what their jobs cost and brought, and last the jobs that have none; totals over all. */
export function listCustomerFigures(context: ShopContext): Promise<CustomerList> {
  return inShopOf(context, async (trx) => {
    const items = await listCustomerFigureRows(trx);
    return { items, totals: toTotals(items) };
  });
}

/**
 * A customer with figures and what was invoiced.
 * @throws AppError `not_found`
 */
export function getCustomer(
  context: ShopContext,
  { customerId }: { customerId: string },
): Promise<CustomerDetail> {
  return inShopOf(context, (trx) => readCustomer(trx, customerId));
}

/**
 * Renames a customer.
 * @throws AppError `not_found`, `conflict` (another has the name, whatever its case)
 */
export function renameCustomer(
  context: ShopContext,
  { customerId }: { customerId: string },
  { name }: CustomerInput,
): Promise<CustomerDetail> {
  return refusingConflicts({ customer_shop_id_name_key: TAKEN }, () =>
    inShopOf(context, async (trx) => {
      if ((await findCustomerNamesake(trx, customerId, name)) !== null) {
        throw new AppError('conflict', TAKEN.message, { issues: [{ ...TAKEN, code: 'taken' }] });
      }
      await updateCustomerName(trx, customerId, name);
      return readCustomer(trx, customerId);
    }),
  );
}

async function readCustomer(trx: ShopTransaction, customerId: string): Promise<CustomerDetail> {
  const [row] = await listCustomerFigureRows(trx, customerId);
  if (!row || row.name === null) {
    throw new AppError('not_found', 'There is no such customer. Load the customers again.');
  }
  const invoices = await listInvoiceRows(trx, { customerId });
  return {
    ...row,
    customerId,
    name: row.name,
    invoices: invoices.map((invoice) => ({ ...toInvoice(invoice), job: invoice.job })),
  };
}

function toTotals(rows: readonly CustomerFiguresRow[]): CustomerFigures {
  const add = (field: 'total' | 'invoiced' | 'margin' | 'workInProgress') =>
    moneyText(sum(rows.map((row) => toMoney(row[field]))));
  const days = rows.map(({ lastWorkedOn }) => lastWorkedOn ?? '').sort();
  return {
    jobs: rows.reduce((count, row) => count + row.jobs, 0),
    openJobs: rows.reduce((count, row) => count + row.openJobs, 0),
    total: add('total'),
    invoiced: add('invoiced'),
    margin: add('margin'),
    marginIsProvisional: rows.some((row) => row.marginIsProvisional),
    workInProgress: add('workInProgress'),
    lastWorkedOn: days.at(-1) || null,
  };
}
