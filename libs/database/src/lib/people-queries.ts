import { type Insertable, type Updateable } from 'kysely';
import { type EmployeeTable, type OperationTable, type OverheadRateTable, type PayRateTable } from './tables';
import { type ShopTransaction } from './tenancy';

/** All employees by number, those who have left last. */
export function listEmployeeRows(trx: ShopTransaction) {
  return selectEmployees(trx).orderBy('isActive', 'desc').orderBy('number').execute();
}

/** One employee. */
export function findEmployeeRow(trx: ShopTransaction, employeeId: string) {
  return selectEmployees(trx).where('employeeId', '=', employeeId).executeTakeFirst();
}

function selectEmployees(trx: ShopTransaction) {
  return trx.selectFrom('employee').select(['employeeId', 'number', 'name', 'isActive']);
}

/** Pay rates, latest first, of one employee or of all. */
export function listPayRateRows(trx: ShopTransaction, employeeId?: string) {
  return trx
    .selectFrom('payRate')
    .select(['payRateId', 'employeeId', 'validFrom', 'wagePerHour', 'burdenPercent'])
    .$if(employeeId !== undefined, (query) => query.where('employeeId', '=', employeeId ?? ''))
    .orderBy('validFrom', 'desc')
    .execute();
}

/** Remembered spellings of employees, of one or of all. */
export function listEmployeeAliases(trx: ShopTransaction, employeeId?: string) {
  return trx
    .selectFrom('nameAlias')
    .select(['aliasId', 'employeeId', 'spelling'])
    .where('kind', '=', 'employee')
    .$if(employeeId !== undefined, (query) => query.where('employeeId', '=', employeeId ?? ''))
    .orderBy('spelling')
    .execute();
}

/** Adds an employee. */
export async function insertEmployee(trx: ShopTransaction, row: Insertable<EmployeeTable>): Promise<void> {
  await trx.insertInto('employee').values(row).execute();
}

/** Changes an employee. */
export async function updateEmployeeRow(
  trx: ShopTransaction,
  employeeId: string,
  change: Updateable<EmployeeTable>,
): Promise<void> {
  await trx.updateTable('employee').set(change).where('employeeId', '=', employeeId).execute();
}

/** Adds a pay rate. */
export async function insertPayRate(trx: ShopTransaction, row: Insertable<PayRateTable>): Promise<void> {
  await trx.insertInto('payRate').values(row).execute();
}

/** Changes a pay rate of an employee; tells whether there was one. */
export async function updatePayRateRow(
  trx: ShopTransaction,
  employeeId: string,
  payRateId: string,
  change: Updateable<PayRateTable>,
): Promise<boolean> {
  const result = await trx
    .updateTable('payRate')
    .set(change)
    .where('employeeId', '=', employeeId)
    .where('payRateId', '=', payRateId)
    .executeTakeFirst();
  return result.numUpdatedRows > 0n;
}

/** Takes out a pay rate of an employee; tells whether there was one. */
export async function deletePayRateRow(
  trx: ShopTransaction,
  employeeId: string,
  payRateId: string,
): Promise<boolean> {
  const result = await trx
    .deleteFrom('payRate')
    .where('employeeId', '=', employeeId)
    .where('payRateId', '=', payRateId)
    .executeTakeFirst();
  return result.numDeletedRows > 0n;
}

/** The employee's first day with a wage; null without any rate. */
export async function findFirstPayDay(trx: ShopTransaction, employeeId: string): Promise<string | null> {
  const { firstDay } = await trx
    .selectFrom('payRate')
    .select((eb) => eb.fn.min<string | null>('validFrom').as('firstDay'))
    .where('employeeId', '=', employeeId)
    .executeTakeFirstOrThrow();
  return firstDay;
}

/** Live entries of an employee from a day on and, if there is an end, before it: how many, and their first and last day. */
export function countEntriesBetween(
  trx: ShopTransaction,
  employeeId: string,
  from: string,
  before: string | null,
) {
  return trx
    .selectFrom('timeEntry')
    .select((eb) => [
      eb.fn.countAll<number>().as('entries'),
      eb.fn.min<string | null>('workedOn').as('firstDay'),
      eb.fn.max<string | null>('workedOn').as('lastDay'),
    ])
    .where('employeeId', '=', employeeId)
    .where('voidedAt', 'is', null)
    .where('workedOn', '>=', from)
    .$if(before !== null, (query) => query.where('workedOn', '<', before ?? ''))
    .executeTakeFirstOrThrow();
}

/** Forgets a spelling, of whatever kind; tells whether there was one. */
export async function deleteAliasRow(trx: ShopTransaction, aliasId: string): Promise<boolean> {
  const result = await trx.deleteFrom('nameAlias').where('aliasId', '=', aliasId).executeTakeFirst();
  return result.numDeletedRows > 0n;
}

/** Overhead rates, latest first. */
export function listOverheadRateRows(trx: ShopTransaction) {
  return trx
    .selectFrom('overheadRate')
    .select(['overheadRateId', 'validFrom', 'ratePerLabourHour'])
    .orderBy('validFrom', 'desc')
    .execute();
}

/** Adds an overhead rate. */
export async function insertOverheadRate(
  trx: ShopTransaction,
  row: Insertable<OverheadRateTable>,
): Promise<void> {
  await trx.insertInto('overheadRate').values(row).execute();
}

/** Changes an overhead rate; tells whether there was one. */
export async function updateOverheadRateRow(
  trx: ShopTransaction,
  overheadRateId: string,
  change: Updateable<OverheadRateTable>,
): Promise<boolean> {
  const result = await trx
    .updateTable('overheadRate')
    .set(change)
    .where('overheadRateId', '=', overheadRateId)
    .executeTakeFirst();
  return result.numUpdatedRows > 0n;
}

/** Takes out an overhead rate; tells whether there was one. */
export async function deleteOverheadRateRow(trx: ShopTransaction, overheadRateId: string): Promise<boolean> {
  const result = await trx
    .deleteFrom('overheadRate')
    .where('overheadRateId', '=', overheadRateId)
    .executeTakeFirst();
  return result.numDeletedRows > 0n;
}

/** All operations by code, each with the code of its default machine. */
export function listOperationRows(trx: ShopTransaction) {
  return selectOperations(trx).orderBy('operation.code').execute();
}

/** One operation. */
export function findOperationRow(trx: ShopTransaction, operationId: string) {
  return selectOperations(trx).where('operation.operationId', '=', operationId).executeTakeFirst();
}

function selectOperations(trx: ShopTransaction) {
  return trx
    .selectFrom('operation')
    .leftJoin('machine', (join) =>
      join
        .onRef('machine.shopId', '=', 'operation.shopId')
        .onRef('machine.machineId', '=', 'operation.defaultMachineId'),
    )
    .select([
      'operation.operationId',
      'operation.code',
      'operation.name',
      'operation.defaultMachineId',
      'machine.code as defaultMachine',
    ]);
}

/** Adds an operation. */
export async function insertOperation(trx: ShopTransaction, row: Insertable<OperationTable>): Promise<void> {
  await trx.insertInto('operation').values(row).execute();
}

/** Changes an operation; tells whether there was one. */
export async function updateOperationRow(
  trx: ShopTransaction,
  operationId: string,
  change: Updateable<OperationTable>,
): Promise<boolean> {
  const result = await trx
    .updateTable('operation')
    .set(change)
    .where('operationId', '=', operationId)
    .executeTakeFirst();
  return result.numUpdatedRows > 0n;
}
