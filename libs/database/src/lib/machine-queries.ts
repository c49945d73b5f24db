import { type Insertable, type Selectable, sql, type Updateable } from 'kysely';
import {
  type MachineCostItemTable,
  type MachineRateBasisTable,
  type MachineRateTable,
  type MachineTable,
} from './tables';
import { type ShopTransaction } from './tenancy';

/** All machines by code, or the one asked for. */
export function listMachineRows(trx: ShopTransaction, machineId?: string) {
  return trx
    .selectFrom('machine')
    .select(['machineId', 'code', 'name', 'kind', 'inServiceOn', 'ratedForceKn', 'bedLengthMm'])
    .$if(machineId !== undefined, (query) => query.where('machineId', '=', machineId ?? ''))
    .orderBy('code')
    .execute();
}

/** Parts of landed cost by date, of one machine or of all. */
export function listMachineCostItemRows(trx: ShopTransaction, machineId?: string) {
  return trx
    .selectFrom('machineCostItem')
    .select(['machineCostItemId', 'machineId', 'incurredOn', 'kind', 'description', 'amount'])
    .$if(machineId !== undefined, (query) => query.where('machineId', '=', machineId ?? ''))
    .orderBy('incurredOn')
    .orderBy('machineCostItemId')
    .execute();
}

/** Rates, latest first, of one machine or of all. */
export function listMachineRateRows(trx: ShopTransaction, machineId?: string) {
  return trx
    .selectFrom('machineRate')
    .select([
      'machineRateId',
      'machineId',
      'validFrom',
      'machineHourRate',
      'chargeOutRate',
      'runningCostPerHour',
    ])
    .$if(machineId !== undefined, (query) => query.where('machineId', '=', machineId ?? ''))
    .orderBy('validFrom', 'desc')
    .execute();
}

/** Adds a machine. */
export async function insertMachine(trx: ShopTransaction, row: Insertable<MachineTable>): Promise<void> {
  await trx.insertInto('machine').values(row).execute();
}

/** Changes a machine. */
export async function updateMachineRow(
  trx: ShopTransaction,
  machineId: string,
  change: Updateable<MachineTable>,
): Promise<void> {
  await trx.updateTable('machine').set(change).where('machineId', '=', machineId).execute();
}

/** Adds to a machine's landed cost. */
export async function insertMachineCostItem(
  trx: ShopTransaction,
  row: Insertable<MachineCostItemTable>,
): Promise<void> {
  await trx.insertInto('machineCostItem').values(row).execute();
}

/** Changes a part of a machine's landed cost; tells whether there was one. */
export async function updateMachineCostItemRow(
  trx: ShopTransaction,
  machineId: string,
  machineCostItemId: string,
  change: Updateable<MachineCostItemTable>,
): Promise<boolean> {
  const result = await trx
    .updateTable('machineCostItem')
    .set(change)
    .where('machineId', '=', machineId)
    .where('machineCostItemId', '=', machineCostItemId)
    .executeTakeFirst();
  return result.numUpdatedRows > 0n;
}

/** Takes out a part of a machine's landed cost; tells whether there was one. */
export async function deleteMachineCostItemRow(
  trx: ShopTransaction,
  machineId: string,
  machineCostItemId: string,
): Promise<boolean> {
  const result = await trx
    .deleteFrom('machineCostItem')
    .where('machineId', '=', machineId)
    .where('machineCostItemId', '=', machineCostItemId)
    .executeTakeFirst();
  return result.numDeletedRows > 0n;
}

/** Adds rates of a machine. */
export async function insertMachineRate(
  trx: ShopTransaction,
  row: Insertable<MachineRateTable>,
): Promise<void> {
  await trx.insertInto('machineRate').values(row).execute();
}

/** Changes rates of a machine; tells whether there were any. */
export async function updateMachineRateRow(
  trx: ShopTransaction,
  machineId: string,
  machineRateId: string,
  change: Updateable<MachineRateTable>,
): Promise<boolean> {
  const result = await trx
    .updateTable('machineRate')
    .set(change)
    .where('machineId', '=', machineId)
    .where('machineRateId', '=', machineRateId)
    .executeTakeFirst();
  return result.numUpdatedRows > 0n;
}

/** Takes out rates of a machine; tells whether there were any. */
export async function deleteMachineRateRow(
  trx: ShopTransaction,
  machineId: string,
  machineRateId: string,
): Promise<boolean> {
  const result = await trx
    .deleteFrom('machineRate')
    .where('machineId', '=', machineId)
    .where('machineRateId', '=', machineRateId)
    .executeTakeFirst();
  return result.numDeletedRows > 0n;
}

/** A rate's basis, without the shop that the transaction is in anyway. */
export type MachineRateBasisRow = Omit<Selectable<MachineRateBasisTable>, 'shopId'>;

const BASIS_COLUMNS = [
  'price',
  'salvage',
  'lifeYears',
  'interestPercent',
  'floorAreaM2',
  'spaceCostPerM2Year',
  'insurancePerYear',
  'upkeepPerYear',
  'productiveHoursPerYear',
  'powerKw',
  'loadPercent',
  'tariffPerKwh',
  'consumablesPerHour',
] as const satisfies readonly (keyof MachineRateBasisTable)[];

/** What rates were built from, of one machine or of all; rates that were typed in have none. */
export function listMachineRateBasisRows(
  trx: ShopTransaction,
  machineId?: string,
): Promise<MachineRateBasisRow[]> {
  return trx
    .selectFrom('machineRateBasis')
    .select(['machineRateId', ...BASIS_COLUMNS])
    .$if(machineId !== undefined, (query) =>
      query.where('machineRateId', 'in', (eb) =>
        eb
          .selectFrom('machineRate')
          .select('machineRateId')
          .where('machineId', '=', machineId ?? ''),
      ),
    )
    .execute();
}

/** Keeps what a rate was built from, in place of what it was built from before. */
export async function saveMachineRateBasis(
  trx: ShopTransaction,
  row: Insertable<MachineRateBasisTable>,
): Promise<void> {
  await trx
    .insertInto('machineRateBasis')
    .values(row)
    .onConflict((conflict) =>
      conflict
        .columns(['shopId', 'machineRateId'])
        .doUpdateSet((eb) =>
          Object.fromEntries(BASIS_COLUMNS.map((column) => [column, eb.ref(`excluded.${column}`)])),
        ),
    )
    .execute();
}

/** Forgets what a rate was built from: it is typed in from now on. */
export async function deleteMachineRateBasis(trx: ShopTransaction, machineRateId: string): Promise<void> {
  await trx.deleteFrom('machineRateBasis').where('machineRateId', '=', machineRateId).execute();
}

/**
 * Hours that a machine ran on each day of a period, the day of the work and not that in the books, net of what late
 * lines take back, and with those that lack a rate; days without hours are left out.
 */
export async function listMachineHours(
  trx: ShopTransaction,
  machineId: string,
  from: string,
  to: string,
): Promise<{ workedOn: string; hours: string }[]> {
  // Lines that came late are found by the day of their work; all others by their day in the books.
  const { rows } = await sql<{ workedOn: string; hours: string }>`
    select worked_on, sum(quantity) as hours
    from (
      select worked_on, quantity, category, machine_id from cost_line
      where posted_on between ${from}::date and ${to}::date and posted_on = worked_on
      union all
      select worked_on, quantity, category, machine_id from cost_line
      where worked_on between ${from}::date and ${to}::date and posted_on <> worked_on
      union all
      select worked_on, hours, category, machine_id from rate_gap
      where worked_on between ${from}::date and ${to}::date
    ) line
    where category = 'machine' and machine_id = ${machineId}
    group by worked_on`.execute(trx);
  return rows;
}
