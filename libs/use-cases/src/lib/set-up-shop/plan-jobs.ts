import { type SetupFile } from '@brakeven/workbook';
import { type SetupDraft } from './setup-draft';
import { toStoredNumber } from './stored-number';
import { listStated } from './table-plan';

/** Customers are no more than their names. */
export function planCustomers(draft: SetupDraft, rows: SetupFile['customers']): void {
  for (const row of rows) {
    if (draft.tables.customer.hasStated(row.name)) {
      draft.refuseTwice('customers', row, 'name', `Customer '${row.name}'`);
      continue;
    }
    draft.count('customers', draft.tables.customer.state(row.name, {}, { name: row.name }).verdict);
  }
}

/** Overhead rates, one a day. */
export function planOverhead(draft: SetupDraft, rows: SetupFile['overhead']): void {
  for (const row of rows) {
    if (draft.tables.overheadRate.hasStated(row.validFrom)) {
      draft.refuseTwice('overhead', row, 'validFrom', `An overhead rate from ${row.validFrom}`);
      continue;
    }
    const rate = { list: 'overhead', column: 'ratePerLabourHour', form: 'rate' } as const;
    const ratePerLabourHour = toStoredNumber(draft, row, rate, row.ratePerLabourHour);
    const values = { validFrom: row.validFrom, ratePerLabourHour };
    draft.count('overhead', draft.tables.overheadRate.state(row.validFrom, values).verdict);
  }
}

type JobRow = SetupFile['jobs'][number];

const NEW_JOB = {
  customerId: null,
  quantity: null,
  openedOn: null,
  dueOn: null,
  quotedPrice: null,
  status: 'open',
} as const;
const QUANTITY_MAX = 2_147_483_647;

/**
 * Jobs; what a row leaves blank stays as the shop has it. `isStated` says whether a cell holds anything, since a
 * blank status is read as open, which must not reopen a job that has been finished meanwhile.
 */
export function planJobs(
  draft: SetupDraft,
  rows: SetupFile['jobs'],
  isStated: (address: string | undefined) => boolean,
): void {
  for (const row of rows) {
    if (draft.tables.job.hasStated(row.number)) {
      draft.refuseTwice('jobs', row, 'number', `Job ${row.number}`);
      continue;
    }
    const customerId = findCustomer(draft, row);
    if (customerId === undefined || !checkQuantity(draft, row)) continue;
    const money = { list: 'jobs', column: 'quotedPrice', form: 'money' } as const;
    const stated = listStated({
      customerId,
      title: row.title,
      quantity: row.quantity,
      openedOn: row.openedOn,
      dueOn: row.dueOn,
      quotedPrice: toStoredNumber(draft, row, money, row.quotedPrice),
      isBillable: row.isBillable,
      status: isStated(row.cells['status']) ? row.status : null,
    });
    const defaults = { ...NEW_JOB, number: row.number, title: row.number };
    draft.count('jobs', draft.tables.job.state(row.number, stated, defaults).verdict);
  }
}

/** Null for a job without a customer, undefined for one whose customer is not known. */
function findCustomer(draft: SetupDraft, row: JobRow): string | null | undefined {
  if (row.customer === null) return null;
  const customerId = draft.tables.customer.findId(row.customer);
  if (customerId !== undefined) return customerId;
  const message = `Customer '${row.customer}' of job ${row.number} stands neither on sheet Customers nor in the shop. Add the customer to Customers or correct the name.`;
  draft.refuse('jobs', row, 'customer', { code: 'customer_unknown', message });
  return undefined;
}

function checkQuantity(draft: SetupDraft, row: JobRow): boolean {
  if (row.quantity === null || (row.quantity > 0 && row.quantity <= QUANTITY_MAX)) return true;
  const message = `${row.quantity} is no quantity of a job. Write pieces such as 24, or leave the cell empty.`;
  draft.refuse('jobs', row, 'quantity', { code: 'quantity_out_of_range', message });
  return false;
}
