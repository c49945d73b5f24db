import { type Insertable, type Updateable } from 'kysely';
import { type MachineCostItemTable, type MachineRateTable, type MachineTable } from './tables';
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
