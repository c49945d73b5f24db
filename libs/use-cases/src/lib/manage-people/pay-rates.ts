import { AppError, type Employee, type PayRateInput } from '@brakeven/contract';
import {
  countEntriesBetween,
  deletePayRateRow,
  findFirstPayDay,
  insertPayRate,
  lockBooks,
  type ShopTransaction,
  updatePayRateRow,
} from '@brakeven/database';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';
import { refusingConflicts } from '../refuse-conflict';
import { getEmployee } from './employees';

const CONFLICTS = {
  pay_rate_shop_id_employee_id_valid_from_key: {
    field: 'validFrom',
    message: 'There is already a rate from this day on. Correct that one.',
  },
};

/**
 * Adds a pay rate from a day on.
 * @throws AppError `not_found` (employee), `conflict` (a rate from that day is there)
 */
export function createPayRate(
  context: ShopContext,
  { employeeId }: { employeeId: string },
  body: PayRateInput,
): Promise<Employee> {
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await getEmployee(trx, employeeId);
      await insertPayRate(trx, { shopId: context.shop.shopId, payRateId: newId(), employeeId, ...body });
      return getEmployee(trx, employeeId);
    }),
  );
}

/**
 * Corrects a pay rate; the days that it prices are costed anew by the next rollup.
 * @throws AppError `not_found`, `conflict`, `rate_needed` if an entry would be left without a wage
 */
export function updatePayRate(
  context: ShopContext,
  { employeeId, payRateId }: { employeeId: string; payRateId: string },
  body: PayRateInput,
): Promise<Employee> {
  return changeRates(context, employeeId, 'validFrom', (trx) =>
    updatePayRateRow(trx, employeeId, payRateId, body),
  );
}

/**
 * Takes a pay rate out.
 * @throws AppError `not_found`, `rate_needed` if an entry would be left without a wage
 */
export function deletePayRate(
  context: ShopContext,
  { employeeId, payRateId }: { employeeId: string; payRateId: string },
): Promise<Employee> {
  return changeRates(context, employeeId, 'payRateId', (trx) => deletePayRateRow(trx, employeeId, payRateId));
}

/** Changes rates while no import can add entries, and refuses if an entry that had a wage has none then. */
function changeRates(
  context: ShopContext,
  employeeId: string,
  field: string,
  change: (trx: ShopTransaction) => Promise<boolean>,
): Promise<Employee> {
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await lockBooks(trx, context.shop.shopId);
      const before = await findFirstPayDay(trx, employeeId);
      if (!(await change(trx))) throw new AppError('not_found', 'There is no such rate.');
      const after = await findFirstPayDay(trx, employeeId);
      if (before !== null && (after === null || after > before)) {
        await assertNoEntryLosesItsWage(trx, employeeId, { before, after, field });
      }
      return getEmployee(trx, employeeId);
    }),
  );
}

async function assertNoEntryLosesItsWage(
  trx: ShopTransaction,
  employeeId: string,
  { before, after, field }: { before: string; after: string | null; field: string },
): Promise<void> {
  const { entries, firstDay, lastDay } = await countEntriesBetween(trx, employeeId, before, after);
  if (entries === 0) return;
  const days = firstDay === lastDay ? `on ${firstDay}` : `from ${firstDay} to ${lastDay}`;
  const noun = entries === 1 ? 'entry' : 'entries';
  const message = `${entries} time ${noun} ${days} would be left without a wage. Add an earlier rate first.`;
  throw new AppError('rate_needed', message, { issues: [{ field, code: 'rate_needed', message }] });
}
