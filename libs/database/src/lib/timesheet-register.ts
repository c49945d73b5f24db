import { sql } from 'kysely';
import { type NameAliasTable } from './tables';
import { type ShopTransaction } from './tenancy';

export interface RegisteredEmployee {
  employeeId: string;
  number: string;
  name: string;
  /** The day of the first pay rate; null if there is none. */
  firstRateOn: string | null;
}
export interface RegisteredJob {
  jobId: string;
  number: string;
  title: string;
  status: string;
}
export interface RegisteredOperation {
  operationId: string;
  code: string;
  name: string;
}
export interface RegisteredMachine {
  machineId: string;
  code: string;
  name: string;
}
export interface RegisteredAlias {
  aliasId: string;
  kind: NameAliasTable['kind'];
  spelling: string;
  targetId: string;
}

/** Everything that the names of a timesheet can stand for. */
export interface TimesheetRegister {
  employees: RegisteredEmployee[];
  jobs: RegisteredJob[];
  operations: RegisteredOperation[];
  machines: RegisteredMachine[];
  aliases: RegisteredAlias[];
}

/** Reads the shop's people, jobs, operations, machines and remembered spellings whole: five small statements. */
export async function readTimesheetRegister(
  trx: ShopTransaction,
  shopId: string,
): Promise<TimesheetRegister> {
  return {
    employees: await listEmployees(trx, shopId),
    jobs: await trx
      .selectFrom('job')
      .select(['jobId', 'number', 'title', 'status'])
      .where('shopId', '=', shopId)
      .orderBy('number')
      .execute(),
    operations: await trx
      .selectFrom('operation')
      .select(['operationId', 'code', 'name'])
      .where('shopId', '=', shopId)
      .orderBy('code')
      .execute(),
    machines: await trx
      .selectFrom('machine')
      .select(['machineId', 'code', 'name'])
      .where('shopId', '=', shopId)
      .orderBy('code')
      .execute(),
    aliases: await listAliases(trx, shopId),
  };
}

function listEmployees(trx: ShopTransaction, shopId: string): Promise<RegisteredEmployee[]> {
  return trx
    .selectFrom('employee as e')
    .leftJoin('payRate as r', (join) =>
      join.onRef('r.shopId', '=', 'e.shopId').onRef('r.employeeId', '=', 'e.employeeId'),
    )
    .select(({ fn }) => ['e.employeeId', 'e.number', 'e.name', fn.min('r.validFrom').as('firstRateOn')])
    .where('e.shopId', '=', shopId)
    .groupBy(['e.employeeId', 'e.number', 'e.name'])
    .orderBy('e.number')
    .execute();
}

function listAliases(trx: ShopTransaction, shopId: string): Promise<RegisteredAlias[]> {
  return trx
    .selectFrom('nameAlias')
    .select([
      'aliasId',
      'kind',
      'spelling',
      sql<string>`coalesce(employee_id, job_id, operation_id, machine_id)`.as('targetId'),
    ])
    .where('shopId', '=', shopId)
    .orderBy('aliasId')
    .execute();
}
