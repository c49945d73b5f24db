import {
  AppError,
  type Employee,
  type EmployeeCreate,
  type EmployeePatch,
  type PayRate,
} from '@brakeven/contract';
import {
  deleteAliasRow,
  findEmployeeRow,
  insertEmployee,
  insertPayRate,
  listEmployeeAliases,
  listEmployeeRows,
  listPayRateRows,
  type ShopTransaction,
  updateEmployeeRow,
} from '@brakeven/database';
import { percentText, rateText, toPercent, toRate } from '@brakeven/values';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';
import { refusingConflicts } from '../refuse-conflict';

const CONFLICTS = {
  employee_shop_id_number_key: { field: 'number', message: 'Another employee has this number.' },
};

/** All employees with their pay rates and other spellings, by number, those who have left last. */
export function listEmployees(context: ShopContext): Promise<Employee[]> {
  return inShopOf(context, async (trx) =>
    toEmployees(await listEmployeeRows(trx), await listPayRateRows(trx), await listEmployeeAliases(trx)),
  );
}

/**
 * Adds an employee with a first pay rate.
 * @throws AppError `conflict` (number taken)
 */
export function createEmployee(context: ShopContext, body: EmployeeCreate): Promise<Employee> {
  const { shopId } = context.shop;
  const employeeId = newId();
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await insertEmployee(trx, { shopId, employeeId, number: body.number, name: body.name });
      await insertPayRate(trx, { shopId, payRateId: newId(), employeeId, ...body.rate });
      return getEmployee(trx, employeeId);
    }),
  );
}

/**
 * Changes number, name or whether somebody still works here.
 * @throws AppError `not_found`, `conflict` (number taken)
 */
export function updateEmployee(
  context: ShopContext,
  { employeeId }: { employeeId: string },
  body: EmployeePatch,
): Promise<Employee> {
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      const { number, name, isActive } = await getEmployee(trx, employeeId);
      await updateEmployeeRow(trx, employeeId, {
        number: body.number ?? number,
        name: body.name ?? name,
        isActive: body.isActive ?? isActive,
      });
      return getEmployee(trx, employeeId);
    }),
  );
}

/**
 * Forgets another spelling; entries that came in by it stay.
 * @throws AppError `not_found`
 */
export async function deleteAlias(context: ShopContext, { aliasId }: { aliasId: string }): Promise<void> {
  const wasThere = await inShopOf(context, (trx) => deleteAliasRow(trx, aliasId));
  if (!wasThere) throw new AppError('not_found', 'This spelling is not remembered, or no longer.');
}

/**
 * One employee as the screens see it.
 * @throws AppError `not_found`
 */
export async function getEmployee(trx: ShopTransaction, employeeId: string): Promise<Employee> {
  const row = await findEmployeeRow(trx, employeeId);
  const [employee] = row
    ? toEmployees([row], await listPayRateRows(trx, employeeId), await listEmployeeAliases(trx, employeeId))
    : [];
  if (!employee) throw new AppError('not_found', 'There is no such employee.');
  return employee;
}

function toEmployees(
  employees: Awaited<ReturnType<typeof listEmployeeRows>>,
  rates: Awaited<ReturnType<typeof listPayRateRows>>,
  aliases: Awaited<ReturnType<typeof listEmployeeAliases>>,
): Employee[] {
  return employees.map((employee) => ({
    ...employee,
    rates: rates.filter(({ employeeId }) => employeeId === employee.employeeId).map(toPayRate),
    aliases: aliases
      .filter(({ employeeId }) => employeeId === employee.employeeId)
      .map(({ aliasId, spelling }) => ({ aliasId, spelling })),
  }));
}

function toPayRate(row: Awaited<ReturnType<typeof listPayRateRows>>[number]): PayRate {
  return {
    payRateId: row.payRateId,
    validFrom: row.validFrom,
    wagePerHour: rateText(toRate(row.wagePerHour)),
    burdenPercent: percentText(toPercent(row.burdenPercent)),
  };
}
